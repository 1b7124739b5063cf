import { describe, expect, it } from 'vitest'
import {
  cosineExponent,
  cosineProfile,
  gaussianProfile,
  profileOf,
  relativeIntensity,
  zoomHeadProfile,
} from '#shared/domain/lighting/beam.ts'

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

describe('cosineProfile', () => {
  it('is half at half the beam and nothing from 90° on', () => {
    expect(cosineProfile(15, 30)).toBeCloseTo(0.5, 9)
    expect(cosineProfile(90, 120)).toBe(0)
  })
})

describe('gaussianProfile', () => {
  it('is half at half the beam and a tenth at 1.8226 times that', () => {
    expect(gaussianProfile(5, 10)).toBeCloseTo(0.5, 9)
    // Field over beam of the Gaussian: √log₂10.
    expect(gaussianProfile(5 * 1.8226, 10)).toBeCloseTo(0.1, 4)
  })
})

describe('zoomHeadProfile', () => {
  it('is even over the covered angle, then fades to nothing', () => {
    expect(zoomHeadProfile(0, 50)).toBe(1)
    expect(zoomHeadProfile(5, 50)).toBe(1)
    expect(zoomHeadProfile(60, 50)).toBe(0)
    expect(zoomHeadProfile(16.6, 50)).toBeGreaterThan(0.3)
  })
})

describe('relativeIntensity', () => {
  it('takes a Gaussian up to 90°, a cosine above, a zoom head bare, and nothing off when unknown', () => {
    const share = (beamDeg: number | null, zoomMm: number | null, bare: boolean) =>
      relativeIntensity(20, { beamDeg, zoomMm, bare })
    expect(share(40, null, false)).toEqual({ share: 0.5, kind: 'gaussian' })
    expect(share(120, null, false).kind).toBe('cosine')
    expect(share(null, 50, true).kind).toBe('zoom head')
    expect(share(null, null, false)).toEqual({ share: 1, kind: 'unknown' })
  })
})

describe('profileOf', () => {
  it('is what relativeIntensity says at every angle', () => {
    for (const head of [
      { beamDeg: 40, zoomMm: null, bare: false },
      { beamDeg: 120, zoomMm: null, bare: false },
      { beamDeg: null, zoomMm: 50, bare: true },
      { beamDeg: null, zoomMm: null, bare: true },
    ])
      for (const deg of [0, 5, 25, 60, 89, 91])
        expect({ share: profileOf(head).shareAt(deg), kind: profileOf(head).kind }).toEqual(
          relativeIntensity(deg, head),
        )
    expect(profileOf({ beamDeg: null, zoomMm: null, bare: true }).shareAt(91)).toBe(0)
  })
})
