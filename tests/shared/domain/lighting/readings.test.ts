import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { distanceBetween } from '#shared/domain/lighting/geometry.ts'
import { arrivalAt } from '#shared/domain/lighting/light-output.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import type { Stated } from '#shared/domain/kit/schema.ts'
import { type Light, type Point, isLamp } from '#shared/domain/lighting/schema.ts'
import { METRES_PER_FOOT } from '#shared/units/length.ts'
import { drawnSetup } from '#tests/support/drawn-setup.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
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

describe('readSetup of a whole setup', () => {
  const main = at2m(1, 'main', 1)
  it('counts lamps by the shutter, and lights that are off not at all', () => {
    const lamp = light(2, { purpose: 'fill', at: [0, 1.5, 2], aim: FACE, unit: lampUnit(4000), power: 1 })
    const at = (shutterS: number) => readSetup(whole({ lights: [main, lamp], camera: { shutterS } }))
    expect((at(1 / 80).lights[1]?.fNumber ?? 0) / (at(1 / 160).lights[1]?.fNumber ?? 1)).toBeCloseTo(Math.SQRT2, 9)
    expect(at(1 / 80).lights[0]?.fNumber).toBe(at(1 / 160).lights[0]?.fNumber)
    const off = readSetup(whole({ lights: [{ ...main, isOn: false }, lamp] }))
    expect(off).toMatchObject({ mainFNumber: null, ratio: null })
    expect(off.lights[0]).toMatchObject({ isOn: false, fNumber: 0, underMainStops: null })
    expect(off.main?.lightId).toBe(main.id)
  })

  it('takes nothing from a panel that the wall keeps dark, and no lamp’s light off a panel for flash', () => {
    const panel = { at: [1, 1.4, 0.6] as [number, number, number], turnDeg: -60 }
    const beyond = light(1, { purpose: 'main', at: [-1.2, 1.9, -3], aim: [1, 1.4, 0.6], power: 1 })
    const turned = { ...panel, turnDeg: 180 }
    expect(readSetup(whole({ lights: [beyond], props: [turned] })).panels[0]?.fNumber).toBe(0)
    const lamp = light(1, { purpose: 'main', at: [-1.2, 1.9, 1], aim: FACE, unit: lampUnit(4000), power: 1 })
    const lit = readSetup(whole({ lights: [lamp], props: [panel], ambientLux: 100 }))
    expect(lit.panels[0]?.fNumber).toBeGreaterThan(0)
    expect(lit.ambient?.underFlashStops).toBeNull()
  })

  it('sets ambient against flash and its colour against the white balance', () => {
    // Flash f/8, daylight exactly f/11.3: a stop over it.
    const lux = (250 * 11.3137 ** 2 * 160) / 100
    const setup = whole({ lights: [at2m(1, 'main', 0.16)], ambientLux: lux })
    expect(readSetup(setup).ambient?.underFlashStops).toBeCloseTo(-1, 2)
    expect(readSetup(setup).ambient).toMatchObject({ isKelvinAssumed: true, miredFromWhite: 0 })
    setup.setup.ambientK = 3200
    // 10⁶/3200 − 10⁶/5500.
    expect(readSetup(setup).ambient?.miredFromWhite).toBeCloseTo(130.68, 2)
    expect(readSetup(whole({ ambientLux: 100 })).ambient?.underFlashStops).toBeNull()
    expect(readSetup(whole({})).ambient).toBeNull()
  })

  it('has the angle and the cosine of the main’s spill on the wall', () => {
    const oblique = light(1, { purpose: 'main', at: [-2, 1.5, 0.5], aim: FACE, power: 1 })
    const reading = readSetup(whole({ lights: [oblique], camera: { at: [0, 1.5, 3] } }))
    // The wall point is straight behind the head, at (0, 1.5, −2): 2 m across and 2.5 m along.
    expect(reading.wall.main?.cosine).toBeCloseTo(2.5 / Math.hypot(2, 2.5), 9)
    const offAxis = (Math.atan2(2.5, 2) - Math.atan2(0.5, 2)) * (180 / Math.PI)
    expect(reading.wall.main?.offAxisDeg).toBeCloseTo(offAxis, 9)
    expect(reading.wall.main?.lightId).toBe(oblique.id)
  })

  it('carries framing, supplies, sync, booms, mains, glow and problems', () => {
    const reading = readSetup(whole({ lights: [main] }), { orientations: ['across', 'square'], frames: 300 })
    expect(reading.framing.map((framing) => framing.orientation)).toEqual(['across', 'square'])
    expect(reading.supplies[0]).toMatchObject({ lightId: main.id, pops: 300, charges: 2 })
    expect(reading.sync).toMatchObject({ isAssumed: true })
    expect(reading.booms).toEqual([])
    expect(reading.mains).toBeNull()
    expect(reading.problems).toEqual([])
    expect(reading.glow?.shares).toEqual([{ lightId: main.id, share: 1 }])
    expect(reading.main?.aboveEyesM).toBe(0)
    expect(readSetup(whole({}), { orientations: [] }).framing).toHaveLength(1)
  })

  it('is the same in feet: with all lengths and guide numbers by a factor, everything reads as before', () => {
    // N = GN/d has no length left in it; illuminance at a metre goes with the square.
    const scale = 1 / METRES_PER_FOOT
    const long = ([x, y, z]: Point): Point => [x * scale, y * scale, z * scale]
    const inFeet = (entry: Light): Light => {
      const numbers = isLamp(entry.unit.numbers)
        ? { ...entry.unit.numbers, luxAtMetre: times(entry.unit.numbers.luxAtMetre, scale ** 2) }
        : { ...entry.unit.numbers, guideNumberM: times(entry.unit.numbers.guideNumberM, scale) }
      const face = entry.modifier?.numbers
      const modifier = entry.modifier && {
        ...entry.modifier,
        numbers: {
          ...entry.modifier.numbers,
          widthM: (face?.widthM ?? 0) * scale,
          heightM: (face?.heightM ?? 0) * scale,
        },
      }
      return { ...entry, at: long(entry.at), aim: long(entry.aim), unit: { ...entry.unit, numbers }, modifier }
    }
    fc.assert(
      fc.property(drawnSetup(), ({ lights }) => {
        for (const entry of lights.filter((each) => each.modifier && distanceBetween(each.at, FACE) > 0.1)) {
          const [metres, feet] = [arrivalAt(entry, FACE, 100), arrivalAt(inFeet(entry), long(FACE), 100)]
          expect(feet.fNumber).toBeCloseTo(metres.fNumber, 6)
          expect(feet.distanceM * METRES_PER_FOOT).toBeCloseTo(metres.distanceM, 9)
          expect(feet.offAxisDeg).toBeCloseTo(metres.offAxisDeg, 4)
        }
      }),
      { numRuns: 60 },
    )
  })
})

const times = (stated: Stated, factor: number): Stated => ({ ...stated, value: stated.value * factor })
