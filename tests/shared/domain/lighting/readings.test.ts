import { describe, expect, it } from 'vitest'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { GRID, HALF_BLUE, light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const at2m = (n: number, purpose: 'main' | 'fill', power: number, distanceM = 2) =>
  light(n, { purpose, at: [0, 1.5, distanceM], aim: FACE, power })

describe('readSetup', () => {
  it('reads f/20 from guide number 40 at 2 m and says how far the fill is under', () => {
    const reading = readSetup(whole({ lights: [at2m(1, 'main', 1), at2m(2, 'fill', 0.25)] }))
    expect(reading.mainFNumber).toBeCloseTo(20, 1)
    expect(reading.lights[1]?.underMainStops).toBeCloseTo(2, 9)
  })

  it('makes 5 : 1 of a fill two stops under', () => {
    // US Army subcourse SS0510 p. 1-17 ff.
    const { ratio } = readSetup(whole({ lights: [at2m(1, 'main', 1), at2m(2, 'fill', 0.25)] }))
    expect(ratio?.value).toBeCloseTo(5, 6)
    expect(ratio?.mainToFill).toBeCloseTo(4, 6)
  })

  it('loses two stops at twice the distance', () => {
    const near = readSetup(whole({ lights: [at2m(1, 'main', 1)] })).mainFNumber ?? 0
    const far = readSetup(whole({ lights: [at2m(1, 'main', 1, 4)] })).mainFNumber ?? 1
    expect(near / far).toBeCloseTo(2, 3)
  })

  it('adds ambient: flash f/8 and f/11 of daylight read f/13.9', () => {
    // Published worked example, printed 13.8. Guide number 40 at 1/6.25 and 2 m is f/8; 32 000 lx·(1/160) s at ISO 100.
    const lux = (250 * 11.3137 ** 2 * 160) / 100
    const reading = readSetup(whole({ lights: [at2m(1, 'main', 0.16)], ambientLux: lux }))
    expect(reading.ambientFNumber).toBeCloseTo(11.3137, 3)
    expect(reading.totalFNumber).toBeCloseTo(13.856, 2)
  })

  it('has no ratio without a main or without fill, and no total without light', () => {
    expect(readSetup(whole({})).ratio).toBeNull()
    expect(readSetup(whole({})).totalFNumber).toBe(0)
    expect(readSetup(whole({ lights: [at2m(1, 'main', 1)] })).ratio).toBeNull()
  })

  it('reads a background light on the wall, with its cosine and its colour', () => {
    const background = light(3, {
      purpose: 'background',
      at: [0, 1.5, -1],
      aim: [0, 1.5, -2],
      power: 1,
      modifier: GRID,
      gels: [HALF_BLUE],
    })
    const reading = readSetup(whole({ lights: [at2m(1, 'main', 1), background] }))
    const onWall = reading.lights.find((entry) => entry.lightId === background.id)
    expect(onWall).toMatchObject({ where: 'wall', distanceM: 1 })
    // 10⁶/(181.8 − 68) for 5500 K behind a half blue.
    expect(onWall?.colourK).toBeCloseTo(8786, -1)
    expect(reading.wall.colourK).toBe(onWall?.colourK)
    expect(reading.mainFNumber).toBeCloseTo(20, 1)
  })

  it('says how far the main’s spill on the wall is under the main', () => {
    // Bare head straight at the sitter from 2 m, wall 2 m further: inverse square alone is two stops.
    const reading = readSetup(whole({ lights: [at2m(1, 'main', 1)], camera: { at: [0, 1.5, 3] } }))
    expect(reading.wall.mainUnderStops).toBeCloseTo(2, 1)
  })

  it('measures the main’s height, size and softness', () => {
    const main = light(1, { purpose: 'main', at: [0, 2.1, 1.2], aim: FACE })
    const reading = readSetup(whole({ lights: [main] }))
    // atan(0.6/1.2): the start in the manuals (NAVEDTRA 14209; SS0510).
    expect(reading.main?.elevationDeg).toBeCloseTo(26.57, 1)
  })

  it('gives depth of field at the sitter and both distances', () => {
    const reading = readSetup(whole({ camera: { at: [0, 1.5, 2], focalMm: 85, fNumber: 5.6 } }))
    expect(reading.cameraToSitterM).toBeCloseTo(2, 9)
    expect(reading.sitterToWallM).toBe(2)
    expect(reading.depth.nearM).toBeCloseTo(1.915, 2)
  })

  it('takes a lit white panel as fill', () => {
    const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1], aim: FACE, power: 1 })
    const reading = readSetup(whole({ lights: [main], props: [{ at: [1, 1.4, 0.6], turnDeg: -60 }] }))
    expect(reading.panels[0]?.fNumber).toBeGreaterThan(1)
    expect(reading.ratio?.value).toBeGreaterThan(2)
  })
})
