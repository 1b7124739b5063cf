export type Stacked = { id: string; z: number }

/** New heights that lift these above everything else, their own order kept. Only what changes. */
export function toFront(items: readonly Stacked[], ids: ReadonlySet<string>): Map<string, number> {
  const others = items.filter((item) => !ids.has(item.id))
  const top = others.reduce((max, item) => Math.max(max, item.z), -Infinity)
  return restack(items, ids, Number.isFinite(top) ? Math.floor(top) + 1 : 0)
}

/** New heights that put these below everything else, their own order kept. Only what changes. */
export function toBack(items: readonly Stacked[], ids: ReadonlySet<string>): Map<string, number> {
  const others = items.filter((item) => !ids.has(item.id))
  const bottom = others.reduce((min, item) => Math.min(min, item.z), Infinity)
  const count = items.length - others.length
  return restack(items, ids, Number.isFinite(bottom) ? Math.ceil(bottom) - count : 0)
}

function restack(items: readonly Stacked[], ids: ReadonlySet<string>, from: number): Map<string, number> {
  const own = items.filter((item) => ids.has(item.id)).sort((a, b) => a.z - b.z || (a.id < b.id ? -1 : 1))
  const heights = new Map<string, number>()
  for (const [i, item] of own.entries()) if (item.z !== from + i) heights.set(item.id, from + i)
  return heights
}

/** A height above all of these. */
export function topOf(items: readonly { z: number }[]): number {
  return items.reduce((max, item) => Math.max(max, Math.floor(item.z) + 1), 0)
}
