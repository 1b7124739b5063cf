import { describe, expect, it } from 'vitest'
import { framingOf } from '#shared/domain/lighting/framing.ts'
import { sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { id, whole } from '#tests/support/lighting-sample.ts'

const level = (distanceM: number, more: object = {}) =>
  whole({ camera: { at: [0, 1.5, distanceM], aim: [0, 1.5, 0], focalMm: 85, ...more } })

describe('framingOf', () => {
  it('covers at the sitter what the lens sees there', () => {
    // d·h/f: 24 × 36 mm at 3 m with 85 mm, level camera.
    const framing = framingOf(level(3), 'upright')
    expect(framing.widthM).toBeCloseTo((3 * 24) / 85, 9)
    expect(framing.heightM).toBeCloseTo((3 * 36) / 85, 9)
    expect(framing.topM).toBeCloseTo(1.5 + (1.5 * 36) / 85, 9)
    expect(framing.bottomM).toBeCloseTo(1.5 - (1.5 * 36) / 85, 9)
    expect(framing.headRoomM).toBeCloseTo((1.5 * 36) / 85 - 0.12, 9)
    expect(framingOf(level(3), 'across').widthM).toBeCloseTo((3 * 36) / 85, 9)
    expect(framingOf(level(3), 'square').heightM).toBeCloseTo((3 * 24) / 85, 9)
  })

  it('has the eyes a third below the top edge when the camera has no aim', () => {
    const framing = framingOf(whole({ camera: { at: [0, 1.5, 3], focalMm: 85 } }), 'upright')
    expect((framing.topM - 1.5) / framing.heightM).toBeCloseTo(1 / 3, 2)
  })

  it.each([
    // Names of crops: common practice, no source. Somebody of 1.6 m; what lies below the eyes is half the field.
    [0.9, 'face'],
    [1.5, 'head and shoulders'],
    [2.3, 'head and chest'],
    [3.3, 'half length'],
    [5, 'three-quarter length'],
    [6.5, 'nearly full length'],
    [9, 'full length'],
  ])('from %d m it is called %s', (distanceM, crop) => {
    expect(framingOf(level(distanceM), 'upright').crop).toBe(crop)
  })

  it('takes the seated for people, not for small ones', () => {
    const setup = level(2.3)
    const seated = {
      ...setup,
      places: setup.places.map((place) => ({ ...place, eyeHeightM: 1.2, pose: 'seated' as const })),
    }
    seated.setup.camera = { ...seated.setup.camera, at: [0, 1.2, 2.3], aim: [0, 1.2, 0] }
    expect(framingOf(seated, 'upright').crop).toBe('head and chest')
  })

  it('says so when the head or a sitter is cut', () => {
    const close = framingOf(level(0.5), 'upright')
    expect(close.headRoomM).toBeLessThan(0)
    expect(close.words).toBe('Face, the top edge cuts the head.')
    expect(framingOf(level(3), 'upright').words).toBe('Half length, 0.5 m above the head.')
    // 0.5 m in whole inches.
    expect(framingOf(level(3), 'upright', 'ft').words).toMatch(/^Half length, 1′ \d+″ above the head\.$/)
    const setup = level(3)
    const beside = { id: id(802), setupId: setup.setup.id, eyeHeightM: 1.5 }
    setup.places.push(sitterPlaceSchema.parse({ ...beside, at: [0.4, 0] }))
    setup.places.push(sitterPlaceSchema.parse({ ...beside, id: id(803), at: [-2, 0] }))
    setup.places.push(sitterPlaceSchema.parse({ ...beside, id: id(804), at: [0, 4] }))
    const { sitters } = framingOf(setup, 'upright')
    expect(sitters.map((sitter) => sitter.words)).toEqual([
      '0.2 m free at the left, 0.2 m at the right.',
      'Cut at the right.',
      'Out of the picture.',
    ])
    // Half the field less 0.4 m and half a body of 0.4 m.
    expect(sitters[1]?.rightM).toBeCloseTo((1.5 * 24) / 85 - 0.4 - 0.2, 9)
  })

  it('works without a sitter', () => {
    const { sitters, widthM } = framingOf({ ...level(3), places: [] }, 'across')
    expect(sitters).toEqual([])
    expect(widthM).toBeGreaterThan(1)
  })
})
