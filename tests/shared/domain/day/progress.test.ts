import { describe, expect, it } from 'vitest'
import { dayProgress } from '#shared/domain/day/progress.ts'
import { type DayShot, type ShotState, dayShotSchema } from '#shared/domain/day/schema.ts'
import { plainDay, shotId } from '#tests/support/plain-day.ts'

const SEQUENCE = [1, 2, 3, 4].map(shotId)

/** What happened, by shot number: state, at which minute, and when it began. */
function happened(
  ...events: [number: number, state: ShotState, atMin: number, startedMin?: number][]
): Map<string, DayShot> {
  return new Map(
    events.map(([number, state, atMin, startedMin]) => [
      shotId(number),
      dayShotSchema.parse({
        id: shotId(number),
        event: { state, atMs: atMin * 60_000, by: 'u', name: 'Tomas' },
        startedAtMs: startedMin === undefined ? null : startedMin * 60_000,
      }),
    ]),
  )
}

function at(nowMin: number | null, dayShots: Map<string, DayShot>, hardOutMin = 800) {
  return dayProgress({
    problem: plainDay(['must', 'should', 'must', 'could'], hardOutMin),
    sequence: SEQUENCE,
    dayShots,
    nowMin,
    minuteOf: (atMs) => atMs / 60_000,
  })
}

describe('dayProgress', () => {
  it('has the first shot next and nobody behind while it is rigged in time', () => {
    const day = at(545, new Map())
    expect(day.current?.shotId).toBe(shotId(1))
    expect(day).toMatchObject({ isUnderWay: false, behindMin: 0, wrapMin: 710, got: 0 })
  })

  it('is behind by what the clock has gone past the planned start', () => {
    expect(at(575, new Map())).toMatchObject({ behindMin: 15, wrapMin: 725 })
  })

  it('lets a shot under way end when its minutes are used up, or now', () => {
    expect(at(570, happened([1, 'under way', 560, 560]))).toMatchObject({ isUnderWay: true, behindMin: 0 })
    const late = at(600, happened([1, 'under way', 560, 560]))
    expect(late.behindMin).toBe(10)
    expect(late.lines[1]?.expectedStartMin).toBe(610)
  })

  it('is ahead after a shot that was got early', () => {
    const day = at(590, happened([1, 'got', 585, 560]))
    expect(day.current?.shotId).toBe(shotId(2))
    expect(day).toMatchObject({ behindMin: -5, got: 1 })
  })

  it('tells what changes from the shot really made before, not from one that was skipped', () => {
    const day = at(600, happened([1, 'got', 590, 560], [2, 'skipped', 595]))
    expect(day.current).toMatchObject({ shotId: shotId(3), changeover: { fromShotId: shotId(1) } })
    expect(day.skipped).toBe(1)
    // Planned 640–670, now 600–630.
    expect(day.behindMin).toBe(-40)
  })

  it('follows shots made out of order', () => {
    const day = at(640, happened([3, 'got', 630, 600], [1, 'got', 590, 560]))
    expect(day.current).toMatchObject({ shotId: shotId(2), changeover: { fromShotId: shotId(3) } })
    expect(day.next?.shotId).toBe(shotId(4))
  })

  it('has no current shot when all are got or skipped', () => {
    const day = at(720, happened([1, 'got', 590], [2, 'skipped', 591], [3, 'got', 670], [4, 'got', 710]))
    expect(day).toMatchObject({ current: null, next: null, behindMin: null, got: 3, skipped: 1, advice: null })
  })

  it('says nothing about the clock when it is not the day', () => {
    const day = at(null, new Map())
    expect(day).toMatchObject({ behindMin: null, wrapMin: null, advice: null })
    expect(day.lines[0]).toMatchObject({ plannedStartMin: 560, plannedEndMin: 590, expectedStartMin: null })
  })
})
