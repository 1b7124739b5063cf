import { z } from 'zod'
import { uploadIdSchema } from '#shared/ids.ts'

export const MAX_UPLOAD_BYTES = 25 * 1024 * 1024
export const MAX_UPLOAD_PIXELS = 100_000_000
/** Long edges of the WebP renditions, px. GET /api/uploads/:uploadId/:rendition */
export const RENDITIONS = [320, 960, 2048] as const
export type RenditionPx = (typeof RENDITIONS)[number]

/** PUT /api/shoots/:shootId/uploads/:uploadId (multipart, field `file`), idempotent. */
export const uploadSchema = z.object({
  id: uploadIdSchema,
  sha256: z.string().length(64),
  widthPx: z.number().int(),
  heightPx: z.number().int(),
  /** Five colours of the picture, most of it first, `#rrggbb`. */
  palette: z.array(z.string()),
  /** Exposure as the camera wrote it, e.g. `f/5.6 · 1/200 · 85 mm · ISO 100`; empty when absent. Position is never kept. */
  exposure: z.string(),
})
export type Upload = z.infer<typeof uploadSchema>
