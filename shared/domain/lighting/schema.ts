import { z } from 'zod'
import {
  kitItemIdSchema,
  lightIdSchema,
  lookIdSchema,
  placeIdSchema,
  propIdSchema,
  setupIdSchema,
  sitterIdSchema,
} from '#shared/ids.ts'
import {
  gelNumbersSchema,
  type LampNumbers,
  lampNumbersSchema,
  modifierNumbersSchema,
  supportNumbersSchema,
  type UnitNumbers,
  unitNumbersSchema,
} from '#shared/domain/kit/schema.ts'
import { colourSchema, lineSchema, proseSchema } from '#shared/domain/text.ts'

/**
 * Coordinates of a setup, in metres: origin on the floor under the sitter's mark, x to the right as the camera
 * sees it, z towards the camera, y up from the floor.
 */
const m = (min: number, max: number) => z.number().min(min).max(max)
/** [x, y, z] in metres. */
export const pointSchema = z.tuple([m(-50, 50), m(-1, 12), m(-50, 50)])
export type Point = z.infer<typeof pointSchema>

/** What a light is for. `main`, never key. */
export const LIGHT_PURPOSES = ['main', 'fill', 'background', 'rim', 'accent'] as const
export type LightPurpose = (typeof LIGHT_PURPOSES)[number]

/** A copy of a kit item's numbers, taken when it was picked; `version` tells when the kit room has newer ones. */
const copied = <T extends z.ZodType>(numbers: T) =>
  z.object({ kitId: kitItemIdSchema, version: z.number().int().min(1), name: lineSchema(120), numbers })

/** A flash head, or a lamp that burns all the time: told apart by what they have, so that older copies still read. */
export const lightUnitSchema = copied(z.union([lampNumbersSchema, unitNumbersSchema]))
export const lightModifierSchema = copied(modifierNumbersSchema)
export const lightGelSchema = copied(gelNumbersSchema)
export const lightSupportSchema = copied(supportNumbersSchema)
export type LightUnit = z.infer<typeof lightUnitSchema>
export type LightModifier = z.infer<typeof lightModifierSchema>
export type LightGel = z.infer<typeof lightGelSchema>
export type LightSupport = z.infer<typeof lightSupportSchema>

/** Whether a light is a lamp that burns all the time, not a flash head. */
export function isLamp(numbers: UnitNumbers | LampNumbers): numbers is LampNumbers {
  return 'luxAtMetre' in numbers
}

export const cameraSchema = z.object({
  at: pointSchema,
  focalMm: m(8, 1200),
  /** Exact f-number N = 2^(Av/2); screens show the nominal label. */
  fNumber: m(0.7, 128),
  iso: m(12, 409600),
  shutterS: m(0.0001, 60),
  whiteBalanceK: m(1500, 20000),
  /** Fastest shutter at which flash lights the whole frame, seconds; null: not known, 1/200 s is assumed. */
  syncS: m(0.0001, 1).nullable().default(null),
  /** Point it looks at; null: at the sitters, eyes a third below the top edge. */
  aim: pointSchema.nullable().default(null),
})
export type Camera = z.infer<typeof cameraSchema>

/** What a background is made of: how test frames show it. */
export const BACKGROUND_SURFACES = ['plaster', 'paper', 'panelling', 'cloth', 'brick'] as const

export const backgroundSchema = z.object({
  /** The wall's z, metres (behind the sitter is negative). */
  zM: m(-50, 0),
  widthM: m(0.2, 60),
  heightM: m(0.2, 20),
  colour: colourSchema,
  surface: z.enum(BACKGROUND_SURFACES).default('plaster'),
  what: proseSchema(120).default(''),
})
export type Background = z.infer<typeof backgroundSchema>

/**
 * Walls and ceiling about the setup, metres from the sitter's mark: left and right as the camera sees them, front is
 * the wall behind the camera. The wall behind the sitter is the background's.
 */
export const walledSchema = z.object({
  leftM: m(0, 100),
  rightM: m(0, 100),
  frontM: m(0, 100),
  ceilingM: m(0.5, 60),
})
export type Walled = z.infer<typeof walledSchema>

export const setupSchema = z.object({
  id: setupIdSchema,
  name: lineSchema(80),
  camera: cameraSchema,
  background: backgroundSchema,
  /** Ambient light at the sitter, lux; null: not measured and left out. */
  ambientLux: m(0, 200000).nullable().default(null),
  /** Its colour temperature, kelvin; null: taken as the camera's white balance. */
  ambientK: m(1500, 20000).nullable().default(null),
  /** Room the setup stands in; null: not drawn. */
  walled: walledSchema.nullable().default(null),
  /** Voltage and rating of the circuit its mains lamps share; null: not known. */
  circuit: z
    .object({ volts: m(50, 500), amps: m(1, 200) })
    .nullable()
    .default(null),
  note: proseSchema(2000).default(''),
  /** Fractional key among the setups. */
  rank: z.string().min(1).max(256).default('a0'),
})
export type Setup = z.infer<typeof setupSchema>

export const lightSchema = z.object({
  id: lightIdSchema,
  setupId: setupIdSchema,
  purpose: z.enum(LIGHT_PURPOSES),
  /** Letter of the radio group; shown in a circle. */
  group: z
    .string()
    .regex(/^[A-Z]$/)
    .nullable()
    .default(null),
  unit: lightUnitSchema,
  modifier: lightModifierSchema.nullable().default(null),
  gels: z.array(lightGelSchema).max(6).default([]),
  support: lightSupportSchema.nullable().default(null),
  /** Power as a fraction of full: 1, 1/2, 1/4 … thirds between. */
  power: z.number().gt(0).max(1),
  /** Off: it stands there and gives no light. */
  isOn: z.boolean().default(true),
  /** Centre of the emitting face. */
  at: pointSchema,
  /** Point it looks at. */
  aim: pointSchema,
  /** Zoom of the head, mm; null when it has none. */
  zoomMm: m(10, 400).nullable().default(null),
  note: proseSchema(500).default(''),
  rank: z.string().min(1).max(256).default('a0'),
})
export type Light = z.infer<typeof lightSchema>

export const POSES = ['standing', 'seated'] as const
export const HAIR_STYLES = ['cropped', 'short', 'bob', 'long', 'knot', 'curls', 'bald'] as const
export const GARMENT_CUTS = ['jumper', 'shirt', 'coat', 'dress', 'cape'] as const

/** How somebody looks in test frames. Null fields follow the look, or a plain guess. */
export const appearanceSchema = z.object({
  /**
   * Skin by its individual typology angle, degrees: atan((L* − 50)/b*) (Chardon 1991); above 55 very light, 41 light,
   * 28 intermediate, 10 tan, −30 brown, below it dark.
   */
  skinItaDeg: m(-70, 80),
  hair: z.enum(HAIR_STYLES),
  hairColour: colourSchema,
  cut: z.enum(GARMENT_CUTS),
  /** Which of the faces there are; null: one that stays the same for the sitter. */
  face: z.number().int().min(0).max(9999).nullable().default(null),
  /** Null: the colour of the look's first garment. */
  garmentColour: colourSchema.nullable().default(null),
})
export type Appearance = z.infer<typeof appearanceSchema>

/** Where a sitter is in a setup. The first one stands on the origin. */
export const sitterPlaceSchema = z.object({
  id: placeIdSchema,
  setupId: setupIdSchema,
  sitterId: sitterIdSchema.nullable().default(null),
  at: z.tuple([m(-50, 50), m(-50, 50)]),
  eyeHeightM: m(0.3, 2.4),
  pose: z.enum(POSES).default('standing'),
  /** Turned about the upright axis, degrees; 0 faces the camera side (+z), positive is anticlockwise seen from above. */
  turnDeg: z.number().min(-180).max(180).default(0),
  /** The head's own turn on top of it, and its nod; positive nods down. */
  headTurnDeg: z.number().min(-80).max(80).default(0),
  headNodDeg: z.number().min(-40).max(40).default(0),
  /** The look test frames show; null: the first look of a shot with this setup and sitter. */
  lookId: lookIdSchema.nullable().default(null),
  appearance: appearanceSchema.nullable().default(null),
})
export type SitterPlace = z.infer<typeof sitterPlaceSchema>

export const PROP_KINDS = ['panel', 'flag', 'prop'] as const
/** What a part of the set looks like in test frames, within its width and height. */
export const PROP_SHAPES = ['block', 'ball', 'post', 'table', 'chair', 'globe', 'books', 'cup', 'plant'] as const
export const propSchema = z.object({
  id: propIdSchema,
  setupId: setupIdSchema,
  kind: z.enum(PROP_KINDS),
  name: lineSchema(80),
  at: pointSchema,
  /** Turned about the upright axis, degrees; 0 faces the camera, positive is anticlockwise seen from above. */
  turnDeg: z.number().min(-180).max(180).default(0),
  widthM: m(0.01, 10),
  heightM: m(0.01, 10),
  colour: colourSchema.default('#ffffff'),
  shape: z.enum(PROP_SHAPES).default('block'),
})
export type Prop = z.infer<typeof propSchema>
