import { describe, expect, it } from 'vitest'
import { blurred, emptySpot, face, plain, seen, tilt } from '#shared/domain/lighting/test-frame/spot.ts'

describe('plain', () => {
  it('forgets what the spot was before', () => {
    const spot = { ...emptySpot(), mirror: 0.5, hair: 1, bloom: 1, isTinted: true, wrapR: 0.4 }
    plain(spot, [0.2, 0.3, 0.4], 0.5)
    expect([spot.r, spot.g, spot.b]).toEqual([0.1, 0.15, 0.2])
    expect([spot.mirror, spot.hair, spot.bloom, spot.isTinted, spot.wrapR]).toEqual([0, 0, 0, false, 0])
  })
})

describe('face and tilt', () => {
  it('turn the normal against the slope and keep it a unit', () => {
    const spot = emptySpot()
    face(spot, 0, 0, 1)
    // A surface that rises by 1 m a metre towards +x leans 45° towards −x.
    tilt(spot, 1, 0, 0, 1, 0, 1, 0, 0)
    expect(spot.nx).toBeCloseTo(-Math.SQRT1_2, 12)
    expect(spot.nz).toBeCloseTo(Math.SQRT1_2, 12)
    expect([spot.gx, spot.gy, spot.gz]).toEqual([0, 0, 1])
  })
})

describe('seen and blurred', () => {
  it('lose what is smaller than the blur', () => {
    expect(seen(0.01, 0)).toBe(1)
    expect(seen(0.01, 0.02)).toBe(0)
    expect(blurred(0.3, 0.7, 1, 0.01, 0.02, 4)).toBe(0)
    expect(blurred(0.3, 0.7, 1, 0.5, 0.001, 4)).not.toBe(0)
  })
})
