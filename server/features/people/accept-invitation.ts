import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { type UserId, userIdSchema } from '#shared/ids.ts'
import { personName } from '#server/auth/person-name.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { type Tx, withTransaction } from '#server/db/client.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import { account, user } from '#server/db/schema/auth.ts'
import { invitation } from '#server/db/schema/people.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { type InvitationRow, findPersonByEmail, getInvitationByToken, requireOpen } from './invitation-rows.ts'
import { roleFrom, studioRoleFrom } from './role-from.ts'

/** The same press twice, before the first answer came back, is one acceptance. */
const DOUBLE_PRESS_MS = 10_000

export type Accepted = {
  /** Where to go then. */
  to: string
  userId: UserId
  /** Whether a session has to be opened: the person came by the letter alone. */
  signsIn: boolean
}

/**
 * Accepts an invitation by its letter's token. The token shows that the mailbox is theirs, so a person without an
 * account gets one and whoever comes signed out is to be signed in. A role that the person has already is kept.
 *
 * @throws NOT_FOUND (no such token); GONE (used, withdrawn, expired); CONFLICT (signed in as somebody else, or the
 *   address has an account of which nobody has shown yet that it is theirs)
 */
export async function acceptInvitation(ctx: Ctx, { token, name }: { token: string; name: string }): Promise<Accepted> {
  const { actor } = ctx
  const at = ctx.now()
  const accepted = await withTransaction(ctx.db, async (tx) => {
    const row = await getInvitationByToken(tx, token, true)
    const to = row.shootId ? `/shoots/${row.shootId}/board` : '/'
    if (row.acceptedBy && row.acceptedAt && !row.revokedAt && isSamePress(row, ctx)) {
      return { to, userId: row.acceptedBy, signsIn: actor === null, row }
    }
    requireOpen(row, at)
    if (actor && actor.email.toLowerCase() !== row.email) {
      throw new AppError(
        'CONFLICT',
        `You are signed in as ${actor.email}, and this invitation is for ${row.email}. Nothing was changed; sign out first, then open the letter again.`,
      )
    }
    const userId = actor?.userId ?? (await personFor(tx, row, name, at))
    if (actor) await tx.update(user).set({ emailVerified: true }).where(eq(user.id, actor.userId))
    if (row.shootId) {
      await tx
        .insert(shootMember)
        .values({ shootId: row.shootId, userId, role: roleFrom(row.role), createdAt: at })
        .onConflictDoNothing()
      await audit(tx, { shootId: row.shootId, userId, what: 'invitation.accepted', subject: row.id, at })
      await notifyAuth(tx, { shootId: row.shootId, userId })
    } else if (row.studioId) {
      await tx
        .insert(studioMember)
        .values({ studioId: row.studioId, userId, role: studioRoleFrom(row.role), createdAt: at })
        .onConflictDoNothing()
      await audit(tx, { studioId: row.studioId, userId, what: 'invitation.accepted', subject: row.id, at })
    }
    await tx.update(invitation).set({ acceptedAt: at, acceptedBy: userId }).where(eq(invitation.id, row.id))
    return { to, userId, signsIn: actor === null, row }
  })
  const { shootId } = accepted.row
  if (shootId) ctx.documents.announce(shootId, [['shoots', shootId, 'people']])
  return { to: accepted.to, userId: accepted.userId, signsIn: accepted.signsIn }
}

/** By the person who accepted, at any time; by the letter alone, only at once. */
function isSamePress(row: InvitationRow, ctx: Ctx): boolean {
  if (ctx.actor) return ctx.actor.userId === row.acceptedBy
  return row.acceptedAt !== null && ctx.now().getTime() - row.acceptedAt.getTime() <= DOUBLE_PRESS_MS
}

/** The account of the invited address, made when there is none. */
async function personFor(tx: Tx, row: InvitationRow, name: string, at: Date): Promise<UserId> {
  const known = await findPersonByEmail(tx, row.email)
  if (known) {
    // Whoever made this account never showed that the mailbox is theirs; its password must not open what the letter opens.
    const [password] = known.emailVerified
      ? []
      : await tx
          .select({ id: account.id })
          .from(account)
          .where(and(eq(account.userId, known.id), eq(account.providerId, 'credential')))
    if (password) {
      throw new AppError(
        'CONFLICT',
        `There is an account for ${row.email} already. Nothing was changed; sign in to it (a letter can sign you in without the password), then open this letter again.`,
      )
    }
    if (!known.emailVerified) await tx.update(user).set({ emailVerified: true }).where(eq(user.id, known.id))
    return userIdSchema.parse(known.id)
  }
  const id = userIdSchema.parse(randomUUID())
  await tx
    .insert(user)
    .values({ id, name: personName(name), email: row.email, emailVerified: true, createdAt: at, updatedAt: at })
  return id
}
