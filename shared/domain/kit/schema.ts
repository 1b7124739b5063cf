import { z } from 'zod'
import { kitItemIdSchema } from '#shared/ids.ts'
import { colourSchema, lineSchema, proseSchema } from '#shared/domain/text.ts'
import { faultsOf } from './faults.ts'

/** Where a number comes from: a maker's or standard's print, a meter, or somebody's guess. */
export const PROVENANCES = ['published', 'measured', 'assumed'] as const
export const provenanceSchema = z.enum(PROVENANCES)
export type Provenance = z.infer<typeof provenanceSchema>

/** A number with where it comes from. */
export const statedSchema = z.object({
  value: z.number(),
  from: provenanceSchema,
  source: proseSchema(200).default(''),
})
export type Stated = z.infer<typeof statedSchema>

export const MODIFIER_SHAPES = [
  'bare',
  'reflector',
  'umbrella',
  'softbox',
  'octa',
  'strip',
  'beauty dish',
  'snoot',
  'grid',
  'lantern',
] as const
export const SUPPORT_KINDS = ['stand', 'boom', 'clamp', 'floor stand', 'floor plate', 'hand', 'magic arm'] as const
export const PANEL_USES = ['panel', 'flag'] as const

const COUNT = 'How many is a whole number from 0 to 999.'
const FOCAL = 'A zoom setting lies between 10 and 400 mm.'
const FACE = 'A face is between 0 and 6 m.'
const PANEL = 'A panel is between 1 cm and 10 m.'
const DENOMINATOR = 'The smallest power is 1/1 to 1/1024.'
const leastPower = z.number().int(DENOMINATOR).min(1, DENOMINATOR).max(1024, DENOMINATOR)

/**
 * What a meter read of a head with a modifier on it (`modifierKitId` null: bare), as the guide number in metres that
 * head and modifier have together at full power and ISO 100. It takes the place of guide number and loss.
 */
export const meteredSchema = z.object({
  modifierKitId: kitItemIdSchema.nullable(),
  /** Zoom of the head while it was read; null when it has none. */
  zoomMm: z.number().min(10).max(400).nullable().default(null),
  guideNumberM: z.number().positive(),
  /** The reading in words: f-number, distance, power, ISO, date. */
  source: proseSchema(200).default(''),
})
export type Metered = z.infer<typeof meteredSchema>

/** A flash head. Guide numbers in metres at ISO 100, full power. */
export const unitNumbersSchema = z.object({
  guideNumberM: statedSchema,
  /** Maker's guide number by zoom setting in mm, when the head zooms. */
  zoom: z
    .array(
      z.object({
        focalMm: z.number().min(10, FOCAL).max(400, FOCAL),
        guideNumberM: z.number().positive('A guide number is above 0: put in the maker’s figure or measure it.'),
      }),
    )
    .max(20, 'At most 20 zoom settings.')
    .default([]),
  /** Smallest power as 1/n. */
  minPowerDenominator: leastPower.default(128),
  flashColourK: statedSchema,
  /** Full pops from one charge or set of cells. */
  fullPops: statedSchema,
  fullRecycleS: statedSchema,
  /** Mass of the head with its power inside, kg. */
  massKg: statedSchema,
  remotePower: z.boolean().default(true),
  /** Watts it draws from the mains while charging; null: runs on its own battery. */
  mainsWatts: statedSchema.nullable().default(null),
  /** How it keeps time with the shutter, and what sets it off, in words. */
  sync: proseSchema(200).default(''),
  triggers: proseSchema(200).default(''),
  metered: z.array(meteredSchema).max(60).default([]),
})
export type UnitNumbers = z.infer<typeof unitNumbersSchema>

/** A lamp that burns all the time. */
export const lampNumbersSchema = z.object({
  /** Illuminance on axis at one metre, bare, full power. */
  luxAtMetre: statedSchema,
  /** Power it draws, W. */
  watts: statedSchema,
  colourK: statedSchema,
  /** Full angle between the half-intensity directions, degrees; null: unknown. */
  beamDeg: statedSchema.nullable().default(null),
  /** Smallest power as 1/n; 1: it cannot be dimmed. */
  minPowerDenominator: leastPower.default(100),
  massKg: statedSchema,
  remotePower: z.boolean().default(false),
  onMains: z.boolean().default(true),
})
export type LampNumbers = z.infer<typeof lampNumbersSchema>

export const modifierNumbersSchema = z.object({
  shape: z.enum(MODIFIER_SHAPES),
  /** Emitting face, m; for a disc both are the diameter. */
  widthM: z.number().min(0, FACE).max(6, FACE),
  heightM: z.number().min(0, FACE).max(6, FACE),
  /** Stops lost on axis against the bare head at the same zoom. */
  lossStops: statedSchema,
  /** Full angle between the half-intensity directions, degrees; null: unknown. */
  beamDeg: statedSchema.nullable().default(null),
  massKg: statedSchema,
})
export type ModifierNumbers = z.infer<typeof modifierNumbersSchema>

/** A colour filter. Positive mired is warmer. */
export const gelNumbersSchema = z.object({
  miredShift: statedSchema,
  /** What the maker prints, where it differs from the shift computed with. */
  printedMired: z.number().nullable().default(null),
  transmission: statedSchema,
  /** A hue that is not on the warm–cool axis is drawn with this colour. */
  colour: z.string().default('#ffffff'),
})
export type GelNumbers = z.infer<typeof gelNumbersSchema>

export const supportNumbersSchema = z.object({
  kind: z.enum(SUPPORT_KINDS),
  maxHeightM: statedSchema,
  maxLoadKg: statedSchema,
  minHeightM: statedSchema.nullable().default(null),
  /** Of a boom: how far the head hangs out, where the counterweight sits, and the mass of the arm; null: not known. */
  reachM: statedSchema.nullable().default(null),
  counterReachM: statedSchema.nullable().default(null),
  armMassKg: statedSchema.nullable().default(null),
})
export type SupportNumbers = z.infer<typeof supportNumbersSchema>

/** A panel gives light back, a flag keeps it off. */
export const panelNumbersSchema = z.object({
  use: z.enum(PANEL_USES),
  widthM: z.number().min(0.01, PANEL).max(10, PANEL),
  heightM: z.number().min(0.01, PANEL).max(10, PANEL),
  colour: colourSchema.default('#ffffff'),
  massKg: statedSchema,
})
export type PanelNumbers = z.infer<typeof panelNumbersSchema>

export const kitBodySchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('unit'), numbers: unitNumbersSchema }),
  z.object({ kind: z.literal('modifier'), numbers: modifierNumbersSchema }),
  z.object({ kind: z.literal('gel'), numbers: gelNumbersSchema }),
  z.object({ kind: z.literal('support'), numbers: supportNumbersSchema }),
  z.object({ kind: z.literal('lamp'), numbers: lampNumbersSchema }),
  z.object({ kind: z.literal('panel'), numbers: panelNumbersSchema }),
])
export type KitBody = z.infer<typeof kitBodySchema>
export const KIT_KINDS = ['unit', 'lamp', 'modifier', 'gel', 'support', 'panel'] as const
export type KitKind = (typeof KIT_KINDS)[number]

/** What a kit item says of itself, without identity and version, as it is read: older ones may break newer rules. */
export const kitFieldsSchema = z.object({
  name: lineSchema(120),
  /** How many the studio has. */
  quantity: z.number().int(COUNT).min(0, COUNT).max(999, COUNT).default(1),
  note: proseSchema(1000).default(''),
  body: kitBodySchema,
})

/** Adds what no setup can be computed with to the issues of an item, each at its number. */
export function refuseFaults({ body }: { body: KitBody }, context: z.RefinementCtx): void {
  for (const { path, message } of faultsOf(body))
    context.addIssue({ code: 'custom', path: ['body', 'numbers', ...path], message })
}

/** What may be written into the kit room: what can be read, and numbers that a setup can be computed with. */
export const kitInputSchema = kitFieldsSchema.superRefine(refuseFaults)
export type KitInput = z.infer<typeof kitInputSchema>
