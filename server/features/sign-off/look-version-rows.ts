import { and, eq, inArray } from 'drizzle-orm'
import { plannedLooks, type PlannedLook } from '#shared/domain/plan/read-plan.ts'
import type { ShootId, UploadId } from '#shared/ids.ts'
import { looksPart } from '#shared/realtime/plan-parts.ts'
import type { Ctx } from '#server/context.ts'
import { upload } from '#server/db/schema/uploads.ts'

export type LookVersions = {
  /** Head of the looks document's log that this was read at. */
  seq: number
  looks: ReadonlyMap<string, PlannedLook>
  /** SHA-256 by upload id, of this shoot's pictures only. */
  pictureHashes: ReadonlyMap<UploadId, string>
}

/** Every look as it stands at the head of the log, everything in it committed. */
export async function readLookVersions(ctx: Ctx, shootId: ShootId): Promise<LookVersions> {
  const { seq, planned } = await ctx.documents.read(shootId, 'looks', (doc, head) => ({
    seq: head,
    planned: plannedLooks(looksPart(doc)),
  }))
  const ids = [...new Set([...planned.values()].flatMap(({ look }) => look.pictureIds))]
  const rows =
    ids.length === 0
      ? []
      : await ctx.db
          .select({ id: upload.id, sha256: upload.sha256 })
          .from(upload)
          .where(and(eq(upload.shootId, shootId), inArray(upload.id, ids)))
  return { seq, looks: planned, pictureHashes: new Map(rows.map((row) => [row.id, row.sha256])) }
}
