import { describe, expect, it } from 'vitest'
import { reflectedRgb } from '#shared/domain/lighting/appearance.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import { lightIdSchema } from '#shared/ids.ts'
import { FULL_WARM, GRID, OCTA, id, light, whole } from '#tests/support/lighting-sample.ts'

const NOBODY = { garmentColour: () => null }
const PLACED = { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA } as const
const main = (more: Partial<Parameters<typeof light>[1]> = {}) =>
  light(1, { ...PLACED, at: [...PLACED.at], aim: [...PLACED.aim], ...more })
const MAIN = main()

describe('sceneOf', () => {
  it('takes a light’s intensity on axis as 2.5·GN², whatever its power, gels and switch', () => {
    // H = 2.5·GN₁₀₀²/d² (computations 1); the sample head has GN 40 and its octa takes nothing.
    const lights = [MAIN, { ...MAIN, power: 1 / 64 }, main({ gels: [FULL_WARM] }), { ...MAIN, isOn: false }]
    for (const each of lights) {
      const [only] = sceneOf(whole({ lights: [each] }), 'upright', NOBODY).emitters
      expect((only?.axisIntensity ?? NaN) / 4000).toBeCloseTo(1, 6)
      expect([only?.widthM, only?.shape]).toEqual([0.9, 'disc'])
    }
  })

  it('keeps the beam for the picture and out of the intensity', () => {
    const [only] = sceneOf(whole({ lights: [main({ modifier: GRID })] }), 'upright', NOBODY).emitters
    expect(only?.beam.beamDeg).toBe(10)
    expect((only?.axisIntensity ?? NaN) / 4000).toBeCloseTo(1, 6)
  })

  it('is told apart by what a picture shows and by nothing else', () => {
    const text = (of: ReturnType<typeof whole>) => JSON.stringify(sceneOf(of, 'upright', NOBODY))
    const base = whole({ lights: [MAIN] })
    expect(text(whole({ lights: [{ ...MAIN, power: 0.01 }] }))).toBe(text(base))
    expect(text(whole({ lights: [MAIN], camera: { iso: 800, whiteBalanceK: 3200 } }))).toBe(text(base))
    expect(text(whole({ lights: [{ ...MAIN, at: [-1.1, 2, 1] }] }))).not.toBe(text(base))
  })

  it('dresses a sitter in the look’s colour, and panels become sheets', () => {
    const of = sceneOf(whole({ props: [{}, { kind: 'prop', name: 'Table', shape: 'table' }] }), 'upright', {
      garmentColour: () => '#804020',
    })
    expect(of.figures[0]?.garment).toEqual(reflectedRgb('#804020'))
    expect([of.sheets.length, of.props.length]).toEqual([1, 1])
  })

  it('leaves out what no shoot has so many of', () => {
    const crowd = whole({
      lights: Array.from({ length: 90 }, (_, n) => ({ ...MAIN, id: lightIdSchema.parse(id(n + 1)) })),
    })
    expect(sceneOf(crowd, 'upright', NOBODY).emitters.length).toBe(32)
  })
})
