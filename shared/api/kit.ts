import { z } from 'zod'
import { kitItemIdSchema } from '#shared/ids.ts'
import { kitInputSchema } from '#shared/domain/kit/schema.ts'

/** A kit item as it stands: every change makes a new version; lights keep the version they copied. */
export const kitItemSchema = kitInputSchema.extend({ id: kitItemIdSchema, version: z.number().int().min(1) })
export type KitItem = z.infer<typeof kitItemSchema>

/** GET /api/studios/:studioId/kit and GET /api/shoots/:shootId/kit; POST /api/studios/:studioId/kit, PUT …/kit/:kitId { …input, version }, DELETE …/kit/:kitId → whole list */
export const kitListSchema = z.object({ kit: z.array(kitItemSchema) })
/** `version` is the one the editor saw: 409 CONFLICT when somebody changed it meanwhile. */
export const kitUpdateSchema = kitInputSchema.extend({ version: z.number().int().min(1) })
