import { describe, expect, it } from 'vitest'
import { adviceFor } from '#shared/domain/day/advice.ts'
import { project } from '#shared/domain/day/project.ts'
import type { Need } from '#shared/domain/board/schema.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { plainDay, shotId } from '#tests/support/plain-day.ts'

/** Everything ahead at lights-on: as planned, the last of four shots ends at 710. */
function advise(needs: readonly Need[], hardOutMin: number, isUnderWay = false) {
  const problem = plainDay(needs, hardOutMin)
  const rest = needs.map((_, index) => shotId(index + 1))
  const projected = project(schedule(problem, rest).shots, {
    nowMin: 540,
    freeFromMin: 540,
    startedMin: isUnderWay ? 560 : null,
  })
  return adviceFor(problem, { got: [], rest, isUnderWay, projected })
}

const MIXED: readonly Need[] = ['must', 'should', 'must', 'could']

describe('adviceFor', () => {
  it('says nothing when the day ends in time', () => {
    expect(advise(MIXED, 710)).toBeNull()
  })

  it('trims the least needed shot where that is enough, to no less than half', () => {
    expect(advise(MIXED, 700)).toEqual({ kind: 'trim', shotId: shotId(4), toMin: 20, wrapMin: 700 })
    expect(advise(MIXED, 695)).toEqual({ kind: 'trim', shotId: shotId(4), toMin: 15, wrapMin: 695 })
  })

  it('leaves one shot where trimming is not enough', () => {
    expect(advise(MIXED, 680)).toEqual({ kind: 'leave', shotIds: [shotId(4)], wrapMin: 670 })
  })

  it('leaves as many as it takes', () => {
    expect(advise(MIXED, 640)).toEqual({ kind: 'leave', shotIds: [shotId(4), shotId(2)], wrapMin: 630 })
  })

  it('never offers what the client needs, nor the shot under way', () => {
    expect(advise(['must', 'must', 'must', 'must'], 700)).toEqual({ kind: 'late', shotIds: [], byMin: 10 })
    expect(advise(['could', 'must', 'must', 'must'], 700, true)).toEqual({ kind: 'late', shotIds: [], byMin: 10 })
  })
})
