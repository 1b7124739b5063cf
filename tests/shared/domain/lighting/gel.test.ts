import { describe, expect, it } from 'vitest'
import { GEL_ROWS } from '#shared/domain/kit/gels.ts'
import { kelvinLabel, miredOf, shiftBetween, shifted, stackGels } from '#shared/domain/lighting/gel.ts'

describe('miredOf', () => {
  it.each([
    [25000, 40],
    [12500, 80],
    [5500, 181.8],
    [3600, 277.8],
    [3200, 312.5],
  ])('%d K is %d mired', (kelvin, mired) => {
    expect(miredOf(kelvin)).toBeCloseTo(mired, 1)
  })
})

describe('shiftBetween', () => {
  it.each([
    // Definition; LEE 201, 203, 205 and 223 print these conversions.
    [3200, 5700, -137.1],
    [3200, 3600, -34.7],
    [6500, 3800, 109.3],
    [6500, 5550, 26.3],
  ])('from %d K to %d K is %d mired', (from, to, shift) => {
    expect(shiftBetween(from, to)).toBeCloseTo(shift, 1)
  })
})

describe('shifted', () => {
  it.each([
    // Rosco Cinegel 3407, 3401, 3408, 3409, 3410 on 5500 K (printed 2900, 3200, 3800, 4500, 4900).
    [167, 2867],
    [131, 3197],
    [81, 3805],
    [42, 4468],
    [20, 4955],
  ])('5500 K with %d mired is %d K', (shift, kelvin) => {
    expect(Math.abs((shifted(5500, shift) ?? 0) - kelvin)).toBeLessThan(1)
  })
  it.each([
    // LEE 205 and 223 on 5500 K from their transmission spectra: 3820–3870 and 4845–4880 K.
    ['Half warm +79', 3820, 3870],
    ['Eighth warm +24', 4845, 4880],
  ])('%s on 5500 K lies between %d and %d K', (name, low, high) => {
    const row = GEL_ROWS.find((entry) => entry.name === name)
    const kelvin = shifted(5500, row?.miredShift ?? 0)
    expect(kelvin).toBeGreaterThan(low - 30)
    expect(kelvin).toBeLessThan(high + 30)
  })
  it('has no colour temperature beyond zero mired', () => {
    expect(shifted(5500, -200)).toBeNull()
    expect(shifted(5500, -131)).toBeCloseTo(19675, -2)
  })
})

describe('stackGels', () => {
  it('adds shifts and multiplies transmissions', () => {
    // Product of Rosco 3408 and 3409: .5913, 0.758 stop.
    const both = stackGels([
      { miredShift: { value: 81 }, transmission: { value: 0.73 } },
      { miredShift: { value: 42 }, transmission: { value: 0.81 } },
    ])
    expect(both.miredShift).toBe(123)
    expect(both.transmission).toBeCloseTo(0.5913, 4)
    expect(both.lossStops).toBeCloseTo(0.758, 3)
  })
  it('is clear without gels', () => {
    expect(stackGels([])).toEqual({ miredShift: 0, transmission: 1, lossStops: 0 })
  })
})

describe('kelvinLabel', () => {
  it('rounds to hundreds and parts thousands from ten thousand', () => {
    expect([3805, 19685].map(kelvinLabel)).toEqual(['3800 K', '19\u00a0700 K'])
  })
})
