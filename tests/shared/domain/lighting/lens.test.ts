import { describe, expect, it } from 'vitest'
import { CIRCLE_MM, angleOfViewDeg, depthOfField, fieldM, framingDistanceM } from '#shared/domain/lighting/lens.ts'

describe('angleOfViewDeg', () => {
  it.each([
    // leica-users.org/leica-users/v10/msg04586.html, angle table for 36 × 24 mm, ± .0005°.
    [14, 104.25, 81.203, 114.182],
    [24, 73.74, 53.13, 84.062],
    [28, 65.47, 46.397, 75.381],
    [50, 39.598, 26.991, 46.793],
    [85, 23.913, 16.071, 28.558],
    [135, 15.189, 10.159, 18.208],
    [200, 10.286, 6.867, 12.347],
    [400, 5.153, 3.437, 6.191],
  ])('of %d mm is %d × %d, diagonal %d degrees', (focal, across, upright, diagonal) => {
    expect(angleOfViewDeg(36, focal)).toBeCloseTo(across, 2)
    expect(angleOfViewDeg(24, focal)).toBeCloseTo(upright, 2)
    expect(angleOfViewDeg(Math.hypot(36, 24), focal)).toBeCloseTo(diagonal, 2)
  })
})

describe('framingDistanceM', () => {
  it.each([
    // d = f(1 + S/h), thin lens.
    [85, 36, 1.8, 4.335],
    [50, 36, 1.8, 2.55],
    [105, 36, 0.9, 2.73],
  ])('%d mm, %d mm side, %d m of subject is %d m', (focal, side, subject, distance) => {
    expect(framingDistanceM(focal, side, subject)).toBeCloseTo(distance, 3)
  })
})

describe('fieldM', () => {
  it('is 1.2 m across at 2.83 m with 85 mm', () => {
    expect(fieldM(85, 36, 2.8333)).toBeCloseTo(1.2, 3)
  })
})

describe('depthOfField', () => {
  it.each([
    // H = f²/(Nc) + f, near, far by the formula with c = 0.030 mm and nominal f-numbers.
    [50, 8, 3, 10.467, 2.338, 4.185],
    [85, 2.8, 3, 86.097, 2.902, 3.105],
    [85, 8, 2.5, 30.189, 2.314, 2.718],
    [135, 2.8, 3, 217.099, 2.961, 3.04],
    [85, 11, 4, 21.979, 3.393, 4.871],
  ])('%d mm f/%d at %d m: hyperfocal %d, near %d, far %d m', (focal, n, focus, hyperfocal, near, far) => {
    const depth = depthOfField(focal, n, focus)
    expect(depth.hyperfocalM / hyperfocal).toBeCloseTo(1, 3)
    expect(depth.nearM / near).toBeCloseTo(1, 3)
    expect((depth.farM ?? Infinity) / far).toBeCloseTo(1, 3)
  })
  it('is 1.915 to 2.093 m for 85 mm f/5.6 at 2 m', () => {
    const depth = depthOfField(85, 5.6, 2)
    expect(depth.nearM).toBeCloseTo(1.915, 2)
    expect(depth.farM).toBeCloseTo(2.093, 2)
  })
  it('is within 6 cm of a published example: 50 mm f/2.8 at 30 ft with c = .025', () => {
    const depth = depthOfField(50, 2.8, 9.144, 0.025)
    expect(Math.abs(depth.nearM - 7.264)).toBeLessThan(0.06)
    expect(Math.abs((depth.farM ?? 0) - 12.319)).toBeLessThan(0.06)
  })
  it('reaches infinity from the hyperfocal distance on', () => {
    expect(depthOfField(24, 8, 3).farM).toBeNull()
    expect(depthOfField(24, 8, 3).nearM).toBeCloseTo(1.339, 2)
    // Zeiss Camera Lens News 1: 0.030 mm for 24 × 36.
    expect(CIRCLE_MM).toBe(0.03)
  })
})
