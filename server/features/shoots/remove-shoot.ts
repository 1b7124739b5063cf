import { eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import { rtDoc } from '#server/db/schema/realtime.ts'
import { shoot } from '#server/db/schema/shoots.ts'

/** Removes a shoot with everything in it, for good; open screens of it are closed. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function removeShoot(ctx: Ctx, shootId: ShootId): Promise<void> {
  const { actor } = await requireShoot(ctx, shootId, 'shoot.remove')
  await withTransaction(ctx.db, async (tx) => {
    // In the order in which edits take them: otherwise each could hold what the other waits for.
    await tx.select({ id: rtDoc.id }).from(rtDoc).where(eq(rtDoc.shootId, shootId)).orderBy(rtDoc.id).for('update')
    await tx.delete(shoot).where(eq(shoot.id, shootId))
    await audit(tx, { shootId, userId: actor.userId, what: 'shoot.removed', at: ctx.now() })
    await notifyAuth(tx, { shootId })
  })
}
