import { describe, expect, it } from 'vitest'
import { panelReading, reflectanceOf } from '#shared/domain/lighting/panel.ts'
import { propSchema } from '#shared/domain/lighting/schema.ts'
import { id, light } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1], aim: FACE, power: 1 })
const panel = (more: object = {}) =>
  propSchema.parse({
    id: id(5),
    setupId: id(1),
    kind: 'panel',
    name: 'White panel',
    at: [1, 1.4, 0.6],
    turnDeg: -60,
    widthM: 1,
    heightM: 1.5,
    ...more,
  })

describe('reflectanceOf', () => {
  it('is capped for white and follows luminance below', () => {
    expect(reflectanceOf('#ffffff')).toBe(0.9)
    // sRGB 118 is the common 18 % grey.
    expect(reflectanceOf('#767676')).toBeCloseTo(0.18, 2)
    expect(reflectanceOf('#000000')).toBe(0)
  })
})

describe('panelReading', () => {
  it('gives a fill some stops under the main, less when it is smaller, further off or black', () => {
    const near = panelReading(panel(), [main], FACE, { iso: 100, shutterS: 1 })
    expect(near).toBeGreaterThan(1)
    expect(near).toBeLessThan(40 / 1.6)
    expect(panelReading(panel({ widthM: 0.5 }), [main], FACE, { iso: 100, shutterS: 1 })).toBeLessThan(near)
    expect(panelReading(panel({ at: [2, 1.4, 1.2] }), [main], FACE, { iso: 100, shutterS: 1 })).toBeLessThan(near)
    expect(panelReading(panel({ colour: '#000000' }), [main], FACE, { iso: 100, shutterS: 1 })).toBe(0)
  })
  it('gives nothing when the face is on the side that is not lit', () => {
    // The panel between main and face is lit from behind.
    expect(panelReading(panel({ at: [-0.6, 1.5, 0.5], turnDeg: -50 }), [main], FACE, { iso: 100, shutterS: 1 })).toBe(0)
  })
  it('gives nothing back from a rim or background light', () => {
    expect(
      panelReading(panel(), [light(2, { purpose: 'rim', at: [-1, 2, -1], aim: FACE })], FACE, {
        iso: 100,
        shutterS: 1,
      }),
    ).toBe(0)
  })
})
