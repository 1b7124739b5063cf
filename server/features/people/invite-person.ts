import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import type { z } from 'zod'
import { type ShootId, invitationIdSchema, userIdSchema } from '#shared/ids.ts'
import type { People, invitationInputSchema } from '#shared/api/people.ts'
import { requireShoot } from '#server/access/require.ts'
import { personName } from '#server/auth/person-name.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { invitation } from '#server/db/schema/people.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'
import { invitationLetter } from '#server/features/mail/letters.ts'
import { queueLetter } from '#server/features/mail/queue-letter.ts'
import { lockShoot } from '#server/features/shoots/brief-rows.ts'
import {
  INVITATION_DAYS,
  expiryFrom,
  findPersonByEmail,
  findWaiting,
  joinUrl,
  newToken,
  titleOf,
} from './invitation-rows.ts'
import { listPeople } from './list-people.ts'

/**
 * Invites somebody into a shoot by letter; the link works for seven days. Answers with the people as they stand then.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when the address belongs to somebody in the shoot or has an open invitation
 */
export async function invitePerson(
  ctx: Ctx,
  { shootId, ...input }: z.output<typeof invitationInputSchema> & { shootId: ShootId },
): Promise<People> {
  const { actor } = await requireShoot(ctx, shootId, 'people.write')
  const email = input.email.toLowerCase()
  const name = input.name === '' ? '' : personName(input.name)
  const at = ctx.now()
  const { token, tokenHash } = newToken()
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, shootId)
    const person = await findPersonByEmail(tx, email)
    const [member] = person
      ? await tx
          .select({ role: shootMember.role })
          .from(shootMember)
          .where(and(eq(shootMember.shootId, shootId), eq(shootMember.userId, userIdSchema.parse(person.id))))
      : []
    if (member)
      throw new AppError(
        'CONFLICT',
        `${person?.name ?? email} is in this shoot already, as ${member.role}. No letter was sent; change the role in the list instead.`,
      )
    if (await findWaiting(tx, { shootId }, email)) {
      throw new AppError(
        'CONFLICT',
        `${email} has an open invitation already. No second letter was sent; send that one again, or withdraw it first.`,
      )
    }
    const id = invitationIdSchema.parse(randomUUID())
    await tx.insert(invitation).values({
      id,
      shootId,
      email,
      name,
      role: input.role,
      tokenHash,
      invitedBy: actor.userId,
      sentAt: at,
      expiresAt: expiryFrom(at),
    })
    const { title } = await titleOf(tx, { shootId, studioId: null })
    await queueLetter(
      tx,
      invitationLetter({
        to: email,
        name,
        inviter: actor.name,
        title,
        role: input.role,
        kind: 'shoot',
        url: joinUrl(ctx.publicUrl, token),
        days: INVITATION_DAYS,
      }),
    )
    await audit(tx, { shootId, userId: actor.userId, what: 'invitation.sent', subject: id, at })
  })
  ctx.documents.announce(shootId, [['shoots', shootId, 'people']])
  return listPeople(ctx, shootId)
}
