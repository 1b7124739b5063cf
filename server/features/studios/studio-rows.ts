import { and, count, eq, ne } from 'drizzle-orm'
import type { ShootId, StudioId, UserId } from '#shared/ids.ts'
import type { StudioRole } from '#shared/access/roles.ts'
import type { Studio } from '#shared/api/studios.ts'
import type { Ctx } from '#server/context.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { studio, studioMember } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'

/** A studio as one of its members sees it. @throws NOT_FOUND */
export async function getStudio(db: Db | Tx, id: StudioId, role: StudioRole): Promise<Studio> {
  const [row] = await db.select({ name: studio.name }).from(studio).where(eq(studio.id, id))
  if (!row) throw new AppError('NOT_FOUND', 'There is no such studio, or you do not belong to it.')
  const [members] = await db.select({ people: count() }).from(studioMember).where(eq(studioMember.studioId, id))
  return { id, name: row.name, role, people: members?.people ?? 0 }
}

/** Holds a studio's row until the transaction ends, so that changes of its people and kit come one after another. */
export async function lockStudio(tx: Tx, id: StudioId): Promise<void> {
  await tx.select({ id: studio.id }).from(studio).where(eq(studio.id, id)).for('update')
}

/** A studio is never without an owner; call it under the studio's lock. @throws CONFLICT */
export async function requireAnotherOwner(tx: Tx, studioId: StudioId, besides: UserId): Promise<void> {
  const others = await tx
    .select({ userId: studioMember.userId })
    .from(studioMember)
    .where(and(eq(studioMember.studioId, studioId), eq(studioMember.role, 'owner'), ne(studioMember.userId, besides)))
    .limit(1)
  if (others.length === 0) {
    throw new AppError(
      'CONFLICT',
      'A studio needs an owner, and this is the only one. Nothing was changed; make somebody else owner first.',
    )
  }
}

/** Tells everyone who has one of the studio's shoots open that these query keys changed; call it after the commit. */
export async function announceToStudio(
  ctx: Ctx,
  studioId: StudioId,
  keysOf: (shootId: ShootId) => readonly (readonly string[])[],
): Promise<void> {
  const shoots = await ctx.db.select({ id: shoot.id }).from(shoot).where(eq(shoot.studioId, studioId))
  for (const { id } of shoots) ctx.documents.announce(id, keysOf(id))
}
