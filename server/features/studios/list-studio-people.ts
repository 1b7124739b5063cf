import { and, asc, desc, eq, isNull } from 'drizzle-orm'
import type { StudioId } from '#shared/ids.ts'
import { canInStudio } from '#shared/access/roles.ts'
import type { StudioPeople } from '#shared/api/studios.ts'
import { colourOf, initialsOf } from '#shared/domain/people/face.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { user } from '#server/db/schema/auth.ts'
import { invitation } from '#server/db/schema/people.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { studioRoleFrom } from '#server/features/people/role-from.ts'

/** Everybody in a studio, owners first, then by name; open invitations are for its owners. @throws SIGNED_OUT, NOT_FOUND */
export async function listStudioPeople(ctx: Ctx, studioId: StudioId): Promise<StudioPeople> {
  const { role } = await requireStudio(ctx, studioId, 'studio.read')
  const members = await ctx.db
    .select({ userId: studioMember.userId, role: studioMember.role, name: user.name, email: user.email })
    .from(studioMember)
    .innerJoin(user, eq(user.id, studioMember.userId))
    .where(eq(studioMember.studioId, studioId))
    .orderBy(desc(studioMember.role), asc(user.name), asc(user.id))
  const rows = canInStudio(role, 'members.write')
    ? await ctx.db
        .select({
          id: invitation.id,
          email: invitation.email,
          role: invitation.role,
          sentAt: invitation.sentAt,
          expiresAt: invitation.expiresAt,
        })
        .from(invitation)
        .where(and(eq(invitation.studioId, studioId), isNull(invitation.acceptedAt), isNull(invitation.revokedAt)))
        .orderBy(desc(invitation.sentAt))
    : []
  return {
    people: members.map((member) => ({
      ...member,
      initials: initialsOf(member.name),
      colour: colourOf(member.userId),
    })),
    invitations: rows.map(({ sentAt, expiresAt, ...row }) => ({
      ...row,
      role: studioRoleFrom(row.role),
      sentAtMs: sentAt.getTime(),
      expiresAtMs: expiresAt.getTime(),
    })),
  }
}
