import { METER_CONSTANT_C } from '../exposure.ts'
import { miredOf, stackGels } from '../gel.ts'
import { gelShareOf } from '../light-output.ts'
import { ownColourK } from '../light-source.ts'
import { type Light, type Setup, isLamp } from '../schema.ts'
import { lightColour } from './light-colour.ts'
import { AMBIENT, type Layers } from './render.ts'
import type { Rgb } from './scene.ts'

/** What each layer of a picture is multiplied with before they are summed, by layer id; missing ones count as 0. */
export type Weights = ReadonlyMap<string, Rgb>

/** Exposure to value: a matt reflectance ρ metered at the camera's own f-number comes out as ρ. S/(C·N²). */
function cameraScale(camera: Setup['camera']): number {
  return camera.iso / (METER_CONSTANT_C * camera.fNumber ** 2)
}

/** What a light's layer weighs: power, gels, colour against the white balance, the camera. Off: 0. */
export function lightWeight(light: Light, camera: Setup['camera']): Rgb {
  if (!light.isOn || !(light.power > 0)) return [0, 0, 0]
  const { miredShift } = stackGels(light.gels.map((gel) => gel.numbers))
  const colour = lightColour(miredOf(ownColourK(light.unit.numbers)) + miredShift, camera.whiteBalanceK)
  const amount =
    light.power * gelShareOf(light) * (isLamp(light.unit.numbers) ? camera.shutterS : 1) * cameraScale(camera)
  return [colour[0] * amount, colour[1] * amount, colour[2] * amount]
}

/** What the ambient layer weighs. */
export function ambientWeight(setup: Setup): Rgb {
  if (setup.ambientLux === null) return [0, 0, 0]
  const { camera } = setup
  const colour = lightColour(miredOf(setup.ambientK ?? camera.whiteBalanceK), camera.whiteBalanceK)
  const amount = setup.ambientLux * camera.shutterS * cameraScale(camera)
  return [colour[0] * amount, colour[1] * amount, colour[2] * amount]
}

/** Weights of the picture that these lights make together, ambient light included. */
export function weightsOf(setup: Setup, lights: readonly Light[]): Weights {
  return new Map<string, Rgb>([
    ...lights.map((light): [string, Rgb] => [light.id, lightWeight(light, setup.camera)]),
    [AMBIENT, ambientWeight(setup)],
  ])
}

/** Where the film's shoulder begins; below it a value stays as it is. */
const SHOULDER = 0.42

/** Film-like curve of a linear value: a slight toe, straight through the middle tones, a long shoulder towards 1. */
export function toneOf(value: number): number {
  if (value <= 0) return 0
  const toed = (value * (value + 0.002)) / (value + 0.012)
  if (toed <= SHOULDER) return toed
  return SHOULDER + (1 - SHOULDER) * (1 - Math.exp(-(toed - SHOULDER) / (1 - SHOULDER)))
}

function encoded(linear: number): number {
  return linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055
}

/** Steps of the table, square root spaced: fine in the shadows. */
const TABLE_STEPS = 4096
const TABLE_MOST = 16
const TABLE = Uint8ClampedArray.from({ length: TABLE_STEPS + 1 }, (_, i) =>
  Math.round(255 * encoded(toneOf((i / TABLE_STEPS) ** 2 * TABLE_MOST))),
)

function byteOf(value: number): number {
  if (!(value > 0)) return 0
  return TABLE[Math.min(TABLE_STEPS, (Math.sqrt(value / TABLE_MOST) * TABLE_STEPS + 0.5) | 0)] ?? 255
}

/** Layers weighed and summed: linear red, green, blue by rows. */
export function sumLayers(layers: Layers, weights: Weights): Float32Array {
  const sum = new Float32Array(layers.width * layers.height * 3)
  layers.ids.forEach((id, index) => {
    const layer = layers.layers[index]
    const weight = weights.get(id)
    if (!layer || !weight || (weight[0] === 0 && weight[1] === 0 && weight[2] === 0)) return
    const [r, g, b] = weight
    for (let i = 0; i < sum.length; i += 3) {
      sum[i] = (sum[i] ?? 0) + (layer[i] ?? 0) * r
      sum[i + 1] = (sum[i + 1] ?? 0) + (layer[i + 1] ?? 0) * g
      sum[i + 2] = (sum[i + 2] ?? 0) + (layer[i + 2] ?? 0) * b
    }
  })
  return sum
}

/** The picture as sRGB bytes with alpha, by rows. */
export function develop(layers: Layers, weights: Weights): Uint8ClampedArray<ArrayBuffer> {
  const sum = sumLayers(layers, weights)
  const bytes = new Uint8ClampedArray(layers.width * layers.height * 4)
  for (let i = 0, o = 0; i < sum.length; i += 3, o += 4) {
    bytes[o] = byteOf(sum[i] ?? 0)
    bytes[o + 1] = byteOf(sum[i + 1] ?? 0)
    bytes[o + 2] = byteOf(sum[i + 2] ?? 0)
    bytes[o + 3] = 255
  }
  return bytes
}

/** Steps of the picture in stops, each with a colour of its own and the words for it; the last one is all above. */
export const STOP_STEPS = [
  { below: -5, colour: [14, 12, 20], words: 'black' },
  { below: -4, colour: [38, 30, 66], words: '−5' },
  { below: -3, colour: [44, 52, 104], words: '−4' },
  { below: -2, colour: [47, 79, 112], words: '−3' },
  { below: -1, colour: [64, 116, 122], words: '−2' },
  { below: -0.5, colour: [104, 142, 112], words: '−1' },
  { below: 0.5, colour: [128, 128, 128], words: 'middle grey' },
  { below: 1, colour: [190, 176, 110], words: '+1' },
  { below: 2, colour: [226, 178, 84], words: '+2' },
  { below: 3, colour: [240, 226, 190], words: '+3' },
  { below: Infinity, colour: [200, 60, 60], words: 'burnt out' },
] as const

/** Brightness of a linear value against middle grey (18 %), stops. */
export function stopsOfValue(r: number, g: number, b: number): number {
  const luminance = 0.2126 * r + 0.7152 * g + 0.0722 * b
  return luminance <= 0 ? -Infinity : Math.log2(luminance / 0.18)
}

/** The picture in false colours: each pixel by its stops against middle grey. */
export function falseColour(layers: Layers, weights: Weights): Uint8ClampedArray<ArrayBuffer> {
  const sum = sumLayers(layers, weights)
  const bytes = new Uint8ClampedArray(layers.width * layers.height * 4)
  for (let i = 0, o = 0; i < sum.length; i += 3, o += 4) {
    const stops = stopsOfValue(sum[i] ?? 0, sum[i + 1] ?? 0, sum[i + 2] ?? 0)
    const step = STOP_STEPS.find((candidate) => stops < candidate.below) ?? STOP_STEPS[STOP_STEPS.length - 1]
    bytes[o] = step?.colour[0] ?? 0
    bytes[o + 1] = step?.colour[1] ?? 0
    bytes[o + 2] = step?.colour[2] ?? 0
    bytes[o + 3] = 255
  }
  return bytes
}
