import { describe, expect, it } from 'vitest'
import { project } from '#shared/domain/day/project.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { plainDay, shotId } from '#tests/support/plain-day.ts'

const shots = schedule(plainDay(['must', 'must'], 900), [shotId(1), shotId(2)]).shots

describe('project', () => {
  it('repeats the plan when nothing is late', () => {
    const { starts, wrapMin } = project(shots, { nowMin: 540, freeFromMin: 540, startedMin: null })
    expect([...starts.values()]).toEqual([560, 600])
    expect(wrapMin).toBe(630)
  })

  it('moves everything behind a late start', () => {
    expect(project(shots, { nowMin: 600, freeFromMin: 540, startedMin: null }).wrapMin).toBe(670)
  })

  it('takes trimmed minutes', () => {
    expect(
      project(shots, { nowMin: 540, freeFromMin: 540, startedMin: null }, new Map([[shotId(2), 12]])).wrapMin,
    ).toBe(612)
  })

  it('never starts a later shot before its window', () => {
    const [first, second] = shots
    if (!first || !second) throw new Error('two shots')
    const { starts } = project([first, { ...second, notBeforeMin: 660 }], {
      nowMin: 540,
      freeFromMin: 540,
      startedMin: null,
    })
    expect(starts.get(shotId(2))).toBe(660)
  })
})
