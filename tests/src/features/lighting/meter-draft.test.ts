import { describe, expect, it } from 'vitest'
import { kitItemSchema } from '#shared/api/kit.ts'
import { guideNumberOfReading } from '#shared/domain/kit/meter-reading.ts'
import { outputOf } from '#shared/domain/lighting/light-output.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { assumedFNumber, draftOf, measuredItem, measuredUnit, readingOf } from '#src/features/lighting/meter-draft.ts'
import { FULL_WARM, OCTA, light, unit, whole } from '#tests/support/lighting-sample.ts'

const face: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1.2], aim: [0.4, 1.4, 0], modifier: OCTA, gels: [FULL_WARM] })
const setup = whole({ lights: [main, light(2, { purpose: 'fill', at: [1, 1.9, 1], aim: face, isOn: false })] })
const [at, off] = readSetup(setup).lights
const { iso } = setup.setup.camera
if (!at || !off) throw new Error('two lights read')

describe('draftOf', () => {
  it('begins with the drawing’s distance and power', () => {
    expect(draftOf(main, at)).toEqual({ fNumber: null, distanceM: Number(at.distanceM.toFixed(2)), power: 0.25 })
  })
})

describe('assumedFNumber', () => {
  it('is what the setup reads there, and the power law elsewhere', () => {
    const here = { distanceM: at.distanceM, power: main.power }
    expect(assumedFNumber(main, at, here, iso)).toBeCloseTo(at.fNumber, 9)
    // A quarter of the power is two stops: half the f-number.
    expect(assumedFNumber(main, at, { ...here, power: main.power / 4 }, iso)).toBeCloseTo(at.fNumber / 2, 9)
  })

  it('counts a light that is switched off as if it were on', () => {
    const fill = setup.lights[1]
    expect(off.fNumber).toBe(0)
    expect(fill && assumedFNumber(fill, off, draftOf(fill, off), iso)).toBeGreaterThan(4)
  })
})

describe('readingOf', () => {
  it('gives back the head’s own number when the meter reads what was assumed: gels, size and aim are undone', () => {
    const draft = { ...draftOf(main, at), distanceM: 1.5 }
    const reading = readingOf(main, at, { ...draft, fNumber: assumedFNumber(main, at, draft, iso) }, iso)
    expect(guideNumberOfReading(reading)).toBeCloseTo(outputOf(main).fullGuideNumberM, 9)
  })
})

describe('measuredUnit', () => {
  const reading = readingOf(main, at, { fNumber: 4, distanceM: 2, power: 1 }, iso)

  it('makes the setup read what the meter read', () => {
    const draft = { ...draftOf(main, at), distanceM: at.distanceM, fNumber: 4.2 }
    const one = { light: main, reading: readingOf(main, at, draft, iso) }
    const after = { ...main, unit: measuredUnit(one, '1 Dec 2026', null) }
    const [now] = readSetup({ ...setup, lights: [after] }).lights
    // The kit keeps guide numbers to a hundredth of a metre.
    expect(now?.fNumber).toBeCloseTo(4.2, 2)
    expect(now?.measured).toContain('with 90 cm octa')
  })

  it('stays offered what else is newer, when it was not up to date before', () => {
    const kept = { before: 1, now: 2 }
    expect(measuredUnit({ light: main, reading }, '', kept).version).toBe(2)
    const older = { ...main, unit: { ...main.unit, version: 3 } }
    expect(measuredUnit({ light: older, reading }, '', kept).version).toBe(3)
    expect(measuredUnit({ light: main, reading }, '', null).version).toBe(1)
  })

  it('is in the kit item as well, with the readings of other lights of the same unit', () => {
    const { kitId, name, numbers } = unit()
    const item = kitItemSchema.parse({ id: kitId, version: 1, name, body: { kind: 'unit', numbers } })
    const bare = { ...main, modifier: null }
    const measured = measuredItem(
      item,
      [
        { light: main, reading },
        { light: bare, reading: { ...reading, modifier: null } },
      ],
      '',
    )
    expect(measured?.body.kind === 'unit' && measured.body.numbers.metered.map((one) => one.modifierKitId)).toEqual([
      OCTA.kitId,
      null,
    ])
  })
})
