import { describe, expect, it } from 'vitest'
import { type Weights, develop } from '#shared/domain/lighting/test-frame/develop.ts'
import { developStages, rowsOfLayers } from '#shared/domain/lighting/test-frame/develop-stages.ts'
import { AMBIENT, type Layers } from '#shared/domain/lighting/test-frame/render.ts'
import type { Rgb } from '#shared/domain/lighting/test-frame/scene.ts'

const WIDTH = 5
const HEIGHT = 4

/** Values that are exact in 32 bits, so that sums do not depend on their order. */
function layersOf(ids: string[]): Layers {
  const layers = ids.map((_, layer) =>
    Float32Array.from({ length: WIDTH * HEIGHT * 3 }, (_value, index) => ((index * 7 + layer * 13) % 32) / 64),
  )
  return { width: WIDTH, height: HEIGHT, ids, layers }
}

describe('developStages', () => {
  const layers = layersOf(['a', 'b', 'c', AMBIENT])
  const weights: Weights = new Map<string, Rgb>([
    ['a', [1, 0.5, 0.25]],
    ['b', [0, 0, 0]],
    ['c', [0.5, 0.5, 1]],
    [AMBIENT, [0.125, 0.125, 0.125]],
  ])

  it('gives what developing each sum by itself gives, ambient light in all of them', () => {
    const order = ['c', 'a', 'b']
    const stages = developStages(layers, weights, order)
    expect(stages).toHaveLength(3)
    stages.forEach((bytes, index) => {
      const upTo = new Set([AMBIENT, ...order.slice(0, index + 1)])
      expect(bytes).toEqual(develop(layers, new Map([...weights].filter(([id]) => upTo.has(id)))))
    })
  })

  it('leaves a picture as it is where a light is off or its layer is not there yet', () => {
    const [first, off, unknown] = developStages(layers, weights, ['a', 'b', 'z'])
    expect(off).toEqual(first)
    expect(unknown).toEqual(first)
  })
})

describe('rowsOfLayers', () => {
  it('is the same rows of the picture', () => {
    const layers = layersOf(['a', AMBIENT])
    const weights: Weights = new Map<string, Rgb>([['a', [1, 1, 1]]])
    const rows = rowsOfLayers(layers, 1, 3)
    expect(rows.height).toBe(2)
    expect(develop(rows, weights)).toEqual(develop(layers, weights).slice(WIDTH * 4, WIDTH * 3 * 4))
  })
})
