import { describe, expect, it } from 'vitest'
import { counterweightKg, fullPopsFor, recycleS } from '#shared/domain/lighting/power.ts'

describe('counterweightKg', () => {
  it.each([
    // Law of the lever: 2.5 kg at 1.5 m, weight at 0.5 m, arm of 0 and 1 kg.
    [2.5, 1.5, 0.5, 0, 7.5],
    [2.5, 1.5, 0.5, 1, 8.5],
    // Published example: 5 lb at 4 ft needs 10 lb at 2 ft.
    [5, 4, 2, 0, 10],
    [1.8, 1.2, 0.6, 0, 3.6],
  ])('%d at %d m against %d m with an arm of %d is %d', (load, a, b, arm, weight) => {
    expect(counterweightKg(load, a, b, arm)).toBeCloseTo(weight, 9)
  })
})

describe('fullPopsFor', () => {
  it('is frames times power', () => {
    expect(fullPopsFor(40, 0.25)).toBe(10)
  })
})

describe('recycleS', () => {
  it('is the share of the full recycle', () => {
    expect(recycleS(3.6, 0.25)).toBeCloseTo(0.9, 9)
  })
})
