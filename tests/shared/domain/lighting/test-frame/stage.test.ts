import { describe, expect, it } from 'vitest'
import { FINE, ROUGH, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { beam, emitter, figure, scene } from '#tests/support/frame-sample.ts'

describe('stageOf', () => {
  it('knows the flux of cosⁿ beams', () => {
    // Closed form 2π/(n + 1): beams of 10, 30, 60, 90, 120° (computations 5).
    for (const [beamDeg, flux] of [
      [30, 0.29929],
      [120, Math.PI],
    ] as const) {
      const [only] = stageOf(scene({ emitters: [emitter({ beam: beam(beamDeg), axisIntensity: 1 })] }), ROUGH).emitters
      // Up to 90° the profile is a Gaussian, whose tails hold a little more than cosⁿ.
      expect(Math.abs((only?.flux ?? 0) / flux - 1)).toBeLessThan(beamDeg < 90 ? 0.025 : 0.002)
    }
  })

  it('turns bodies by orthonormal rows, left hand to the right of the picture', () => {
    const stage = stageOf(scene({ figures: [figure({ turn: 0.7, headTurn: -0.3, headNod: 0.2 })] }), ROUGH)
    for (const { rows } of stage.solids) {
      const row = (i: number) => rows.slice(i * 3, i * 3 + 3)
      for (const i of [0, 1, 2]) {
        for (const j of [0, 1, 2]) {
          const product = row(i).reduce((sum, value, k) => sum + value * (row(j)[k] ?? NaN), 0)
          expect(product).toBeCloseTo(i === j ? 1 : 0, 12)
        }
      }
    }
    const straight = stageOf(scene({ figures: [figure()] }), ROUGH).solids[0]?.rows.map((value) => value + 0)
    expect(straight).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 1])
  })

  it('keeps the points of a face on the face, spread about its middle', () => {
    for (const shape of ['disc', 'rectangle'] as const) {
      const [only] = stageOf(scene({ emitters: [emitter({ shape, widthM: 0.3, heightM: 1.2 })] }), FINE).emitters
      const points = only?.points ?? []
      expect(points.length).toBeGreaterThanOrEqual(4)
      for (const [u, v] of points)
        expect(shape === 'disc' ? Math.hypot(u, v) : Math.max(Math.abs(u), Math.abs(v))).toBeLessThan(1)
      expect(points.reduce((sum, [u]) => sum + u, 0) / points.length).toBeCloseTo(0, 0)
    }
  })
})
