import { and, eq } from 'drizzle-orm'
import type { ShootId, UserId } from '#shared/ids.ts'
import { findRole, requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { lockShoot } from '#server/features/shoots/brief-rows.ts'
import { requireAnotherPhotographer } from './photographers.ts'

/**
 * Takes a person out of a shoot, or leaves it when it is oneself; open screens of theirs are closed. What they made
 * stays. Somebody who is out already is no error.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT for the last photographer
 */
export async function removePerson(ctx: Ctx, { shootId, userId }: { shootId: ShootId; userId: UserId }): Promise<void> {
  const isLeaving = ctx.actor?.userId === userId
  const { actor } = await requireShoot(ctx, shootId, isLeaving ? 'people.read' : 'people.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, shootId)
    const before = await findRole(tx, shootId, userId)
    if (!before) return
    if (before === 'photographer') await requireAnotherPhotographer(tx, shootId, userId)
    await tx.delete(shootMember).where(and(eq(shootMember.shootId, shootId), eq(shootMember.userId, userId)))
    await audit(tx, {
      shootId,
      userId: actor.userId,
      what: isLeaving ? 'person.left' : 'person.removed',
      subject: userId,
      at: ctx.now(),
    })
    await notifyAuth(tx, { shootId, userId })
  })
  ctx.documents.announce(shootId, [['shoots', shootId, 'people']])
}
