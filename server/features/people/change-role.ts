import { and, eq } from 'drizzle-orm'
import type { ShootId, UserId } from '#shared/ids.ts'
import type { Role } from '#shared/access/roles.ts'
import type { People } from '#shared/api/people.ts'
import { findRole, requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'
import { lockShoot } from '#server/features/shoots/brief-rows.ts'
import { listPeople } from './list-people.ts'
import { requireAnotherPhotographer } from './photographers.ts'

/**
 * Gives a person of the shoot another role; their open screens are told at once.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when it would leave the shoot without a photographer
 */
export async function changeRole(
  ctx: Ctx,
  { shootId, userId, role }: { shootId: ShootId; userId: UserId; role: Role },
): Promise<People> {
  const { actor } = await requireShoot(ctx, shootId, 'people.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, shootId)
    const before = await findRole(tx, shootId, userId)
    if (!before)
      throw new AppError(
        'NOT_FOUND',
        'This person is not in the shoot any more. Nothing was changed; look at the list again.',
      )
    if (before === role) return
    if (before === 'photographer') await requireAnotherPhotographer(tx, shootId, userId)
    await tx
      .update(shootMember)
      .set({ role })
      .where(and(eq(shootMember.shootId, shootId), eq(shootMember.userId, userId)))
    await audit(tx, { shootId, userId: actor.userId, what: `role.${role}`, subject: userId, at: ctx.now() })
    await notifyAuth(tx, { shootId, userId })
  })
  ctx.documents.announce(shootId, [
    ['shoots', shootId, 'people'],
    ['shoots', shootId],
  ])
  return listPeople(ctx, shootId)
}
