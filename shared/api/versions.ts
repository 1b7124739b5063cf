import { z } from 'zod'
import { userIdSchema, versionIdSchema } from '#shared/ids.ts'
import { lineSchema } from '#shared/domain/text.ts'

/** Kept versions a shoot may have at the same time, those kept by themselves among them. */
export const MOST_VERSIONS = 200
/** Length of a version's name, UTF-16 units. */
export const VERSION_NAME_MAX = 80

export const versionNameSchema = lineSchema(VERSION_NAME_MAX)

/**
 * GET /api/shoots/:shootId/versions → all, newest first; POST { name } keeps the board and the plan as they stand;
 * PATCH { name } and DELETE …/versions/:versionId; POST …/versions/:versionId/take-back keeps them as well, under a name
 * of its own, before whoever asks takes the version back. Each answers with the whole list.
 */
export const keepVersionSchema = z.object({ name: versionNameSchema })

export const versionSchema = z.object({
  id: versionIdSchema,
  name: z.string(),
  userId: userIdSchema,
  /** Who kept it. */
  by: z.string(),
  atMs: z.number(),
  /** The name of what was taken back right after this was kept by itself; null for one a person kept. */
  takingBack: z.string().nullable(),
})
export type Version = z.infer<typeof versionSchema>

export const versionsSchema = z.object({ versions: z.array(versionSchema) })
export type Versions = z.infer<typeof versionsSchema>

/** GET …/versions/:versionId: the full states of both documents, each a Yjs update, version 1, in base64. */
export const versionStatesSchema = z.object({ version: versionSchema, board: z.string(), plan: z.string() })
export type VersionStates = z.infer<typeof versionStatesSchema>
