import { and, eq } from 'drizzle-orm'
import { canInShoot } from '#shared/access/roles.ts'
import type { RenditionPx } from '#shared/api/uploads.ts'
import type { UploadId } from '#shared/ids.ts'
import { findRole, requireUser } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { rendition } from '#server/db/schema/uploads.ts'
import { AppError } from '#server/errors.ts'
import { findUpload } from './upload-rows.ts'

export type FoundRendition = {
  /** By content: the same for ever. */
  etag: string
  /** Reads the WebP; not needed when the browser has it. */
  read: () => Promise<Uint8Array>
}

/** A rendition of a picture, for members of its shoot; to everybody else it does not exist. */
export async function findRendition(
  ctx: Ctx,
  input: { uploadId: UploadId; longEdgePx: RenditionPx },
): Promise<FoundRendition> {
  const { userId } = requireUser(ctx)
  const row = await findUpload(ctx.db, input.uploadId)
  const role = row ? await findRole(ctx.db, row.shootId, userId) : null
  // One answer for no picture and for somebody else's.
  if (!row || !canInShoot(role, 'uploads.read')) throw new AppError('NOT_FOUND', 'There is no such picture.')
  return {
    etag: `"${row.sha256.slice(0, 32)}-${input.longEdgePx}"`,
    read: async () => {
      const [found] = await ctx.db
        .select({ bytes: rendition.bytes })
        .from(rendition)
        .where(and(eq(rendition.sha256, row.sha256), eq(rendition.longEdgePx, input.longEdgePx)))
      if (!found) throw new AppError('NOT_FOUND', 'There is no such picture.')
      return found.bytes
    },
  }
}
