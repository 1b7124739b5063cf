import type { ShotId } from '#shared/ids.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import type { DaySchedule, ScheduledShot } from '#shared/domain/order/schedule-types.ts'
import { type Advice, adviceFor } from './advice.ts'
import { type Projection, project } from './project.ts'
import type { DayShot, ShotState } from './schema.ts'

/** A shot as the day has it: where it was planned, and when it happens as things stand. Minutes since midnight. */
export type DayLine = {
  shotId: ShotId
  state: ShotState
  plannedStartMin: number
  plannedEndMin: number
  /** As things stand; null once it is got or skipped, or when it is not the day. */
  expectedStartMin: number | null
}

export type DayProgress = {
  /** In running order. */
  lines: readonly DayLine[]
  /** The shot under way, else the first that waits; null when all are got or skipped. */
  current: ScheduledShot | null
  isUnderWay: boolean
  next: ScheduledShot | null
  planned: DaySchedule
  /** Minutes behind the plan (negative: ahead); null when it is not the day. */
  behindMin: number | null
  /** When the last shot ends as things stand; null when it is not the day. */
  wrapMin: number | null
  advice: Advice | null
  got: number
  skipped: number
}

export type DayProgressInput = {
  problem: OrderProblem
  /** The running order. */
  sequence: readonly ShotId[]
  dayShots: ReadonlyMap<string, DayShot>
  /** Minutes since midnight of the shoot's civil day; null when it is not that day. */
  nowMin: number | null
  /** An instant as minutes since midnight of the shoot's civil day. */
  minuteOf: (atMs: number) => number
}

/**
 * Where the day stands. What changes for a shot is told from the last one that was really made, in the order in which
 * shots were made; skipped ones leave no trace. Durations and waits are those of the running order's own schedule.
 */
export function dayProgress({ problem, sequence, dayShots, nowMin, minuteOf }: DayProgressInput): DayProgress {
  const stateOf = (id: ShotId): ShotState => dayShots.get(id)?.event?.state ?? 'waiting'
  const changedAt = (id: ShotId) => dayShots.get(id)?.event?.atMs ?? 0
  const planned = schedule(problem, sequence)
  const got = sequence.filter((id) => stateOf(id) === 'got').sort((a, b) => changedAt(a) - changedAt(b))
  const underWay = sequence.filter((id) => stateOf(id) === 'under way').sort((a, b) => changedAt(b) - changedAt(a))
  const waiting = sequence.filter((id) => stateOf(id) === 'waiting')
  const rest = [...underWay, ...waiting]
  const actual = schedule(problem, [...got, ...rest])
  const of = (day: DaySchedule, id: ShotId | undefined) => day.shots.find((shot) => shot.shotId === id)
  const [currentId, nextId] = rest
  const current = of(actual, currentId) ?? null
  const isUnderWay = underWay.length > 0
  const startedAtMs = currentId === undefined ? null : (dayShots.get(currentId)?.startedAtMs ?? null)
  const lastGot = got.at(-1)

  const projected =
    nowMin === null
      ? null
      : project(actual.shots.slice(got.length), {
          nowMin,
          freeFromMin: lastGot === undefined ? problem.lightsOnMin : minuteOf(changedAt(lastGot)),
          startedMin: isUnderWay ? (startedAtMs === null ? nowMin : minuteOf(startedAtMs)) : null,
        })
  return {
    lines: sequence.map((shotId) => ({
      shotId,
      state: stateOf(shotId),
      plannedStartMin: of(planned, shotId)?.startMin ?? problem.lightsOnMin,
      plannedEndMin: of(planned, shotId)?.endMin ?? problem.lightsOnMin,
      expectedStartMin: projected?.starts.get(shotId) ?? null,
    })),
    current,
    isUnderWay,
    next: of(actual, nextId) ?? null,
    planned,
    behindMin: projected && currentId !== undefined ? behind(projected, currentId, of(planned, currentId)) : null,
    wrapMin: projected ? projected.wrapMin : null,
    advice: projected && nowMin !== null ? adviceFor(problem, { got, rest, isUnderWay, projected }) : null,
    got: got.length,
    skipped: sequence.filter((id) => stateOf(id) === 'skipped').length,
  }
}

/** By when the current shot ends; an early start before the day has begun is no gain to speak of. */
function behind(projected: Projection, id: ShotId, planned: ScheduledShot | undefined): number {
  const endMin = projected.ends.get(id)
  return endMin === undefined || !planned ? 0 : Math.round(endMin - planned.endMin)
}
