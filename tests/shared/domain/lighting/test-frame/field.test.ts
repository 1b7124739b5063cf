import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import {
  capsule,
  clamp,
  cylinder,
  ease,
  ellipsoid,
  hash3,
  layeredNoise,
  noise,
  ring,
  roundBox,
  smoothMax,
  smoothMin,
  sphere,
} from '#shared/domain/lighting/test-frame/field.ts'

const near = fc.double({ min: -2, max: 2, noNaN: true })

/** Distance to the nearest of many points on a surface: the brute force a field must agree with. */
function nearest(points: readonly (readonly [number, number, number])[], x: number, y: number, z: number): number {
  return Math.min(...points.map(([a, b, c]) => Math.hypot(a - x, b - y, c - z)))
}

describe('sphere, ring, roundBox, cylinder', () => {
  it('are exact outside: no nearer and no further than the nearest point of the surface', () => {
    const turns = Array.from({ length: 720 }, (_, i) => (i * Math.PI) / 360)
    const circle = turns.map((t) => [0.5 * Math.cos(t), 0, 0.5 * Math.sin(t)] as const)
    fc.assert(
      fc.property(near, near, near, (x, y, z) => {
        expect(sphere(x, y, z, 0.7)).toBeCloseTo(Math.hypot(x, y, z) - 0.7, 12)
        expect(Math.abs(ring(x, y, z, 0.5, 0.1) + 0.1 - nearest(circle, x, y, z))).toBeLessThan(0.003)
        const box = Math.hypot(...[x, y, z].map((value) => Math.max(0, Math.abs(value) - 0.4)))
        if (box > 0) expect(roundBox(x, y, z, 0.4, 0.4, 0.4, 1e-9)).toBeCloseTo(box, 6)
        const rod = Math.hypot(Math.max(0, Math.hypot(x, z) - 0.3), Math.max(0, Math.abs(y) - 0.6))
        if (rod > 0) expect(cylinder(x, y, z, 0.3, 0.6, 1e-9)).toBeCloseTo(rod, 6)
      }),
    )
  })
})

describe('capsule', () => {
  it('is the distance to the stretch less the radius', () => {
    const points = Array.from({ length: 2001 }, (_, i) => [i / 2000, (i / 2000) * 0.5, 0] as const)
    fc.assert(
      fc.property(near, near, near, (x, y, z) => {
        expect(Math.abs(capsule(x, y, z, 0, 0, 0, 1, 0.5, 0, 0.1, 0.1) + 0.1 - nearest(points, x, y, z))).toBeLessThan(
          0.001,
        )
      }),
    )
  })
})

describe('ellipsoid', () => {
  it('has the right sign, is 0 on its surface and a sphere when its axes are equal', () => {
    fc.assert(
      fc.property(near, near, near, (x, y, z) => {
        const inside = (x / 0.5) ** 2 + (y / 0.8) ** 2 + (z / 0.3) ** 2
        if (Math.abs(inside - 1) > 1e-6) expect(ellipsoid(x, y, z, 0.5, 0.8, 0.3) < 0).toBe(inside < 1)
        expect(ellipsoid(x, y, z, 0.6, 0.6, 0.6)).toBeCloseTo(sphere(x, y, z, 0.6), 6)
      }),
    )
    expect(ellipsoid(0.5, 0, 0, 0.5, 0.8, 0.3)).toBeCloseTo(0, 12)
    expect(ellipsoid(0, 0, 0, 0.5, 0.8, 0.3)).toBe(-0.3)
  })
})

describe('smoothMin and smoothMax', () => {
  it('never leave the sharp ones by more than a quarter of the rounding', () => {
    fc.assert(
      fc.property(near, near, (a, b) => {
        const least = smoothMin(a, b, 0.2)
        expect(least).toBeLessThanOrEqual(Math.min(a, b) + 1e-12)
        expect(least).toBeGreaterThanOrEqual(Math.min(a, b) - 0.05 - 1e-12)
        expect(smoothMax(a, b, 0.2)).toBeCloseTo(-smoothMin(-a, -b, 0.2), 12)
      }),
    )
  })
})

describe('clamp and ease', () => {
  it('hold their ends and rise between, from either side', () => {
    expect([clamp(-1, 0, 1), clamp(0.4, 0, 1), clamp(2, 0, 1)]).toEqual([0, 0.4, 1])
    expect([ease(1, 3, 0), ease(1, 3, 2), ease(1, 3, 4)]).toEqual([0, 0.5, 1])
    expect([ease(3, 1, 0), ease(3, 1, 4)]).toEqual([1, 0])
  })
})

describe('noise', () => {
  it('is the same for the same place, even over all places and smooth', () => {
    let sum = 0
    for (let i = 0; i < 20000; i++) {
      const value = hash3(i, i * 7, -i)
      expect(value).toBeGreaterThanOrEqual(0)
      expect(value).toBeLessThan(1)
      sum += value
    }
    expect(Math.abs(sum / 20000 - 0.5)).toBeLessThan(0.01)
    fc.assert(
      fc.property(near, near, near, (x, y, z) => {
        const value = noise(x * 9, y * 9, z * 9)
        expect(noise(x * 9, y * 9, z * 9)).toBe(value)
        expect(Math.abs(value)).toBeLessThanOrEqual(1)
        expect(Math.abs(noise(x * 9 + 1e-5, y * 9, z * 9) - value)).toBeLessThan(1e-4)
        expect(Math.abs(layeredNoise(x, y, z, 4))).toBeLessThanOrEqual(1)
      }),
    )
  })
})
