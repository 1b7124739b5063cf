import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { kitItemIdSchema } from '#shared/ids.ts'
import {
  type MeterReading,
  findMetered,
  guideNumberOfReading,
  meterFaults,
  meteredOf,
  readingWords,
  withMetered,
  withoutMetered,
} from '#shared/domain/kit/meter-reading.ts'
import { meteredSchema, unitNumbersSchema } from '#shared/domain/kit/schema.ts'
import { discFactor, fNumberOfExposure, luminousExposure } from '#shared/domain/lighting/exposure.ts'
import { id, unit } from '#tests/support/lighting-sample.ts'

const OCTA = { kitId: kitItemIdSchema.parse(id(911)), name: '90 cm octa' }
const bare = (more: Partial<MeterReading> = {}): MeterReading => ({
  fNumber: 4,
  distanceM: 5,
  power: 1,
  iso: 100,
  zoomMm: null,
  modifier: null,
  ...more,
})
const numbers = unitNumbersSchema.parse(unit().numbers)

describe('guideNumberOfReading', () => {
  it.each([
    // GN 20 at 5 m is f/4: published camera manual example (computations.md, section 1).
    [bare(), 20],
    // GN 80 ft at 10 ft is f/8: NAVEDTRA 14209; in metres.
    [bare({ fNumber: 8, distanceM: 3.048 }), 24.384],
    // GN 64 at 1/64 is 8: published worked example (computations.md, section 1). f/4 at 2 m.
    [bare({ fNumber: 4, distanceM: 2, power: 1 / 64 }), 64],
    // ISO 400 doubles the guide number: its definition.
    [bare({ fNumber: 8, distanceM: 5, iso: 400 }), 20],
    // A gel of two stops halves it.
    [bare({ fNumber: 2, distanceM: 5, gelLossStops: 2 }), 20],
  ])('is worked back from what the meter read', (reading, expected) => {
    expect(guideNumberOfReading(reading)).toBeCloseTo(expected, 3)
  })

  it('undoes the size of the face: a disc 1 m wide from 2.5 m gives .9615 of a point', () => {
    // d²/(d² + r²), IES definitions 9.1.1 (computations.md, section 5).
    const reading = bare({ fNumber: 8, distanceM: 2.5, radiusM: 0.5, modifier: OCTA })
    expect(guideNumberOfReading(reading)).toBeCloseTo(20 / Math.sqrt(0.961538), 4)
  })

  it('gives back the number that a reading was computed from, wherever it was taken', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 5, max: 120, noNaN: true }),
        fc.double({ min: 0.3, max: 12, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        fc.constantFrom(50, 100, 400, 3200),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0.05, max: 1, noNaN: true }),
        (guideNumberM, distanceM, power, iso, radiusM, beamShare) => {
          const exposure =
            luminousExposure(guideNumberM * Math.sqrt(power), distanceM) * discFactor(distanceM, radiusM) * beamShare
          const fNumber = fNumberOfExposure(exposure, iso)
          const reading = bare({ fNumber, distanceM, power, iso, modifier: OCTA, radiusM, beamShare })
          expect(guideNumberOfReading(reading) / guideNumberM).toBeCloseTo(1, 9)
        },
      ),
    )
  })
})

describe('meterFaults', () => {
  it.each<[Partial<MeterReading>, string, string]>([
    [{ distanceM: 0 }, 'distanceM', 'At no distance'],
    [{ distanceM: -2 }, 'distanceM', 'At no distance'],
    [{ distanceM: 80 }, 'distanceM', 'between 0.1 m and 50 m'],
    [{ fNumber: 0 }, 'fNumber', 'between f/0.7 and f/128'],
    [{ fNumber: 1000 }, 'fNumber', 'between f/0.7 and f/128'],
    [{ fNumber: Number.NaN }, 'fNumber', 'between f/0.7 and f/128'],
    [{ power: 1 / 256 }, 'power', 'goes down to 1/128'],
    [{ power: 2 }, 'power', 'more than full'],
    [{ power: 0 }, 'power', 'a part of full'],
    [{ iso: 0 }, 'iso', 'between 12'],
    [{ zoomMm: 5 }, 'zoomMm', 'between 10 and 400'],
    [{ fNumber: 128, distanceM: 50, power: 1 / 100 }, 'fNumber', 'a guide number of 64000 m, which no head has'],
    [{ fNumber: 0.7, distanceM: 0.1, iso: 409_600 }, 'fNumber', 'which no head has'],
  ])('refuses %o', (more, field, words) => {
    expect(meterFaults(bare(more), numbers)).toEqual([{ field, message: expect.stringContaining(words) }])
  })

  it('asks a head that zooms for its setting, and takes a good reading', () => {
    const zooms = { ...numbers, zoom: [{ focalMm: 50, guideNumberM: 40 }] }
    expect(meterFaults(bare(), zooms)).toMatchObject([{ field: 'zoomMm' }])
    expect(meterFaults(bare({ zoomMm: 50 }), zooms)).toEqual([])
    expect(meterFaults(bare({ power: 1 / 128 }), numbers)).toEqual([])
  })
})

describe('readingWords', () => {
  it('names everything that the number hangs on', () => {
    const reading = bare({ fNumber: 5.6, distanceM: 2, power: 0.25, zoomMm: 50, modifier: OCTA })
    expect(readingWords(reading, '1 Dec 2026')).toBe('f/5.6 at 2 m, 1/4, ISO 100, 50 mm, with 90 cm octa, 1 Dec 2026')
    expect(readingWords(bare({ gelLossStops: 1 }), '')).toBe(
      'f/4 at 5 m, full power, ISO 100, bare, gels of 1.0 stops undone',
    )
  })
})

describe('meteredOf', () => {
  it('is an entry of the kit, however long the name', () => {
    const entry = meteredOf(bare({ modifier: { ...OCTA, name: 'x'.repeat(300) } }), '1 Dec 2026')
    expect(meteredSchema.parse(entry)).toEqual(entry)
    expect(entry.modifierKitId).toBe(OCTA.kitId)
  })
})

describe('withMetered', () => {
  const entry = meteredOf(bare({ modifier: OCTA, zoomMm: 50 }), '')

  it('takes the place of the entry for the same modifier and zoom, and of no other', () => {
    const other = meteredOf(bare({ zoomMm: 50 }), '')
    const before = withMetered(withMetered(numbers, other), entry)
    const after = withMetered(before, { ...entry, guideNumberM: 33 })
    expect(after.metered).toEqual([other, { ...entry, guideNumberM: 33 }])
    expect(findMetered(after, OCTA.kitId, 50)?.guideNumberM).toBe(33)
    expect(findMetered(after, OCTA.kitId, 35)).toBeUndefined()
  })

  it('keeps the newest sixty', () => {
    let many = numbers
    for (let zoomMm = 20; zoomMm < 90; zoomMm++) many = withMetered(many, { ...entry, zoomMm })
    expect([many.metered.length, many.metered[0]?.zoomMm]).toEqual([60, 30])
    expect(unitNumbersSchema.safeParse(many).success).toBe(true)
  })

  it('is undone by withoutMetered', () => {
    expect(withoutMetered(withMetered(numbers, entry), entry)).toEqual(numbers)
  })
})
