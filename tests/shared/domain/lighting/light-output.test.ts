import { describe, expect, it } from 'vitest'
import {
  arrivalAt,
  arrivalOf,
  axisOnWall,
  beamOf,
  emissionOf,
  exposureOnWall,
  faceOf,
  faceRadiusM,
  gelShareOf,
  incidenceShare,
  isAllRound,
  isAmount,
  isLoss,
  outputOf,
  zoomOf,
} from '#shared/domain/lighting/light-output.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { guideNumberOfReading } from '#shared/domain/kit/meter-reading.ts'
import { kitItemIdSchema } from '#shared/ids.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { FULL_WARM, GRID, OCTA, gel, light, modifier, unit } from '#tests/support/lighting-sample.ts'

const bare = (more: object = {}) => light(1, { purpose: 'main', at: [0, 1.5, 2], aim: [0, 1.5, 0], power: 1, ...more })
const FACE: Point = [0, 1.5, 0]

describe('outputOf', () => {
  it('takes power, modifier and gel off the guide number', () => {
    const dimmed = outputOf(bare({ power: 0.25, gels: [FULL_WARM] }))
    expect(dimmed.fullGuideNumberM).toBe(40)
    // Rosco Cinegel 3407: transmission .47, 1.09 stops.
    expect(dimmed.gelLossStops).toBeCloseTo(1.09, 2)
    expect(dimmed.guideNumberM).toBeCloseTo(40 * Math.sqrt(0.25 * 0.47), 9)
  })
})

describe('faceOf', () => {
  it('is the modifier’s, or a small window', () => {
    expect(faceOf(bare({ modifier: OCTA }))).toEqual({ widthM: 0.9, heightM: 0.9 })
    expect(faceOf(bare())).toEqual({ widthM: 0.06, heightM: 0.06 })
  })
})

describe('faceRadiusM', () => {
  it('is half of what is round, that of a rectangle’s area, and nothing for a ball', () => {
    const shaped = (shape: string) => faceRadiusM(bare({ modifier: modifier(972, 'Face', { shape }) }))
    expect(shaped('octa')).toBeCloseTo(0.45, 9)
    expect(shaped('softbox')).toBeCloseTo(0.9 / Math.sqrt(Math.PI), 9)
    expect(shaped('lantern')).toBe(0)
    expect(faceRadiusM(bare())).toBeCloseTo(0.03, 9)
  })
})

describe('arrivalAt', () => {
  it('reads GN/d on axis from a small source', () => {
    const arrival = arrivalAt(bare(), FACE, 100)
    expect(arrival.fNumber).toBeCloseTo(20, 1)
    expect(arrival.exposureLxS).toBeCloseTo(1000, -1)
  })
  it('loses a stop at half the beam of a grid', () => {
    const at = (x: number) => arrivalAt(bare({ modifier: GRID }), [x, 1.5, 0], 100)
    const off = at(2 * Math.tan((5 * Math.PI) / 180))
    expect(off.offAxisDeg).toBeCloseTo(5, 9)
    expect(off.beamShare).toBeCloseTo(0.5, 9)
    expect(at(0).beamShare).toBe(1)
  })
  it('reads two stops more at ISO 400', () => {
    expect(arrivalAt(bare(), FACE, 400).fNumber / arrivalAt(bare(), FACE, 100).fNumber).toBeCloseTo(2, 9)
  })
})

describe('incidenceShare', () => {
  it('is the cosine, and nothing from behind', () => {
    // E = I·cos/d² (IES 9.1.2): 60° is a half.
    expect(incidenceShare(bare({ at: [Math.sqrt(3), 0, 1] }), [0, 0, 0], [0, 0, 1])).toBeCloseTo(0.5, 9)
    expect(incidenceShare(bare({ at: [0, 0, -1] }), [0, 0, 0], [0, 0, 1])).toBe(0)
  })
})

describe('axisOnWall', () => {
  it('finds where the axis meets the wall, or nothing', () => {
    expect(axisOnWall(bare({ at: [1, 1, 0], aim: [0.5, 1.5, -1] }), -2)).toEqual([0, 2, -2])
    expect(axisOnWall(bare({ at: [1, 1, 0], aim: [1, 1, 1] }), -2)).toBeNull()
  })
})

const metered = (zoomMm: number | null, modifierKitId: string | null = OCTA.kitId, guideNumberM = 25) => ({
  modifierKitId,
  zoomMm,
  guideNumberM,
  source: 'f/8 at 2 m, full power, ISO 100',
})
const ZOOM = [
  { focalMm: 24, guideNumberM: 28 },
  { focalMm: 105, guideNumberM: 58 },
]
const boxed = (numbers: Record<string, unknown>, more: object = {}) =>
  bare({ modifier: OCTA, unit: unit(undefined, numbers), ...more })

describe('outputOf a measured head', () => {
  it('takes the reading of head and modifier in place of guide number and loss, and says so', () => {
    const output = outputOf(boxed({ metered: [metered(null, null, 50), metered(null)] }, { power: 0.25 }))
    expect(output).toMatchObject({
      fullGuideNumberM: 25,
      modifierLossStops: 0,
      measured: 'f/8 at 2 m, full power, ISO 100',
    })
    expect(output.guideNumberM).toBeCloseTo(12.5, 9)
  })
  it('takes it only for this modifier and this zoom', () => {
    expect(outputOf(boxed({ metered: [metered(null, null, 50)] }))).toMatchObject({
      fullGuideNumberM: 40,
      measured: null,
    })
    expect(outputOf(boxed({ zoom: ZOOM, metered: [metered(50)] }, { zoomMm: 24 })).measured).toBeNull()
    expect(outputOf(boxed({ zoom: ZOOM, metered: [metered(24)] }, { zoomMm: 24 })).fullGuideNumberM).toBe(25)
    expect(outputOf(boxed({ metered: [metered(null)] }, { zoomMm: 24 })).fullGuideNumberM).toBe(25)
  })
  it('reads at the meter’s place what the meter read', () => {
    // f/8 at 2 m behind a 90 cm face, undone by its disc, read back.
    const reading = { fNumber: 8, distanceM: 2, power: 1, iso: 100, zoomMm: null }
    const modifierOn = { kitId: kitItemIdSchema.parse(OCTA.kitId), name: OCTA.name }
    const radiusM = faceRadiusM(boxed({}))
    const guideNumberM = guideNumberOfReading({ ...reading, modifier: modifierOn, radiusM })
    const entry = { ...metered(null), guideNumberM }
    expect(arrivalAt(boxed({ metered: [entry] }), FACE, 100).fNumber).toBeCloseTo(8, 9)
  })
  it('is 0 and never NaN for numbers that cannot be worked with', () => {
    const odd = [
      boxed({ guideNumberM: { value: -3, from: 'assumed', source: '' } }),
      { ...bare(), power: -1 },
      { ...bare(), power: NaN },
    ]
    expect(odd.map((entry) => outputOf(entry).guideNumberM)).toEqual([0, 0, 0])
  })
})

describe('a lamp', () => {
  const lamp = (more: object = {}) => bare({ unit: lampUnit(4000), ...more })
  it('gives E·t: 4000 lx at a metre are 1000 at 2 m, 6.25 lx·s in 1/160 s', () => {
    // H = E·t and N = √(H·S/C) (ISO 2720): less the disc of a window of 6 cm.
    const arrival = arrivalAt(lamp(), FACE, 100, 1 / 160)
    expect(arrival.exposureLxS).toBeCloseTo(6.25, 2)
    expect(arrival.fNumber).toBeCloseTo(Math.sqrt((6.25 * 100) / 250), 3)
    expect(arrival.luxAtMetre).toBeCloseTo(4000, 6)
  })
  it('follows power, shutter, gels and the modifier’s loss', () => {
    const loss = modifier(970, 'Cloth', { ...OCTA.numbers, lossStops: { value: 1, from: 'assumed', source: '' } })
    const part = (more: object, shutterS = 1) => arrivalAt(lamp(more), FACE, 100, shutterS).exposureLxS
    expect(part({ power: 0.25 }) / part({})).toBeCloseTo(0.25, 9)
    expect(part({}, 1 / 60) / part({}, 1 / 30)).toBeCloseTo(0.5, 9)
    expect(part({ gels: [FULL_WARM] }) / part({})).toBeCloseTo(0.47, 9)
    expect(part({ modifier: loss }) / part({ modifier: OCTA })).toBeCloseTo(0.5, 9)
  })
  it('has its own beam while it is bare', () => {
    const beamDeg = { value: 40, from: 'assumed', source: '' }
    expect(beamOf(lamp({ unit: lampUnit(4000, { beamDeg }) }))).toMatchObject({ beamDeg: 40 })
    expect(beamOf(lamp({ unit: lampUnit(4000, { beamDeg }), modifier: GRID }))).toMatchObject({ beamDeg: 10 })
  })
})

describe('a light that is off', () => {
  it('gives 0 and keeps its workings', () => {
    const arrival = arrivalAt(bare({ isOn: false }), FACE, 100)
    expect(arrival).toMatchObject({ exposureLxS: 0, fNumber: 0, fullGuideNumberM: 40 })
  })
})

describe('emissionOf', () => {
  it('gives nothing behind its face, save as a lantern', () => {
    const behind: Point = [0, 1.5, 4]
    const lantern = modifier(971, 'Paper ball', { shape: 'lantern' })
    expect(arrivalAt(bare({ modifier: OCTA }), behind, 100).fNumber).toBe(0)
    expect(arrivalAt(bare({ modifier: lantern }), behind, 100).fNumber).toBeGreaterThan(0)
  })
})

describe('isAllRound', () => {
  it('is a lantern, or a bare bulb: it lights what it does not look at too', () => {
    const behind: Point = [0, 1.5, 4]
    const bulb = (more: object = {}) =>
      bare({ unit: lampUnit(64, { beamDeg: { value: 360, from: 'assumed', source: '' } }), ...more })
    expect([bulb(), bulb({ modifier: OCTA }), bare({ unit: lampUnit(64) })].map(isAllRound)).toEqual([
      true,
      false,
      false,
    ])
    expect(arrivalAt(bulb(), behind, 100).exposureLxS).toBeCloseTo(arrivalAt(bulb(), FACE, 100).exposureLxS, 9)
    expect(arrivalAt(bulb({ modifier: OCTA }), behind, 100).exposureLxS).toBe(0)
  })
})

describe('exposureOnWall', () => {
  it('is what arrives, with the cosine, and nothing from behind', () => {
    const emission = emissionOf(bare({ modifier: GRID }))
    const wall: Point = [0.3, 1.4, -2]
    const expected = arrivalOf(emission, wall, 100).exposureLxS * incidenceShare(emission.light, wall, [0, 0, 1])
    expect(exposureOnWall(emission, ...wall)).toBeCloseTo(expected, 9)
    expect(exposureOnWall(emission, 0, 1.5, 3)).toBe(0)
  })
})

describe('zoomOf', () => {
  it('is nothing for a head that does not zoom', () => {
    expect(zoomOf(bare({ zoomMm: 50 }))).toBeNull()
    expect(zoomOf(bare({ zoomMm: 50, unit: unit(undefined, { zoom: ZOOM }) }))).toBe(50)
  })
})

describe('isAmount', () => {
  it('is above 0 and of this world', () => {
    expect([1, 0, -1, NaN, Infinity, 1e300].map(isAmount)).toEqual([true, false, false, false, false, false])
  })
})

describe('isLoss', () => {
  it('is a number of stops that something before a light may take', () => {
    expect([2.3, -1, NaN, -1e6].map(isLoss)).toEqual([true, true, false, false])
  })
})

describe('gelShareOf', () => {
  it('multiplies what gels let through, and is nothing where one lets nothing through', () => {
    expect(gelShareOf(bare())).toBe(1)
    expect(gelShareOf(bare({ gels: [FULL_WARM, FULL_WARM] }))).toBeCloseTo(0.47 ** 2, 9)
    expect(gelShareOf(bare({ gels: [FULL_WARM, gel(960, 'Tin foil', 0, -1)] }))).toBe(0)
  })
})
