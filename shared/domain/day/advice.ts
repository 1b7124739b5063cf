import type { ShotId } from '#shared/ids.ts'
import type { Need } from '#shared/domain/board/schema.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { type Projection, type Trimmed, project } from './project.ts'

/** What would bring the day to its hard out. Minutes. */
export type Advice =
  | { kind: 'trim'; shotId: ShotId; toMin: number; wrapMin: number }
  | { kind: 'leave'; shotIds: readonly ShotId[]; wrapMin: number }
  /** Leaving everything that can be left is not enough. */
  | { kind: 'late'; shotIds: readonly ShotId[]; byMin: number }

/** Least needed first; what the client needs is never offered. */
const CAN_GO: readonly Need[] = ['could', 'should']
/** A shot is trimmed to no less than half of its minutes (common practice, no source). */
const TRIM_TO = 0.5

type Standing = { got: readonly ShotId[]; rest: readonly ShotId[]; isUnderWay: boolean; projected: Projection }

/**
 * What to trim or leave so that the last shot ends by the hard out; null when it does anyway. One trim where that is
 * enough, else as few shots as it takes: least needed first, the latest first.
 */
export function adviceFor(problem: OrderProblem, { got, rest, isUnderWay, projected }: Standing): Advice | null {
  const overMin = projected.wrapMin - problem.hardOutMin
  if (overMin <= 0) return null
  const shots = new Map(problem.shots.map((shot) => [shot.id, shot]))
  const wrapWith = (ids: readonly ShotId[], trimmed?: Trimmed) => {
    const day = schedule(problem, [...got, ...ids])
    return project(day.shots.slice(got.length), projected.from, trimmed).wrapMin
  }
  const open = isUnderWay ? rest.slice(1) : rest
  const candidates = CAN_GO.flatMap((need) => open.filter((id) => shots.get(id)?.need === need).reverse())

  for (const id of candidates) {
    const minutes = shots.get(id)?.minutes ?? 0
    const toMin = Math.floor(minutes - overMin)
    if (toMin < minutes * TRIM_TO) continue
    const wrapMin = wrapWith(rest, new Map([[id, toMin]]))
    if (wrapMin <= problem.hardOutMin) return { kind: 'trim', shotId: id, toMin, wrapMin }
  }
  for (const id of candidates) {
    const wrapMin = wrapWith(rest.filter((other) => other !== id))
    if (wrapMin <= problem.hardOutMin) return { kind: 'leave', shotIds: [id], wrapMin }
  }
  const left: ShotId[] = []
  let wrapMin = projected.wrapMin
  for (const id of candidates) {
    const kept = rest.filter((other) => other !== id && !left.includes(other))
    const without = wrapWith(kept)
    if (without >= wrapMin) continue
    left.push(id)
    wrapMin = without
    if (wrapMin <= problem.hardOutMin) return { kind: 'leave', shotIds: left, wrapMin }
  }
  return { kind: 'late', shotIds: left, byMin: wrapMin - problem.hardOutMin }
}
