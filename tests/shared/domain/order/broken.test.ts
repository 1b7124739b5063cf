import { describe, expect, it } from 'vitest'
import { brokenRules } from '#shared/domain/order/broken.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { handDay, inOrder } from '#tests/support/hand-day.ts'

const wordsOf = (problem: ReturnType<typeof handDay>, ...order: number[]) =>
  brokenRules(problem, order, schedule(problem, inOrder(...order))).map((rule) => rule.words)

describe('brokenRules', () => {
  it('says what is wrong and by how much', () => {
    const problem = handDay({
      shots: [{}, {}, {}],
      rules: [
        { kind: 'pin-place', shot: 2, index: 0 },
        { kind: 'pin-place', shot: 0, index: -1 },
        { kind: 'after', shot: 0, after: 1 },
        { kind: 'pin-clock', shot: 1, atMin: 590, toleranceMin: 5 },
      ],
    })
    expect(wordsOf(problem, 0, 1, 2)).toEqual([
      '“Shot 3” stays first, but stands third.',
      '“Shot 1” stays last, but stands first.',
      '“Shot 1” comes after “Shot 2”, but stands before it.',
      '“Shot 2” starts at 09:50, but cannot before 10:00, 10 min late.',
    ])
  })

  it('finds no gap for a meal on a day of one long shot', () => {
    const problem = handDay({ shots: [{ minutes: 200 }], meal: { minutes: 30, latestAfterMin: 120 } })
    expect(wordsOf(problem, 0)).toEqual([
      'The meal begins no later than 11:00, but there is no gap between two shots before that.',
    ])
  })

  it('looks only at rules whose shots are in the order', () => {
    const problem = handDay({
      shots: [{}, {}],
      rules: [
        { kind: 'after', shot: 0, after: 1 },
        { kind: 'together', shots: [0, 1] },
      ],
    })
    expect(wordsOf(problem, 0)).toEqual([])
  })
})
