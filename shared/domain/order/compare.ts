import type { ShotId } from '#shared/ids.ts'
import { movedShots } from './objective.ts'
import type { OrderProblem } from './problem.ts'
import { type RuleKey, ruleKeys } from './rules.ts'
import type { DaySchedule } from './schedule-types.ts'

/** One order in the figures that are put side by side. Minutes, or clock minutes since midnight. */
export type OrderFigures = {
  /** Minutes spent changing over, the first rigging included. */
  changeoverMin: number
  lightingChanges: number
  roomMoves: number
  /** Changeovers in which the clock waits for wardrobe. */
  wardrobeOnClock: number
  wrapMin: number
  /** Minutes sitters wait between their own shots. */
  waitingMin: number
  /** Shots that end after the hard out. */
  notMade: readonly ShotId[]
  /** Rules kept and broken, one entry a rule however often it is broken. */
  kept: readonly RuleKey[]
  broken: readonly RuleKey[]
}

export type OrderComparison = {
  present: OrderFigures
  proposed: OrderFigures
  /** Shots taken out and put elsewhere to get from one to the other. */
  moved: number
  /** Minutes earlier that the proposed order wraps; negative when later. */
  savedMin: number
}

/** The figures of one order of a problem. */
export function orderFigures(problem: OrderProblem, day: DaySchedule): OrderFigures {
  const faults = new Set(problem.faults.map((fault) => fault.key))
  const broken = new Set(day.broken.map((rule) => rule.key))
  const keys = [...new Set([...ruleKeys(problem), ...faults])]
  return {
    changeoverMin: day.changeoverMin,
    lightingChanges: day.lightingChanges,
    roomMoves: day.roomMoves,
    wardrobeOnClock: day.wardrobeOnClock,
    wrapMin: day.wrapMin,
    waitingMin: day.waitingMin,
    notMade: day.shots.filter((shot) => !shot.made).map((shot) => shot.shotId),
    kept: keys.filter((key) => !broken.has(key)),
    broken: keys.filter((key) => broken.has(key)),
  }
}

/** Two orders of the same day side by side: as it stands, and as proposed. */
export function compareOrders(problem: OrderProblem, present: DaySchedule, proposed: DaySchedule): OrderComparison {
  const ids = (day: DaySchedule) => day.shots.map((shot) => shot.shotId)
  return {
    present: orderFigures(problem, present),
    proposed: orderFigures(problem, proposed),
    moved: movedShots(ids(present), ids(proposed)),
    savedMin: present.wrapMin - proposed.wrapMin,
  }
}
