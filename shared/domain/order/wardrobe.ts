import type { OrderProblem } from './problem.ts'

/** The hours in which nobody works; null while no meal has been taken. */
export type MealBreak = { startMin: number; endMin: number }

/** When `workMin` minutes are done that begin at `fromMin`, nobody working during the meal. */
export function doneAt(fromMin: number, workMin: number, meal: MealBreak | null): number {
  if (!meal || fromMin >= meal.endMin) return fromMin + workMin
  if (fromMin >= meal.startMin) return meal.endMin + workMin
  const left = workMin - (meal.startMin - fromMin)
  return left <= 0 ? fromMin + workMin : meal.endMin + left
}

/** The latest time to begin `workMin` minutes that are to be done by `byMin`, nobody working during the meal. */
export function latestBegin(byMin: number, workMin: number, meal: MealBreak | null): number {
  if (!meal || byMin <= meal.startMin || byMin - workMin >= meal.endMin) return byMin - workMin
  const after = Math.max(0, byMin - meal.endMin)
  return meal.startMin - (workMin - after)
}

/** Minutes of the chair and of changing that a sitter needs before a look; `from` is the look worn, -1 for none yet. */
export function wardrobeWork(problem: OrderProblem, from: number, to: number): { chairMin: number; changeMin: number } {
  const next = problem.looks[to]
  if (!next || from === to) return { chairMin: 0, changeMin: 0 }
  const chair = problem.sitters[next.sitter]?.chairMin ?? 0
  const restyled = problem.looks[from]?.style !== next.style
  return { chairMin: restyled ? chair : 0, changeMin: next.changeMin }
}

/** One turn of a sitter: chair, then change, for one shot. Times may be -Infinity when the sitter is here all day. */
export type Turn = {
  sitter: number
  shot: number
  /** The look worn before; -1 for none. */
  fromLook: number
  toLook: number
  chair: number | null
  chairMin: number
  changeMin: number
  beginMin: number
  readyMin: number
}

/**
 * The chairs: each turn takes the chair that is free first, in running order (within a shot in the order of its
 * looks), and never one before it. Unlimited chairs never make anyone wait.
 */
export class Chairs {
  private readonly freeMin: number[] | null

  constructor(count: number | null) {
    this.freeMin = count === null ? null : Array.from({ length: count }, () => -Infinity)
  }

  copy(): Chairs {
    const other = new Chairs(this.freeMin === null ? null : this.freeMin.length)
    this.freeMin?.forEach((free, index) => other.take(index, free))
    return other
  }

  /** Seats somebody who is free at `freeMin` for `chairMin` minutes; returns chair, begin and end. */
  seat(
    freeMin: number,
    chairMin: number,
    meal: MealBreak | null,
  ): { chair: number | null; beginMin: number; endMin: number } {
    if (chairMin === 0 || this.freeMin === null) {
      return { chair: null, beginMin: freeMin, endMin: doneAt(freeMin, chairMin, meal) }
    }
    const chair = this.freeMin.indexOf(Math.min(...this.freeMin))
    const beginMin = Math.max(freeMin, this.freeMin[chair] ?? freeMin)
    const endMin = doneAt(beginMin, chairMin, meal)
    this.take(chair, endMin)
    return { chair, beginMin, endMin }
  }

  private take(chair: number, untilMin: number): void {
    if (this.freeMin) this.freeMin[chair] = untilMin
  }
}

/**
 * The latest begin of each turn that still lets its shot start on time, with the chairs as they were given out: each
 * turn ends before its shot and leaves its chair to the next turn on it. `startMin` is the start of each turn's shot.
 */
export function latestTurns(
  turns: readonly Turn[],
  startMin: (turn: Turn) => number,
  meal: MealBreak | null,
): number[] {
  const begins = turns.map(() => 0)
  const takenFrom = new Map<number, number>()
  for (let at = turns.length - 1; at >= 0; at--) {
    const turn = turns[at]
    if (!turn) continue
    const dressedFrom = latestBegin(startMin(turn), turn.changeMin, meal)
    const chairUntil = turn.chair === null ? dressedFrom : Math.min(dressedFrom, takenFrom.get(turn.chair) ?? Infinity)
    const begin = latestBegin(chairUntil, turn.chairMin, meal)
    if (turn.chair !== null) takenFrom.set(turn.chair, begin)
    begins[at] = begin
  }
  return begins
}
