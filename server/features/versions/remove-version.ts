import { and, eq } from 'drizzle-orm'
import type { DocId, ShootId, VersionId } from '#shared/ids.ts'
import type { Versions } from '#shared/api/versions.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { type Tx, withTransaction } from '#server/db/client.ts'
import { keptVersion, rtSnapshot } from '#server/db/schema/realtime.ts'
import { lockShoot } from '#server/features/shoots/brief-rows.ts'
import { VERSION_KIND, announceVersions, keptDocIds, loadVersions } from './version-rows.ts'

/** Forgets a kept version, and its states unless another version needs them; one that is gone already is no error. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function removeVersion(
  ctx: Ctx,
  { shootId, versionId }: { shootId: ShootId; versionId: VersionId },
): Promise<Versions> {
  await requireShoot(ctx, shootId, 'versions.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, shootId)
    const [gone] = await tx
      .delete(keptVersion)
      .where(and(eq(keptVersion.shootId, shootId), eq(keptVersion.id, versionId)))
      .returning()
    if (!gone) return
    const others = await tx
      .select({ boardSeq: keptVersion.boardSeq, planSeq: keptVersion.planSeq })
      .from(keptVersion)
      .where(eq(keptVersion.shootId, shootId))
    const ids = await keptDocIds(tx, shootId)
    if (!others.some(({ boardSeq }) => boardSeq === gone.boardSeq)) await removeState(tx, ids.board, gone.boardSeq)
    if (!others.some(({ planSeq }) => planSeq === gone.planSeq)) await removeState(tx, ids.plan, gone.planSeq)
  })
  announceVersions(ctx, shootId)
  return { versions: await loadVersions(ctx.db, shootId) }
}

async function removeState(tx: Tx, docId: DocId, seq: number): Promise<void> {
  await tx
    .delete(rtSnapshot)
    .where(and(eq(rtSnapshot.docId, docId), eq(rtSnapshot.seq, seq), eq(rtSnapshot.kind, VERSION_KIND)))
}
