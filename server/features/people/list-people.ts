import { and, asc, desc, eq, inArray, isNull } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import { ROLES, type Role, canInShoot } from '#shared/access/roles.ts'
import type { People } from '#shared/api/people.ts'
import { colourOf, initialsOf } from '#shared/domain/people/face.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { user } from '#server/db/schema/auth.ts'
import { callSheet, callSheetCopy } from '#server/db/schema/call-sheet.ts'
import { invitation } from '#server/db/schema/people.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { roleFrom } from './role-from.ts'

/**
 * Everybody in a shoot, by role and name, with the e-mails that the person who asks may see (their own always): all for
 * those who plan, the photographers' for the client, those on the newest call sheet for the crew. Open invitations are
 * for the photographer.
 *
 * @throws SIGNED_OUT, NOT_FOUND
 */
export async function listPeople(ctx: Ctx, shootId: ShootId): Promise<People> {
  const { actor, role } = await requireShoot(ctx, shootId, 'people.read')
  const members = await ctx.db
    .select({ userId: shootMember.userId, role: shootMember.role, name: user.name, email: user.email })
    .from(shootMember)
    .innerJoin(user, eq(user.id, shootMember.userId))
    .where(eq(shootMember.shootId, shootId))
    .orderBy(asc(user.name), asc(user.id))
  const onCallSheet = canInShoot(role, 'contacts.readCallSheet')
    ? await emailsOnCallSheet(ctx, shootId)
    : new Set<string>()
  const maySee = (member: { userId: string; role: Role; email: string }): boolean =>
    member.userId === actor.userId ||
    canInShoot(role, 'contacts.readAll') ||
    (member.role === 'photographer' && canInShoot(role, 'contacts.readPhotographer')) ||
    onCallSheet.has(member.email)
  return {
    people: members
      .sort((a, b) => ROLES.indexOf(a.role) - ROLES.indexOf(b.role))
      .map((member) => ({
        userId: member.userId,
        name: member.name,
        initials: initialsOf(member.name),
        colour: colourOf(member.userId),
        role: member.role,
        email: maySee(member) ? member.email : null,
        you: member.userId === actor.userId,
      })),
    invitations: canInShoot(role, 'people.write') ? await openInvitations(ctx, shootId) : [],
  }
}

async function openInvitations(ctx: Ctx, shootId: ShootId): Promise<People['invitations']> {
  const rows = await ctx.db
    .select({
      id: invitation.id,
      email: invitation.email,
      name: invitation.name,
      role: invitation.role,
      sentAt: invitation.sentAt,
      expiresAt: invitation.expiresAt,
    })
    .from(invitation)
    .where(and(eq(invitation.shootId, shootId), isNull(invitation.acceptedAt), isNull(invitation.revokedAt)))
    .orderBy(desc(invitation.sentAt))
  return rows.map(({ sentAt, expiresAt, role, ...row }) => ({
    ...row,
    role: roleFrom(role),
    sentAtMs: sentAt.getTime(),
    expiresAtMs: expiresAt.getTime(),
    expired: expiresAt <= ctx.now(),
  }))
}

async function emailsOnCallSheet(ctx: Ctx, shootId: ShootId): Promise<Set<string>> {
  const newest = ctx.db
    .select({ id: callSheet.id })
    .from(callSheet)
    .where(eq(callSheet.shootId, shootId))
    .orderBy(desc(callSheet.number))
    .limit(1)
  const rows = await ctx.db
    .select({ email: callSheetCopy.email })
    .from(callSheetCopy)
    .where(inArray(callSheetCopy.callSheetId, newest))
  return new Set(rows.map((row) => row.email))
}
