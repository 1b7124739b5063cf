import { describe, expect, it } from 'vitest'
import { ASSUMED_COLOUR_K, hasColour, ownColourK, zoomTableOf } from '#shared/domain/lighting/light-source.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { light, unit } from '#tests/support/lighting-sample.ts'

const numbersOf = (of: ReturnType<typeof lampUnit>) =>
  light(1, { purpose: 'main', at: [0, 2, 1], aim: [0, 1, 0], unit: of }).unit.numbers

describe('ownColourK', () => {
  it('is a head’s flash colour or a lamp’s colour', () => {
    expect(ownColourK(numbersOf(unit()))).toBe(5500)
    expect(ownColourK(numbersOf(lampUnit(4000)))).toBe(5600)
  })
})

describe('hasColour', () => {
  it('knows a colour temperature from a number that is none, for which daylight is taken', () => {
    const of = (value: number) =>
      numbersOf(unit(undefined, { flashColourK: { value, from: 'assumed', source: 'sample' } }))
    expect([3200, 0, -5600, 1e-300].map((value) => hasColour(of(value)))).toEqual([true, false, false, false])
    expect(ownColourK(of(0))).toBe(ASSUMED_COLOUR_K)
  })
})

describe('zoomTableOf', () => {
  it('is a head’s table; a lamp has none', () => {
    const zoom = [{ focalMm: 24, guideNumberM: 28 }]
    expect(zoomTableOf(numbersOf(unit(undefined, { zoom })))).toEqual(zoom)
    expect(zoomTableOf(numbersOf(lampUnit(4000)))).toEqual([])
  })
})
