import { z } from 'zod'
import { shootIdSchema, studioIdSchema, uploadIdSchema } from '#shared/ids.ts'
import { civilDateSchema, lineSchema } from '#shared/domain/text.ts'
import { ROLES } from '#shared/access/roles.ts'
import {
  briefFieldsSchema,
  briefSchema,
  deliverableInputSchema,
  locationSchema,
  roomInputSchema,
  zoneSchema,
} from '#shared/domain/shoots/schema.ts'
import { minutesSchema } from '#shared/domain/plan/minutes.ts'
import { LAMPS, SECTIONS } from '#shared/domain/shoots/readiness.ts'

const lampSchema = z.enum(LAMPS)

/** GET /api/shoots: those the person has a role in, soonest first. */
export const shootCardSchema = z.object({
  id: shootIdSchema,
  studioId: studioIdSchema,
  title: z.string(),
  role: z.enum(ROLES),
  date: civilDateSchema.nullable(),
  place: z.string(),
  shots: z.number().int(),
  /** Pictures on the card: up to three upload ids. */
  pictures: z.array(uploadIdSchema),
  readiness: z.array(z.object({ section: z.enum(SECTIONS), lamp: lampSchema, why: z.string() })),
})
export type ShootCard = z.infer<typeof shootCardSchema>
export const shootCardsSchema = z.object({ shoots: z.array(shootCardSchema) })

/** POST /api/shoots → { id } */
export const createShootSchema = z.object({
  studioId: studioIdSchema,
  title: lineSchema(120),
  date: civilDateSchema.nullable().default(null),
  zone: zoneSchema,
})
export const createdShootSchema = z.object({ id: shootIdSchema })

/** GET /api/shoots/:shootId: everything of the shoot that is not in a document. */
export const shootSchema = z.object({
  id: shootIdSchema,
  studioId: studioIdSchema,
  /** Whether the person also belongs to the studio. */
  inStudio: z.boolean(),
  role: z.enum(ROLES),
  brief: briefSchema,
  minutes: minutesSchema,
  /** Epoch of each document, part of the browser's cache name. */
  epochs: z.record(z.string(), z.number().int()),
})
export type ShootView = z.infer<typeof shootSchema>

/** PATCH /api/shoots/:shootId/brief → brief. Without the defaults: what is not sent stays as it is. */
const brief = briefFieldsSchema.shape
export const briefPatchSchema = z
  .object({
    title: brief.title,
    client: brief.client.unwrap(),
    idea: brief.idea.unwrap(),
    usage: brief.usage.unwrap(),
    date: brief.date.unwrap(),
    zone: brief.zone,
    signOffByMs: brief.signOffByMs.unwrap(),
  })
  .partial()
/** PUT /api/shoots/:shootId/location → brief */
export const locationInputSchema = locationSchema
/** POST /api/shoots/:shootId/rooms, PUT …/rooms/:roomId, DELETE …/rooms/:roomId → brief */
export const roomBodySchema = roomInputSchema
/** POST /api/shoots/:shootId/deliverables, PUT …/deliverables/:deliverableId, DELETE → brief */
export const deliverableBodySchema = deliverableInputSchema
export const briefResponseSchema = z.object({ brief: briefSchema })

/** GET and PUT /api/studios/:studioId/minutes */
export const minutesResponseSchema = z.object({ minutes: minutesSchema })
