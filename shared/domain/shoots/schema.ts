import { z } from 'zod'
import { deliverableIdSchema, roomIdSchema } from '#shared/ids.ts'
import { civilDateSchema, lineSchema, proseSchema } from '#shared/domain/text.ts'

/** An IANA time zone that this engine knows. */
export const zoneSchema = z
  .string()
  .max(64)
  .refine(isZone, 'this time zone is not known; use a name like Europe/London')

function isZone(zone: string): boolean {
  try {
    return Intl.DateTimeFormat('en', { timeZone: zone }).resolvedOptions().timeZone !== ''
  } catch {
    return false
  }
}

const metres = (max: number) => z.number().min(0).max(max)

export const roomInputSchema = z.object({
  name: lineSchema(80),
  widthM: metres(200).nullable().default(null),
  depthM: metres(200).nullable().default(null),
  ceilingM: metres(60).nullable().default(null),
  /** Sockets and breakers as the venue tells; never a permit. */
  power: proseSchema(500).default(''),
  windows: proseSchema(500).default(''),
  note: proseSchema(1000).default(''),
})
export type RoomInput = z.infer<typeof roomInputSchema>
export const roomSchema = roomInputSchema.extend({ id: roomIdSchema })
export type Room = z.infer<typeof roomSchema>

export const locationSchema = z.object({
  name: proseSchema(120).default(''),
  address: proseSchema(400).default(''),
  latitude: z.number().min(-90).max(90).nullable().default(null),
  longitude: z.number().min(-180).max(180).nullable().default(null),
  parking: proseSchema(500).default(''),
  access: proseSchema(1000).default(''),
})
export type Location = z.infer<typeof locationSchema>

export const DELIVERABLE_ORIENTATIONS = ['any', 'upright', 'across', 'square'] as const
export const deliverableInputSchema = z.object({
  title: lineSchema(120),
  count: z.number().int().min(1).max(999).default(1),
  orientation: z.enum(DELIVERABLE_ORIENTATIONS).default('any'),
  use: proseSchema(300).default(''),
  dueOn: civilDateSchema.nullable().default(null),
})
export type DeliverableInput = z.infer<typeof deliverableInputSchema>
export const deliverableSchema = deliverableInputSchema.extend({ id: deliverableIdSchema })
export type Deliverable = z.infer<typeof deliverableSchema>

/** What the shoot is for. `date` is the first day's civil date in `zone`. */
export const briefFieldsSchema = z.object({
  title: lineSchema(120),
  client: proseSchema(120).default(''),
  idea: proseSchema(4000).default(''),
  usage: proseSchema(1000).default(''),
  date: civilDateSchema.nullable().default(null),
  zone: zoneSchema,
  /** When the looks should be signed off: an instant, ms since 1970 UTC. */
  signOffByMs: z.number().int().nullable().default(null),
  location: locationSchema,
})
export type BriefFields = z.infer<typeof briefFieldsSchema>

export const briefSchema = briefFieldsSchema.extend({
  rooms: z.array(roomSchema),
  deliverables: z.array(deliverableSchema),
})
export type Brief = z.infer<typeof briefSchema>
