import { describe, expect, it } from 'vitest'
import { BACKGROUND_SURFACES, GARMENT_CUTS, HAIR_STYLES, PROP_SHAPES } from '#shared/domain/lighting/schema.ts'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { FINE, ROUGH, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { surfaceAt } from '#shared/domain/lighting/test-frame/surface.ts'
import { emptyHit, trace } from '#shared/domain/lighting/test-frame/trace.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import { figure, scene } from '#tests/support/frame-sample.ts'

/** Every surface of a scene that a grid of rays meets. */
function spotsOf(of: Scene, fineness = ROUGH) {
  const stage = stageOf(of, fineness)
  const hit = emptyHit()
  const spots = []
  for (let i = -14; i <= 14; i++) {
    for (let j = -20; j <= 12; j++) {
      const length = Math.hypot(i * 0.01, j * 0.02, 1)
      trace(stage, 0, 1.4, 3, (i * 0.01) / length, (j * 0.02) / length, -1 / length, hit)
      if (hit.what === 'nothing') continue
      const spot = emptySpot()
      spot.x = (i * 0.01 * hit.t) / length
      spot.y = 1.4 + (j * 0.02 * hit.t) / length
      spot.z = 3 - hit.t / length
      surfaceAt(stage, hit, spot, 0.001)
      spots.push(spot)
    }
  }
  return spots
}

function check(of: Scene, name: string): void {
  for (const spot of spotsOf(of)) {
    expect(Math.hypot(spot.nx, spot.ny, spot.nz), name).toBeCloseTo(1, 6)
    expect(Math.hypot(spot.gx, spot.gy, spot.gz), name).toBeCloseTo(1, 6)
    for (const value of [spot.r, spot.g, spot.b]) {
      expect(value, name).toBeGreaterThanOrEqual(0)
      expect(value, name).toBeLessThan(1)
    }
    expect(spot.mirror, name).toBeLessThan(1)
  }
}

describe('surfaceAt', () => {
  it('gives unit normals and reflectances below 1 on people of every hair and cut', () => {
    HAIR_STYLES.forEach((hair, index) => {
      const cut = GARMENT_CUTS[index % GARMENT_CUTS.length] ?? 'coat'
      const pose = index % 2 === 0 ? 'standing' : 'seated'
      check(scene({ figures: [figure({ hair, cut, pose, seed: index })] }), `${hair} ${cut}`)
    })
  })

  it('gives them on every background and part of a set', () => {
    for (const surface of BACKGROUND_SURFACES) check(scene({ background: { ...scene().background, surface } }), surface)
    for (const shape of PROP_SHAPES) {
      const prop = {
        shape,
        at: [0, 1.2, 0],
        turn: 0.3,
        widthM: 0.5,
        heightM: 0.7,
        colour: [0.4, 0.3, 0.2],
        seed: 2,
      } as const
      check(scene({ props: [prop] }), shape)
    }
  })

  it('keeps the mean colour of a wall near its own', () => {
    for (const surface of BACKGROUND_SURFACES) {
      const wall = { zM: -2, widthM: 12, heightM: 6, colour: [0.4, 0.4, 0.4], surface } as const
      const spots = spotsOf(scene({ background: wall })).filter((spot) => spot.z < -1.99 && spot.y > 0.1)
      const mean = spots.reduce((sum, spot) => sum + spot.g, 0) / spots.length
      expect(Math.abs(mean / 0.4 - 1), surface).toBeLessThan(0.12)
    }
  })

  it('shows eyes in a face: something white, something dark, both smooth', () => {
    const of = scene({
      figures: [figure({ eyes: [0, 1.4, 1.2] })],
      view: { ...scene().view, at: [0, 1.4, 3] },
    })
    const eyes = spotsOf(of, FINE).filter((spot) => spot.mirror === 0.035 && spot.rough < 0.1)
    expect(eyes.length).toBeGreaterThan(0)
  })
})
