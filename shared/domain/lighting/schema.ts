import { z } from 'zod'
import {
  kitItemIdSchema,
  lightIdSchema,
  placeIdSchema,
  propIdSchema,
  setupIdSchema,
  sitterIdSchema,
} from '#shared/ids.ts'
import {
  gelNumbersSchema,
  modifierNumbersSchema,
  supportNumbersSchema,
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

export const lightUnitSchema = copied(unitNumbersSchema)
export const lightModifierSchema = copied(modifierNumbersSchema)
export const lightGelSchema = copied(gelNumbersSchema)
export const lightSupportSchema = copied(supportNumbersSchema)
export type LightUnit = z.infer<typeof lightUnitSchema>
export type LightModifier = z.infer<typeof lightModifierSchema>
export type LightGel = z.infer<typeof lightGelSchema>
export type LightSupport = z.infer<typeof lightSupportSchema>

export const cameraSchema = z.object({
  at: pointSchema,
  focalMm: m(8, 1200),
  /** Exact f-number N = 2^(Av/2); screens show the nominal label. */
  fNumber: m(0.7, 128),
  iso: m(12, 409600),
  shutterS: m(0.0001, 60),
  whiteBalanceK: m(1500, 20000),
})
export type Camera = z.infer<typeof cameraSchema>

export const backgroundSchema = z.object({
  /** The wall's z, metres (behind the sitter is negative). */
  zM: m(-50, 0),
  widthM: m(0.2, 60),
  heightM: m(0.2, 20),
  colour: colourSchema,
  what: proseSchema(120).default(''),
})
export type Background = z.infer<typeof backgroundSchema>

export const setupSchema = z.object({
  id: setupIdSchema,
  name: lineSchema(80),
  camera: cameraSchema,
  background: backgroundSchema,
  /** Ambient light at the sitter, lux; null: not measured and left out. */
  ambientLux: m(0, 200000).nullable().default(null),
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

/** Where a sitter is in a setup. The first one stands on the origin. */
export const sitterPlaceSchema = z.object({
  id: placeIdSchema,
  setupId: setupIdSchema,
  sitterId: sitterIdSchema.nullable().default(null),
  at: z.tuple([m(-50, 50), m(-50, 50)]),
  eyeHeightM: m(0.3, 2.4),
})
export type SitterPlace = z.infer<typeof sitterPlaceSchema>

export const PROP_KINDS = ['panel', 'flag', 'prop'] as const
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
})
export type Prop = z.infer<typeof propSchema>
