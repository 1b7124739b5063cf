import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  clearanceOf,
  frameSidesMm,
  hiddenBySitter,
  projected,
  rayThrough,
  unprojected,
  viewOf,
} from '#shared/domain/lighting/frame.ts'
import { dot } from '#shared/domain/lighting/geometry.ts'
import { whole } from '#tests/support/lighting-sample.ts'

const setup = whole({ camera: { at: [0, 1.5, 3], focalMm: 50 } })

describe('frameSidesMm', () => {
  it('turns the frame, and cuts a square from its middle', () => {
    expect([frameSidesMm('upright'), frameSidesMm('across'), frameSidesMm('square')]).toEqual([
      { widthMm: 24, heightMm: 36 },
      { widthMm: 36, heightMm: 24 },
      { widthMm: 24, heightMm: 24 },
    ])
  })
})

describe('viewOf', () => {
  it('looks at the sitter with the eyes a third below the top edge', () => {
    const view = viewOf(setup, 'upright')
    expect(dot(view.forward, view.right)).toBeCloseTo(0, 9)
    expect(dot(view.forward, view.up)).toBeCloseTo(0, 9)
    expect(view.right[0]).toBeCloseTo(1, 9)
    // The eyes straight ahead of a level camera: in the picture at a third of the half height.
    const height = dot([0, 0, -3], view.up) / dot([0, 0, -3], view.forward) / view.tanUp
    expect(height).toBeCloseTo(1 / 3, 9)
  })
})

describe('clearanceOf', () => {
  const view = viewOf(setup, 'across')
  it('is the distance past the edge at the point’s own depth', () => {
    const depth = dot([2, 0, -3], view.forward)
    const clearance = clearanceOf(view, [[2, 1.5, 0]])
    expect(clearance?.edge).toBe('right')
    expect(clearance?.marginM).toBeCloseTo(2 - depth * (18 / 50), 9)
  })
  it('is that of the corner nearest to the picture', () => {
    const alone = clearanceOf(view, [[2, 1.5, 0]])?.marginM ?? 0
    expect(
      clearanceOf(view, [
        [2, 1.5, 0],
        [2.4, 1.5, 0],
      ])?.marginM,
    ).toBeCloseTo(alone, 9)
  })
  it('is negative for what reaches across an edge or over the whole picture', () => {
    expect(clearanceOf(view, [[0.1, 1.5, 0]])?.marginM).toBeLessThan(0)
    expect(
      clearanceOf(view, [
        [-4, 1.5, 0],
        [4, 1.5, 0],
      ])?.marginM,
    ).toBeLessThan(0)
  })
  it('is null behind the camera', () => {
    expect(clearanceOf(view, [[0, 1.5, 5]])).toBeNull()
  })
})

describe('hiddenBySitter', () => {
  const view = viewOf(setup, 'upright')
  it('hides what is right behind the body and not what looks out beside it', () => {
    expect(
      hiddenBySitter(view, setup.places, [
        [0, 1, -1],
        [0.1, 1.1, -1],
      ]),
    ).toBe(true)
    expect(
      hiddenBySitter(view, setup.places, [
        [0, 1, -1],
        [0.6, 1.1, -1],
      ]),
    ).toBe(false)
    expect(hiddenBySitter(view, setup.places, [[0, 1, 1]])).toBe(false)
  })
})

describe('viewOf a camera with an aim', () => {
  it('looks straight at it, upright', () => {
    const aimed = whole({ camera: { at: [1, 1.5, 3], aim: [0, 1, 0] } })
    const view = viewOf(aimed, 'across')
    const length = Math.hypot(1, 0.5, 3)
    expect(view.forward[0]).toBeCloseTo(-1 / length, 12)
    expect(view.forward[1]).toBeCloseTo(-0.5 / length, 12)
    expect(dot(view.up, view.forward)).toBeCloseTo(0, 12)
    expect(dot(view.up, view.up)).toBeCloseTo(1, 12)
    expect(view.right[1]).toBe(0)
    expect(projected(view, [0, 1, 0])).toMatchObject({ depthM: expect.closeTo(length, 9) as number })
  })
  it('has a picture straight down too, and none of its own place', () => {
    const down = viewOf(whole({ camera: { at: [0, 3, 0], aim: [0, 0, 0] } }), 'across')
    expect(down.up).toEqual([0, 0, -1])
    expect(dot(down.right, down.forward)).toBeCloseTo(0, 12)
    const itself = viewOf(whole({ camera: { at: [0, 1.5, 3], aim: [0, 1.5, 3] } }), 'across')
    expect(itself).toEqual(viewOf(whole({ camera: { at: [0, 1.5, 3] } }), 'across'))
  })
})

describe('projected', () => {
  it('has the edges of the picture at ±1 and nothing behind the camera', () => {
    // A level camera: half of 24 mm over 50 mm at 3 m is the edge across.
    const level = viewOf(whole({ camera: { at: [0, 1.5, 3], aim: [0, 1.5, 0], focalMm: 50 } }), 'upright')
    expect(projected(level, [(3 * 12) / 50, 1.5, 0])?.across).toBeCloseTo(1, 12)
    expect(projected(level, [0, 1.5 + (3 * 18) / 50, 0])?.up).toBeCloseTo(1, 12)
    expect(projected(level, [0, 1.5, 4])).toBeNull()
  })
})

describe('unprojected', () => {
  const number = (min: number, max: number) => fc.double({ min, max, noNaN: true })
  const point = fc.tuple(number(-10, 10), number(0, 5), number(-10, 10))
  it('turns projected back, for any camera', () => {
    fc.assert(
      fc.property(point, point, point, number(8, 400), (at, aim, seen, focalMm) => {
        fc.pre(Math.hypot(at[0] - aim[0], at[1] - aim[1], at[2] - aim[2]) > 0.1)
        const view = viewOf(whole({ camera: { at, aim, focalMm } }), 'across')
        const there = projected(view, seen)
        if (!there) return
        const back = unprojected(view, there)
        for (const axis of [0, 1, 2] as const) expect(Math.abs(back[axis] - seen[axis])).toBeLessThan(1e-6)
      }),
    )
  })
  it('is where a ray goes', () => {
    const view = viewOf(whole({ camera: { at: [0, 1.5, 3], aim: [0, 1.5, 0], focalMm: 50 } }), 'upright')
    const ray = rayThrough(view, 1, 0)
    expect(ray[0]).toBeCloseTo(12 / 50, 12)
    expect(unprojected(view, { across: 1, up: 0, depthM: 3 })[0]).toBeCloseTo((3 * 12) / 50, 12)
  })
})
