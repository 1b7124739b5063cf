import { describe, expect, it } from 'vitest'
import { findConflict } from '#shared/domain/order/search/conflict.ts'
import { handDay, ruleId, sitterId } from '#tests/support/hand-day.ts'

function conflictOf(problem: ReturnType<typeof handDay>, work = 1e6) {
  const search = findConflict(problem, { seed: 1, work })
  let turn = search.next()
  while (!turn.done) turn = search.next()
  return turn.value
}

const LATE_FOR_ADA = handDay({
  shots: [{ looks: ['coat'] }, {}],
  looks: { coat: { sitter: 'Ada', changeMin: 5 } },
  sitters: { Ada: { hours: [540, 600] } },
  rules: [
    { kind: 'pin-place', shot: 0, index: -1 },
    { kind: 'window', shot: 1, fromMin: 540, toMin: 900 },
  ],
})

describe('findConflict', () => {
  it('names a sitter’s hours and the rule that cannot be kept in them, and nothing else', () => {
    expect(conflictOf(LATE_FOR_ADA)).toEqual({ keys: [`rule:${ruleId(0)}`, `hours:${sitterId(0)}`], minimal: true })
  })

  it('does not call a set minimal that it had no time to make so', () => {
    expect(conflictOf(LATE_FOR_ADA, 0).minimal).toBe(false)
  })
})
