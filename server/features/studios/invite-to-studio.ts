import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import type { z } from 'zod'
import { type StudioId, invitationIdSchema, userIdSchema } from '#shared/ids.ts'
import type { StudioPeople, studioInvitationInputSchema } from '#shared/api/studios.ts'
import { findStudioRole, requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { invitation } from '#server/db/schema/people.ts'
import { AppError } from '#server/errors.ts'
import { invitationLetter } from '#server/features/mail/letters.ts'
import { queueLetter } from '#server/features/mail/queue-letter.ts'
import {
  INVITATION_DAYS,
  expiryFrom,
  findPersonByEmail,
  findWaiting,
  joinUrl,
  newToken,
  titleOf,
} from '#server/features/people/invitation-rows.ts'
import { listStudioPeople } from './list-studio-people.ts'
import { lockStudio } from './studio-rows.ts'

/**
 * Invites somebody into a studio by letter; the link works for seven days. Inviting the same address again replaces
 * the earlier letter, whose link is dead from then.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when the address belongs to somebody in the studio
 */
export async function inviteToStudio(
  ctx: Ctx,
  { studioId, ...input }: z.output<typeof studioInvitationInputSchema> & { studioId: StudioId },
): Promise<StudioPeople> {
  const { actor } = await requireStudio(ctx, studioId, 'members.write')
  const email = input.email.toLowerCase()
  const at = ctx.now()
  const { token, tokenHash } = newToken()
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const person = await findPersonByEmail(tx, email)
    if (person && (await findStudioRole(tx, studioId, userIdSchema.parse(person.id)))) {
      throw new AppError('CONFLICT', `${person.name} belongs to this studio already. No letter was sent.`)
    }
    const waiting = await findWaiting(tx, { studioId }, email)
    if (waiting) await tx.update(invitation).set({ revokedAt: at }).where(eq(invitation.id, waiting.id))
    const id = invitationIdSchema.parse(randomUUID())
    await tx.insert(invitation).values({
      id,
      studioId,
      email,
      role: input.role,
      tokenHash,
      invitedBy: actor.userId,
      sentAt: at,
      expiresAt: expiryFrom(at),
    })
    const { title } = await titleOf(tx, { shootId: null, studioId })
    await queueLetter(
      tx,
      invitationLetter({
        to: email,
        name: person?.name ?? '',
        inviter: actor.name,
        title,
        role: input.role,
        kind: 'studio',
        url: joinUrl(ctx.publicUrl, token),
        days: INVITATION_DAYS,
      }),
    )
    await audit(tx, { studioId, userId: actor.userId, what: 'invitation.sent', subject: id, at })
  })
  return listStudioPeople(ctx, studioId)
}
