import { boundsOf } from '#shared/domain/board/geometry.ts'
import type { Box } from '#shared/domain/board/schema.ts'
import { fitBox, zoomAt } from '#shared/domain/board/view.ts'
import type { WallControl } from '../wall-control.ts'
import { setView } from '../wall-state.ts'

/** Zooms by a factor around the middle of what is seen. */
export function zoomBy({ state }: WallControl, factor: number): void {
  const { widthPx, heightPx } = state.viewport.get()
  setView(state, zoomAt(state.view.get(), { x: widthPx / 2, y: heightPx / 2 }, factor))
}

/** Shows everything that hangs on the wall. */
export function fitAll({ state, items }: WallControl): void {
  const bounds = boundsOf([...items().values()].map((entry) => entry.box))
  setView(state, bounds ? fitBox(bounds, state.viewport.get(), 28) : { x: 0, y: 0, zoom: 1 })
}

/** Brings a box into the middle, at a zoom at which it can be read. */
export function goTo({ state }: WallControl, box: Box): void {
  const view = fitBox(box, state.viewport.get(), 80)
  const zoom = Math.min(view.zoom, Math.max(1, state.view.get().zoom))
  const { widthPx, heightPx } = state.viewport.get()
  setView(state, {
    x: box[0] + box[2] / 2 - widthPx / zoom / 2,
    y: box[1] + box[3] / 2 - heightPx / zoom / 2,
    zoom,
  })
}
