import { describe, expect, it } from 'vitest'
import { callsOf, scheduledShot } from '#shared/domain/order/spell-out.ts'
import { handDay } from '#tests/support/hand-day.ts'

const problem = handDay({
  shots: [{ looks: ['coat'] }],
  looks: { coat: { sitter: 'Ada', changeMin: 12 } },
  sitters: { Ada: { chairMin: 20, travelMin: 15 } },
})
const turn = {
  sitter: 0,
  shot: 0,
  fromLook: -1,
  toLook: 0,
  chair: null,
  chairMin: 20,
  changeMin: 12,
  beginMin: -Infinity,
  readyMin: -Infinity,
}
const planned = problem.shots[0]
if (!planned) throw new Error('the day has a shot')
const shot = scheduledShot(problem, {
  planned,
  before: -1,
  previousEndMin: 540,
  mealBefore: null,
  step: { startMin: 560, endMin: 590, lightMin: 560, readyMin: -Infinity, turns: [turn] },
})

describe('scheduledShot', () => {
  it('spells out what gets a sitter ready, none of it on the clock before a first shot', () => {
    expect(shot.changeover.wardrobe).toMatchObject([
      { sitterName: 'Ada', lookName: 'coat', chairMin: 20, changeMin: 12, first: true, onClockMin: 0 },
    ])
    expect(shot).toMatchObject({
      notBeforeMin: null,
      made: true,
      changeover: { fromShotId: null, minutes: 20, setMove: null },
    })
  })
})

describe('callsOf', () => {
  it('goes back from the first start over change, chair and travel', () => {
    // 560 − 12 − 20 = 528; 513 on the way; 510.
    expect(callsOf(problem, [shot], [turn], null)).toMatchObject([{ beginMin: 528, callMin: 510 }])
  })

  it('goes back over the meal', () => {
    expect(callsOf(problem, [shot], [turn], { startMin: 500, endMin: 545 })).toMatchObject([
      { beginMin: 483, callMin: 465 },
    ])
  })
})
