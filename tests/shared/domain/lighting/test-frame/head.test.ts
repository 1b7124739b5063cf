import { describe, expect, it } from 'vitest'
import { makeHead, strandShade } from '#shared/domain/lighting/test-frame/head.ts'

const STYLES = ['cropped', 'short', 'bob', 'long', 'knot', 'curls', 'bald'] as const

/** Where a field is met when coming from far along +z at a place, metres; null: not met. */
function met(field: (x: number, y: number, z: number) => number, x: number, y: number): number | null {
  for (let z = 0.25; z > -0.25; z -= 0.0005) if (field(x, y, z) < 0) return z
  return null
}

describe('makeHead', () => {
  it('has the measures of a grown-up’s head', () => {
    // From memory: about 23 cm from crown to chin, the eyes half way; 15 cm wide; pupils 63 mm apart.
    for (const seed of [1, 2, 3, 40]) {
      const { skin, eye } = makeHead(seed, 'bald')
      expect(eye.x * 2).toBeCloseTo(0.063, 3)
      const crown = Array.from({ length: 400 }, (_, i) => 0.2 - i * 0.001).find((y) => skin(0, y, -0.01) < 0) ?? NaN
      const chin = Array.from({ length: 200 }, (_, i) => -0.2 + i * 0.001).find((y) => skin(0, y, 0.075) < 0) ?? NaN
      expect(Math.abs(crown - chin - 0.228)).toBeLessThan(0.012)
      const wide = Array.from({ length: 200 }, (_, i) => 0.2 - i * 0.001).find((x) => skin(x, 0.05, 0) < 0) ?? NaN
      expect(Math.abs(wide - 0.075)).toBeLessThan(0.006)
    }
  })

  it('has a nose before the lips, lips before the chin, and eyes that are seen between the lids', () => {
    for (const seed of [1, 7, 33, 95]) {
      const head = makeHead(seed, 'short')
      const nose = met(head.skin, 0, -0.038) ?? NaN
      const lips = met(head.skin, 0.004, -0.078) ?? NaN
      expect(nose).toBeGreaterThan(lips)
      expect(lips).toBeGreaterThan(met(head.skin, 0, -0.09) ?? NaN)
      const lid = met(head.skin, head.eye.x, 0.009) ?? NaN
      const ball = met(head.eyes, head.eye.x, 0) ?? NaN
      expect(ball).toBeGreaterThan(met(head.skin, head.eye.x, 0) ?? NaN)
      expect(lid).toBeGreaterThan(0.08)
      expect(met(head.hair, head.eye.x, 0) ?? -1).toBeLessThan(ball)
    }
  })

  it('mirrors the face, and differs from seed to seed', () => {
    const head = makeHead(4, 'bald')
    expect(head.skin(0.03, -0.02, 0.09)).toBe(head.skin(-0.03, -0.02, 0.09))
    expect(head.skin(0.03, -0.02, 0.09)).not.toBe(makeHead(5, 'bald').skin(0.03, -0.02, 0.09))
  })

  it('grows hair on the crown and none on the face, whatever the style', () => {
    for (const style of STYLES) {
      const { hair, skin } = makeHead(9, style)
      const onCrown = hair(0, 0.118, -0.01)
      if (style === 'bald') expect(onCrown).toBe(1)
      else expect(onCrown).toBeLessThan(skin(0, 0.118, -0.01) + 0.001)
      for (const [x, y] of [
        [0, -0.04],
        [0.03, -0.03],
        [0, -0.075],
        [0.0315, 0],
        [0, 0.02],
      ] as const) {
        const front = met(skin, x, y) ?? NaN
        expect(met(hair, x, y) ?? -1, `${style} at ${x}, ${y}`).toBeLessThan(front)
      }
    }
  })

  it('paints lips on the mouth and nowhere else, brows above the eyes', () => {
    const { paint } = makeHead(4, 'short')
    expect(paint(0.004, -0.078, 0.1).lips).toBeGreaterThan(0.8)
    expect(paint(0, -0.03, 0.11).lips).toBe(0)
    expect(paint(0.028, 0.0245, 0.08).brow).toBeGreaterThan(0.3)
    expect(paint(0.028, 0.05, 0.08).brow).toBe(0)
  })
})

describe('strandShade', () => {
  it('stays within its bounds', () => {
    for (let i = 0; i < 200; i++) expect(Math.abs(strandShade(i * 0.013, i * 0.007, 0.1))).toBeLessThanOrEqual(1)
  })
})
