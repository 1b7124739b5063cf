import { describe, expect, it } from 'vitest'
import { mainToFill, ratioLabel, ratioOfStops, stopsOfRatio } from '#shared/domain/lighting/ratio.ts'
import { inverseSquareStops, stopsBetween } from '#shared/domain/lighting/stops.ts'

describe('ratioOfStops', () => {
  it.each([
    // US Army subcourse SS0510 p. 1-17 ff.
    [0, 2],
    [1, 3],
    [2, 5],
    [3, 9],
  ])('%d stops is %d : 1', (stops, ratio) => {
    expect(ratioOfStops(stops)).toBeCloseTo(ratio, 9)
  })
  it('is 5 : 1 for equal lamps at 5.6 and 11 ft (exactly 4.86)', () => {
    // Same source.
    expect(ratioOfStops(inverseSquareStops(11, 5.6))).toBeCloseTo(4.86, 2)
  })
  it('is 5 : 1 for readings of f/11 and f/5.6', () => {
    // Same source, nominal figures.
    expect(Math.abs(ratioOfStops(stopsBetween(11, 5.6)) - 5)).toBeLessThan(0.15)
  })
  it('is 5 : 1 for 800 and 200 footcandles', () => {
    expect(ratioOfStops(Math.log2(800 / 200))).toBe(5)
  })
})

describe('mainToFill', () => {
  it.each([
    [0, 1],
    [2, 4],
    [4, 16],
    [6, 64],
  ])('%d stops is %d : 1', (stops, ratio) => {
    expect(mainToFill(stops)).toBe(ratio)
  })
})

describe('stopsOfRatio', () => {
  it.each([
    [2, 0],
    [3, 1],
    [5, 2],
    [8, 2.8074],
  ])('%d : 1 is %d stops', (ratio, stops) => {
    expect(stopsOfRatio(ratio)).toBeCloseTo(stops, 3)
  })
})

describe('ratioLabel', () => {
  it('is whole from ten on and has one decimal where it needs one', () => {
    expect([5, 4.86, 12.4].map(ratioLabel)).toEqual(['5 : 1', '4.9 : 1', '12 : 1'])
  })
})
