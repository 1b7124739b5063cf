import { eq } from 'drizzle-orm'
import { type Plan, readPlan } from '#shared/domain/plan/read-plan.ts'
import type { ShootId } from '#shared/ids.ts'
import { boardPart, lightingPart, looksPart, planPart } from '#shared/realtime/plan-parts.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'
import { getBrief } from '#server/features/shoots/brief-rows.ts'
import { loadMinutes } from '#server/features/studios/minutes-rows.ts'

/**
 * The read model of a shoot as it stands at the head of each document's log. Items that do not parse are left out, as
 * on every screen. For whoever may read the shoot.
 *
 * @throws SIGNED_OUT, NOT_FOUND
 */
export async function readShootPlan(ctx: Ctx, shootId: ShootId): Promise<Plan> {
  await requireShoot(ctx, shootId, 'brief.read')
  const [row] = await ctx.db.select({ studioId: shoot.studioId }).from(shoot).where(eq(shoot.id, shootId))
  if (!row) throw new AppError('NOT_FOUND', 'There is no such shoot, or you do not belong to it.')
  const [brief, minutes, board, plan, looks, lighting] = await Promise.all([
    getBrief(ctx.db, shootId),
    loadMinutes(ctx.db, row.studioId),
    ctx.documents.read(shootId, 'board', boardPart),
    ctx.documents.read(shootId, 'plan', planPart),
    ctx.documents.read(shootId, 'looks', looksPart),
    ctx.documents.read(shootId, 'lighting', lightingPart),
  ])
  return readPlan({ brief, minutes, board, plan, looks, lighting })
}
