import type { Clock } from './clock.ts'
import { type Compiled, at, item } from './compiled.ts'
import { bitCount } from './path-bound.ts'

/** One way to have done a set of shots, with all that what follows depends on. */
export type Label = Clock & {
  shot: number
  before: Label | null
  broken: number
  /** Bits of the `together` rules that are broken already. */
  split: number
  must: number
  should: number
  light: number
  wait: number
  /** Element k: the least last shot of a run of k + 1 shots that is in the present order. */
  tails: Uint8Array
  /** For each need of the node: when the sitter would be ready for it. */
  ready: Float64Array
  /** No completion wraps before. */
  least: number
}

/** A look (or, with a limit on chairs, a sitter) that the rest of the day asks for. */
type Need = {
  sitter: number
  /** -1: any look, where chairs are limited. */
  look: number
  /** At least this long after the end of the last shot the sitter is not wanted. */
  notWithin: number
  started: boolean
}

/** All labels that have done the same shots and end with the same one. */
export type Node = {
  mask: number
  last: number
  labels: Label[]
  needs: readonly Need[]
  /** Sitters not begun yet with two shots or more to come: their waiting can still grow when they begin earlier. */
  growing: number
  complete: number
}

export type LabelTables = {
  wants: readonly { sitter: number; look: number; shots: number }[]
  ofSitter: Int32Array
  blocks: readonly number[]
}

export function labelTables(c: Compiled): LabelTables {
  const wants: { sitter: number; look: number; shots: number }[] = []
  const ofSitter = new Int32Array(c.sitters)
  c.wears.forEach((wears, shot) => {
    for (const wear of wears) {
      ofSitter[wear.sitter] = at(ofSitter, wear.sitter) | (1 << shot)
      const want = wants.find((candidate) => candidate.sitter === wear.sitter && candidate.look === wear.first)
      if (want) want.shots |= 1 << shot
      else wants.push({ sitter: wear.sitter, look: wear.first, shots: 1 << shot })
    }
  })
  wants.sort((a, b) => a.sitter - b.sitter || a.look - b.look)
  const blocks = c.together.map((shots) => shots.reduce((mask, shot) => mask | (1 << shot), 0))
  return { wants, ofSitter, blocks }
}

export function makeNode(c: Compiled, tables: LabelTables, mask: number, last: number): Node {
  const needs: Need[] = []
  const limited = c.chairs !== null
  for (const want of tables.wants) {
    const left = want.shots & ~mask
    if (left === 0) continue
    const started = (at(tables.ofSitter, want.sitter) & mask) !== 0
    if (limited) {
      if (!needs.some((need) => need.sitter === want.sitter))
        needs.push({ sitter: want.sitter, look: -1, notWithin: -Infinity, started })
      continue
    }
    if (!started && at(c.available, want.sitter) <= -1e6) continue
    let notWithin = Infinity
    for (let shot = 0; shot < c.n; shot++) {
      if ((left & (1 << shot)) !== 0) notWithin = Math.min(notWithin, at(c.delta, (last + 1) * c.n + shot))
    }
    needs.push({ sitter: want.sitter, look: want.look, notWithin, started })
  }
  let growing = 0
  for (let s = 0; s < c.sitters; s++) {
    const shots = at(tables.ofSitter, s)
    if ((shots & mask) === 0 && bitCount(shots) > 1) growing++
  }
  const complete = tables.blocks.reduce((bits, block, index) => ((block & ~mask) === 0 ? bits | (1 << index) : bits), 0)
  return { mask, last, labels: [], needs, growing, complete }
}

export function readyTimes(c: Compiled, node: Node, clock: Clock): Float64Array {
  const ready = new Float64Array(node.needs.length)
  node.needs.forEach((need, index) => {
    const free = at(clock.free, need.sitter)
    const cell = (at(clock.look, need.sitter) + 1) * c.looks + need.look
    ready[index] = need.look < 0 ? free : free + at(c.chair, cell) + at(c.change, cell)
  })
  return ready
}

/**
 * Whether every way on from `b` is at least as good from `a` (and not the same order): `b` can be forgotten.
 *
 * Times of `a` no later in every respect give times no later for whatever follows (the day is a monotone system), so
 * breaches, shots not made and wrap are no worse. Waiting is not monotone: somebody who begins earlier may wait longer;
 * it grows by no more than the largest difference of times for each sitter still to begin. While a meal is still to
 * come, that bound does not hold, and only equal times are compared.
 */
export function dominates(c: Compiled, node: Node, a: Label, b: Label): boolean {
  if ((b.fed && !a.fed) || a.end > b.end) return false
  let furthest = b.end - a.end
  let equal = furthest === 0 && a.fed === b.fed
  let waitMore = 0
  let sitter = -1
  let sitterMore = 0
  for (let k = 0; k < node.needs.length; k++) {
    const need = item(node.needs, k)
    const ra = at(a.ready, k)
    const rb = at(b.ready, k)
    if (need.look < 0 && at(a.look, need.sitter) !== at(b.look, need.sitter)) return false
    const ca = Math.max(ra, a.end + need.notWithin)
    const cb = Math.max(rb, b.end + need.notWithin)
    if (ca > cb) return false
    if (ca < cb) {
      equal = false
      furthest = Math.max(furthest, cb - ca)
    }
    if (!need.started) continue
    if (need.sitter !== sitter) {
      waitMore += sitterMore
      sitter = need.sitter
      sitterMore = rb - ra
    } else sitterMore = Math.max(sitterMore, rb - ra)
  }
  waitMore += sitterMore
  for (let k = 0; k < a.chairs.length; k++) {
    const ahead = at(b.chairs, k) - at(a.chairs, k)
    if (ahead < 0) return false
    if (ahead > 0) {
      equal = false
      furthest = Math.max(furthest, ahead)
    }
  }
  const mayStillSplit = b.split & ~a.split & ~node.complete
  const broken = a.broken + (mayStillSplit === 0 ? 0 : bitCount(mayStillSplit)) - b.broken
  const ahead = broken || a.must - b.must || a.should - b.should || a.light - b.light
  if (ahead !== 0) return firstTier(broken, a, b)
  if (!equal && c.hasMeal && !a.fed) return false
  if (a.fed !== b.fed) return false
  const margin = b.wait - a.wait - waitMore - (equal ? 0 : node.growing * furthest)
  if (margin !== 0) return margin > 0
  return tailsNoWorse(a.tails, b.tails) && idsBefore(c, a, b)
}

function firstTier(broken: number, a: Label, b: Label): boolean {
  if (broken !== 0) return broken < 0
  if (a.must !== b.must) return a.must < b.must
  if (a.should !== b.should) return a.should < b.should
  return a.light < b.light
}

function tailsNoWorse(a: Uint8Array, b: Uint8Array): boolean {
  if (a.length < b.length) return false
  for (let k = 0; k < b.length; k++) if (at(a, k) > at(b, k)) return false
  return true
}

/** Whether the order behind `a` comes before the one behind `b` by the ids of its shots. */
function idsBefore(c: Compiled, a: Label, b: Label): boolean {
  let first = 0
  let x: Label | null = a
  let y: Label | null = b
  while (x !== null && y !== null && x !== y) {
    if (x.shot !== y.shot) first = at(c.idRank, x.shot) - at(c.idRank, y.shot)
    x = x.before
    y = y.before
  }
  return first < 0
}

/** The shots of a label in their order. */
export function orderOf(label: Label): number[] {
  const order: number[] = []
  for (let walk: Label | null = label; walk !== null; walk = walk.before) order.push(walk.shot)
  return order.reverse()
}

export function extendTails(tails: Uint8Array, shot: number): Uint8Array {
  let slot = 0
  while (slot < tails.length && at(tails, slot) < shot) slot++
  const longer = new Uint8Array(Math.max(tails.length, slot + 1))
  longer.set(tails)
  longer[slot] = shot
  return longer
}

/** The fewest shots that will have been moved in any completion. */
export function leastMoved(n: number, tails: Uint8Array, mask: number): number {
  let longest = 0
  for (let k = -1; k < tails.length; k++) {
    let run = k + 1
    for (let shot = k < 0 ? 0 : at(tails, k) + 1; shot < n; shot++) if ((mask & (1 << shot)) === 0) run++
    longest = Math.max(longest, run)
  }
  return n - longest
}
