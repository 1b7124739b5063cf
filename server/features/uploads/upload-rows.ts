import { eq } from 'drizzle-orm'
import type { Upload } from '#shared/api/uploads.ts'
import type { UploadId } from '#shared/ids.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { upload } from '#server/db/schema/uploads.ts'

export type UploadRow = typeof upload.$inferSelect

export async function findUpload(db: Db | Tx, uploadId: UploadId): Promise<UploadRow | undefined> {
  const [row] = await db.select().from(upload).where(eq(upload.id, uploadId))
  return row
}

/** Any upload of the same file: what was worked out for it holds for the next. */
export async function findUploadOfContent(db: Db | Tx, sha256: string): Promise<UploadRow | undefined> {
  const [row] = await db.select().from(upload).where(eq(upload.sha256, sha256)).limit(1)
  return row
}

export function toUpload({ id, sha256, widthPx, heightPx, palette, exposure }: UploadRow): Upload {
  return { id, sha256, widthPx, heightPx, palette, exposure }
}
