import { describe, expect, it } from 'vitest'
import { sheetExposures, sheetFactor, sheetVisible } from '#shared/domain/lighting/test-frame/sheet.ts'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { FINE, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { emitter, scene } from '#tests/support/frame-sample.ts'

const SHEET = { at: [0, 1.5, 1], turn: 0, widthM: 1, heightM: 1, colour: [0.8, 0.8, 0.8] } as const

function staged(more: Parameters<typeof scene>[0] = {}) {
  return stageOf(
    scene({
      sheets: [{ ...SHEET, at: [0, 1.5, 1] }],
      emitters: [emitter({ at: [0, 1.5, 0], aim: [0, 1.5, 1] })],
      ...more,
    }),
    FINE,
  )
}

describe('sheetFactor', () => {
  it('is the form factor of a square over the middle of which a spot lies', () => {
    // Parallel square of side a at distance d, spot under its middle: 4 × the corner formula of a quarter square,
    // F = 2/π · [A/√(1+A²)]·atan(B/√(1+A²)) with A = B = a/2d (closed form by integration).
    for (const d of [0.7, 1, 2]) {
      const spot = { ...emptySpot(), x: 0, y: 1.5, z: 1 - d, nz: 1, gz: 1 }
      const a = 0.5 / d
      const root = Math.sqrt(1 + a * a)
      const exact = 4 * (1 / (2 * Math.PI)) * 2 * (a / root) * Math.atan(a / root)
      expect(Math.abs(Math.abs(sheetFactor(staged(), 0, spot)) / exact - 1)).toBeLessThan(0.06)
    }
  })

  it('is negative behind the sheet and nothing when it is not faced', () => {
    const behind = { ...emptySpot(), x: 0, y: 1.5, z: 0, nz: 1 }
    expect(sheetFactor(staged(), 0, behind)).toBeLessThan(0)
    expect(sheetFactor(staged(), 0, { ...behind, nz: -1 })).toBe(0)
  })
})

describe('sheetExposures', () => {
  it('is what falls on the side that is lit, and nothing on the other', () => {
    const [front, back] = sheetExposures(staged())[0]?.[0] ?? [NaN, NaN]
    expect(front).toBe(0)
    expect(back).toBeGreaterThan(600)
    expect(back).toBeLessThan(1000)
  })
})

describe('sheetVisible', () => {
  it('sees all of it in the open', () => {
    expect(sheetVisible(staged(), 0, { ...emptySpot(), x: 0, y: 1.5, z: 0 }, 16, 0, 1)).toBe(1)
  })
})
