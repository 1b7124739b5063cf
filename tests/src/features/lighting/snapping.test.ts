import { describe, expect, it } from 'vitest'
import type { Point } from '#shared/domain/lighting/schema.ts'
import type { DrawingKind, Part } from '#src/features/lighting/parts.ts'
import { gridM, mirroredPlace, snapPoint } from '#src/features/lighting/snapping.ts'
import { light, whole } from '#tests/support/lighting-sample.ts'

const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1.1], aim: [0, 1.5, 0] })
const fill = light(2, { purpose: 'fill', at: [2, 2.2, -0.4], aim: [0, 1.5, 0] })
const setup = whole({ lights: [main, fill] })

function snapped(part: Part, raw: Point, drawing: DrawingKind, more: { isFree?: boolean; own?: typeof setup } = {}) {
  const { isFree = false, own = setup } = more
  return snapPoint({ part, raw, drawing, whole: own, gridM: gridM('m'), reachM: 0.1, isFree })
}

describe('snapPoint in the plan', () => {
  it('goes to the grid and leaves the height', () => {
    expect(snapped({ kind: 'light', light: fill }, [1.512, 2.21, 0.777], 'plan')).toEqual({
      at: [1.5, 2.21, 0.8],
      guides: [],
    })
  })
  it('goes to two inches where lengths are in feet', () => {
    const { at } = snapPoint({
      part: { kind: 'light', light: fill },
      raw: [1, 2, 1],
      drawing: 'plan',
      whole: setup,
      gridM: gridM('ft'),
      reachM: 0,
      isFree: false,
    })
    expect(at[0] / 0.0254).toBeCloseTo(40, 1)
  })
  it('goes onto the line between camera and sitter and shows it', () => {
    const { at, guides } = snapped({ kind: 'light', light: fill }, [0.07, 2.2, 1.53], 'plan')
    expect(at).toEqual([0, 2.2, 1.55])
    expect(guides).toHaveLength(1)
  })
  it('does so on a slanting axis too', () => {
    const own = whole({ camera: { at: [2, 1.4, 2] }, lights: [fill] })
    const { at } = snapped({ kind: 'light', light: fill }, [1.05, 2, 0.98], 'plan', { own })
    expect(at[0]).toBeCloseTo(at[2], 9)
  })
  it('goes to the mirrored place of another light before it goes to lines', () => {
    const { at, guides } = snapped({ kind: 'light', light: fill }, [1.26, 2.2, 1.06], 'plan')
    expect(at).toEqual([1.2, 2.2, 1.1])
    expect(guides[0]?.from).toEqual(main.at)
  })
  it('brings an aim onto the eyes and a camera straight before the sitter', () => {
    expect(snapped({ kind: 'aim', light: fill }, [0.06, 1.2, -0.07], 'plan').at).toEqual([0, 1.2, 0])
    expect(snapped({ kind: 'camera', setupId: setup.setup.id }, [0.08, 1.4, 2.68], 'plan').at).toEqual([0, 1.4, 2.7])
  })
  it('does none of it while a key is held', () => {
    expect(snapped({ kind: 'light', light: fill }, [0.0712, 2.2, 1.533], 'plan', { isFree: true })).toEqual({
      at: [0.07, 2.2, 1.53],
      guides: [],
    })
  })
})

describe('snapPoint from the side', () => {
  it('goes to the eye line and leaves what the side does not show', () => {
    const { at, guides } = snapped({ kind: 'light', light: fill }, [2, 1.56, 0.61], 'side')
    expect(at).toEqual([2, 1.5, 0.6])
    expect(guides).toHaveLength(1)
  })
  it('goes beside another light at its height', () => {
    expect(snapped({ kind: 'light', light: fill }, [2, 1.85, 1.04], 'side').at).toEqual([2, 1.9, 1.1])
  })
  it('keeps a sitter’s eyes where eyes can be, and lights off the ground', () => {
    const place = setup.places[0]
    if (!place) throw new Error('the sample has one')
    expect(snapped({ kind: 'place', place }, [0, 5, 0], 'side').at).toEqual([0, 2.4, 0])
    expect(snapped({ kind: 'light', light: fill }, [2, -3, 0], 'side').at[1]).toBe(0)
  })
})

describe('mirroredPlace', () => {
  it('is itself again when mirrored twice, as far from the sitter, on any axis', () => {
    for (const at of [
      [0, 1.4, 3],
      [2, 1.4, 1],
      [-1, 2, -2],
    ] as const) {
      const own = whole({ camera: { at: [...at] } })
      const once = mirroredPlace([1.3, 2, 0.4], own)
      expect(Math.hypot(once[0], once[2])).toBeCloseTo(Math.hypot(1.3, 0.4), 9)
      mirroredPlace(once, own).forEach((value, axis) => expect(value).toBeCloseTo([1.3, 2, 0.4][axis] ?? NaN, 9))
    }
  })
})
