import { describe, expect, it } from 'vitest'
import { notBefore, transitionMinutes } from '#shared/domain/order/transitions.ts'
import { handDay } from '#tests/support/hand-day.ts'

describe('transitionMinutes', () => {
  it('adds light, move, strike and dressing; nothing for no transition', () => {
    expect(
      transitionMinutes({ lightingMin: 8, changesLight: true, moveMin: 15, strikeMin: 2, dressMin: 3, actions: 0 }),
    ).toBe(28)
    expect(transitionMinutes(undefined)).toBe(0)
  })
})

describe('notBefore', () => {
  it('is the latest of windows and clock pins', () => {
    const problem = handDay({
      shots: [{}, {}],
      rules: [
        { kind: 'window', shot: 0, fromMin: 600, toMin: 900 },
        { kind: 'pin-clock', shot: 0, atMin: 620, toleranceMin: 5 },
      ],
    })
    expect([notBefore(problem, 0), notBefore(problem, 1)]).toEqual([620, -Infinity])
  })
})
