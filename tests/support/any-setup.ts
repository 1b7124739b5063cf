import fc from 'fast-check'
import type { z } from 'zod'
import {
  BACKGROUND_SURFACES,
  GARMENT_CUTS,
  HAIR_STYLES,
  LIGHT_PURPOSES,
  POSES,
  PROP_KINDS,
  PROP_SHAPES,
  lightSchema,
  propSchema,
  setupSchema,
  sitterPlaceSchema,
} from '#shared/domain/lighting/schema.ts'
import { MODIFIER_SHAPES, PROVENANCES, SUPPORT_KINDS } from '#shared/domain/kit/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'

/** Without −0, which JSON does not tell from 0. */
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true }).map((value) => value + 0)
const text = (maxLength: number) => fc.string({ unit: 'grapheme', maxLength })
const line = (maxLength: number) => text(maxLength).filter((value) => value.trim() !== '')
const colour = fc.stringMatching(/^#[0-9a-f]{6}$/)
const point = fc.tuple(number(-50, 50), number(-1, 12), number(-50, 50))
const stated = (min: number, max: number) =>
  fc.record({ value: number(min, max), from: fc.constantFrom(...PROVENANCES), source: text(20) })
const maybe = <T>(one: fc.Arbitrary<T>) => fc.option(one, { nil: null })

const copied = <T>(numbers: fc.Arbitrary<T>) =>
  fc.record({ kitId: fc.uuid(), version: fc.integer({ min: 1, max: 99 }), name: line(12), numbers })

const head = fc.record({
  guideNumberM: stated(1, 100),
  zoom: fc.array(fc.record({ focalMm: number(10, 400), guideNumberM: number(1, 100) }), { maxLength: 3 }),
  minPowerDenominator: fc.integer({ min: 1, max: 1024 }),
  flashColourK: stated(2000, 9000),
  fullPops: stated(1, 900),
  fullRecycleS: stated(0.1, 20),
  massKg: stated(0.1, 9),
  mainsWatts: maybe(stated(1, 3000)),
  sync: text(10),
  metered: fc.array(
    fc.record({
      modifierKitId: maybe(fc.uuid()),
      zoomMm: maybe(number(10, 400)),
      guideNumberM: number(1, 100),
      source: text(10),
    }),
    { maxLength: 2 },
  ),
})
const lamp = fc.record({
  luxAtMetre: stated(1, 1e5),
  watts: stated(1, 3000),
  colourK: stated(2000, 9000),
  beamDeg: maybe(stated(5, 170)),
  massKg: stated(0.1, 9),
  onMains: fc.boolean(),
})
const modifier = fc.record({
  shape: fc.constantFrom(...MODIFIER_SHAPES),
  widthM: number(0, 6),
  heightM: number(0, 6),
  lossStops: stated(0, 5),
  beamDeg: maybe(stated(5, 170)),
  massKg: stated(0.1, 9),
})
const gel = fc.record({
  miredShift: stated(-200, 200),
  printedMired: maybe(number(-200, 200)),
  transmission: stated(0.01, 1),
  colour,
})
const support = fc.record({
  kind: fc.constantFrom(...SUPPORT_KINDS),
  maxHeightM: stated(0.5, 6),
  maxLoadKg: stated(0.5, 20),
  reachM: maybe(stated(0.5, 3)),
})

type LightInput = z.input<typeof lightSchema>
const anyLight = (setupId: string) =>
  fc
    .record({
      id: fc.uuid(),
      purpose: fc.constantFrom(...LIGHT_PURPOSES),
      group: maybe(fc.constantFrom('A', 'B', 'Z')),
      unit: fc.oneof(copied(head), copied(lamp)),
      modifier: maybe(copied(modifier)),
      gels: fc.array(copied(gel), { maxLength: 3 }),
      support: maybe(copied(support)),
      power: number(0.001, 1),
      isOn: fc.boolean(),
      at: point,
      aim: point,
      zoomMm: maybe(number(10, 400)),
      note: text(30),
      rank: fc.constantFrom('a0', 'a1', 'a2'),
    })
    .map((input: Omit<LightInput, 'setupId'>) => lightSchema.parse({ ...input, setupId }))

const anyPlace = (setupId: string) =>
  fc
    .record({
      id: fc.uuid(),
      sitterId: maybe(fc.uuid()),
      lookId: maybe(fc.uuid()),
      at: fc.tuple(number(-50, 50), number(-50, 50)),
      eyeHeightM: number(0.3, 2.4),
      pose: fc.constantFrom(...POSES),
      turnDeg: number(-180, 180),
      headTurnDeg: number(-80, 80),
      headNodDeg: number(-40, 40),
      appearance: maybe(
        fc.record({
          skinItaDeg: number(-70, 80),
          hair: fc.constantFrom(...HAIR_STYLES),
          hairColour: colour,
          cut: fc.constantFrom(...GARMENT_CUTS),
          garmentColour: maybe(colour),
        }),
      ),
    })
    .map((input) => sitterPlaceSchema.parse({ ...input, setupId }))

const anyProp = (setupId: string) =>
  fc
    .record({
      id: fc.uuid(),
      kind: fc.constantFrom(...PROP_KINDS),
      name: line(12),
      at: point,
      turnDeg: number(-180, 180),
      widthM: number(0.01, 10),
      heightM: number(0.01, 10),
      colour,
      shape: fc.constantFrom(...PROP_SHAPES),
    })
    .map((input) => propSchema.parse({ ...input, setupId }))

const anySetupItem = fc
  .record({
    id: fc.uuid(),
    name: line(30),
    camera: fc.record({
      at: point,
      focalMm: number(8, 1200),
      fNumber: number(0.7, 128),
      iso: number(12, 409600),
      shutterS: number(0.0001, 60),
      whiteBalanceK: number(1500, 20000),
      syncS: maybe(number(0.0001, 1)),
      aim: maybe(point),
    }),
    background: fc.record({
      zM: number(-50, 0),
      widthM: number(0.2, 60),
      heightM: number(0.2, 20),
      colour,
      surface: fc.constantFrom(...BACKGROUND_SURFACES),
      what: text(20),
    }),
    ambientLux: maybe(number(0, 200000)),
    ambientK: maybe(number(1500, 20000)),
    walled: maybe(
      fc.record({ leftM: number(0, 100), rightM: number(0, 100), frontM: number(0, 100), ceilingM: number(0.5, 60) }),
    ),
    circuit: maybe(fc.record({ volts: number(50, 500), amps: number(1, 200) })),
    note: text(60),
    rank: fc.constantFrom('a0', 'a1'),
  })
  .map((input) => setupSchema.parse(input))

/** Any setup with everything in it, its parts in the order of the read model. */
export const anySetup: fc.Arbitrary<WholeSetup> = anySetupItem.chain((setup) => {
  const byId = (a: { id: string }, b: { id: string }) => (a.id < b.id ? -1 : 1)
  const byRank = (a: { rank: string; id: string }, b: { rank: string; id: string }) =>
    a.rank < b.rank ? -1 : a.rank > b.rank ? 1 : byId(a, b)
  return fc
    .record({
      lights: fc.array(anyLight(setup.id), { maxLength: 5 }),
      places: fc.array(anyPlace(setup.id), { maxLength: 3 }),
      props: fc.array(anyProp(setup.id), { maxLength: 3 }),
    })
    .map(({ lights, places, props }) => ({
      setup,
      lights: lights.sort(byRank),
      places: places.sort(byId),
      props: props.sort(byId),
    }))
})
