import { describe, expect, it } from 'vitest'
import {
  lightGelSchema,
  lightModifierSchema,
  lightSupportSchema,
  lightUnitSchema,
} from '#shared/domain/lighting/schema.ts'
import { newerNumbersOf } from '#src/features/lighting/newer-numbers.ts'
import { FULL_WARM, OCTA, STAND, light, unit, whole } from '#tests/support/lighting-sample.ts'

const face: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [-1, 1.9, 1], aim: face, modifier: OCTA, gels: [FULL_WARM] })
const fill = light(2, { purpose: 'fill', at: [1, 1.9, 1], aim: face })
const setup = whole({ lights: [main, fill] })
const stated = (value: number) => ({ value, from: 'measured' as const, source: 'meter' })
const none = { units: [], modifiers: [], gels: [], supports: [] }
const newUnit = (more: Record<string, unknown>, version = 2) =>
  lightUnitSchema.parse({ ...unit(undefined, more), version })
const entry = (guideNumberM: number, modifierKitId: string | null = null) => ({
  modifierKitId,
  zoomMm: null,
  guideNumberM,
  source: 'f/5 at 2 m',
})

describe('newerNumbersOf', () => {
  it('is nothing while copies are as new as the kit room, or only a name has changed', () => {
    expect(newerNumbersOf(setup, none)).toEqual([])
    expect(newerNumbersOf(setup, { ...none, units: [newUnit({ guideNumberM: stated(52) }, 1)] })).toEqual([])
    expect(newerNumbersOf(setup, { ...none, units: [{ ...newUnit({}), name: 'Flash one' }] })).toEqual([])
  })

  it('says of every light what changes, and takes it over whole', () => {
    const units = [newUnit({ guideNumberM: stated(52) })]
    const newer = newerNumbersOf(setup, { ...none, units })
    expect(newer.map(({ light: { purpose }, words }) => [purpose, words])).toEqual([
      ['main', ['GN 40 → 52 measured']],
      ['fill', ['GN 40 → 52 measured']],
    ])
    expect(newer[0]?.patch).toEqual({ unit: units[0] })
  })

  it('looks at modifiers, gels and supports too', () => {
    const modifier = lightModifierSchema.parse({
      ...OCTA,
      version: 3,
      numbers: { ...OCTA.numbers, lossStops: stated(1.7) },
    })
    const gel = lightGelSchema.parse({
      ...FULL_WARM,
      version: 2,
      numbers: { ...FULL_WARM.numbers, miredShift: stated(-160) },
    })
    const support = lightSupportSchema.parse({
      ...STAND,
      version: 2,
      numbers: { ...STAND.numbers, maxLoadKg: stated(2) },
    })
    const [first] = newerNumbersOf(setup, { units: [], modifiers: [modifier], gels: [gel], supports: [support] })
    expect(first?.words).toEqual([
      '90 cm octa: 0 → 1.7 stops measured',
      'Full warm +167: 167 → −160 mired measured',
      '2.4 m stand: 3 → 2 kg carried measured',
    ])
    expect(first?.patch).toEqual({ modifier, gels: [gel], support })
  })

  it('names a meter reading that this light will be computed with', () => {
    const metered = [entry(21.5, OCTA.kitId), entry(39)]
    const newer = newerNumbersOf(setup, { ...none, units: [newUnit({ metered })] })
    expect(newer.map(({ words }) => words)).toEqual([['with 90 cm octa GN 21.5 measured'], ['bare GN 39 measured']])
    const elsewhere = newerNumbersOf(setup, { ...none, units: [newUnit({ metered: [entry(9, STAND.kitId)] })] })
    expect(elsewhere[0]?.words).toEqual(['Small flash: meter readings'])
  })

  it('keeps a reading taken on the spot that the kit room does not know', () => {
    const own = { ...fill, unit: lightUnitSchema.parse(unit(undefined, { metered: [entry(39)] })) }
    const [newer] = newerNumbersOf(whole({ lights: [own] }), {
      ...none,
      units: [newUnit({ guideNumberM: stated(52) })],
    })
    expect(newer?.patch.unit).toMatchObject({ version: 2, numbers: { guideNumberM: stated(52), metered: [entry(39)] } })
    const same = newerNumbersOf(whole({ lights: [own] }), { ...none, units: [newUnit({})] })
    expect(same).toEqual([])
  })
})
