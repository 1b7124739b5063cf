import { describe, expect, it } from 'vitest'
import { cosineExponent, cosinePower, gaussianProfile, profileOf } from '#shared/domain/lighting/beam.ts'

describe('cosineExponent', () => {
  it.each([
    // Closed form, n = ln 0.5/ln cos(half); flux/I₀ = 2π/(n + 1).
    [10, 181.81, 0.03437],
    [30, 19.994, 0.29929],
    [60, 4.819, 1.0798],
    [90, 2, 2.0944],
    [120, 1, Math.PI],
  ])('of a beam of %d° is %d with flux %d', (beam, n, flux) => {
    expect(cosineExponent(beam)).toBeCloseTo(n, 2)
    expect((2 * Math.PI) / (cosineExponent(beam) + 1)).toBeCloseTo(flux, 4)
  })
})

describe('cosinePower', () => {
  it('is half at half the beam and nothing from 90° on', () => {
    expect(cosinePower(15, cosineExponent(30))).toBeCloseTo(0.5, 9)
    expect(cosinePower(90, cosineExponent(120))).toBe(0)
  })
})

describe('gaussianProfile', () => {
  it('is half at half the beam and a tenth at 1.8226 times that', () => {
    expect(gaussianProfile(5, 10)).toBeCloseTo(0.5, 9)
    // Field over beam of the Gaussian: √log₂10.
    expect(gaussianProfile(5 * 1.8226, 10)).toBeCloseTo(0.1, 4)
  })
})

describe('profileOf', () => {
  const of = (beamDeg: number | null, zoomMm: number | null, bare: boolean) => profileOf({ beamDeg, zoomMm, bare })
  it('takes a Gaussian up to 90°, a cosine above, a zoom head bare, and nothing off when unknown', () => {
    expect([of(40, null, false).kind, of(40, null, false).shareAt(20)]).toEqual(['gaussian', 0.5])
    expect(of(120, null, false).kind).toBe('cosine')
    // Half at half the beam, whatever the profile: the definition of a beam.
    expect(of(120, null, false).shareAt(60)).toBeCloseTo(0.5, 9)
    expect(of(null, 50, true).kind).toBe('zoom head')
    expect([of(null, null, false).kind, of(null, null, false).shareAt(20)]).toEqual(['unknown', 1])
    expect(of(null, null, true).shareAt(91)).toBe(0)
  })
  it('is even over the angle that a bare zoom head covers, then fades to nothing', () => {
    expect([0, 5, 60].map(of(null, 50, true).shareAt)).toEqual([1, 1, 0])
    expect(of(null, 50, true).shareAt(16.6)).toBeGreaterThan(0.3)
  })
})
