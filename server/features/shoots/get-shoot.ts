import { eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import type { ShootView } from '#shared/api/shoots.ts'
import { findStudioRole, requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { rtDoc } from '#server/db/schema/realtime.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { loadMinutes } from '#server/features/studios/minutes-rows.ts'
import { AppError } from '#server/errors.ts'
import { getBrief } from './brief-rows.ts'

/** Everything of a shoot that is in no document, for a person with a role in it. @throws SIGNED_OUT, NOT_FOUND */
export async function getShoot(ctx: Ctx, shootId: ShootId): Promise<ShootView> {
  const { actor, role } = await requireShoot(ctx, shootId, 'brief.read')
  const [row] = await ctx.db.select({ studioId: shoot.studioId }).from(shoot).where(eq(shoot.id, shootId))
  if (!row) throw new AppError('NOT_FOUND', 'There is no such shoot, or you do not belong to it.')
  const [brief, minutes, studioRole, docs] = await Promise.all([
    getBrief(ctx.db, shootId),
    loadMinutes(ctx.db, row.studioId),
    findStudioRole(ctx.db, row.studioId, actor.userId),
    ctx.db
      .select({ kind: rtDoc.kind, epoch: rtDoc.epoch })
      .from(rtDoc)
      .where(eq(rtDoc.shootId, shootId))
      // Pages compare them as a whole.
      .orderBy(rtDoc.kind),
  ])
  return {
    id: shootId,
    studioId: row.studioId,
    inStudio: studioRole !== null,
    role,
    brief,
    minutes,
    epochs: Object.fromEntries(docs.map(({ kind, epoch }) => [kind, epoch])),
  }
}
