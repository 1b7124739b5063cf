import { type Corner, resizeBox } from '#shared/domain/board/geometry.ts'
import { PRINT_INSET } from '#shared/domain/board/print.ts'
import type { Box } from '#shared/domain/board/schema.ts'
import { type WallControl, announce } from '../wall-control.ts'
import type { WallItem } from '../wall-item.ts'
import { dropHeld, letGo, presentDrag } from './drag-items.ts'

export type Resize = { move(dx: number, dy: number): void; drop(): void; cancel(): void }

/** Least side of each kind, wall units. */
const LEAST: Readonly<Record<WallItem['kind'], number>> = { frame: 64, note: 60, tag: 110, area: 80, palette: 32 }

/** The box of a thing whose corner is pulled by (dx, dy) wall units; a frame keeps its picture's proportions. */
export function resized(entry: WallItem, corner: Corner, dx: number, dy: number): Box {
  const isFrame = entry.kind === 'frame'
  return resizeBox(entry.box, corner, dx, dy, {
    keepAspect: isFrame,
    min: LEAST[entry.kind],
    ...(isFrame ? { inset: PRINT_INSET } : {}),
  })
}

export function startResize(control: WallControl, entry: WallItem, corner: Corner): Resize {
  return {
    move(dx, dy) {
      const held = new Map([[entry.id, resized(entry, corner, dx, dy)]])
      control.state.own.set(held)
      presentDrag(control, held)
    },
    drop() {
      const box = control.state.own.get(entry.id)
      if (dropHeld(control) && box) {
        announce(control, `${control.nameOf([entry])} is now ${Math.round(box[2])} by ${Math.round(box[3])}`)
      }
    },
    cancel: () => letGo(control),
  }
}
