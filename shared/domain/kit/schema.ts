import { z } from 'zod'
import { lineSchema, proseSchema } from '#shared/domain/text.ts'

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
  'panel',
  'lantern',
] as const
export const SUPPORT_KINDS = ['stand', 'boom', 'clamp', 'floor stand', 'hand', 'magic arm'] as const

/** A flash head. Guide numbers in metres at ISO 100, full power. */
export const unitNumbersSchema = z.object({
  guideNumberM: statedSchema,
  /** Maker's guide number by zoom setting in mm, when the head zooms. */
  zoom: z
    .array(z.object({ focalMm: z.number().min(10).max(400), guideNumberM: z.number().positive() }))
    .max(20)
    .default([]),
  /** Smallest power as 1/n. */
  minPowerDenominator: z.number().int().min(1).max(1024).default(128),
  flashColourK: statedSchema,
  /** Full pops from one charge or set of cells. */
  fullPops: statedSchema,
  fullRecycleS: statedSchema,
  /** Mass of the head with its power inside, kg. */
  massKg: statedSchema,
  remotePower: z.boolean().default(true),
})
export type UnitNumbers = z.infer<typeof unitNumbersSchema>

export const modifierNumbersSchema = z.object({
  shape: z.enum(MODIFIER_SHAPES),
  /** Emitting face, m; for a disc both are the diameter. */
  widthM: z.number().min(0).max(6),
  heightM: z.number().min(0).max(6),
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
})
export type SupportNumbers = z.infer<typeof supportNumbersSchema>

export const kitBodySchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('unit'), numbers: unitNumbersSchema }),
  z.object({ kind: z.literal('modifier'), numbers: modifierNumbersSchema }),
  z.object({ kind: z.literal('gel'), numbers: gelNumbersSchema }),
  z.object({ kind: z.literal('support'), numbers: supportNumbersSchema }),
])
export type KitBody = z.infer<typeof kitBodySchema>
export const KIT_KINDS = ['unit', 'modifier', 'gel', 'support'] as const
export type KitKind = (typeof KIT_KINDS)[number]

/** What a kit item says of itself, without identity and version. */
export const kitInputSchema = z.object({
  name: lineSchema(120),
  /** How many the studio has. */
  quantity: z.number().int().min(0).max(999).default(1),
  note: proseSchema(1000).default(''),
  body: kitBodySchema,
})
export type KitInput = z.infer<typeof kitInputSchema>
