import type { ShotId } from '#shared/ids.ts'
import type { OrderProblem } from './problem.ts'
import type { DaySchedule } from './schedule-types.ts'

/**
 * What an order is worth, compared from top to bottom, less being better: breaches of rules, must-have shots that are
 * not made (they end after the hard out), should-haves not made, wrap, lighting changes, minutes that sitters wait,
 * shots moved from the order as it stands, then the ids of the shots one after the other, so that the best is one.
 */
export type Objective = {
  broken: number
  mustNotMade: number
  shouldNotMade: number
  wrapMin: number
  lightingChanges: number
  waitingMin: number
  moved: number
  sequence: readonly ShotId[]
}

/** The objective of an order. Rules that are broken whatever the order count alike for all and are left out. */
export function objectiveOf(problem: OrderProblem, schedule: DaySchedule): Objective {
  const needOf = new Map(problem.shots.map((shot) => [shot.id, shot.need]))
  const notMade = schedule.shots.filter((shot) => !shot.made).map((shot) => needOf.get(shot.shotId))
  const sequence = schedule.shots.map((shot) => shot.shotId)
  return {
    broken: schedule.broken.length - problem.faults.length,
    mustNotMade: notMade.filter((need) => need === 'must').length,
    shouldNotMade: notMade.filter((need) => need === 'should').length,
    wrapMin: schedule.wrapMin,
    lightingChanges: schedule.lightingChanges,
    waitingMin: schedule.waitingMin,
    moved: movedShots(
      problem.shots.map((shot) => shot.id),
      sequence,
    ),
    sequence,
  }
}

/**
 * The fewest shots that have to be taken out and put back to turn one order into the other: all but the longest run
 * that is already in order. Shots that are in only one of the two are not counted.
 */
export function movedShots(present: readonly ShotId[], sequence: readonly ShotId[]): number {
  const place = new Map(present.map((id, index) => [id, index]))
  /** Element k: the least last place of an increasing run of k + 1 shots. */
  const tails: number[] = []
  let common = 0
  for (const id of sequence) {
    const at = place.get(id)
    if (at === undefined) continue
    common++
    const slot = tails.findIndex((tail) => tail >= at)
    tails[slot < 0 ? tails.length : slot] = at
  }
  return common - tails.length
}

/** Less than zero when `a` is the better order; zero only for the same one. */
export function compareObjectives(a: Objective, b: Objective): number {
  return (
    a.broken - b.broken ||
    a.mustNotMade - b.mustNotMade ||
    a.shouldNotMade - b.shouldNotMade ||
    a.wrapMin - b.wrapMin ||
    a.lightingChanges - b.lightingChanges ||
    a.waitingMin - b.waitingMin ||
    a.moved - b.moved ||
    compareIds(a.sequence, b.sequence)
  )
}

function compareIds(a: readonly ShotId[], b: readonly ShotId[]): number {
  for (let at = 0; at < a.length; at++) {
    const left = a[at] ?? ''
    const right = b[at] ?? ''
    if (left !== right) return left < right ? -1 : 1
  }
  return 0
}
