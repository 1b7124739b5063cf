import { describe, expect, it } from 'vitest'
import { guessedAppearance } from '#shared/domain/lighting/appearance.ts'
import {
  lightModifierSchema,
  lightSchema,
  lightUnitSchema,
  propSchema,
  setupSchema,
  sitterPlaceSchema,
} from '#shared/domain/lighting/schema.ts'
import { elevationDeg } from '#shared/domain/lighting/softness.ts'
import { changeActions } from '#shared/domain/lighting/changeover.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { sitterIdSchema } from '#shared/ids.ts'
import {
  copyOf,
  duplicateLight,
  inShape,
  newLight,
  newProp,
  newSetup,
  shiftedRank,
} from '#src/features/lighting/new-items.ts'
import { MINUTES, OCTA, id, light, unit, whole } from '#tests/support/lighting-sample.ts'

const make = { unit: lightUnitSchema.parse(unit()), modifier: lightModifierSchema.parse(OCTA), support: null }
const half = () => 0.5

describe('newLight', () => {
  it('begins the main where the manuals begin: about 26° up and 45° to the side', () => {
    // NAVEDTRA 14209; US Army subcourse SS0510: 4 ft away, 2 ft above the eyes.
    const main = newLight(whole({}), { ...make, purpose: 'main' }, half)
    expect(lightSchema.parse(main)).toEqual(main)
    expect(Math.atan2(-main.at[0], main.at[2]) * (180 / Math.PI)).toBeCloseTo(45, 9)
    const elevation = elevationDeg(main.at[1] - 1.5, Math.hypot(main.at[0], main.at[2]))
    expect(elevation).toBeGreaterThan(18)
    expect(elevation).toBeLessThan(27)
  })
  it('does not put a second light of a kind on the first, and takes the next letter', () => {
    const first = newLight(whole({}), { ...make, purpose: 'rim' }, half)
    const second = newLight(whole({ lights: [first] }), { ...make, purpose: 'rim' }, half)
    const third = newLight(whole({ lights: [first, second] }), { ...make, purpose: 'rim' }, half)
    expect(new Set([first, second, third].map((rim) => rim.at.join())).size).toBe(3)
    expect([first.group, second.group, third.group]).toEqual(['A', 'B', 'C'])
    expect(second.rank > first.rank).toBe(true)
  })
  it('points a background light at the wall', () => {
    expect(newLight(whole({}), { ...make, purpose: 'background' }, half).aim[2]).toBe(-2)
  })
})

describe('duplicateLight', () => {
  it('copies a light beside itself and nothing for an unknown one', () => {
    const main = light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0] })
    const setup = whole({ lights: [main] })
    const copy = duplicateLight(setup, main.id, half)
    expect(copy).toMatchObject({ at: [-0.5, 2, 1], power: main.power })
    expect(copy?.id).not.toBe(main.id)
    expect(duplicateLight(whole({}), main.id, half)).toBeNull()
  })
})

describe('newProp', () => {
  it('stands a panel away from the main, facing the sitter', () => {
    const main = light(1, { purpose: 'main', at: [1, 2, 1], aim: [0, 1.5, 0] })
    const panel = newProp(whole({ lights: [main] }), 'panel')
    expect(propSchema.parse(panel)).toEqual(panel)
    expect(panel.at[0]).toBeLessThan(0)
    expect(panel.turnDeg).toBeLessThan(0)
  })
})

describe('newSetup', () => {
  it('has a camera, a wall and one sitter', () => {
    const { setup, place } = newSetup('Setup 1', [], half)
    expect(setupSchema.parse(setup)).toEqual(setup)
    expect(sitterPlaceSchema.parse(place)).toEqual(place)
  })
})

describe('copyOf', () => {
  it('is a variation: new ids, and nothing to do between the two', () => {
    const setup = whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0] })], props: [{}] })
    const copy = copyOf(setup, 'Variation', [setup.setup.rank], half)
    expect(copy.setup.id).not.toBe(setup.setup.id)
    expect(copy.lights[0]?.setupId).toBe(copy.setup.id)
    expect(copy.lights[0]?.id).not.toBe(setup.lights[0]?.id)
    expect(changeActions(setup, copy, { sameRoom: true, minutes: MINUTES })).toEqual([])
  })
  it('shows the same person, also one without a name', () => {
    const figures = (setup: WholeSetup) => sceneOf(setup, 'upright', { garmentColour: () => null }).figures
    const nameless = whole({})
    const plain = nameless.places.map((place) => ({ ...place, sitterId: null, appearance: null }))
    const brown = plain.map((place) => ({ ...place, appearance: { ...guessedAppearance(place), skinItaDeg: -12 } }))
    for (const places of [plain, brown]) {
      const setup = { ...nameless, places }
      const copy = copyOf(setup, 'Variation', [], half)
      expect(figures(copy)).toEqual(figures(setup))
      expect(figures(copyOf(copy, 'Another', [], half))).toEqual(figures(setup))
    }
    const named = { ...nameless, places: plain.map((place) => ({ ...place, sitterId: sitterIdSchema.parse(id(77)) })) }
    expect(copyOf(named, 'Variation', [], half).places[0]?.appearance).toBeNull()
  })
})

describe('shiftedRank', () => {
  const row = ['a0', 'a1', 'a2', 'a3'].map((rank, n) =>
    light(n + 1, { purpose: 'rim', at: [n, 2, 1], aim: [0, 1.5, 0], rank }),
  )
  const orderAfter = (index: number, by: -1 | 1) => {
    const own = row[index]
    const rank = own ? shiftedRank(row, own.id, by, half) : null
    const next = row.map((other) => (other === own && rank !== null ? { ...other, rank } : other))
    return next.sort((a, b) => (a.rank < b.rank ? -1 : 1)).map((other) => row.findIndex(({ id }) => id === other.id))
  }
  it('changes places with the one before or behind', () => {
    expect(orderAfter(2, -1)).toEqual([0, 2, 1, 3])
    expect(orderAfter(1, -1)).toEqual([1, 0, 2, 3])
    expect(orderAfter(1, 1)).toEqual([0, 2, 1, 3])
    expect(orderAfter(2, 1)).toEqual([0, 1, 3, 2])
  })
  it('is null at the ends', () => {
    expect(orderAfter(0, -1)).toEqual([0, 1, 2, 3])
    expect(orderAfter(3, 1)).toEqual([0, 1, 2, 3])
  })
})

describe('inShape', () => {
  it('takes name and size of the new shape along while nobody has given its own, the foot where it was', () => {
    const table = newProp(whole({}), 'prop')
    const chair = { ...table, ...inShape(table, 'chair') }
    expect(chair).toMatchObject({ name: 'Chair', shape: 'chair', widthM: 0.45, heightM: 0.9 })
    expect(chair.at[1] - chair.heightM / 2).toBeCloseTo(table.at[1] - table.heightM / 2, 9)
    expect(propSchema.parse(chair)).toEqual(chair)
  })
  it('leaves what somebody wrote', () => {
    const own = { ...newProp(whole({}), 'prop'), name: 'Tea chest', widthM: 0.6 }
    expect(inShape(own, 'block')).toEqual({ shape: 'block' })
  })
})
