import { describe, expect, it } from 'vitest'
import {
  type Part,
  moved,
  partKey,
  partName,
  placeWords,
  pointOf,
  snap,
  withMoves,
} from '#src/features/lighting/parts.ts'
import { light, whole } from '#tests/support/lighting-sample.ts'

const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1.1], aim: [0, 1.5, 0] })
const setup = whole({
  lights: [main, light(2, { purpose: 'rim', at: [1.2, 1.9, -1.2], aim: [0, 1.5, 0] })],
  props: [{}],
})

describe('placeWords', () => {
  it('tells a place from the sitter as it is read aloud', () => {
    expect(placeWords([-1.2, 1.5, 1.1], setup)).toBe('1.2 m left, 1.1 m towards the camera, 1.6 m from the sitter')
    expect(placeWords([0, 1.5, -2], setup)).toBe('2.0 m behind the sitter’s mark, 2.0 m from the sitter')
    expect(placeWords([0, 1.5, -2], setup, 'ft')).toBe('6′ 7″ behind the sitter’s mark, 6′ 7″ from the sitter')
    expect(placeWords([0, 2.5, 0], setup)).toBe('on the sitter’s mark, 1.0 m from the sitter')
    expect(placeWords([0, 1.5, 0], setup)).toBe('on the sitter’s mark')
  })
})

describe('snap', () => {
  it('goes to five centimetres, keeps to its limits and knows no minus zero', () => {
    expect(snap(1.23)).toBeCloseTo(1.25, 9)
    expect(snap(-80)).toBe(-50)
    expect(Object.is(snap(-0.01), 0)).toBe(true)
  })
})

describe('moved', () => {
  it('takes only what the drawing shows: a height somebody else has written meanwhile stays', () => {
    expect(moved([1, 2.4, 3], [1.5, 1.9, 2], 'plan')).toEqual([1.5, 2.4, 2])
    expect(moved([1, 2.4, 3], [1.5, 1.9, 2], 'side')).toEqual([1, 1.9, 2])
  })
})

describe('withMoves', () => {
  it('puts what is held where it is held and leaves the rest as it was', () => {
    const moved = withMoves(setup, new Map([[partKey({ kind: 'light', light: main }), [1, 2, 1]]]))
    expect(moved.lights[0]?.at).toEqual([1, 2, 1])
    expect(moved.lights[1]).toBe(setup.lights[1])
    expect(moved.setup).toBe(setup.setup)
  })
  it('is the setup itself when nothing is held', () => {
    expect(withMoves(setup, new Map())).toBe(setup)
  })
  it('moves every kind of part by its key', () => {
    const place = setup.places[0]
    const prop = setup.props[0]
    if (!place || !prop) throw new Error('the sample has both')
    const parts: Part[] = [
      { kind: 'aim', light: main },
      { kind: 'place', place },
      { kind: 'prop', prop },
      { kind: 'camera', setupId: setup.setup.id },
    ]
    for (const part of parts) {
      const moved = withMoves(setup, new Map([[partKey(part), [0.5, 1.5, 0.5]]]))
      expect(moved).not.toEqual(setup)
    }
    expect(pointOf({ kind: 'place', place }, setup)).toEqual([0, 1.5, 0])
    expect(parts.map((part) => partName(part))).toEqual(['Aim of the main', 'Sitter', 'White panel', 'Camera'])
  })
})
