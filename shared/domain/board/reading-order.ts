import { bottomOf, centreOf, containsPoint, rightOf, type Placed } from './geometry.ts'
import type { Box } from './schema.ts'

export type Direction = 'left' | 'right' | 'up' | 'down'

/** In rows from the top, each row from the left: who starts above the middle of a row's first item belongs to that row. */
export function readingOrder<T extends Placed>(items: readonly T[]): T[] {
  const byTop = [...items].sort((a, b) => a.box[1] - b.box[1] || a.box[0] - b.box[0] || (a.id < b.id ? -1 : 1))
  const rows: T[][] = []
  let rowMiddle = -Infinity
  for (const item of byTop) {
    const row = rows.at(-1)
    if (row && item.box[1] < rowMiddle) row.push(item)
    else {
      rows.push([item])
      rowMiddle = centreOf(item.box).y
    }
  }
  return rows.flatMap((row) => row.sort((a, b) => a.box[0] - b.box[0] || (a.id < b.id ? -1 : 1)))
}

/**
 * Id of the area something hangs in: the smallest area that holds its middle; else the nearest one whose title stands
 * above it and whose line reaches over its middle, at most `reach` wall units up; else null.
 */
export function areaOf(box: Box, areas: readonly Placed[], reach = 1200): string | null {
  const middle = centreOf(box)
  let inside: Placed | null = null
  let above: Placed | null = null
  for (const area of areas) {
    const surface = (b: Box) => b[2] * b[3]
    if (containsPoint(area.box, middle)) {
      if (!inside || surface(area.box) < surface(inside.box)) inside = area
    } else if (middle.x >= area.box[0] && middle.x <= rightOf(area.box) && middle.y > area.box[1]) {
      if (middle.y - bottomOf(area.box) <= reach && (!above || area.box[1] > above.box[1])) above = area
    }
  }
  return inside?.id ?? above?.id ?? null
}

export type AreaGroup<A, T> = { area: A | null; items: T[] }

/** Everything on the wall by area: areas in reading order, what hangs in each in reading order, the rest last. */
export function byArea<A extends Placed, T extends Placed>(
  areas: readonly A[],
  items: readonly T[],
): AreaGroup<A, T>[] {
  const groups = new Map<string | null, T[]>()
  for (const item of items) {
    const id = areaOf(item.box, areas)
    const list = groups.get(id)
    if (list) list.push(item)
    else groups.set(id, [item])
  }
  const ordered: AreaGroup<A, T>[] = readingOrder(areas).map((area) => ({
    area,
    items: readingOrder(groups.get(area.id) ?? []),
  }))
  const rest = groups.get(null)
  return rest ? [...ordered, { area: null, items: readingOrder(rest) }] : ordered
}

/** The next item when going from a box in a direction: near and straight ahead beats far or aside; null at the end. */
export function nextInDirection(from: Box, items: readonly Placed[], direction: Direction): string | null {
  const start = centreOf(from)
  let best: { id: string; cost: number } | null = null
  for (const { id, box } of items) {
    const to = centreOf(box)
    const dx = to.x - start.x
    const dy = to.y - start.y
    const ahead = { left: -dx, right: dx, up: -dy, down: dy }[direction]
    const aside = Math.abs(direction === 'left' || direction === 'right' ? dy : dx)
    if (ahead <= 1 || aside > ahead * 3) continue
    const cost = ahead + aside * 2
    if (!best || cost < best.cost) best = { id, cost }
  }
  return best?.id ?? null
}
