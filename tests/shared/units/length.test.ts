import { describe, expect, it } from 'vitest'
import { METRES_PER_FOOT, feetAndInches, lengthLabel } from '#shared/units/length.ts'

describe('lengthLabel', () => {
  it('is metres to one decimal, or to the centimetre', () => {
    expect([lengthLabel(1.64, 'm'), lengthLabel(2, 'm'), lengthLabel(1.95, 'm', true)]).toEqual([
      '1.6 m',
      '2.0 m',
      '1.95 m',
    ])
  })

  // 1 ft = 0.3048 m, 1 in = 0.0254 m exactly (NIST Special Publication 811, B.8): 1.6 m is 62.99 in.
  it('is feet and whole inches, or half inches', () => {
    expect([lengthLabel(1.6, 'ft'), lengthLabel(1.95, 'ft', true), lengthLabel(-0.0254, 'ft')]).toEqual([
      '5′ 3″',
      '6′ 5″',
      '−0′ 1″',
    ])
  })
})

describe('feetAndInches', () => {
  it('never has twelve inches', () => {
    expect(feetAndInches(2 * METRES_PER_FOOT - 0.001, 1)).toEqual({ isNegative: false, feet: 2, inches: 0 })
  })
})
