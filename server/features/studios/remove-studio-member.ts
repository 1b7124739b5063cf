import { and, eq } from 'drizzle-orm'
import type { StudioId, UserId } from '#shared/ids.ts'
import { findStudioRole, requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { lockStudio, requireAnotherOwner } from './studio-rows.ts'

/**
 * Takes a person out of a studio, or leaves it when it is oneself; their roles in shoots stay. Somebody who is out
 * already is no error.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT for the last owner
 */
export async function removeStudioMember(
  ctx: Ctx,
  { studioId, userId }: { studioId: StudioId; userId: UserId },
): Promise<void> {
  const isLeaving = ctx.actor?.userId === userId
  const { actor } = await requireStudio(ctx, studioId, isLeaving ? 'studio.read' : 'members.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const before = await findStudioRole(tx, studioId, userId)
    if (!before) return
    if (before === 'owner') await requireAnotherOwner(tx, studioId, userId)
    await tx.delete(studioMember).where(and(eq(studioMember.studioId, studioId), eq(studioMember.userId, userId)))
    await audit(tx, {
      studioId,
      userId: actor.userId,
      what: isLeaving ? 'person.left' : 'person.removed',
      subject: userId,
      at: ctx.now(),
    })
  })
}
