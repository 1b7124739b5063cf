import { asc, eq } from 'drizzle-orm'
import type { Session } from '#shared/api/studios.ts'
import { colourOf, initialsOf } from '#shared/domain/people/face.ts'
import { requireUser } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { studio, studioMember } from '#server/db/schema/studios.ts'

/** Who is signed in and the studios they belong to, by name. @throws SIGNED_OUT */
export async function getSession(ctx: Ctx): Promise<Omit<Session, 'letters'>> {
  const { userId, name, email } = requireUser(ctx)
  const studios = await ctx.db
    .select({ id: studio.id, name: studio.name, role: studioMember.role })
    .from(studioMember)
    .innerJoin(studio, eq(studio.id, studioMember.studioId))
    .where(eq(studioMember.userId, userId))
    .orderBy(asc(studio.name), asc(studio.id))
  return { user: { id: userId, name, email, initials: initialsOf(name), colour: colourOf(userId) }, studios }
}
