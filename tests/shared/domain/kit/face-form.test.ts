import { describe, expect, it } from 'vitest'
import { discRadiusM, faceFormOf } from '#shared/domain/kit/face-form.ts'

describe('faceFormOf', () => {
  it('tells boxes and balls from what is round', () => {
    expect((['octa', 'umbrella', 'strip', 'softbox', 'lantern'] as const).map(faceFormOf)).toEqual([
      'disc',
      'disc',
      'rectangle',
      'rectangle',
      'ball',
    ])
  })
})

describe('discRadiusM', () => {
  it('is half the diameter of what is round, and a disc of the same area for what is not', () => {
    expect(discRadiusM({ shape: 'octa', widthM: 0.9, heightM: 0.9 })).toBeCloseTo(0.45, 9)
    // A square metre: r = 1/√π.
    expect(discRadiusM({ shape: 'softbox', widthM: 1, heightM: 1 })).toBeCloseTo(0.5642, 4)
    expect(discRadiusM({ shape: 'bare', widthM: 0, heightM: 0 })).toBe(0)
  })
  it('is 0 for a ball: integrated over its face, it gives what a point in its middle gives', () => {
    // A Lambertian sphere of radius 0.325 m and luminance 1 seen from 1 m: L·π·r² cd in its middle.
    const [radius, distance, steps] = [0.325, 1, 20000]
    let sum = 0
    for (let i = 0; i < steps; i++) {
      const up = 1 - (2 * (i + 0.5)) / steps
      const [along, aside] = [distance - radius * up, radius * Math.sqrt(1 - up * up)]
      const s2 = along * along + aside * aside
      const leaving = (up * along - Math.sqrt(1 - up * up) * aside) / Math.sqrt(s2)
      const meeting = along / Math.sqrt(s2)
      if (leaving > 0) sum += ((leaving * meeting) / s2) * ((4 * Math.PI * radius * radius) / steps)
    }
    expect(sum / ((Math.PI * radius ** 2) / distance ** 2)).toBeCloseTo(1, 3)
    expect(discRadiusM({ shape: 'lantern', widthM: 0.65, heightM: 0.65 })).toBe(0)
  })
})
