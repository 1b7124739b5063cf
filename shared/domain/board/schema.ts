import { z } from 'zod'
import {
  areaIdSchema,
  frameIdSchema,
  lookIdSchema,
  noteIdSchema,
  paletteIdSchema,
  shotIdSchema,
  tagIdSchema,
  uploadIdSchema,
} from '#shared/ids.ts'
import { colourSchema, lineSchema, proseSchema } from '#shared/domain/text.ts'

/** Where a thing hangs on the wall: left, top, width, height in wall units (one unit is one CSS pixel at zoom 1). */
export const boxSchema = z.tuple([
  z.number().min(-1e6).max(1e6),
  z.number().min(-1e6).max(1e6),
  z.number().min(8).max(2e4),
  z.number().min(8).max(2e4),
])
export type Box = z.infer<typeof boxSchema>

/** Who put it there and when; set once, a courtesy (the trustworthy authorship is in the log). */
export const madeSchema = z.object({
  by: z.string().max(64),
  name: z.string().max(80),
  initials: z.string().max(4),
  atMs: z.number().int(),
})
export type Made = z.infer<typeof madeSchema>

export const FRAME_RIGHTS = ['reference', 'ours', 'licensed', 'unknown'] as const
export const PICTURE_STATES = ['waiting', 'stored', 'refused'] as const

/** A picture's file: `waiting` is on somebody's device, `stored` is on the server, `refused` says why. */
export const pictureSchema = z.object({
  uploadId: uploadIdSchema,
  state: z.enum(PICTURE_STATES),
  widthPx: z.number().int().min(1).max(100000),
  heightPx: z.number().int().min(1).max(100000),
  why: z.string().max(300).optional(),
})
export type Picture = z.infer<typeof pictureSchema>

export const frameSchema = z.object({
  id: frameIdSchema,
  box: boxSchema,
  z: z.number().default(0),
  picture: pictureSchema,
  caption: proseSchema(300).default(''),
  credit: proseSchema(200).default(''),
  rights: z.enum(FRAME_RIGHTS).default('unknown'),
  palette: z.array(colourSchema).max(8).default([]),
  lookId: lookIdSchema.nullable().default(null),
  shotId: shotIdSchema.nullable().default(null),
  exposure: proseSchema(120).default(''),
  made: madeSchema.optional(),
})
export type Frame = z.infer<typeof frameSchema>

export const noteSchema = z.object({
  id: noteIdSchema,
  box: boxSchema,
  z: z.number().default(0),
  text: proseSchema(2000).default(''),
  made: madeSchema.optional(),
})
export type Note = z.infer<typeof noteSchema>

/** A swing tag: free text, or bound to a look whose pieces it then shows. */
export const tagSchema = z.object({
  id: tagIdSchema,
  box: boxSchema,
  z: z.number().default(0),
  title: proseSchema(120).default(''),
  text: proseSchema(2000).default(''),
  lookId: lookIdSchema.nullable().default(null),
  made: madeSchema.optional(),
})
export type Tag = z.infer<typeof tagSchema>

export const areaSchema = z.object({
  id: areaIdSchema,
  box: boxSchema,
  title: proseSchema(120).default(''),
  made: madeSchema.optional(),
})
export type Area = z.infer<typeof areaSchema>

export const paletteSchema = z.object({
  id: paletteIdSchema,
  box: boxSchema,
  z: z.number().default(0),
  title: proseSchema(120).default(''),
  colours: z.array(colourSchema).min(1).max(12),
  made: madeSchema.optional(),
})
export type Palette = z.infer<typeof paletteSchema>

export const NEEDS = ['must', 'should', 'could'] as const
export const needSchema = z.enum(NEEDS)
export type Need = z.infer<typeof needSchema>

/** The list a shot stands in (a day's id, or `loose`) and its fractional key there: one value, never torn apart. */
export const placeSchema = z.tuple([z.string().max(64), z.string().min(1).max(256)])
export type Place = z.infer<typeof placeSchema>
export const LOOSE = 'loose'

export const shotSchema = z.object({
  id: shotIdSchema,
  title: lineSchema(120),
  note: proseSchema(2000).default(''),
  need: needSchema.default('must'),
  place: placeSchema,
  coverFrameId: frameIdSchema.nullable().default(null),
  lookIds: z.array(lookIdSchema).default([]),
})
export type Shot = z.infer<typeof shotSchema>
