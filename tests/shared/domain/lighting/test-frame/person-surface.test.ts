import { describe, expect, it } from 'vitest'
import { eyeSpot, hairSpot, skinSpot } from '#shared/domain/lighting/test-frame/person-surface.ts'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { ROUGH, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { figure, scene } from '#tests/support/frame-sample.ts'

const PERSON = figure()
const STAGE = stageOf(scene({ figures: [PERSON], view: { ...scene().view, at: [0, 1.55, 3] } }), ROUGH)
const [HEAD] = STAGE.solids

describe('eyeSpot', () => {
  it('has a dark pupil that looks at the lens, an iris about it and white beside', () => {
    if (!HEAD) throw new Error('no head')
    const at = (x: number, y: number) => {
      const spot = emptySpot()
      const z = Math.sqrt(0.0122 ** 2 - x * x - y * y)
      eyeSpot(STAGE, spot, PERSON, HEAD, 0.0315 + x, y, 0.0752 + z)
      return spot
    }
    expect(at(0, 0).g).toBeLessThan(0.02)
    expect(at(0.011, 0).g).toBeGreaterThan(0.25)
    expect(at(0.004, 0).g).toBeLessThan(0.25)
    expect(at(0, 0).rough).toBeLessThan(0.1)
  })
})

describe('skinSpot', () => {
  it('is skin on the cheek and redder on the lips', () => {
    if (!HEAD) throw new Error('no head')
    const cheek = emptySpot()
    skinSpot(STAGE, cheek, PERSON, HEAD, 0.02, -0.05, 0.09, 0.01)
    const lip = emptySpot()
    skinSpot(STAGE, lip, PERSON, HEAD, 0.004, -0.078, 0.1, 0.01)
    expect(Math.abs(cheek.r / PERSON.skin[0] - 1)).toBeLessThan(0.15)
    expect(lip.r / lip.g).toBeGreaterThan(cheek.r / cheek.g)
    expect(cheek.wrapR).toBeGreaterThan(cheek.wrapB)
  })
})

describe('hairSpot', () => {
  it('has strands along the surface', () => {
    if (!HEAD) throw new Error('no head')
    const spot = { ...emptySpot(), gx: 0, gy: 1, gz: 0, nx: 0, ny: 1, nz: 0 }
    hairSpot(spot, PERSON, HEAD, 0.01, 0.12, 0, 0.02)
    expect(Math.abs(spot.tx * spot.gx + spot.ty * spot.gy + spot.tz * spot.gz)).toBeLessThan(0.3)
    expect(spot.hair).toBeGreaterThan(0)
  })
})
