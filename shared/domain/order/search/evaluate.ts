import { type Clock, Stepper, firstClock, resetClock } from './clock.ts'
import { type Compiled, at, item } from './compiled.ts'

/** An order's worth without its last two tiers (moved, ids), which are only compared when all others are equal. */
export type Score = {
  broken: number
  must: number
  should: number
  wrap: number
  light: number
  wait: number
  /** Minutes by which latest times are missed: leads a search towards orders that keep them, no part of the objective. */
  lateMin: number
}

export const NO_SCORE: Score = {
  broken: Infinity,
  must: 0,
  should: 0,
  wrap: Infinity,
  light: 0,
  wait: 0,
  lateMin: Infinity,
}

/** Works out whole orders (arrays of shot indices) on reused buffers. */
export class Evaluator {
  readonly c: Compiled
  private readonly stepper: Stepper
  private readonly clock: Clock
  private readonly place: Int16Array

  constructor(c: Compiled) {
    this.c = c
    this.stepper = new Stepper(c)
    this.clock = firstClock(c)
    this.place = new Int16Array(c.n)
  }

  score(order: readonly number[], into: Score): Score {
    const { c, clock, stepper } = this
    resetClock(c, clock)
    into.broken = this.orderBreaches(order)
    into.must = 0
    into.should = 0
    into.light = 0
    into.wait = 0
    into.lateMin = 0
    let from = -1
    for (let i = 0; i < order.length; i++) {
      const to = at(order, i)
      const step = stepper.step(clock, from, to, i)
      into.broken += step.late
      into.lateMin += step.lateMin
      into.wait += step.wait
      into.light += at(c.light, (from + 1) * c.n + to)
      if (step.end > c.hardOut) {
        if (at(c.need, to) === 0) into.must++
        else if (at(c.need, to) === 1) into.should++
      }
      from = to
    }
    into.wrap = clock.end
    return into
  }

  /** Breaches of rules that depend on places alone. */
  private orderBreaches(order: readonly number[]): number {
    const { c, place } = this
    for (let i = 0; i < order.length; i++) place[at(order, i)] = i
    let breaches = 0
    for (let shot = 0; shot < c.n; shot++) {
      for (const before of item(c.after, shot)) if (at(place, before) > at(place, shot)) breaches++
      for (const pinned of item(c.places, shot)) if (at(place, shot) !== pinned) breaches++
    }
    for (const shots of c.together) {
      let first = c.n
      let last = 0
      for (const shot of shots) {
        first = Math.min(first, at(place, shot))
        last = Math.max(last, at(place, shot))
      }
      if (last - first !== shots.length - 1) breaches++
    }
    return breaches
  }
}

/** Less than zero when `a` is better in the tiers of a score. */
export function compareScores(a: Score, b: Score): number {
  return (
    a.broken - b.broken ||
    a.must - b.must ||
    a.should - b.should ||
    a.wrap - b.wrap ||
    a.light - b.light ||
    a.wait - b.wait
  )
}

/** Shots of an order that have to be moved to get it from the order as it stands (0, 1, 2 …). */
export function movedIn(order: readonly number[]): number {
  const tails: number[] = []
  for (const shot of order) {
    const slot = tails.findIndex((tail) => tail >= shot)
    tails[slot < 0 ? tails.length : slot] = shot
  }
  return order.length - tails.length
}

/** Compares the last two tiers of two orders: shots moved, then ids. */
export function compareTies(c: Compiled, a: readonly number[], b: readonly number[]): number {
  const moved = movedIn(a) - movedIn(b)
  if (moved !== 0) return moved
  for (let i = 0; i < a.length; i++) {
    const rank = at(c.idRank, at(a, i)) - at(c.idRank, at(b, i))
    if (rank !== 0) return rank
  }
  return 0
}
