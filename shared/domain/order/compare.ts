import { movedShots } from './objective.ts'
import type { OrderProblem } from './problem.ts'
import { type RuleKey, ruleKeys } from './rules.ts'
import type { DaySchedule } from './schedule-types.ts'

/** What one order costs, in the figures that two orders are compared by. Minutes since midnight for `wrapMin`. */
export type OrderFigures = {
  /** Minutes spent changing over: lights, sets, moves and waiting for wardrobe, the first rigging included. */
  changingMin: number
  /** Minutes in which everything is ready and waits for a window to open or a fixed time. */
  heldMin: number
  lightingChanges: number
  roomMoves: number
  /** Changeovers in which the clock waits for wardrobe. */
  wardrobeOnClock: number
  wrapMin: number
  /** Shots that end after the hard out. */
  notMade: number
  /** Rules, hours and the meal that are not kept, each once. */
  broken: readonly RuleKey[]
}

export type OrderComparison = {
  present: OrderFigures
  proposed: OrderFigures
  /** Shots taken out and put back to come from one to the other. */
  moved: number
  /** Rules among shots, hours of sitters and the meal that the proposed order keeps. */
  kept: readonly RuleKey[]
}

/** The figures of one order of a day. Changing and held minutes, shots and meal add up to wrap less lights-on. */
export function orderFigures(schedule: DaySchedule): OrderFigures {
  const heldMin = schedule.shots.reduce((sum, { changeover }) => sum + changeover.holdWaitMin, 0)
  return {
    changingMin: schedule.changeoverMin - heldMin,
    heldMin,
    lightingChanges: schedule.lightingChanges,
    roomMoves: schedule.roomMoves,
    wardrobeOnClock: schedule.wardrobeOnClock,
    wrapMin: schedule.wrapMin,
    notMade: schedule.shots.filter((shot) => !shot.made).length,
    broken: [...new Set(schedule.broken.map(({ key }) => key))],
  }
}

/** Two orders of the same day side by side: the one as it stands and a proposed one. */
export function compareOrders(problem: OrderProblem, present: DaySchedule, proposed: DaySchedule): OrderComparison {
  const after = orderFigures(proposed)
  const ids = (day: DaySchedule) => day.shots.map(({ shotId }) => shotId)
  return {
    present: orderFigures(present),
    proposed: after,
    moved: movedShots(ids(present), ids(proposed)),
    kept: ruleKeys(problem).filter((key) => !after.broken.includes(key)),
  }
}
