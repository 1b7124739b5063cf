import { lightIdSchema, placeIdSchema, propIdSchema, setupIdSchema, type LightId, type SetupId } from '#shared/ids.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { guessedAppearance, seedOf } from '#shared/domain/lighting/appearance.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { zoomTableOf } from '#shared/domain/lighting/light-source.ts'
import {
  type Appearance,
  type Light,
  type LightModifier,
  type LightPurpose,
  type LightSupport,
  type LightUnit,
  type Point,
  type Prop,
  type PROP_KINDS,
  type Setup,
  type SitterPlace,
  sitterPlaceSchema,
} from '#shared/domain/lighting/schema.ts'
import { fNumberOfThirds } from '#shared/domain/lighting/stops.ts'
import { appendKey, keyBetween } from '#shared/realtime/order-keys.ts'
import { newId } from '#src/lib/new-id.ts'

export type NewLight = {
  purpose: LightPurpose
  unit: LightUnit
  modifier: LightModifier | null
  support: LightSupport | null
}

/** Where a light of this kind is usually begun, from the sitter's eyes; and what it looks at. */
function start(purpose: LightPurpose, face: Point, wallM: number): { at: Point; aim: Point } {
  const [x, y, z] = face
  const from = (dx: number, height: number, dz: number): Point => [x + dx, Math.max(0.2, height), z + dz]
  switch (purpose) {
    case 'main':
      // About four feet off, two feet above the eyes, 45° to the side: the start that manuals give.
      return { at: from(-1, y + 0.55, 1), aim: face }
    case 'fill':
      return { at: from(1.1, y + 0.2, 1.8), aim: face }
    case 'background': {
      const depth = wallM - z
      return { at: from(1.1, 0.7, depth * 0.5), aim: [x, y * 0.9, wallM] }
    }
    case 'rim':
      return { at: from(1.2, y + 0.4, Math.max(-1.2, (wallM - z) * 0.7)), aim: face }
    case 'accent':
      return { at: from(-1.3, y, Math.max(-0.8, (wallM - z) * 0.6)), aim: face }
  }
}

/** Lights nearer to each other than this would be drawn over one another, metres. */
const CLEAR_M = 0.4

/** The first free place: as it is, on the other side of the sitter, then further and further out. */
function freePlace(at: Point, face: Point, lights: readonly Light[]): Point {
  const places = [0, 1, 2, 3].flatMap((step): Point[] => {
    const out = (at[0] - face[0]) * (1 + step * 0.45)
    return [
      [face[0] + out, at[1], at[2]],
      [face[0] - out, at[1], at[2]],
    ]
  })
  return (
    places.find((place) =>
      lights.every((light) => Math.hypot(light.at[0] - place[0], light.at[2] - place[2]) > CLEAR_M),
    ) ?? at
  )
}

const round = (point: Point): Point => [
  Math.round(point[0] * 20) / 20,
  Math.round(point[1] * 20) / 20,
  Math.round(point[2] * 20) / 20,
]

/** First letter no light of the setup uses. */
function freeGroup(lights: readonly Light[]): string | null {
  const taken = new Set(lights.map((light) => light.group))
  return [...'ABCDEFGH'].find((letter) => !taken.has(letter)) ?? null
}

/** A light of this make at the usual place for its purpose, behind the others in the list. */
export function newLight(whole: WholeSetup, input: NewLight, random: () => number): Light {
  const face = facePoint(whole)
  const { at, aim } = start(input.purpose, face, whole.setup.background.zM)
  return {
    ...input,
    id: lightIdSchema.parse(newId()),
    setupId: whole.setup.id,
    group: freeGroup(whole.lights),
    gels: [],
    power: Math.max(1 / 16, 1 / input.unit.numbers.minPowerDenominator),
    at: round(freePlace(at, face, whole.lights)),
    aim: round(aim),
    isOn: true,
    zoomMm: zoomTableOf(input.unit.numbers).at(-1)?.focalMm ?? null,
    note: '',
    rank: appendKey(
      whole.lights.map((light) => light.rank),
      random,
    ),
  }
}

/** A copy of a light half a metre beside it; undefined ids copy nothing. */
export function duplicateLight(whole: WholeSetup, id: LightId, random: () => number): Light | null {
  const light = whole.lights.find((candidate) => candidate.id === id)
  if (!light) return null
  return {
    ...light,
    id: lightIdSchema.parse(newId()),
    group: freeGroup(whole.lights) ?? light.group,
    at: [light.at[0] + 0.5, light.at[1], light.at[2]],
    rank: appendKey(
      whole.lights.map((other) => other.rank),
      random,
    ),
  }
}

/** The key that brings a light one place earlier (−1) or later (1) among the others; null at the end of the row. */
export function shiftedRank(lights: readonly Light[], id: LightId, by: -1 | 1, random: () => number): string | null {
  const index = lights.findIndex((light) => light.id === id)
  const near = lights[index + by]
  if (index < 0 || !near) return null
  const far = lights[index + 2 * by]?.rank ?? null
  const [before, after] = by < 0 ? [far, near.rank] : [near.rank, far]
  // Two lights that got the same key at the same time lie beside each other; behind both is good enough.
  return keyBetween(before, after === before ? null : after, random)
}

const PROPS = {
  panel: { name: 'White panel', widthM: 1, heightM: 1.5, colour: '#ffffff' },
  flag: { name: 'Black flag', widthM: 1, heightM: 1.5, colour: '#1f1c1a' },
  prop: { name: 'Table', widthM: 0.8, heightM: 0.75, colour: '#8e6a22' },
} as const

/** Usual widths and heights of the shapes, metres (common practice, no source). */
const SHAPE_SIZES: Readonly<Record<Prop['shape'], readonly [widthM: number, heightM: number]>> = {
  block: [0.5, 0.5],
  ball: [0.3, 0.3],
  post: [0.35, 1.1],
  table: [0.8, 0.75],
  chair: [0.45, 0.9],
  globe: [0.45, 1.2],
  books: [0.3, 0.2],
  cup: [0.1, 0.1],
  plant: [0.6, 1.1],
}

const shapeName = (shape: Prop['shape']) => shape.charAt(0).toUpperCase() + shape.slice(1)

/**
 * A prop in another shape. One that was never named or measured takes the new shape's name and usual size, its foot where
 * it was; anything somebody wrote stays.
 */
export function inShape(prop: Prop, shape: Prop['shape']): Partial<Prop> {
  const [widthM, heightM] = SHAPE_SIZES[prop.shape]
  const isNamed = prop.name.replace(/ \d+$/, '') !== shapeName(prop.shape)
  const isMeasured = prop.widthM !== widthM || prop.heightM !== heightM
  const [width, height] = SHAPE_SIZES[shape]
  return {
    shape,
    ...(isNamed ? {} : { name: shapeName(shape) }),
    ...(isMeasured
      ? {}
      : { widthM: width, heightM: height, at: [prop.at[0], prop.at[1] + (height - heightM) / 2, prop.at[2]] }),
  }
}

export function newProp(whole: WholeSetup, kind: (typeof PROP_KINDS)[number]): Prop {
  const face = facePoint(whole)
  const { name, widthM, heightM, colour } = PROPS[kind]
  // Away from the main.
  const main = whole.lights.find((light) => light.purpose === 'main')
  const side = main && main.at[0] > face[0] ? -1 : 1
  const same = whole.props.filter((prop) => prop.kind === kind).length
  return {
    id: propIdSchema.parse(newId()),
    setupId: whole.setup.id,
    kind,
    name: same === 0 ? name : `${name} ${same + 1}`,
    at: round([
      face[0] + side * (kind === 'prop' ? 0.6 : 1.1),
      heightM / 2,
      face[2] + (kind === 'prop' ? -0.2 : 0.7) + same * 0.3,
    ]),
    // Facing the sitter.
    turnDeg: kind === 'prop' ? 0 : side * 57,
    widthM,
    heightM,
    colour,
    shape: kind === 'prop' ? 'table' : 'block',
  }
}

/** A setup with a camera, one sitter and a wall, and no light yet. */
export function newSetup(
  name: string,
  ranks: readonly string[],
  random: () => number,
): { setup: Setup; place: SitterPlace } {
  const id = setupIdSchema.parse(newId())
  return {
    setup: {
      id,
      name,
      camera: {
        at: [0, 1.5, 2.8],
        focalMm: 85,
        fNumber: fNumberOfThirds(15),
        iso: 100,
        shutterS: 1 / 160,
        whiteBalanceK: 5500,
        syncS: null,
        aim: null,
      },
      background: { zM: -2.5, widthM: 5, heightM: 3, colour: '#8d8a85', surface: 'plaster', what: '' },
      ambientLux: null,
      ambientK: null,
      walled: null,
      circuit: null,
      note: '',
      rank: appendKey(ranks, random),
    },
    place: sitterPlaceSchema.parse({ id: newId(), setupId: id, at: [0, 0], eyeHeightM: 1.55 }),
  }
}

/** The guess about somebody without a name hangs on the id of the place: a copy has another, and keeps the person. */
function keptAppearance(place: SitterPlace): Appearance | null {
  const { appearance, sitterId } = place
  if (sitterId !== null || (appearance && appearance.face !== null)) return appearance
  return { ...(appearance ?? guessedAppearance(place)), face: seedOf(place.id) }
}

/** Everything of a setup with new ids under a new name: a variation. */
export function copyOf(whole: WholeSetup, name: string, ranks: readonly string[], random: () => number): WholeSetup {
  const setupId: SetupId = setupIdSchema.parse(newId())
  // Which of two sitters is read hangs on the order of their ids: new ones are handed out in the order of the old.
  const placeIds = whole.places.map(() => newId()).sort()
  return {
    setup: { ...whole.setup, id: setupId, name, rank: appendKey(ranks, random) },
    lights: whole.lights.map((light) => ({ ...light, id: lightIdSchema.parse(newId()), setupId })),
    places: whole.places.map((place, index) => ({
      ...place,
      id: placeIdSchema.parse(placeIds[index]),
      setupId,
      appearance: keptAppearance(place),
    })),
    props: whole.props.map((prop) => ({ ...prop, id: propIdSchema.parse(newId()), setupId })),
  }
}
