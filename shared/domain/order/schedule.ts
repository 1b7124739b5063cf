import type { ShotId } from '#shared/ids.ts'
import { brokenRules } from './broken.ts'
import type { OrderProblem } from './problem.ts'
import type { DaySchedule, ScheduledShot } from './schedule-types.ts'
import { callsOf, scheduledShot } from './spell-out.ts'
import { notBefore, transitionMinutes } from './transitions.ts'
import { Chairs, type MealBreak, type Turn, doneAt, wardrobeWork } from './wardrobe.ts'

type Clock = { endMin: number; meal: MealBreak | null; chairs: Chairs; freeMin: number[]; look: number[] }
export type Step = { startMin: number; endMin: number; lightMin: number; readyMin: number; turns: Turn[]; after: Clock }

/**
 * The day in this order. `sequence` holds shots of the problem, each once (all of them, or what is left of the day).
 *
 * All in minutes since midnight of the day. For shot j after shot i:
 *
 * - light(j) = end(i) + meal if taken here + set move + strike of the old set + dressing of the new one + lighting; for
 *   the first shot from lights-on, from nothing, nothing to strike.
 * - ready(s, j) for each sitter of j: chair, then change; for the first look from available(s), later from the end of
 *   the sitter's last shot, the chair only where hair or make-up differs. No change into a look that is being worn.
 * - start(j) = the latest of light(j), ready(s, j), window openings and clock pin; end(j) = start(j) + minutes.
 *
 * Readings of what the definition leaves open:
 *
 * - available(s) is the beginning of the sitter's hours; without hours a sitter comes as early as the first look needs,
 *   so that it never holds the first shot up (unless a chair is taken), and the call says when that is.
 * - Nobody works during the meal: chair and change stop at its start and go on at its end.
 * - A meal that is set is taken, between two shots: at a gap if it could not begin in time at the next one, and at
 *   the last gap at the latest. It begins when the shot before ends. If already the first shot ends too late, it is
 *   taken after it and the rule is broken. A day of one shot has no gap: the rule is broken only if that shot ends too late.
 * - Chairs are given out in running order and nobody is seated before somebody called earlier to the same chair.
 * - A clock pin holds the shot until its time; only starting later than its tolerance breaks it.
 * - A place pin beyond the last shot means the last. Places and rules count the shots in `sequence`.
 * - A shot that ends after the hard out is not made; that breaks no rule, but it counts before the wrap.
 * - A lighting change is a changeover in which a light, panel or background changes; rigging the first shot is none.
 * - A sitter waits between own shots: start minus end of the one before, less chair and change, less the meal. Before
 *   the first shot nobody waits: the call moves.
 * - Call = first start − change − chair − travel, in the chair earlier where a limited chair is wanted by another
 *   afterwards; skipping the meal; rounded down to five minutes.
 *
 * @throws on a shot that is not in the problem or stands in the sequence twice.
 */
export function schedule(problem: OrderProblem, sequence: readonly ShotId[]): DaySchedule {
  const indexOf = new Map<string, number>(problem.shots.map((shot, index) => [shot.id, index]))
  const order = sequence.map((id) => {
    const index = indexOf.get(id)
    if (index === undefined) throw new RangeError(`shot ${id} is not in this day, or stands in the order twice`)
    indexOf.delete(id)
    return index
  })
  let clock: Clock = {
    endMin: problem.lightsOnMin,
    meal: null,
    chairs: new Chairs(problem.chairs),
    freeMin: problem.sitters.map((sitter) => sitter.hours?.[0] ?? -Infinity),
    look: problem.sitters.map(() => -1),
  }
  const latestMealMin = problem.lightsOnMin + (problem.meal?.latestAfterMin ?? 0)
  const shots: ScheduledShot[] = []
  const turns: Turn[] = []
  const waitMin = problem.sitters.map(() => 0)
  order.forEach((shot, at) => {
    const before = order[at - 1] ?? -1
    let mealBefore: MealBreak | null = null
    let step = takeStep(problem, clock, before, shot)
    if (problem.meal && !clock.meal && at > 0 && (step.endMin > latestMealMin || at === order.length - 1)) {
      mealBefore = { startMin: clock.endMin, endMin: clock.endMin + problem.meal.minutes }
      step = takeStep(problem, { ...clock, meal: mealBefore }, before, shot)
    }
    turns.push(...step.turns)
    for (const turn of step.turns) {
      if (turn.fromLook >= 0) waitMin[turn.sitter] = (waitMin[turn.sitter] ?? 0) + waited(turn, clock, step)
    }
    const planned = problem.shots[shot]
    if (planned) shots.push(scheduledShot(problem, { planned, before, step, previousEndMin: clock.endMin, mealBefore }))
    clock = step.after
  })
  const lastEnd = shots.at(-1)?.endMin ?? problem.lightsOnMin
  const result = {
    shots,
    lightsOnMin: problem.lightsOnMin,
    hardOutMin: problem.hardOutMin,
    wrapMin: lastEnd,
    meal: clock.meal,
    calls: callsOf(problem, shots, turns, clock.meal),
    waiting: problem.sitters.map((sitter, s) => ({ sitterId: sitter.id, minutes: waitMin[s] ?? 0 })),
    waitingMin: waitMin.reduce((sum, minutes) => sum + minutes, 0),
    lightingChanges: shots.filter((shot, at) => at > 0 && shot.changeover.changesLight).length,
    roomMoves: shots.filter((shot) => shot.changeover.setMove?.otherRoom).length,
    wardrobeOnClock: shots.filter((shot) => shot.changeover.wardrobe.some((change) => change.onClockMin > 0)).length,
    changeoverMin: shots.reduce((sum, shot) => sum + shot.changeover.minutes, 0),
  }
  return { ...result, broken: [...problem.faults, ...brokenRules(problem, order, result)] }
}

function takeStep(problem: OrderProblem, clock: Clock, before: number, shot: number): Step {
  const planned = problem.shots[shot]
  const chairs = clock.chairs.copy()
  const freeMin = [...clock.freeMin]
  const look = [...clock.look]
  const resumeMin = clock.meal ? Math.max(clock.endMin, clock.meal.endMin) : clock.endMin
  const lightMin = resumeMin + transitionMinutes(problem.transitions[before + 1]?.[shot])
  const turns = (planned?.wears ?? []).map((wear): Turn => {
    const fromLook = look[wear.sitter] ?? -1
    const { chairMin, changeMin } = wardrobeWork(problem, fromLook, wear.firstLook)
    const seat = chairs.seat(freeMin[wear.sitter] ?? -Infinity, chairMin, clock.meal)
    const readyMin = doneAt(seat.endMin, changeMin, clock.meal)
    return {
      sitter: wear.sitter,
      shot,
      fromLook,
      toLook: wear.firstLook,
      chair: seat.chair,
      chairMin,
      changeMin,
      beginMin: seat.beginMin,
      readyMin,
    }
  })
  const readyMin = Math.max(-Infinity, ...turns.map((turn) => turn.readyMin))
  const startMin = Math.max(lightMin, readyMin, notBefore(problem, shot))
  const endMin = startMin + (planned?.minutes ?? 0)
  for (const wear of planned?.wears ?? []) {
    freeMin[wear.sitter] = endMin
    look[wear.sitter] = wear.lastLook
  }
  return { startMin, endMin, lightMin, readyMin, turns, after: { endMin, meal: clock.meal, chairs, freeMin, look } }
}

/** Minutes a sitter spent waiting before this shot since the last one of their own. */
function waited(turn: Turn, before: Clock, step: Step): number {
  const freeMin = before.freeMin[turn.sitter] ?? step.startMin
  const { meal } = step.after
  const mealMin = meal && meal.startMin >= freeMin ? meal.endMin - meal.startMin : 0
  return step.startMin - freeMin - turn.chairMin - turn.changeMin - mealMin
}
