import { bottomOf, boundsOf, moveBox, rightOf, type Placed } from './geometry.ts'
import type { Box } from './schema.ts'

export const ALIGNMENTS = ['left', 'centre', 'right', 'top', 'middle', 'bottom'] as const
export type Alignment = (typeof ALIGNMENTS)[number]
export type Axis = 'across' | 'down'

/** New boxes of all that moves when these are lined up on an edge or the middle of their common bounds. */
export function align(items: readonly Placed[], alignment: Alignment): Map<string, Box> {
  const bounds = boundsOf(items.map((item) => item.box))
  const moved = new Map<string, Box>()
  if (!bounds) return moved
  for (const { id, box } of items) {
    const target: Record<Alignment, readonly [number, number]> = {
      left: [bounds[0], box[1]],
      centre: [bounds[0] + (bounds[2] - box[2]) / 2, box[1]],
      right: [rightOf(bounds) - box[2], box[1]],
      top: [box[0], bounds[1]],
      middle: [box[0], bounds[1] + (bounds[3] - box[3]) / 2],
      bottom: [box[0], bottomOf(bounds) - box[3]],
    }
    const [x, y] = target[alignment]
    if (x !== box[0] || y !== box[1]) moved.set(id, [x, y, box[2], box[3]])
  }
  return moved
}

/** New boxes of all that moves when the gaps between these are made equal; the two outermost stay. Below three, nothing. */
export function distribute(items: readonly Placed[], axis: Axis): Map<string, Box> {
  const moved = new Map<string, Box>()
  if (items.length < 3) return moved
  const [at, size] = axis === 'across' ? ([0, 2] as const) : ([1, 3] as const)
  const sorted = [...items].sort((a, b) => a.box[at] + a.box[size] / 2 - (b.box[at] + b.box[size] / 2))
  const start = Math.min(...items.map(({ box }) => box[at]))
  const end = Math.max(...items.map(({ box }) => box[at] + box[size]))
  const filled = items.reduce((sum, { box }) => sum + box[size], 0)
  const gap = (end - start - filled) / (items.length - 1)
  let next = start
  for (const { id, box } of sorted) {
    const by = next - box[at]
    if (Math.abs(by) > 1e-9) moved.set(id, axis === 'across' ? moveBox(box, by, 0) : moveBox(box, 0, by))
    next += box[size] + gap
  }
  return moved
}
