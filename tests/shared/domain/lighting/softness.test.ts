import { describe, expect, it } from 'vitest'
import {
  SOCKET_LIMIT_DEG,
  apparentSizeDeg,
  elevationDeg,
  penumbraM,
  socketLimitDeg,
} from '#shared/domain/lighting/softness.ts'

describe('apparentSizeDeg', () => {
  // 2·atan(D/2d).
  it.each([
    [0.9, 1.5, 33.398],
    [0.9, 1, 48.455],
    [1.2, 1.5, 43.603],
    [0.06, 2, 1.719],
    [0.21, 1, 11.988],
  ])('of %d m at %d m is %d degrees', (size, distance, degrees) => {
    expect(apparentSizeDeg(size, distance)).toBeCloseTo(degrees, 2)
  })
})

describe('penumbraM', () => {
  it.each([
    // Similar triangles; the sun's disc of 0.53° makes 1/108 (The Physics Teacher 62/6 A543).
    [0.9, 1.5, 0.05, 0.03],
    [0.9, 1.5, 0.02, 0.012],
    [0.06, 2, 0.5, 0.015],
    [0.6, 2, 0.03, 0.009],
    [2 * Math.tan((0.53 * Math.PI) / 360), 1, 1, 1 / 108],
  ])('%d m source, %d m to the edge, %d m behind is %d m', (size, a, b, width) => {
    expect(penumbraM(size, a, b)).toBeCloseTo(width, 4)
  })
})

describe('elevationDeg', () => {
  it.each([
    // NAVEDTRA 14209 and SS0510: 2 ft above the eyes, 4 ft away.
    [2, 4, 26.57],
    [0.8, 1.2, 33.69],
    [0.7, 1.5, 25.02],
    [-1, 1, -45],
  ])('%d up at %d away is %d degrees', (rise, away, degrees) => {
    expect(elevationDeg(rise, away)).toBeCloseTo(degrees, 2)
  })
})

describe('socketLimitDeg', () => {
  it('is the angle of a ledge', () => {
    // Geometry; the face measures are assumptions.
    expect(socketLimitDeg(12, 15)).toBeCloseTo(38.7, 1)
    expect(socketLimitDeg(10, 12)).toBeCloseTo(39.8, 1)
    expect(Math.round(SOCKET_LIMIT_DEG)).toBe(39)
  })
})
