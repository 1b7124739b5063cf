import { panBy, wheelFactor, zoomAt } from '#shared/domain/board/view.ts'
import type { WallControl } from '../wall-control.ts'
import { setView } from '../wall-state.ts'

const LINE_PX = 16

/** Wheel and trackpad: scrolling pans, with Ctrl or Command (and a pinch on a trackpad) it zooms at the pointer. */
export function attachWheel(element: HTMLElement, { state }: WallControl): () => void {
  const handleWheel = (event: WheelEvent) => {
    event.preventDefault()
    const unit =
      event.deltaMode === WheelEvent.DOM_DELTA_LINE ? LINE_PX : event.deltaMode === WheelEvent.DOM_DELTA_PAGE ? 400 : 1
    if (event.ctrlKey || event.metaKey) {
      const edges = element.getBoundingClientRect()
      const px = { x: event.clientX - edges.left, y: event.clientY - edges.top }
      // A trackpad's pinch comes in small steps, a wheel's notch in one of a hundred.
      const step = Math.abs(event.deltaY) < 40 ? event.deltaY * 3 : event.deltaY
      setView(state, zoomAt(state.view.get(), px, wheelFactor(step * unit)))
      return
    }
    const sideways = event.shiftKey && event.deltaX === 0
    const dx = sideways ? event.deltaY : event.deltaX
    const dy = sideways ? 0 : event.deltaY
    setView(state, panBy(state.view.get(), -dx * unit, -dy * unit))
  }
  element.addEventListener('wheel', handleWheel, { passive: false })
  return () => element.removeEventListener('wheel', handleWheel)
}
