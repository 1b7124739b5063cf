import { z } from 'zod'
import { kitItemIdSchema, shotIdSchema } from '#shared/ids.ts'
import { proseSchema } from '#shared/domain/text.ts'

/** `waiting` is a shot not yet begun; `got` is finished, `skipped` dropped. */
export const SHOT_STATES = ['waiting', 'under way', 'got', 'skipped'] as const
export type ShotState = (typeof SHOT_STATES)[number]

/** One change of a shot's state: one value, so that state, time and person never tear apart. */
export const shotEventSchema = z.object({
  state: z.enum(SHOT_STATES),
  atMs: z.number().int(),
  by: z.string().max(64),
  name: z.string().max(80),
  why: proseSchema(300).optional(),
})
export type ShotEvent = z.infer<typeof shotEventSchema>

export const dayShotSchema = z.object({
  id: shotIdSchema,
  event: shotEventSchema.optional(),
  startedAtMs: z.number().int().nullable().default(null),
  note: proseSchema(2000).default(''),
  frames: proseSchema(200).default(''),
})
export type DayShot = z.infer<typeof dayShotSchema>

/** A tick against one action of a changeover; the id is the shot's id, a colon and the action's key. */
export const tickSchema = z.object({
  id: z.string().max(200),
  done: z.boolean(),
  by: z.string().max(64),
  atMs: z.number().int(),
})
export type Tick = z.infer<typeof tickSchema>

export const kitCheckSchema = z.object({ id: kitItemIdSchema, packed: z.boolean(), back: z.boolean().default(false) })
export type KitCheck = z.infer<typeof kitCheckSchema>
