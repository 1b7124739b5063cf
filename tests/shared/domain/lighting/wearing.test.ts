import { describe, expect, it } from 'vitest'
import { sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { wearingOf } from '#shared/domain/lighting/wearing.ts'
import { pieceSchema } from '#shared/domain/looks/schema.ts'
import { type ReadPlanInput, readPlan } from '#shared/domain/plan/read-plan.ts'
import { id } from '#tests/support/lighting-sample.ts'
import { DAY, planSample } from '#tests/support/plan-sample.ts'

const SETUP = id(31)
const ADA = id(41)
const BEN = id(42)
const BLUE_COAT = id(51)
const RED_DRESS = id(52)
const BENS = id(53)

const pieces = new Map(
  [
    { id: id(61), name: 'Brooch', kind: 'jewellery' as const, colour: '#ffd700' },
    { id: id(62), name: 'Lining', kind: 'garment' as const, colour: null },
    { id: id(63), name: 'Coat', kind: 'garment' as const, colour: '#203a6b' },
    { id: id(64), name: 'Dress', kind: 'garment' as const, colour: '#7a1f2b' },
    { id: id(65), name: 'Shirt', kind: 'garment' as const, colour: '#eeeeee' },
  ].map((piece) => [piece.id, pieceSchema.parse(piece)]),
)

function input(): ReadPlanInput {
  const sample = planSample({
    setups: [SETUP],
    sitters: [
      { id: ADA, name: 'Ada' },
      { id: BEN, name: 'Ben' },
    ],
    looks: [
      { id: BLUE_COAT, sitterId: ADA, name: 'Blue coat', pieceIds: [id(61), id(62), id(63), id(65)] },
      { id: RED_DRESS, sitterId: ADA, name: 'Red dress', pieceIds: [id(64)] },
      { id: BENS, sitterId: BEN, name: 'Shirt', pieceIds: [id(65)] },
    ],
    shots: [
      { id: id(71), title: 'Later', place: [DAY, 'b'], lookIds: [BENS, RED_DRESS] },
      { id: id(72), title: 'First', place: [DAY, 'a'], lookIds: [BLUE_COAT] },
      { id: id(73), title: 'Elsewhere', place: [DAY, 'Z'], lookIds: [RED_DRESS] },
    ],
    shotPlans: [
      { id: id(71), setupId: SETUP },
      { id: id(72), setupId: SETUP },
    ],
  })
  return { ...sample, looks: { ...sample.looks, pieces } }
}

const place = (more: { sitterId?: string; lookId?: string }) =>
  sitterPlaceSchema.parse({ id: id(81), setupId: SETUP, at: [0, 0], eyeHeightM: 1.5, ...more })

describe('wearingOf', () => {
  const wearing = wearingOf(readPlan(input()), SETUP)

  it('is the first garment with a colour of the look at the place', () => {
    expect(wearing.garmentColour(place({ sitterId: ADA, lookId: RED_DRESS }))).toBe('#7a1f2b')
  })

  it('else of the first look that the sitter wears in a shot with this setup, in running order', () => {
    expect(wearing.garmentColour(place({ sitterId: ADA }))).toBe('#203a6b')
    expect(wearing.garmentColour(place({ sitterId: BEN }))).toBe('#eeeeee')
  })

  it('is nothing without sitter, without shot, or when the look is gone', () => {
    expect(wearing.garmentColour(place({}))).toBeNull()
    expect(wearing.garmentColour(place({ sitterId: ADA, lookId: id(99) }))).toBeNull()
    expect(wearingOf(readPlan(input()), id(32)).garmentColour(place({ sitterId: ADA }))).toBeNull()
  })
})
