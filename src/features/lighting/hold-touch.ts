/**
 * Keeps the page from scrolling under a finger that holds a part of a drawing, while it still scrolls from anywhere
 * else. `touch-action` is not honoured inside an SVG everywhere, and React listens to touches passively.
 */
export function holdTouch(drawing: SVGSVGElement | null): (() => void) | undefined {
  if (!drawing) return undefined
  const handle = (event: TouchEvent) => {
    if (event.cancelable && event.target instanceof Element && event.target.closest('[data-movable]'))
      event.preventDefault()
  }
  drawing.addEventListener('touchstart', handle, { passive: false })
  return () => drawing.removeEventListener('touchstart', handle)
}
