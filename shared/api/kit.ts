import { z } from 'zod'
import { kitItemIdSchema } from '#shared/ids.ts'
import { kitFieldsSchema, kitInputSchema, refuseFaults } from '#shared/domain/kit/schema.ts'

const versionSchema = z.number().int().min(1)

/** A kit item as it stands: every change makes a new version; lights keep the version they copied. */
export const kitItemSchema = kitFieldsSchema.extend({ id: kitItemIdSchema, version: versionSchema })
export type KitItem = z.infer<typeof kitItemSchema>

/** GET /api/studios/:studioId/kit and GET /api/shoots/:shootId/kit; POST /api/studios/:studioId/kit, PUT …/kit/:kitId { …input, version }, DELETE …/kit/:kitId → whole list */
export const kitListSchema = z.object({ kit: z.array(kitItemSchema) })
/** `version` is the one the editor saw: 409 CONFLICT when somebody changed it meanwhile. */
export const kitUpdateSchema = kitFieldsSchema.extend({ version: versionSchema }).superRefine(refuseFaults)

/** Most items of a studio's kit: every list of it carries all. */
export const KIT_ITEMS_MAX = 5000
/** Most rows of one import. */
export const IMPORT_ROWS_MAX = 2000
/** Largest body of an import, bytes. */
export const IMPORT_BYTES_MAX = 8_000_000

/**
 * One agreed row of an import. `version` null: a new item, whose `id` only stands for it in this request (meter
 * readings of other rows may name it); otherwise the item and the version that was looked at.
 */
export const kitImportRowSchema = z.object({
  id: kitItemIdSchema,
  version: versionSchema.nullable(),
  input: kitInputSchema,
})
export type KitImportRow = z.infer<typeof kitImportRowSchema>

/** POST /api/studios/:studioId/kit/import → whole list; all rows or none. */
export const kitImportSchema = z.object({
  rows: z
    .array(kitImportRowSchema)
    .min(1)
    .max(IMPORT_ROWS_MAX, `at most ${IMPORT_ROWS_MAX} rows at a time; split the file`),
})
