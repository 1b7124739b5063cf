import { describe, expect, it } from 'vitest'
import {
  STOP_STEPS,
  ambientWeight,
  develop,
  falseColour,
  lightWeight,
  stopsOfValue,
  sumLayers,
  toneOf,
  weightsOf,
} from '#shared/domain/lighting/test-frame/develop.ts'
import { AMBIENT, type Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { FULL_WARM, gel, light, unit, whole } from '#tests/support/lighting-sample.ts'

const LAYERS: Layers = {
  width: 2,
  height: 1,
  ids: ['a', AMBIENT],
  layers: [new Float32Array([1, 1, 1, 4, 4, 4]), new Float32Array([2, 2, 2, 0, 0, 0])],
}

const SETUP = whole({ camera: { fNumber: 8, iso: 100 } }).setup

describe('lightWeight', () => {
  const plain = light(1, { purpose: 'main', at: [0, 1, 1], aim: [0, 1, 0], power: 1 })
  const warm = light(1, { purpose: 'main', at: [0, 1, 1], aim: [0, 1, 0], power: 1, gels: [FULL_WARM] })
  it('makes 18 % grey metered at the camera’s f-number 18 %', () => {
    // N² = H·S/C: f/8 at ISO 100 are 160 lx·s (ISO 2720, computations 1).
    const [, g] = lightWeight(plain, SETUP.camera)
    expect(0.18 * 160 * g).toBeCloseTo(0.18, 2)
  })

  it('halves with the power, a stop more for a stop of ISO, nothing when off', () => {
    const [, g] = lightWeight(plain, SETUP.camera)
    expect(lightWeight({ ...plain, power: 0.5 }, SETUP.camera)[1]).toBeCloseTo(g / 2, 12)
    expect(lightWeight(plain, { ...SETUP.camera, iso: 200 })[1]).toBeCloseTo(g * 2, 12)
    expect(lightWeight({ ...plain, isOn: false }, SETUP.camera)).toEqual([0, 0, 0])
  })

  it('takes the gel’s transmission and turns warm behind a warm one', () => {
    const [r, g, b] = lightWeight(warm, SETUP.camera)
    const [r0, g0, b0] = lightWeight(plain, SETUP.camera)
    const luminance = (x: number, y: number, z: number) => 0.2126729 * x + 0.7151522 * y + 0.072175 * z
    expect(luminance(r, g, b) / luminance(r0, g0, b0)).toBeCloseTo(0.47, 6)
    expect(r / b).toBeGreaterThan(r0 / b0)
  })
})

describe('lightWeight of what cannot be worked with', () => {
  it('is what the readings take: nothing behind a gel that lets nothing through, daylight for no colour', () => {
    const odd = (more: object) => light(1, { purpose: 'main', at: [0, 1, 1], aim: [0, 1, 0], power: 1, ...more })
    const foil = gel(960, 'Tin foil', 0, -0.5)
    expect(lightWeight(odd({ gels: [foil] }), SETUP.camera)).toEqual([0, 0, 0])
    expect(lightWeight(odd({ gels: [foil, foil] }), SETUP.camera)).toEqual([0, 0, 0])
    const none = unit(undefined, { flashColourK: { value: 0, from: 'assumed', source: 'sample' } })
    expect(lightWeight(odd({ unit: none }), SETUP.camera)).toEqual(lightWeight(odd({}), SETUP.camera))
    const red = gel(961, 'Deepest', 1e6, 0.5)
    expect(lightWeight(odd({ gels: [red] }), SETUP.camera).every(Number.isFinite)).toBe(true)
  })
})

describe('ambientWeight', () => {
  it('is E·t, and nothing when it was not measured', () => {
    const lit = { ...SETUP, ambientLux: 160, camera: { ...SETUP.camera, shutterS: 1 } }
    expect(ambientWeight(lit)[1]).toBeCloseTo(1, 2)
    expect(ambientWeight(SETUP)).toEqual([0, 0, 0])
  })
})

describe('sumLayers', () => {
  it('weighs and adds, and leaves out what has no weight', () => {
    expect([
      ...sumLayers(
        LAYERS,
        new Map([
          ['a', [1, 2, 3]],
          [AMBIENT, [10, 10, 10]],
        ]),
      ),
    ]).toEqual([21, 22, 23, 4, 8, 12])
    expect([...sumLayers(LAYERS, new Map([['a', [1, 1, 1]]]))]).toEqual([1, 1, 1, 4, 4, 4])
  })
})

describe('weightsOf', () => {
  it('has every light and the ambient', () => {
    const lights = [light(1, { purpose: 'main', at: [0, 1, 1], aim: [0, 1, 0] })]
    expect([...weightsOf(SETUP, lights).keys()]).toEqual([lights[0]?.id, AMBIENT])
  })
})

describe('toneOf', () => {
  it('rises, keeps the middle tones and never passes 1', () => {
    let last = -1
    for (let value = 0; value < 20; value += 0.01) {
      const tone = toneOf(value)
      expect(tone).toBeGreaterThanOrEqual(last)
      expect(tone).toBeLessThanOrEqual(1)
      last = tone
    }
    expect(Math.abs(Math.log2(toneOf(0.18) / 0.18))).toBeLessThan(0.1)
  })
})

describe('develop', () => {
  it('gives opaque bytes: black stays black, brighter is brighter', () => {
    const [r, , , alpha, r2] = develop(LAYERS, new Map([['a', [0.1, 0.1, 0.1]]]))
    expect(alpha).toBe(255)
    expect(r2).toBeGreaterThan(r ?? NaN)
    expect(develop(LAYERS, new Map())[0]).toBe(0)
    // 18 % is 118 in sRGB (IEC 61966-2-1); the toe takes a little.
    const grey = develop(LAYERS, new Map([['a', [0.18, 0.18, 0.18]]]))[0] ?? NaN
    expect(Math.abs(grey - 118)).toBeLessThan(6)
  })
})

describe('falseColour', () => {
  it('colours by stops against middle grey', () => {
    expect(stopsOfValue(0.18, 0.18, 0.18)).toBeCloseTo(0, 12)
    expect(stopsOfValue(0.72, 0.72, 0.72)).toBeCloseTo(2, 12)
    expect(stopsOfValue(0, 0, 0)).toBe(-Infinity)
    const bytes = falseColour(LAYERS, new Map([['a', [0.18, 0.18, 0.18]]]))
    expect([...bytes.slice(0, 3)]).toEqual(STOP_STEPS.find((step) => step.words === 'middle grey')?.colour)
    expect([...bytes.slice(4, 7)]).toEqual(STOP_STEPS.find((step) => step.words === '+3')?.colour)
  })
})
