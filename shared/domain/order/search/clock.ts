import { type Compiled, at, item } from './compiled.ts'

/**
 * The state of the day after some shots. Times of what went on before the meal are kept as if it had gone on that much
 * later ("shifted"), so that what is under way while nobody works needs no special case afterwards: with x' = x + meal
 * for everything that was free by its start, x' + work is right whenever it lies after the meal, and nothing before
 * the end of the meal can matter any more.
 */
export type Clock = {
  end: number
  fed: boolean
  /** When each sitter is free; before their first shot when they are available. */
  free: Float64Array
  /** The look each sitter wears, -1 before the first. */
  look: Int16Array
  /** When each chair is free, earliest first; empty without a limit. */
  chairs: Float64Array
}

/** What one step did, beside moving the clock. `late` counts breached latest times and a late meal, `lateMin` their minutes. */
export type StepResult = { start: number; end: number; late: number; lateMin: number; wait: number }

export function firstClock(c: Compiled): Clock {
  return {
    end: c.lightsOn,
    fed: false,
    free: c.available.slice(),
    look: new Int16Array(c.sitters).fill(-1),
    chairs: new Float64Array(c.chairs === null ? 0 : c.chairs).fill(-1e7),
  }
}

export function copyClock(clock: Clock): Clock {
  return { ...clock, free: clock.free.slice(), look: clock.look.slice(), chairs: clock.chairs.slice() }
}

export function resetClock(c: Compiled, clock: Clock): void {
  clock.end = c.lightsOn
  clock.fed = false
  clock.free.set(c.available)
  clock.look.fill(-1)
  clock.chairs.fill(-1e7)
}

/** Takes the steps of one order after the other on reused buffers; one stepper serves one search. */
export class Stepper {
  readonly result: StepResult = { start: 0, end: 0, late: 0, lateMin: 0, wait: 0 }
  private readonly c: Compiled
  private readonly chairs: Float64Array

  constructor(c: Compiled) {
    this.c = c
    this.chairs = new Float64Array(c.chairs ?? 0)
  }

  /** Moves `clock` on by shot `to` after shot `from` (-1: none), the `place`-th of the day (0-based). Fills `result`. */
  step(clock: Clock, from: number, to: number, place: number): StepResult {
    const c = this.c
    const { result } = this
    result.late = 0
    result.lateMin = 0
    const minutes = at(c.minutes, to)
    const delta = at(c.delta, (from + 1) * c.n + to)
    const hold = at(c.notBefore, to)
    let start = Math.max(clock.end + delta, hold, this.ready(clock, to))
    if (c.hasMeal && !clock.fed) {
      if (place > 0 && (start + minutes > c.mealLatest || place === c.n - 1)) {
        if (clock.end > c.mealLatest) this.breach(clock.end - c.mealLatest)
        this.eat(clock)
        start = Math.max(clock.end + delta, hold, this.ready(clock, to))
      } else if (c.n === 1 && start + minutes > c.mealLatest) this.breach(start + minutes - c.mealLatest)
    }
    const end = start + minutes
    for (const latest of item(c.latestStart, to)) if (start > latest) this.breach(start - latest)
    for (const latest of item(c.latestEnd, to)) if (end > latest) this.breach(end - latest)
    let wait = 0
    for (const wear of item(c.wears, to)) {
      const worn = at(clock.look, wear.sitter)
      if (worn >= 0) {
        const cell = (worn + 1) * c.looks + wear.first
        wait += start - at(clock.free, wear.sitter) - at(c.change, cell) - at(c.chair, cell)
      }
    }
    for (const wear of item(c.wears, to)) {
      clock.free[wear.sitter] = end
      clock.look[wear.sitter] = wear.last
    }
    if (this.chairs.length > 0) clock.chairs.set(this.chairs)
    clock.end = end
    result.start = start
    result.end = end
    result.wait = wait
    return result
  }

  private breach(byMin: number): void {
    this.result.late++
    this.result.lateMin += byMin
  }

  /** When all sitters of a shot are ready; leaves the chairs as they are then in `this.chairs`. */
  private ready(clock: Clock, to: number): number {
    const c = this.c
    if (this.chairs.length > 0) this.chairs.set(clock.chairs)
    let ready = -1e7
    for (const wear of item(c.wears, to)) {
      const cell = (at(clock.look, wear.sitter) + 1) * c.looks + wear.first
      const chair = at(c.chair, cell)
      let from = at(clock.free, wear.sitter)
      if (chair > 0 && this.chairs.length > 0) {
        from = Math.max(from, at(this.chairs, 0))
        this.takeFirstChair(from + chair)
      }
      ready = Math.max(ready, from + chair + at(c.change, cell))
    }
    return ready
  }

  private takeFirstChair(until: number): void {
    const { chairs } = this
    let slot = 0
    while (slot + 1 < chairs.length && at(chairs, slot + 1) < until) {
      chairs[slot] = at(chairs, slot + 1)
      slot++
    }
    chairs[slot] = until
  }

  private eat(clock: Clock): void {
    const { mealMin } = this.c
    const begin = clock.end
    const shifted = (x: number) => Math.max(x, Math.min(x, begin) + mealMin)
    for (let s = 0; s < clock.free.length; s++) clock.free[s] = shifted(at(clock.free, s))
    for (let s = 0; s < clock.chairs.length; s++) clock.chairs[s] = shifted(at(clock.chairs, s))
    clock.end = begin + mealMin
    clock.fed = true
  }
}
