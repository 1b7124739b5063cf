import { describe, expect, it } from 'vitest'
import { isBehindBackground, mainFNumberOf, readArrivalOf, wallTargetOf } from '#shared/domain/lighting/at-sitter.ts'
import { light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const main = (n: number, more: object = {}) =>
  light(n, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, power: 1, ...more })
const { background } = whole({}).setup

describe('isBehindBackground', () => {
  it('is so only where the wall is in the way', () => {
    expect(isBehindBackground(main(1, { at: [0, 1.5, -3] }), FACE, background)).toBe(true)
    expect(isBehindBackground(main(1, { at: [0, 1.5, -1] }), FACE, background)).toBe(false)
    // Over the top: on its way from 8 m at z −3 it passes z −2 at 5.8 m, the wall is 3 m high.
    expect(isBehindBackground(main(1, { at: [0, 8, -3] }), FACE, background)).toBe(false)
    expect(isBehindBackground(main(1, { at: [0, 1.5, -3] }), [0, 1.5, -2.5], background)).toBe(false)
  })
})

describe('wallTargetOf', () => {
  it('is where the axis of a background light meets the wall, and nothing for others', () => {
    const to = { at: [1, 1, 0] as [number, number, number], aim: [0.5, 1.5, -1] as [number, number, number] }
    expect(wallTargetOf(light(2, { purpose: 'background', ...to }), background)).toEqual([0, 2, -2])
    expect(wallTargetOf(main(1, to), background)).toBeNull()
  })
})

describe('readArrivalOf', () => {
  it('is at the eyes, nothing through the wall, and on the wall with the cosine', () => {
    expect(readArrivalOf(main(1), whole({}))).toMatchObject({ where: 'sitter', distanceM: 2 })
    expect(readArrivalOf(main(1, { at: [0, 1.5, -3] }), whole({})).fNumber).toBe(0)
    // 45° to the wall from √2 m: E = I·cos φ/d² (IES 9.1.2), 2.5·40²·cos 45°/2.
    const aslant = light(2, { purpose: 'background', at: [0, 1.5, -1], aim: [1, 1.5, -2], power: 1 })
    const arrival = readArrivalOf(aslant, whole({}))
    expect(arrival.where).toBe('wall')
    expect(arrival.exposureLxS / ((4000 * Math.SQRT1_2) / 2)).toBeCloseTo(1, 2)
  })
})

describe('mainFNumberOf', () => {
  it('adds mains: f/20 twice is f/28.3', () => {
    // √(20² + 20²), less the 3 cm of the head’s window.
    expect(mainFNumberOf(whole({ lights: [main(1), main(2)] }))).toBeCloseTo(28.28, 1)
  })
  it('is null without one that is on and reaches the eyes', () => {
    expect(mainFNumberOf(whole({}))).toBeNull()
    expect(mainFNumberOf(whole({ lights: [main(1, { isOn: false })] }))).toBeNull()
    expect(mainFNumberOf(whole({ lights: [main(1, { at: [0, 1.5, -3] })] }))).toBeNull()
  })
})
