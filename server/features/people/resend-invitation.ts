import { and, eq, isNull } from 'drizzle-orm'
import type { InvitationId, ShootId } from '#shared/ids.ts'
import type { People } from '#shared/api/people.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { invitation } from '#server/db/schema/people.ts'
import { AppError } from '#server/errors.ts'
import { invitationLetter } from '#server/features/mail/letters.ts'
import { queueLetter } from '#server/features/mail/queue-letter.ts'
import { INVITATION_DAYS, expiryFrom, joinUrl, newToken, titleOf } from './invitation-rows.ts'
import { listPeople } from './list-people.ts'

/**
 * Sends an invitation again with a new link for another seven days; the link of the earlier letter is dead from then.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when it was accepted or withdrawn meanwhile
 */
export async function resendInvitation(
  ctx: Ctx,
  { shootId, invitationId }: { shootId: ShootId; invitationId: InvitationId },
): Promise<People> {
  const { actor } = await requireShoot(ctx, shootId, 'people.write')
  const at = ctx.now()
  const { token, tokenHash } = newToken()
  await withTransaction(ctx.db, async (tx) => {
    const [row] = await tx
      .update(invitation)
      .set({ tokenHash, sentAt: at, expiresAt: expiryFrom(at), invitedBy: actor.userId })
      .where(
        and(
          eq(invitation.id, invitationId),
          eq(invitation.shootId, shootId),
          isNull(invitation.acceptedAt),
          isNull(invitation.revokedAt),
        ),
      )
      .returning()
    if (!row)
      throw new AppError(
        'CONFLICT',
        'This invitation was accepted or withdrawn meanwhile. No letter was sent; look at the list again.',
      )
    const { title } = await titleOf(tx, row)
    await queueLetter(
      tx,
      invitationLetter({
        to: row.email,
        name: row.name,
        inviter: actor.name,
        title,
        role: row.role,
        kind: 'shoot',
        url: joinUrl(ctx.publicUrl, token),
        days: INVITATION_DAYS,
      }),
    )
    await audit(tx, { shootId, userId: actor.userId, what: 'invitation.resent', subject: invitationId, at })
  })
  ctx.documents.announce(shootId, [['shoots', shootId, 'people']])
  return listPeople(ctx, shootId)
}
