import { describe, expect, it } from 'vitest'
import {
  AMBIENT,
  type Layers,
  emptyLayers,
  renderFrame,
  renderRows,
} from '#shared/domain/lighting/test-frame/render.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import { sumLayers, weightsOf } from '#shared/domain/lighting/test-frame/develop.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { beam, emitter, figure, scene } from '#tests/support/frame-sample.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { FULL_WARM, GRID, OCTA, SOFTBOX, light, modifier, unit, whole } from '#tests/support/lighting-sample.ts'

function layerOf(layers: Layers, id: string): Float32Array {
  const layer = layers.layers[layers.ids.indexOf(id)]
  if (!layer) throw new Error(`no layer ${id}`)
  return layer
}

/** Exposure of the wall in the middle of the picture: what was sent over the paper's reflectance. */
function middle(of: Scene, id = 'a', size = 21): number {
  const layers = renderFrame(of, 'fine', size, size)
  const at = (Math.floor(size / 2) * size + Math.floor(size / 2)) * 3
  return (layerOf(layers, id)[at] ?? NaN) / 0.5
}

describe('renderFrame', () => {
  it('gives a wall pixel the closed form I·cos φ/d² of a point, within 2 %', () => {
    // The axis meets the wall at 2 m straight on, then at a slant: computations 5, E = I(θ)·cos φ/d².
    expect(middle(scene())).toBeCloseTo(1000 / 4, 0)
    const slant = middle(scene({ emitters: [emitter({ at: [1.5, 1.5, 0], aim: [0, 1.5, -2] })] }))
    const d = Math.hypot(1.5, 2)
    expect(slant / ((1000 * (2 / d)) / d ** 2)).toBeCloseTo(1, 2)
  })

  it('gives a point off the axis the share of its beam', () => {
    // cos⁴-like: 20° off a Gaussian of 40° is half, times cos³ for slant and distance (computations 5).
    const off = Math.tan((20 * Math.PI) / 180) * 2
    const lit = middle(scene({ emitters: [emitter({ at: [off, 1.5, 0], aim: [off, 1.5, -2], beam: beam(40) })] }))
    expect(lit / (250 * 0.5 * Math.cos((20 * Math.PI) / 180) ** 3)).toBeCloseTo(1, 2)
  })

  it('gives a disc on its axis d²/(d² + r²) of a point, within 2 %', () => {
    // 1 m wide from 2.5 m: .9615 (computations 5, IES definitions 9.1.1); 1 m from 1 m: .8.
    const disc = { widthM: 1, heightM: 1, beam: beam(120) }
    const far = middle(scene({ emitters: [emitter({ ...disc, at: [0, 1.5, 0.5] })] }))
    expect(Math.abs(far / ((1000 / 2.5 ** 2) * 0.9615) - 1)).toBeLessThan(0.02)
    const near = middle(scene({ emitters: [emitter({ ...disc, at: [0, 1.5, -1] })] }))
    expect(Math.abs(near / (1000 * 0.8) - 1)).toBeLessThan(0.02)
  })

  it('loses two stops when a distance of ten radii and more is doubled', () => {
    const disc = { widthM: 0.2, heightM: 0.2, beam: beam(120) }
    const at = (z: number) => middle(scene({ emitters: [emitter({ ...disc, at: [0, 1.5, z - 2] })] }))
    expect(Math.abs(Math.log2(at(1) / at(2)) - 2)).toBeLessThan(0.02)
    expect(Math.abs(Math.log2(at(2) / at(4)) - 2)).toBeLessThan(0.02)
  })

  it('is in sum what all lights give together', () => {
    const a = emitter({ at: [-1.2, 2, 1], aim: [0, 1.5, 0], widthM: 0.9, heightM: 0.9 })
    const b = emitter({ id: 'b', at: [1, 1.2, 1.5], aim: [0, 1.4, 0], axisIntensity: 300 })
    const of = scene({ figures: [figure()], emitters: [a, b], room: { areaM2: 126, reflectance: 0.3 } })
    const both = renderFrame(of, 'fine', 40, 50)
    const alone = renderFrame({ ...of, emitters: [a] }, 'fine', 40, 50)
    const other = renderFrame({ ...of, emitters: [b] }, 'fine', 40, 50)
    expect(layerOf(both, 'a')).toEqual(layerOf(alone, 'a'))
    expect(layerOf(both, 'b')).toEqual(layerOf(other, 'b'))
    expect(layerOf(both, AMBIENT)).toEqual(layerOf(alone, AMBIENT))
  })

  it('is the same picture every time, at once or by rows, and in proportion to the intensity', () => {
    const of = scene({
      figures: [figure()],
      emitters: [emitter({ at: [-1, 2, 1.2], aim: [0, 1.5, 0], widthM: 0.6, heightM: 0.6 })],
    })
    const whole = renderFrame(of, 'fine', 40, 50)
    expect(renderFrame(of, 'fine', 40, 50)).toEqual(whole)
    const parts = emptyLayers(of, 40, 50)
    for (const [from, to] of [
      [26, 50],
      [0, 13],
      [13, 26],
    ] as const)
      for (const _ of renderRows(of, 'fine', parts, from, to));
    expect(parts).toEqual(whole)
    const strong = renderFrame(
      { ...of, emitters: of.emitters.map((each) => ({ ...each, axisIntensity: 2000 })) },
      'fine',
      40,
      50,
    )
    layerOf(strong, 'a').forEach((value, i) => expect(value).toBeCloseTo(2 * (layerOf(whole, 'a')[i] ?? NaN), 2))
  })

  it('has no noise on an evenly lit wall: σ at most 1 %', () => {
    const of = scene({
      emitters: [emitter({ at: [0, 1.5, 8], aim: [0, 1.5, -2], widthM: 1, heightM: 1, beam: beam(120) })],
    })
    const layers = renderFrame(of, 'fine', 48, 48)
    const lit = layerOf(layers, 'a')
    // Differences from the mean of the row above and below: what is left when the slow fall-off is taken away.
    const rests: number[] = []
    for (let y = 1; y < 47; y++) {
      for (let x = 0; x < 48; x++) {
        const value = (row: number) => lit[(row * 48 + x) * 3] ?? NaN
        rests.push(value(y) / ((value(y - 1) + value(y + 1)) / 2) - 1)
      }
    }
    const mean = rests.reduce((sum, rest) => sum + rest, 0) / rests.length
    expect(Math.sqrt(rests.reduce((sum, rest) => sum + (rest - mean) ** 2, 0) / rests.length)).toBeLessThan(0.01)
  })

  it('throws the shadow of a ball where the lines from the light say', () => {
    const ball = {
      shape: 'ball',
      at: [0, 1.5, -1],
      turn: 0,
      widthM: 0.4,
      heightM: 0.4,
      colour: [0.5, 0.5, 0.5],
      seed: 1,
    } as const
    const size = 101
    const layers = renderFrame(
      scene({ props: [ball], emitters: [emitter({ at: [1, 1.5, 0], aim: [0, 1.5, -1] })] }),
      'fine',
      size,
      size,
    )
    // The light's line through the ball's middle meets the wall at x = −1, 5 m before the lens.
    const column = Math.round(((-1 / (5 * 0.2) + 1) / 2) * size)
    const at = (x: number) => layerOf(layers, 'a')[(50 * size + Math.min(size - 1, Math.max(0, x))) * 3] ?? NaN
    expect(at(column + 2)).toBe(0)
    expect(at(column + 30)).toBeGreaterThan(10)
  })

  it('keeps what a flag shades dark, and gives what a panel gives back', () => {
    const light = emitter({ at: [0, 1.5, 1.5], aim: [0, 1.5, -2] })
    const sheet = { at: [0, 1.5, 0] as const, turn: 0, widthM: 1, heightM: 1, colour: [0.02, 0.02, 0.02] as const }
    const open = scene({ view: { ...scene().view, at: [0, 1.5, -0.5] }, emitters: [light] })
    expect(middle(open)).toBeGreaterThan(50)
    expect(middle({ ...open, sheets: [{ ...sheet, at: [0, 1.5, 0] }] })).toBe(0)
    const dark = { ...open, emitters: [emitter({ at: [0, 1.5, -1], aim: [0, 1.5, 3] })] }
    expect(middle(dark)).toBe(0)
    const white = {
      ...dark,
      sheets: [{ ...sheet, at: [0, 1.5, 0] as [number, number, number], colour: [0.9, 0.9, 0.9] as const }],
    }
    expect(middle(white)).toBeGreaterThan(5)
  })
})

describe('a grey patch at the eyes, turned to the light', () => {
  const eyes: [number, number, number] = [0, 1.5, 0]
  const lantern = modifier(971, 'Lantern', { shape: 'lantern', widthM: 0.65, heightM: 0.65 })
  const zoom = [{ focalMm: 50, guideNumberM: 42 }]
  const bulb = lampUnit(64, { beamDeg: { value: 360, from: 'assumed', source: 'sample' } })
  it.each([
    ['a bare zoom head off its axis', { unit: unit(undefined, { zoom }), zoomMm: 50, aim: [0.3, 1.5, 0] }],
    ['an octa close by', { modifier: OCTA }],
    ['a softbox behind a gel', { modifier: SOFTBOX, gels: [FULL_WARM], power: 0.1 }],
    ['a grid off its axis', { modifier: GRID, aim: [0.05, 1.5, 0] }],
    ['a lantern that looks away', { modifier: lantern, aim: [2, 1.5, 3] }],
    ['a lamp', { unit: lampUnit(4000), power: 0.5 }],
    ['a bulb that looks away', { unit: bulb, aim: [2, 1.5, 3] }],
  ])('has the exposure that is read of $0, within 2 %', (_, more) => {
    const one = light(1, { purpose: 'main', at: [0.6, 1.5, 0.8], aim: eyes, ...(more as object) })
    const setup = whole({ lights: [one], camera: { at: [0, 1.5, 4], aim: eyes, focalMm: 200, whiteBalanceK: 5600 } })
    const patch = {
      at: eyes,
      turn: Math.atan2(0.6, 0.8),
      widthM: 0.12,
      heightM: 0.12,
      colour: [0.5, 0.5, 0.5] as const,
    }
    const of = { ...sceneOf(setup, 'square', { garmentColour: () => null }), figures: [], sheets: [patch] }
    const layers = renderFrame({ ...of, room: { areaM2: 126, reflectance: 0 } }, 'fine', 21, 21)
    const [r = NaN, g = NaN, b = NaN] = sumLayers(layers, weightsOf(setup.setup, [one])).slice(220 * 3, 221 * 3)
    const { fNumber, iso } = setup.setup.camera
    // N² = H·S/C (ISO 2720): a value of ρ is the camera's own exposure.
    const exposureLxS = (((0.2126729 * r + 0.7151522 * g + 0.072175 * b) / 0.5) * 250 * fNumber ** 2) / iso
    expect(Math.abs(exposureLxS / (readSetup(setup).lights[0]?.exposureLxS ?? NaN) - 1)).toBeLessThan(0.02)
  })
})
