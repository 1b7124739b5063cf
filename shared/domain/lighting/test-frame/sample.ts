import { type Weights, stopsOfValue } from './develop.ts'
import type { Layers } from './render.ts'
import type { Rgb } from './scene.ts'

/** Linear value at a place of a picture, across from its left and down from its top in shares of it. */
export function sampleAt(layers: Layers, weights: Weights, across: number, down: number): Rgb {
  const { width, height, ids } = layers
  const column = Math.min(width - 1, Math.max(0, Math.floor(across * width)))
  const row = Math.min(height - 1, Math.max(0, Math.floor(down * height)))
  const pixel = (row * width + column) * 3
  let r = 0
  let g = 0
  let b = 0
  ids.forEach((id, index) => {
    const layer = layers.layers[index]
    const weight = weights.get(id)
    if (!layer || !weight) return
    r += (layer[pixel] ?? 0) * weight[0]
    g += (layer[pixel + 1] ?? 0) * weight[1]
    b += (layer[pixel + 2] ?? 0) * weight[2]
  })
  return [r, g, b]
}

/**
 * What a spot meter says of a linear value: stops over middle grey (18 %), and the f-number at which it would be middle
 * grey, N·2^(stops/2). Black: −Infinity and 0.
 */
export function spotReading(value: Rgb, fNumber: number): { stops: number; fNumber: number } {
  const stops = stopsOfValue(...value)
  return { stops, fNumber: Number.isFinite(stops) ? fNumber * 2 ** (stops / 2) : 0 }
}
