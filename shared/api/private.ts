import { z } from 'zod'
import { pieceIdSchema, sitterIdSchema } from '#shared/ids.ts'
import { proseSchema } from '#shared/domain/text.ts'

/** GET /api/shoots/:shootId/sizes; PUT …/sizes/:sitterId → list (`sizes.*`) */
export const sitterPrivateInputSchema = z.object({
  sizes: proseSchema(1000).default(''),
  contact: proseSchema(300).default(''),
})
export const sitterPrivatesSchema = z.object({
  sitters: z.array(sitterPrivateInputSchema.extend({ sitterId: sitterIdSchema })),
})
export type SitterPrivates = z.infer<typeof sitterPrivatesSchema>

/** ISO 4217 code and minor units. */
export const moneySchema = z.object({
  minor: z.number().int().min(0).max(1e12),
  currency: z.string().regex(/^[A-Z]{3}$/),
})
/** GET /api/shoots/:shootId/piece-costs; PUT …/piece-costs/:pieceId → list (`piece-costs.*`) */
export const pieceCostInputSchema = z.object({
  cost: moneySchema.nullable(),
  deposit: moneySchema.nullable().default(null),
  size: proseSchema(40).default(''),
})
export const pieceCostsSchema = z.object({ pieces: z.array(pieceCostInputSchema.extend({ pieceId: pieceIdSchema })) })
export type PieceCosts = z.infer<typeof pieceCostsSchema>

/** GET and PUT /api/shoots/:shootId/private-note (`private-notes.*`) */
export const privateNoteSchema = z.object({ text: proseSchema(8000) })
