import { describe, expect, it } from 'vitest'
import { Stepper, copyClock, firstClock, resetClock } from '#shared/domain/order/search/clock.ts'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { handDay } from '#tests/support/hand-day.ts'

const looks = { coat: { sitter: 'Ada', changeMin: 0 }, gown: { sitter: 'Ada', changeMin: 60 } }
const c = compile(
  handDay({ shots: [{ looks: ['coat'] }, {}, { looks: ['gown'] }], looks, meal: { minutes: 45, latestAfterMin: 90 } }),
)

describe('Stepper', () => {
  it('takes the meal before the shot that could not end in time, and changes none of it away', () => {
    const clock = firstClock(c)
    const stepper = new Stepper(c)
    const starts = [
      stepper.step(clock, -1, 0, 0).start,
      stepper.step(clock, 0, 1, 1).start,
      stepper.step(clock, 1, 2, 2).start,
    ]
    // As in the test of `schedule`: Ada has 20 of 60 minutes left when the meal ends at 675.
    expect(starts).toEqual([560, 600, 695])
    expect(clock).toMatchObject({ end: 725, fed: true })
  })
})

describe('firstClock', () => {
  it('is before the day: nobody wears anything', () => {
    expect(firstClock(c)).toMatchObject({ end: 540, fed: false, look: Int16Array.of(-1) })
  })
})

describe('copyClock and resetClock', () => {
  it('leave the original alone, and go back to the beginning', () => {
    const clock = firstClock(c)
    const copy = copyClock(clock)
    new Stepper(c).step(copy, -1, 0, 0)
    expect(clock).toEqual(firstClock(c))
    expect(copy).not.toEqual(clock)
    resetClock(c, copy)
    expect(copy).toEqual(clock)
  })
})
