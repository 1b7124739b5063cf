import { and, eq, isNull } from 'drizzle-orm'
import type { InvitationId, StudioId } from '#shared/ids.ts'
import type { StudioPeople } from '#shared/api/studios.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { invitation } from '#server/db/schema/people.ts'
import { listStudioPeople } from './list-studio-people.ts'

/** Withdraws an invitation into a studio; one that is accepted or withdrawn already is left as it is. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function revokeStudioInvitation(
  ctx: Ctx,
  { studioId, invitationId }: { studioId: StudioId; invitationId: InvitationId },
): Promise<StudioPeople> {
  const { actor } = await requireStudio(ctx, studioId, 'members.write')
  await withTransaction(ctx.db, async (tx) => {
    const at = ctx.now()
    const changed = await tx
      .update(invitation)
      .set({ revokedAt: at })
      .where(
        and(
          eq(invitation.id, invitationId),
          eq(invitation.studioId, studioId),
          isNull(invitation.acceptedAt),
          isNull(invitation.revokedAt),
        ),
      )
      .returning({ id: invitation.id })
    if (changed.length > 0)
      await audit(tx, { studioId, userId: actor.userId, what: 'invitation.withdrawn', subject: invitationId, at })
  })
  return listStudioPeople(ctx, studioId)
}
