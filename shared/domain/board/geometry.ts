import type { Box } from './schema.ts'

/** A point on the wall, wall units (one unit is one CSS pixel at zoom 1). */
export type Point = { x: number; y: number }

/** A box with the id of what hangs there. */
export type Placed = { id: string; box: Box }

/** Smallest and largest side the schema allows, wall units. */
const MIN_SIDE = 8
const MAX_SIDE = 2e4
const FARTHEST = 1e6

export const rightOf = (box: Box): number => box[0] + box[2]
export const bottomOf = (box: Box): number => box[1] + box[3]

/** Middle of a box. */
export function centreOf(box: Box): Point {
  return { x: box[0] + box[2] / 2, y: box[1] + box[3] / 2 }
}

/** A box whose numbers are finite, inside the wall's outer bounds and rounded to a tenth of a unit. */
export function tidyBox(box: Box): Box {
  const round = (value: number) => Math.round(value * 10) / 10
  const at = (value: number) => Math.min(FARTHEST, Math.max(-FARTHEST, round(Number.isFinite(value) ? value : 0)))
  const side = (value: number) =>
    Math.min(MAX_SIDE, Math.max(MIN_SIDE, round(Number.isFinite(value) ? value : MIN_SIDE)))
  return [at(box[0]), at(box[1]), side(box[2]), side(box[3])]
}

/** The same box, moved. */
export function moveBox(box: Box, dx: number, dy: number): Box {
  return [box[0] + dx, box[1] + dy, box[2], box[3]]
}

/** The box grown by a margin on every side. */
export function growBox(box: Box, by: number): Box {
  return [box[0] - by, box[1] - by, box[2] + 2 * by, box[3] + 2 * by]
}

/** The box between two opposite corners, in any order. */
export function boxBetween(a: Point, b: Point): Box {
  return [Math.min(a.x, b.x), Math.min(a.y, b.y), Math.abs(a.x - b.x), Math.abs(a.y - b.y)]
}

/** Whether two boxes share any surface; touching edges do not count. */
export function overlaps(a: Box, b: Box): boolean {
  return a[0] < rightOf(b) && b[0] < rightOf(a) && a[1] < bottomOf(b) && b[1] < bottomOf(a)
}

/** Whether a point lies in a box, edges included. */
export function containsPoint(box: Box, point: Point): boolean {
  return point.x >= box[0] && point.x <= rightOf(box) && point.y >= box[1] && point.y <= bottomOf(box)
}

/** Smallest box around all of these, or null for none. */
export function boundsOf(boxes: Iterable<Box>): Box | null {
  let left = Infinity
  let top = Infinity
  let right = -Infinity
  let bottom = -Infinity
  for (const box of boxes) {
    left = Math.min(left, box[0])
    top = Math.min(top, box[1])
    right = Math.max(right, rightOf(box))
    bottom = Math.max(bottom, bottomOf(box))
  }
  return left === Infinity ? null : [left, top, right - left, bottom - top]
}

/** Ids of all that a marquee touches. */
export function touchedBy(marquee: Box, items: readonly Placed[]): string[] {
  return items.filter((item) => overlaps(marquee, item.box)).map((item) => item.id)
}

/** What lies under a point, the topmost first: highest `z`, then the later in the list. */
export function hitTest(point: Point, items: readonly (Placed & { z: number })[]): string | null {
  let top: { id: string; z: number } | null = null
  for (const item of items) {
    if (containsPoint(item.box, point) && (top === null || item.z >= top.z)) top = item
  }
  return top?.id ?? null
}

/** A corner of a box, as two letters: top or bottom, left or right. */
export const CORNERS = ['tl', 'tr', 'bl', 'br'] as const
export type Corner = (typeof CORNERS)[number]

/**
 * A box whose corner was dragged by (dx, dy) wall units while the opposite corner stays.
 *
 * `inset` is what of the box does not scale (a print's edge and caption), wall units: with `keepAspect` the rest keeps
 * its proportions, led by the larger of the two movements. No side goes below `min`.
 */
export function resizeBox(
  box: Box,
  corner: Corner,
  dx: number,
  dy: number,
  options: { keepAspect: boolean; min: number; inset?: { w: number; h: number } },
): Box {
  const fromLeft = corner === 'tl' || corner === 'bl'
  const fromTop = corner === 'tl' || corner === 'tr'
  let w = Math.max(options.min, box[2] + (fromLeft ? -dx : dx))
  let h = Math.max(options.min, box[3] + (fromTop ? -dy : dy))
  if (options.keepAspect) {
    const inset = options.inset ?? { w: 0, h: 0 }
    const innerW = Math.max(1, box[2] - inset.w)
    const innerH = Math.max(1, box[3] - inset.h)
    const least = Math.max((options.min - inset.w) / innerW, (options.min - inset.h) / innerH)
    const byW = (w - inset.w) / innerW
    const byH = (h - inset.h) / innerH
    const scale = Math.max(least, Math.abs(byW - 1) >= Math.abs(byH - 1) ? byW : byH)
    w = innerW * scale + inset.w
    h = innerH * scale + inset.h
  }
  return [fromLeft ? rightOf(box) - w : box[0], fromTop ? bottomOf(box) - h : box[1], w, h]
}
