import { createHash, randomUUID } from 'node:crypto'
import { type SQL, and, count, desc, eq, getTableColumns, inArray } from 'drizzle-orm'
import * as Y from 'yjs'
import { type DocId, type ShootId, type UserId, type VersionId, versionIdSchema } from '#shared/ids.ts'
import { MOST_VERSIONS, type Version } from '#shared/api/versions.ts'
import type { Ctx } from '#server/context.ts'
import { type Db, type Tx, withTransaction } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { keptVersion, rtDoc, rtSnapshot } from '#server/db/schema/realtime.ts'
import { AppError } from '#server/errors.ts'
import { lockShoot } from '#server/features/shoots/brief-rows.ts'

/** Kind of the snapshots that hold kept versions; compaction has another and leaves these alone. */
export const VERSION_KIND = 'version'

/** The documents that a version keeps. */
type KeptKind = 'board' | 'plan'

type VersionRow = typeof keptVersion.$inferSelect & { by: string }

/** Versions with the names of those who kept them, newest first. */
function versionRows(db: Db | Tx, where: SQL | undefined): Promise<VersionRow[]> {
  return db
    .select({ ...getTableColumns(keptVersion), by: user.name })
    .from(keptVersion)
    .innerJoin(user, eq(user.id, keptVersion.userId))
    .where(where)
    .orderBy(desc(keptVersion.at), desc(keptVersion.id))
}

/** A row as screens are given it. */
export function toVersion({ id, name, userId, by, at, takingBack }: VersionRow): Version {
  return { id, name, userId, by, atMs: at.getTime(), takingBack }
}

/** A shoot's versions, newest first. */
export async function loadVersions(db: Db | Tx, shootId: ShootId): Promise<Version[]> {
  return (await versionRows(db, eq(keptVersion.shootId, shootId))).map(toVersion)
}

/** @throws NOT_FOUND */
export async function getVersionRow(db: Db | Tx, shootId: ShootId, versionId: VersionId): Promise<VersionRow> {
  const [row] = await versionRows(db, and(eq(keptVersion.shootId, shootId), eq(keptVersion.id, versionId)))
  if (!row)
    throw new AppError('NOT_FOUND', 'This version is not kept any more. Nothing was changed; look at the list again.')
  return row
}

/** Ids of the documents that versions keep. */
export async function keptDocIds(db: Db | Tx, shootId: ShootId): Promise<Record<KeptKind, DocId>> {
  const rows = await db
    .select({ id: rtDoc.id, kind: rtDoc.kind })
    .from(rtDoc)
    .where(and(eq(rtDoc.shootId, shootId), inArray(rtDoc.kind, ['board', 'plan'])))
  const of = (kind: KeptKind) => {
    const row = rows.find((one) => one.kind === kind)
    if (!row) throw new AppError('NOT_FOUND', 'There is no such shoot, or you do not belong to it.')
    return row.id
  }
  return { board: of('board'), plan: of('plan') }
}

/**
 * Keeps both documents as they stand, and tells everybody with the shoot open.
 *
 * @throws NOT_FOUND; CONFLICT when the shoot has as many versions as it may
 */
export async function storeVersion(
  ctx: Ctx,
  version: { shootId: ShootId; userId: UserId; name: string; takingBack: string | null },
): Promise<void> {
  const { shootId } = version
  const stand = (kind: KeptKind) =>
    ctx.documents.read(shootId, kind, (doc, seq) => ({ seq, state: Y.encodeStateAsUpdate(doc) }))
  const board = await stand('board')
  const plan = await stand('plan')
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, shootId)
    const [kept] = await tx.select({ number: count() }).from(keptVersion).where(eq(keptVersion.shootId, shootId))
    if ((kept?.number ?? 0) >= MOST_VERSIONS)
      throw new AppError(
        'CONFLICT',
        `This shoot has ${MOST_VERSIONS} kept versions, as many as it can have. Nothing was changed; remove one that nobody needs and try again.`,
      )
    const ids = await keptDocIds(tx, shootId)
    const snapshot = (docId: DocId, { seq, state }: { seq: number; state: Uint8Array }) => ({
      docId,
      seq,
      kind: VERSION_KIND,
      state,
      sha256: digest(state),
      at: ctx.now(),
    })
    // At the same place of the log stands the same content: two versions share it.
    await tx
      .insert(rtSnapshot)
      .values([snapshot(ids.board, board), snapshot(ids.plan, plan)])
      .onConflictDoNothing()
    await tx.insert(keptVersion).values({
      ...version,
      id: versionIdSchema.parse(randomUUID()),
      at: ctx.now(),
      boardSeq: board.seq,
      planSeq: plan.seq,
    })
  })
  announceVersions(ctx, shootId)
}

/** Checksum that stands beside a stored state. */
export function digest(state: Uint8Array): Uint8Array {
  return createHash('sha256').update(state).digest()
}

/** Tells everybody with the shoot open to fetch the list again. */
export function announceVersions(ctx: Ctx, shootId: ShootId): void {
  ctx.documents.announce(shootId, [['shoots', shootId, 'versions']])
}
