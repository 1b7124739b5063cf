import { describe, expect, it } from 'vitest'
import { clearanceOf, frameSidesMm, hiddenBySitter, viewOf } from '#shared/domain/lighting/frame.ts'
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
