import { describe, expect, it } from 'vitest'
import {
  ambientExposure,
  combineFNumbers,
  discFactor,
  exposureOfFNumber,
  fNumberAt,
  fNumberOfExposure,
  guideNumberAfterLoss,
  guideNumberAtIso,
  guideNumberAtPower,
  guideNumberAtZoom,
  luminousExposure,
} from '#shared/domain/lighting/exposure.ts'

const METRES_PER_FOOT = 0.3048

describe('fNumberAt', () => {
  it.each([
    // NAVEDTRA 14209 (US Navy photography manual): GN 80 in feet at 10 ft.
    [80 * METRES_PER_FOOT, 10 * METRES_PER_FOOT, 8],
    // Contax RTS manual p. 67.
    [20, 5, 4],
    // openphotographicsociety.org, guide number article.
    [32, 4, 8],
    // metzflash.ca: GN 50 at f/4 reaches 12.5 m.
    [50, 12.5, 4],
  ])('of guide number %d at %d m is f/%d', (gn, distance, expected) => {
    expect(fNumberAt(gn, distance)).toBeCloseTo(expected, 2)
  })
})

describe('guideNumberAtPower', () => {
  it('is 8 for 64 at 1/64', () => {
    // photo.stackexchange.com/q/82465, worked example.
    expect(guideNumberAtPower(64, 1 / 64)).toBeCloseTo(8, 4)
  })
  it('is the same for powers that add: two heads at 1/64 make 11.314', () => {
    expect(combineFNumbers([8, 8])).toBeCloseTo(11.314, 3)
    // Published worked example: 1/16 + 1/32 + 1/32 = 1/8.
    const parts = [1 / 16, 1 / 32, 1 / 32].map((power) => guideNumberAtPower(40, power))
    expect(combineFNumbers(parts)).toBeCloseTo(guideNumberAtPower(40, 1 / 8), 9)
  })
})

describe('guideNumberAfterLoss', () => {
  it('halves for two stops', () => {
    expect(guideNumberAfterLoss(40, 2)).toBeCloseTo(20, 9)
  })
})

describe('guideNumberAtIso', () => {
  it.each([
    // Guide number definition.
    [25, 0.5],
    [50, 0.707],
    [200, 1.414],
    [400, 2],
    [800, 2.83],
    [1600, 4],
    [3200, 5.66],
    [6400, 8],
  ])('ISO %d is a factor of %d', (iso, factor) => {
    expect(Math.abs(guideNumberAtIso(1, iso) - factor)).toBeLessThan(0.01)
  })
  it.each([
    // Kodak DCS600 manual p. 190, against ISO 200.
    [80, 0.632],
    [400, 1.414],
    [1600, 2.827],
  ])('ISO %d against ISO 200 is %d', (iso, factor) => {
    expect(Math.abs(guideNumberAtIso(1, iso) / guideNumberAtIso(1, 200) - factor)).toBeLessThan(0.002)
  })
})

describe('guideNumberAtZoom', () => {
  const unit = {
    guideNumberM: { value: 58, from: 'assumed' as const, source: 'sample' },
    zoom: [
      { focalMm: 50, guideNumberM: 42 },
      { focalMm: 24, guideNumberM: 28 },
      { focalMm: 105, guideNumberM: 58 },
    ],
  }
  it('takes the table at its rows and holds its ends', () => {
    expect([14, 24, 50, 105, 200].map((zoom) => guideNumberAtZoom(unit, zoom))).toEqual([28, 28, 42, 58, 58])
  })
  it('runs straight in logarithms between rows', () => {
    expect(guideNumberAtZoom(unit, Math.sqrt(24 * 50))).toBeCloseTo(Math.sqrt(28 * 42), 9)
  })
  it('is the one figure of a head without zoom', () => {
    expect(guideNumberAtZoom({ ...unit, zoom: [] }, 50)).toBe(58)
    expect(guideNumberAtZoom(unit, null)).toBe(58)
  })
})

describe('luminousExposure', () => {
  it('is 1000 lx·s for guide number 40 at 2 m', () => {
    // From N² = H·S/C with C = 250.
    expect(luminousExposure(40, 2)).toBeCloseTo(1000, 9)
  })
})

describe('fNumberOfExposure', () => {
  it('turns exposureOfFNumber back and agrees with the guide number', () => {
    expect(fNumberOfExposure(exposureOfFNumber(5.6, 200), 200)).toBeCloseTo(5.6, 9)
    expect(fNumberOfExposure(luminousExposure(40, 2), 100)).toBeCloseTo(20, 9)
  })
})

describe('exposureOfFNumber', () => {
  it.each([
    // ISO 2720, C = 250: E = C·N²/(t·S).
    [8, 1, 100, 160],
    [8, 0.005, 100, 32000],
    [5.6, 0.008, 200, 4900],
  ])('f/%d, %d s, ISO %d is %d lx', (fNumber, shutterS, iso, lux) => {
    expect(exposureOfFNumber(fNumber, iso) / shutterS).toBeCloseTo(lux, 6)
  })
  it.each([
    // Incident EV to lux at ISO 100, C = 250 (ISO 2720).
    [-1, 1.25],
    [0, 2.5],
    [1, 5],
    [4, 40],
  ])('EV %d is %d lx', (ev, lux) => {
    expect(exposureOfFNumber(2 ** (ev / 2), 100)).toBeCloseTo(lux, 9)
  })
})

describe('ambientExposure', () => {
  it('is illuminance times time', () => {
    expect(ambientExposure(160, 0.5)).toBe(80)
  })
})

describe('combineFNumbers', () => {
  it.each([
    // dpreview.com/forums/post/64109612; gamestone.co.uk flash article; published worked example (printed 13.8).
    [[8, 8], 11.31],
    [[5, 5, 5], 8.66],
    [[8, 11.3137], 13.856],
  ])('%j together read %d', (parts, expected) => {
    expect(Math.abs(combineFNumbers(parts) - expected)).toBeLessThan(0.005)
  })
  it('is zero without light', () => {
    expect(combineFNumbers([])).toBe(0)
  })
})

describe('discFactor', () => {
  it('is .9615 for a disc 1 m wide at 2.5 m', () => {
    expect(discFactor(2.5, 0.5)).toBeCloseTo(0.9615, 4)
  })
  it('is within one per cent from five times the largest dimension', () => {
    // IES definitions 9.1.1.
    expect(1 - discFactor(5, 0.5)).toBeLessThanOrEqual(0.01)
    expect(1 - discFactor(4, 0.5)).toBeGreaterThan(0.01)
  })
})
