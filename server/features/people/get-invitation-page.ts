import { eq } from 'drizzle-orm'
import { type InvitationPage, invitationPageSchema } from '#shared/api/people.ts'
import type { Ctx } from '#server/context.ts'
import { user } from '#server/db/schema/auth.ts'
import { getInvitationByToken, requireOpen, titleOf } from './invitation-rows.ts'

/** What a letter's page shows to whoever holds its link, signed in or not; uses nothing up. @throws NOT_FOUND, GONE */
export async function getInvitationPage(ctx: Ctx, token: string): Promise<InvitationPage> {
  const row = await getInvitationByToken(ctx.db, token)
  requireOpen(row, ctx.now())
  const [inviter] = await ctx.db.select({ name: user.name }).from(user).where(eq(user.id, row.invitedBy))
  const known = await titleOf(ctx.db, row)
  return invitationPageSchema.parse({
    ...known,
    inviter: inviter?.name ?? '',
    role: row.role,
    email: row.email,
    name: row.name,
  })
}
