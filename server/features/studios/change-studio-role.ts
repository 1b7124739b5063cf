import { and, eq } from 'drizzle-orm'
import type { StudioId, UserId } from '#shared/ids.ts'
import type { StudioRole } from '#shared/access/roles.ts'
import type { StudioPeople } from '#shared/api/studios.ts'
import { findStudioRole, requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { listStudioPeople } from './list-studio-people.ts'
import { lockStudio, requireAnotherOwner } from './studio-rows.ts'

/** Makes a person of the studio an owner or a member. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT for the last owner */
export async function changeStudioRole(
  ctx: Ctx,
  { studioId, userId, role }: { studioId: StudioId; userId: UserId; role: StudioRole },
): Promise<StudioPeople> {
  const { actor } = await requireStudio(ctx, studioId, 'members.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const before = await findStudioRole(tx, studioId, userId)
    if (!before)
      throw new AppError(
        'NOT_FOUND',
        'This person does not belong to the studio any more. Nothing was changed; look at the list again.',
      )
    if (before === role) return
    if (before === 'owner') await requireAnotherOwner(tx, studioId, userId)
    await tx
      .update(studioMember)
      .set({ role })
      .where(and(eq(studioMember.studioId, studioId), eq(studioMember.userId, userId)))
    await audit(tx, { studioId, userId: actor.userId, what: `role.${role}`, subject: userId, at: ctx.now() })
  })
  return listStudioPeople(ctx, studioId)
}
