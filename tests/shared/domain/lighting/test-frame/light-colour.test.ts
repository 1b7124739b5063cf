import { describe, expect, it } from 'vitest'
import { lightColour, radiatorXyz } from '#shared/domain/lighting/test-frame/light-colour.ts'

describe('radiatorXyz', () => {
  it('has the chromaticities of full radiators', () => {
    // CIE standard illuminant A, 2856 K: x .44757, y .40745 (CIE 15:2018). The matching functions are a fit: ±.004.
    const [x, y, z] = radiatorXyz(1e6 / 2856)
    expect(Math.abs(x / (x + y + z) - 0.44757)).toBeLessThan(0.004)
    expect(Math.abs(y / (x + y + z) - 0.40745)).toBeLessThan(0.004)
    // The end of the locus, infinite temperature: x .2399, y .2340 (Wyszecki and Stiles, from memory).
    const [ix, iy, iz] = radiatorXyz(0)
    expect(Math.abs(ix / (ix + iy + iz) - 0.2399)).toBeLessThan(0.006)
    expect(Math.abs(iy / (ix + iy + iz) - 0.234)).toBeLessThan(0.006)
  })
})

describe('lightColour', () => {
  it('is neutral for the colour the camera is balanced to', () => {
    for (const kelvin of [2900, 4300, 5600, 9000])
      for (const value of lightColour(1e6 / kelvin, kelvin)) expect(value).toBeCloseTo(1, 2)
  })

  it('is warm for lower and blue for higher temperatures, and keeps the luminance', () => {
    const [r, g, b] = lightColour(1e6 / 3200, 5500)
    expect(r).toBeGreaterThan(g)
    expect(g).toBeGreaterThan(b)
    const [r2, , b2] = lightColour(50, 5500)
    expect(b2).toBeGreaterThan(r2)
    expect(0.2126729 * r + 0.7151522 * g + 0.072175 * b).toBeCloseTo(1, 9)
  })
})
