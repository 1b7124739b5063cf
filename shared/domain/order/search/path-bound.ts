import { type Compiled, at, item } from './compiled.ts'

/** Above this many shots the tables of the bound (2^n · n) are too large. */
export const PATH_BOUND_MAX = 16

/**
 * The least that is left to do: for a set of shots behind us and the last of them, the minutes from its end to the wrap
 * (shots and changeovers; no windows, no waiting for others, no meal) and the lighting changes to come. Dynamic
 * programming over sets (Held and Karp 1962, from memory); Infinity where the rest cannot keep the rules about places.
 */
export type PathBound = {
  minutes(mask: number, last: number): number
  lights(mask: number, last: number): number
}

/** `strict`: orders that break a rule about places (after, place pins, together) are no way on. */
export function pathBound(c: Compiled, strict: boolean): PathBound {
  return c.n <= PATH_BOUND_MAX ? exactBound(c, strict) : looseBound(c, strict)
}

function exactBound(c: Compiled, strict: boolean): PathBound {
  const { n } = c
  const full = 2 ** n - 1
  const minutes = new Float64Array((full + 1) * n).fill(Infinity)
  const lights = new Uint8Array((full + 1) * n).fill(255)
  const allowed = strict ? orderRules(c) : null
  for (let last = 0; last < n; last++) {
    minutes[full * n + last] = 0
    lights[full * n + last] = 0
  }
  for (let mask = full - 1; mask > 0; mask--) {
    for (let last = 0; last < n; last++) {
      if ((mask & (1 << last)) === 0) continue
      let best = Infinity
      let fewest = 255
      for (let next = 0; next < n; next++) {
        const bit = 1 << next
        if ((mask & bit) !== 0 || (allowed !== null && !allowed(mask, last, next))) continue
        const cell = (mask | bit) * n + next
        const rest = at(minutes, cell)
        if (rest === Infinity) continue
        const way = (last + 1) * n + next
        best = Math.min(best, at(c.least, way) + at(c.minutes, next) + rest)
        fewest = Math.min(fewest, at(c.light, way) + at(lights, cell))
      }
      minutes[mask * n + last] = best
      lights[mask * n + last] = fewest
    }
  }
  return { minutes: (mask, last) => at(minutes, mask * n + last), lights: (mask, last) => at(lights, mask * n + last) }
}

/**
 * For many shots: every shot to come is entered once and all of them but one are left once, so the least ways in, and of
 * what then remains the least ways out but the dearest, have to be paid (reduction of the matrix). Kept by set and last.
 */
function looseBound(c: Compiled, strict: boolean): PathBound {
  const { n } = c
  const ways = Float64Array.from(c.least)
  if (strict) {
    c.after.forEach((shots, shot) => {
      for (const before of shots) ways[(shot + 1) * n + before] = Infinity
    })
  }
  const known = new Map<number, number>()
  const rest = new Int32Array(n)
  const into = new Float64Array(n)
  const compute = (mask: number, last: number): number => {
    let count = 0
    for (let shot = 0; shot < n; shot++) if ((mask & (1 << shot)) === 0) rest[count++] = shot
    let total = 0
    for (let j = 0; j < count; j++) {
      const to = at(rest, j)
      let least = at(ways, (last + 1) * n + to)
      for (let i = 0; i < count; i++) if (i !== j) least = Math.min(least, at(ways, (at(rest, i) + 1) * n + to))
      into[j] = least
      total += least + at(c.minutes, to)
    }
    if (total === Infinity || count === 0) return total
    let dearest = 0
    for (let i = -1; i < count; i++) {
      const from = i < 0 ? last : at(rest, i)
      let least = Infinity
      for (let j = 0; j < count; j++)
        if (i !== j) least = Math.min(least, at(ways, (from + 1) * n + at(rest, j)) - at(into, j))
      if (least === Infinity) least = 0
      total += least
      if (i >= 0) dearest = Math.max(dearest, least)
    }
    return total - dearest
  }
  const minutes = (mask: number, last: number) => {
    const key = mask * n + last
    let value = known.get(key)
    if (value === undefined) {
      value = compute(mask, last)
      known.set(key, value)
    }
    return value
  }
  return { minutes, lights: () => 0 }
}

/** Whether `next` may follow `last` when the shots in `mask` are done, by the rules about places alone. */
export function orderRules(c: Compiled): (mask: number, last: number, next: number) => boolean {
  const before = Int32Array.from(c.after, (shots) => shots.reduce((mask, shot) => mask | (1 << shot), 0))
  const pinnedAt = new Int16Array(c.n).fill(-1)
  c.places.forEach((places, shot) => {
    for (const place of places) pinnedAt[place] = at(pinnedAt, place) === -1 || at(pinnedAt, place) === shot ? shot : -2
  })
  const blocks = c.together.map((shots) => shots.reduce((mask, shot) => mask | (1 << shot), 0))
  return (mask, last, next) => {
    if ((at(before, next) & ~mask) !== 0) return false
    const place = bitCount(mask)
    const pinned = at(pinnedAt, place)
    if (pinned !== -1 && pinned !== next) return false
    for (const own of item(c.places, next)) if (own !== place) return false
    if (last < 0) return true
    for (const block of blocks) {
      if ((block & (1 << last)) !== 0 && (block & ~mask) !== 0 && (block & (1 << next)) === 0) return false
    }
    return true
  }
}

export function bitCount(mask: number): number {
  let count = 0
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++
  return count
}
