import { describe, expect, it } from 'vitest'
import type { Weights } from '#shared/domain/lighting/test-frame/develop.ts'
import type { Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { sampleAt, spotReading } from '#shared/domain/lighting/test-frame/sample.ts'
import type { Rgb } from '#shared/domain/lighting/test-frame/scene.ts'

const layers: Layers = {
  width: 2,
  height: 2,
  ids: ['a', 'b'],
  layers: [
    Float32Array.from([1, 1, 1, 2, 2, 2, 3, 3, 3, 4, 4, 4]),
    Float32Array.from([0, 0, 0, 0, 0, 0, 0, 0, 0, 8, 8, 8]),
  ],
}
const weights: Weights = new Map<string, Rgb>([
  ['a', [1, 0.5, 0]],
  ['b', [0.25, 0.25, 0.25]],
])

describe('sampleAt', () => {
  it('sums the weighed layers at a place', () => {
    expect(sampleAt(layers, weights, 0.1, 0.1)).toEqual([1, 0.5, 0])
    expect(sampleAt(layers, weights, 0.9, 0.1)).toEqual([2, 1, 0])
    expect(sampleAt(layers, weights, 0.9, 0.9)).toEqual([6, 4, 2])
  })

  it('stays in the picture at its edges and beyond', () => {
    expect(sampleAt(layers, weights, 1, 1)).toEqual([6, 4, 2])
    expect(sampleAt(layers, weights, -1, 2)).toEqual([3, 1.5, 0])
  })
})

describe('spotReading', () => {
  // A spot meter's scale: twice the light is a stop, and a stop is a factor √2 of the f-number.
  it('is 0 at middle grey, at the f-number that is set', () => {
    const { stops, fNumber } = spotReading([0.18, 0.18, 0.18], 5.6)
    expect(stops).toBeCloseTo(0, 9)
    expect(fNumber).toBeCloseTo(5.6, 9)
  })

  it('is two stops over at four times as much, and two full stops up the scale', () => {
    const { stops, fNumber } = spotReading([0.72, 0.72, 0.72], 4)
    expect(stops).toBeCloseTo(2, 9)
    expect(fNumber).toBeCloseTo(8, 9)
  })

  it('reads no f-number from black', () => {
    expect(spotReading([0, 0, 0], 8)).toEqual({ stops: -Infinity, fNumber: 0 })
  })
})
