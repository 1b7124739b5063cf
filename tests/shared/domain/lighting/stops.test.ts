import { describe, expect, it } from 'vitest'
import {
  apertureValue,
  exposureValue,
  fNumberOfThirds,
  inverseSquareStops,
  powersOf,
  roundToThird,
  shutterLabel,
  stopsBetween,
  stopsOfTransmission,
  timeValue,
} from '#shared/domain/lighting/stops.ts'

describe('inverseSquareStops', () => {
  it.each([
    // Inverse square law (IES definitions 9.1.1).
    [1, 2, -2],
    [1, Math.SQRT2, -1],
    [1, 3, -3.1699],
    [2, 3, -1.1699],
    [1.5, 1, 1.1699],
  ])('from %d m to %d m is %d stops', (from, to, stops) => {
    expect(inverseSquareStops(from, to)).toBeCloseTo(stops, 3)
  })
})

describe('stopsBetween', () => {
  it('is one stop from f/8 to exact f/11 and minus two to f/4', () => {
    expect(stopsBetween(11.313708, 8)).toBeCloseTo(1, 5)
    expect(stopsBetween(4, 8)).toBeCloseTo(-2, 9)
  })
})

describe('stopsOfTransmission', () => {
  it.each([
    // Rosco Cinegel 3407–3410, published transmission and stops.
    [0.47, 1.09],
    [0.73, 0.45],
    [0.81, 0.3],
    [0.92, 0.12],
    // LEE 205 and 223: optical density 0.15 and 0.07, published.
    [10 ** -0.15, 0.5],
    [10 ** -0.07, 0.23],
  ])('%d costs %d stops', (transmission, stops) => {
    expect(stopsOfTransmission(transmission)).toBeCloseTo(stops, 2)
  })
  it('is nothing for clear', () => {
    expect(stopsOfTransmission(1)).toBe(0)
  })
})

describe('apertureValue', () => {
  // APEX tables, ASA PH2.5-1960 and successors; nominal figures are within 0.1.
  it.each([
    [1, 0],
    [2, 2],
    [4, 4],
    [8, 6],
    [16, 8],
    [32, 10],
    [11, 7],
    [22, 9],
  ])('of f/%d is %d', (fNumber, av) => {
    expect(Math.abs(apertureValue(fNumber) - av)).toBeLessThan(0.1)
  })
})

describe('timeValue', () => {
  // APEX tables, as above.
  it.each([
    [1, 0],
    [2, 1],
    [8, 3],
    [30, 5],
    [125, 7],
    [500, 9],
    [1000, 10],
  ])('of 1/%d s is %d', (denominator, tv) => {
    expect(Math.abs(timeValue(1 / denominator) - tv)).toBeLessThan(0.1)
  })
})

describe('exposureValue', () => {
  // EV = log2(N²/t), worked out by hand.
  it.each([
    [8, 1 / 60, 11.9069],
    [16, 1 / 125, 14.9658],
    [8, 1 / 200, 13.6439],
  ])('of f/%d at %d s is %d', (n, t, ev) => {
    expect(exposureValue(n, t)).toBeCloseTo(ev, 3)
  })
})

describe('fNumberOfThirds', () => {
  // Exact third-stop series 2^(i/6).
  it.each([
    [2, 1.2599],
    [8, 2.5198],
    [15, 5.6569],
    [20, 10.0794],
    [22, 12.6992],
    [26, 20.1587],
  ])('%d thirds is %d', (index, exact) => {
    expect(fNumberOfThirds(index)).toBeCloseTo(exact, 4)
  })
})

describe('roundToThird', () => {
  it('gives the exact value behind a nominal label', () => {
    // US Army subcourse SS0508: f/11 is 11.313708.
    expect(roundToThird(11)).toBeCloseTo(11.313708, 5)
    expect(roundToThird(5.6)).toBeCloseTo(5.656854, 5)
  })
})

describe('powersOf', () => {
  it('goes from full in thirds to the least power', () => {
    const powers = powersOf(128)
    expect(powers).toHaveLength(22)
    expect(powers[0]).toBe(1)
    expect(powers[3]).toBeCloseTo(0.5, 9)
    expect(powers.at(-1)).toBeCloseTo(1 / 128, 9)
  })
  it('never goes below the least, and takes printed thirds for what they are', () => {
    expect(powersOf(100).at(-1)).toBeCloseTo(2 ** (-19 / 3), 9)
    // 1/102 is how thirds print 1/101.6, 1/10 what they print for 1/10.08.
    expect(powersOf(102).at(-1)).toBeCloseTo(2 ** (-20 / 3), 9)
    expect(powersOf(10).at(-1)).toBeCloseTo(2 ** (-10 / 3), 9)
    expect(powersOf(1)).toEqual([1])
  })
})

describe('shutterLabel', () => {
  it('reads as on a camera', () => {
    expect(shutterLabel(1 / 160)).toBe('1/160')
    expect(shutterLabel(0.5)).toBe('0.5 s')
    expect(shutterLabel(2)).toBe('2 s')
  })
})
