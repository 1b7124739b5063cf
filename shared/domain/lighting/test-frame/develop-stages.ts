import { type Weights, develop } from './develop.ts'
import { AMBIENT, type Layers } from './render.ts'
import type { Rgb } from './scene.ts'

const AS_IT_IS: Weights = new Map<string, Rgb>([['sum', [1, 1, 1]]])

function addLayer(sum: Float32Array, layer: Float32Array | undefined, weight: Rgb | undefined): void {
  if (!layer || !weight || (weight[0] === 0 && weight[1] === 0 && weight[2] === 0)) return
  const [r, g, b] = weight
  for (let i = 0; i < sum.length; i += 3) {
    sum[i] = (sum[i] ?? 0) + (layer[i] ?? 0) * r
    sum[i + 1] = (sum[i + 1] ?? 0) + (layer[i + 1] ?? 0) * g
    sum[i + 2] = (sum[i + 2] ?? 0) + (layer[i + 2] ?? 0) * b
  }
}

/**
 * The pictures of a setup being built up, as `develop` gives them: ambient light and the first layer of `order`, then
 * with the second, and so on; each layer is added once. A layer that is not there adds nothing.
 */
export function developStages(
  layers: Layers,
  weights: Weights,
  order: readonly string[],
): Uint8ClampedArray<ArrayBuffer>[] {
  const { width, height } = layers
  const sum = new Float32Array(width * height * 3)
  const add = (id: string) => addLayer(sum, layers.layers[layers.ids.indexOf(id)], weights.get(id))
  add(AMBIENT)
  return order.map((id) => {
    add(id)
    return develop({ width, height, ids: ['sum'], layers: [sum] }, AS_IT_IS)
  })
}

/** Rows `from` … `to` − 1 of layers, without copying them. */
export function rowsOfLayers(layers: Layers, from: number, to: number): Layers {
  const { width, ids } = layers
  return {
    width,
    height: to - from,
    ids,
    layers: layers.layers.map((layer) => layer.subarray(from * width * 3, to * width * 3)),
  }
}
