import { and, eq } from 'drizzle-orm'
import type { DocId, ShootId, VersionId } from '#shared/ids.ts'
import type { VersionStates } from '#shared/api/versions.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { rtSnapshot } from '#server/db/schema/realtime.ts'
import { AppError } from '#server/errors.ts'
import { VERSION_KIND, digest, getVersionRow, keptDocIds, toVersion } from './version-rows.ts'

/**
 * A kept version with the full states of board and plan.
 *
 * @throws SIGNED_OUT, NOT_FOUND; GONE when what is stored is not what was kept
 */
export async function getVersion(
  ctx: Ctx,
  { shootId, versionId }: { shootId: ShootId; versionId: VersionId },
): Promise<VersionStates> {
  await requireShoot(ctx, shootId, 'versions.read')
  const row = await getVersionRow(ctx.db, shootId, versionId)
  const ids = await keptDocIds(ctx.db, shootId)
  const board = await readState(ctx, ids.board, row.boardSeq)
  const plan = await readState(ctx, ids.plan, row.planSeq)
  if (!board || !plan)
    throw new AppError(
      'GONE',
      'This version is damaged where it is stored and cannot be shown. The board is as it was; look at another version.',
    )
  return { version: toVersion(row), board, plan }
}

/** The stored state in base64; undefined when it is missing or does not agree with its checksum. */
async function readState(ctx: Ctx, docId: DocId, seq: number): Promise<string | undefined> {
  const [row] = await ctx.db
    .select({ state: rtSnapshot.state, sha256: rtSnapshot.sha256 })
    .from(rtSnapshot)
    .where(and(eq(rtSnapshot.docId, docId), eq(rtSnapshot.seq, seq), eq(rtSnapshot.kind, VERSION_KIND)))
  if (!row || Buffer.compare(digest(row.state), row.sha256) !== 0) return undefined
  return Buffer.from(row.state).toString('base64')
}
