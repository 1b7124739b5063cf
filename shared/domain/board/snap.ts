import { bottomOf, rightOf } from './geometry.ts'
import type { Box } from './schema.ts'

/** A line on the wall along which something has just snapped: `x` is upright at `at`, `y` is level. Wall units. */
export type Guide = { axis: 'x' | 'y'; at: number; from: number; to: number }
export type Snap = { dx: number; dy: number; guides: Guide[] }

/** Start, middle and end of a box along an axis. */
function linesOf(box: Box, axis: 0 | 1): readonly [number, number, number] {
  const size = axis === 0 ? box[2] : box[3]
  return [box[axis], box[axis] + size / 2, box[axis] + size]
}

function nearest(moving: Box, others: readonly Box[], axis: 0 | 1, tolerance: number) {
  let best: { by: number; at: number; other: Box } | null = null
  const own = linesOf(moving, axis)
  for (const other of others) {
    for (const [i, line] of linesOf(other, axis).entries()) {
      for (const [j, mine] of own.entries()) {
        // A middle lines up with a middle; an edge with either edge.
        if ((i === 1) !== (j === 1)) continue
        const by = line - mine
        if (Math.abs(by) <= tolerance && (best === null || Math.abs(by) < Math.abs(best.by)))
          best = { by, at: line, other }
      }
    }
  }
  return best
}

/**
 * How far a box being moved should still go so that an edge or its middle lines up with a neighbour's, at most
 * `tolerance` wall units on each axis, and the guides to draw.
 */
export function snapBox(moving: Box, others: readonly Box[], tolerance: number): Snap {
  const x = nearest(moving, others, 0, tolerance)
  const y = nearest(moving, others, 1, tolerance)
  const dx = x?.by ?? 0
  const dy = y?.by ?? 0
  const at: Box = [moving[0] + dx, moving[1] + dy, moving[2], moving[3]]
  const guides: Guide[] = []
  if (x)
    guides.push({
      axis: 'x',
      at: x.at,
      from: Math.min(at[1], x.other[1]),
      to: Math.max(bottomOf(at), bottomOf(x.other)),
    })
  if (y)
    guides.push({ axis: 'y', at: y.at, from: Math.min(at[0], y.other[0]), to: Math.max(rightOf(at), rightOf(y.other)) })
  return { dx, dy, guides }
}
