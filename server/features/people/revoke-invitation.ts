import { and, eq, isNull } from 'drizzle-orm'
import type { InvitationId, ShootId } from '#shared/ids.ts'
import type { People } from '#shared/api/people.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { invitation } from '#server/db/schema/people.ts'
import { AppError } from '#server/errors.ts'
import { listPeople } from './list-people.ts'

/**
 * Withdraws an invitation: the letter's link says so from then. One that is withdrawn already is no error.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when it was accepted meanwhile (then remove the person)
 */
export async function revokeInvitation(
  ctx: Ctx,
  { shootId, invitationId }: { shootId: ShootId; invitationId: InvitationId },
): Promise<People> {
  const { actor } = await requireShoot(ctx, shootId, 'people.write')
  await withTransaction(ctx.db, async (tx) => {
    const mine = and(eq(invitation.id, invitationId), eq(invitation.shootId, shootId))
    const [row] = await tx.select({ acceptedAt: invitation.acceptedAt }).from(invitation).where(mine).for('update')
    if (row?.acceptedAt)
      throw new AppError(
        'CONFLICT',
        'This invitation was accepted meanwhile. Nothing was changed; remove the person from the list instead.',
      )
    const at = ctx.now()
    const changed = await tx
      .update(invitation)
      .set({ revokedAt: at })
      .where(and(mine, isNull(invitation.revokedAt)))
      .returning({ id: invitation.id })
    if (changed.length > 0)
      await audit(tx, { shootId, userId: actor.userId, what: 'invitation.withdrawn', subject: invitationId, at })
  })
  ctx.documents.announce(shootId, [['shoots', shootId, 'people']])
  return listPeople(ctx, shootId)
}
