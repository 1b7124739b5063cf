import type { Point } from './geometry.ts'
import { bottomOf, growBox, overlaps, rightOf } from './geometry.ts'
import type { Box } from './schema.ts'

export type Size = { w: number; h: number }

/**
 * Places for new things on the wall: in rows from `start`, not wider than `width` wall units, `gap` apart, over nothing
 * that hangs there already and not over each other. One box for each size, in the order given.
 */
export function arrangeNew(
  sizes: readonly Size[],
  occupied: readonly Box[],
  start: Point,
  width: number,
  gap = 20,
): Box[] {
  const taken = occupied.filter((box) => bottomOf(box) > start.y - gap)
  const placed: Box[] = []
  let x = start.x
  let y = start.y
  // Lowest edge that something in this row ends at: the next row begins there, so it always goes down.
  let rowEnd = Infinity
  for (const size of sizes) {
    for (;;) {
      if (x > start.x && x + size.w > start.x + width) {
        y = (Number.isFinite(rowEnd) ? rowEnd : y + size.h) + gap
        x = start.x
        rowEnd = Infinity
      }
      const box: Box = [x, y, size.w, size.h]
      const room = growBox(box, gap - 1)
      const blocker = taken.find((other) => overlaps(room, other))
      if (!blocker) {
        placed.push(box)
        taken.push(box)
        rowEnd = Math.min(rowEnd, bottomOf(box))
        x += size.w + gap
        break
      }
      rowEnd = Math.min(rowEnd, Math.max(y + 1 - gap, bottomOf(blocker)))
      x = Math.max(x + 1, rightOf(blocker) + gap)
    }
  }
  return placed
}
