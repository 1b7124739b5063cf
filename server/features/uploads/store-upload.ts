import { createHash } from 'node:crypto'
import { eq } from 'drizzle-orm'
import type { Upload } from '#shared/api/uploads.ts'
import type { ShootId, UploadId } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { blob, rendition, upload } from '#server/db/schema/uploads.ts'
import { AppError } from '#server/errors.ts'
import { type ProcessedPicture, processPicture } from './process-picture.ts'
import { type UploadRow, findUpload, findUploadOfContent, toUpload } from './upload-rows.ts'

export type StoreUpload = {
  shootId: ShootId
  uploadId: UploadId
  bytes: Uint8Array
  /** What these bytes came to, where somebody had to know before; else they are processed here. */
  processed?: ProcessedPicture
}

/**
 * Keeps a picture under an id made on the device. Sent again with the same bytes it answers the same; another picture
 * or another shoot under the same id is a CONFLICT.
 *
 * @throws AppError UNSUPPORTED (no picture, broken), TOO_LARGE (pixels), each with a sentence for people.
 */
export async function storeUpload(
  ctx: Ctx,
  { shootId, uploadId, bytes, processed: given }: StoreUpload,
): Promise<Upload> {
  const { actor } = await requireShoot(ctx, shootId, 'uploads.write')
  const sha256 = createHash('sha256').update(bytes).digest('hex')
  const earlier = await findUpload(ctx.db, uploadId)
  if (earlier) return sameOrConflict(earlier, shootId, sha256)

  const known = await findUploadOfContent(ctx.db, sha256)
  const processed = known ? null : (given ?? (await processPicture(bytes)))
  const facts = known ?? processed
  if (!facts) throw new Error('a picture is either known or processed')
  return withTransaction(ctx.db, async (tx) => {
    if (processed) {
      await tx.insert(blob).values({ sha256, bytes }).onConflictDoNothing()
      await tx
        .insert(rendition)
        .values(processed.renditions.map((one) => ({ sha256, ...one })))
        .onConflictDoNothing()
    }
    const [row] = await tx
      .insert(upload)
      .values({
        id: uploadId,
        shootId,
        sha256,
        mime: facts.mime,
        sizeBytes: bytes.length,
        widthPx: facts.widthPx,
        heightPx: facts.heightPx,
        palette: facts.palette,
        exposure: facts.exposure,
        exif: facts.exif,
        perceptualHash: facts.perceptualHash,
        createdBy: actor.userId,
        createdAt: ctx.now(),
      })
      .onConflictDoNothing()
      .returning()
    if (row) return toUpload(row)
    // Another request brought the same id in the meantime.
    const [other] = await tx.select().from(upload).where(eq(upload.id, uploadId))
    if (!other) throw new Error('an upload that conflicts exists')
    return sameOrConflict(other, shootId, sha256)
  })
}

function sameOrConflict(row: UploadRow, shootId: ShootId, sha256: string): Upload {
  if (row.shootId === shootId && row.sha256 === sha256) return toUpload(row)
  throw new AppError(
    'CONFLICT',
    'Another picture was already kept under this id. Nothing was changed; add the picture again.',
  )
}
