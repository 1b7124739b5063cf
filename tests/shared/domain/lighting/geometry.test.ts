import { describe, expect, it } from 'vitest'
import {
  angleBetweenDeg,
  axesOf,
  distanceBetween,
  dot,
  facePoint,
  floorDistance,
  lengthOf,
  mainPlace,
  minus,
  panelNormal,
} from '#shared/domain/lighting/geometry.ts'
import { sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { id } from '#tests/support/lighting-sample.ts'

const place = (n: number, at: [number, number], eyeHeightM = 1.5) =>
  sitterPlaceSchema.parse({ id: id(n), setupId: id(1), at, eyeHeightM })

describe('minus', () => {
  it('takes one point from another', () => {
    expect(minus([1, 2, 3], [1, 1, 1])).toEqual([0, 1, 2])
  })
})
describe('dot', () => {
  it('multiplies and adds', () => {
    expect(dot([1, 2, 3], [4, 5, 6])).toBe(32)
  })
})
describe('distanceBetween', () => {
  it('is straight through the room', () => {
    expect(distanceBetween([0, 0, 0], [1, 2, 2])).toBe(3)
  })
})
describe('floorDistance', () => {
  it('leaves heights out', () => {
    expect(floorDistance([0, 0, 0], [3, 9, 4])).toBe(5)
  })
})
describe('angleBetweenDeg', () => {
  it('is 90 for axes, 0 for nothing, 180 for opposites', () => {
    expect(angleBetweenDeg([1, 0, 0], [0, 2, 0])).toBeCloseTo(90, 9)
    expect(angleBetweenDeg([0, 0, 0], [0, 2, 0])).toBe(0)
    expect(angleBetweenDeg([1, 0, 0], [-3, 0, 0])).toBeCloseTo(180, 9)
  })
})
describe('mainPlace', () => {
  it('is the place nearest to the origin, ties by id', () => {
    expect(mainPlace([place(2, [0.5, 0]), place(1, [0.1, 0])])?.id).toBe(id(1))
    expect(mainPlace([place(2, [0, 0]), place(1, [0, 0])])?.id).toBe(id(1))
    expect(mainPlace([])).toBeNull()
  })
})
describe('facePoint', () => {
  it('is at the eyes, or at assumed eyes when nobody stands there', () => {
    expect(facePoint({ places: [place(1, [0.1, 0.2], 1.2)] })).toEqual([0.1, 1.2, 0.2])
    expect(facePoint({ places: [] })).toEqual([0, 1.55, 0])
  })
})
describe('panelNormal', () => {
  it('faces the camera at 0 and turns anticlockwise seen from above, towards camera right', () => {
    const [x, , z] = panelNormal(0)
    expect([x, z]).toEqual([0, 1])
    expect(panelNormal(90)[0]).toBeCloseTo(1, 9)
  })
})

describe('lengthOf', () => {
  it('is Pythagoras in three dimensions', () => {
    expect(lengthOf([2, 3, 6])).toBe(7)
    expect(lengthOf([0, 0, 0])).toBe(0)
  })
})

describe('axesOf', () => {
  it('gives unit vectors at right angles, the side level and to the right of where it looks', () => {
    for (const aim of [
      [1, 2, 3],
      [-2, 0.5, -1],
      [0, 0, -4],
      [3, -1, 0],
    ] as const) {
      const { look, side, up } = axesOf([0, 1, 0], aim, [0, 0, 1])
      for (const axis of [look, side, up]) expect(lengthOf(axis)).toBeCloseTo(1, 12)
      for (const product of [dot(look, side), dot(side, up), dot(up, look), side[1]]) expect(product).toBeCloseTo(0, 12)
      expect(up[1]).toBeGreaterThan(0)
    }
    expect(axesOf([0, 0, 0], [0, 0, -2], [0, 0, 1]).side).toEqual([1, 0, 0])
  })

  it('has a side also straight down, and a direction where it looks at its own place', () => {
    expect(axesOf([0, 2, 0], [0, 0, 0], [0, 0, 1])).toMatchObject({ look: [0, -1, 0], side: [1, 0, 0] })
    expect(axesOf([1, 1, 1], [1, 1, 1], [0, 0, -1]).look).toEqual([0, 0, -1])
  })
})
