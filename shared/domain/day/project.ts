import type { ShotId } from '#shared/ids.ts'
import type { ScheduledShot } from '#shared/domain/order/schedule-types.ts'

/** Minutes since midnight. */
export type Projection = {
  starts: ReadonlyMap<ShotId, number>
  ends: ReadonlyMap<ShotId, number>
  wrapMin: number
  /** What the projection was made from, to make another with less in it. */
  from: ProjectFrom
}

export type ProjectFrom = {
  nowMin: number
  /** When the last shot was got, or lights-on. */
  freeFromMin: number
  /** When the first of the rest began; null when it has not. */
  startedMin: number | null
}

/** Minutes of shooting, by shot, other than planned. */
export type Trimmed = ReadonlyMap<ShotId, number>

/** Work between two shots that takes the clock whatever the time is; waiting for a window is not among it. */
function changeoverMin({ changeover, mealBefore }: ScheduledShot): number {
  const meal = mealBefore ? mealBefore.endMin - mealBefore.startMin : 0
  return changeover.minutes - changeover.holdWaitMin + meal
}

/**
 * When the rest of the day happens from now. A shot under way ends when its minutes are used up, or now; one that has
 * not begun starts when its changeover, counted from the last shot got, is done, or now. Windows and clock pins hold
 * later shots back.
 */
export function project(rest: readonly ScheduledShot[], from: ProjectFrom, trimmed: Trimmed = new Map()): Projection {
  const starts = new Map<ShotId, number>()
  const ends = new Map<ShotId, number>()
  let clockMin = from.freeFromMin
  rest.forEach((shot, at) => {
    const minutes = trimmed.get(shot.shotId) ?? shot.endMin - shot.startMin
    const readyMin = Math.max(clockMin + changeoverMin(shot), shot.notBeforeMin ?? -Infinity)
    const isFirst = at === 0
    const startMin = isFirst ? (from.startedMin ?? Math.max(from.nowMin, readyMin)) : readyMin
    const endMin = isFirst ? Math.max(from.nowMin, startMin + minutes) : startMin + minutes
    starts.set(shot.shotId, startMin)
    ends.set(shot.shotId, endMin)
    clockMin = endMin
  })
  return { starts, ends, wrapMin: clockMin, from }
}
