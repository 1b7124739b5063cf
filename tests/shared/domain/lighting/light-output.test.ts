import { describe, expect, it } from 'vitest'
import {
  arrivalAt,
  axisOnWall,
  faceOf,
  faceRadiusM,
  incidenceShare,
  outputOf,
} from '#shared/domain/lighting/light-output.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { FULL_WARM, GRID, OCTA, light } from '#tests/support/lighting-sample.ts'

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
  it('is the radius of a disc of the same area', () => {
    expect(faceRadiusM(bare({ modifier: OCTA }))).toBeCloseTo(0.9 / Math.sqrt(Math.PI), 9)
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
