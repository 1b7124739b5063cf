import { and, eq } from 'drizzle-orm'
import type { DeliverableId, ShootId } from '#shared/ids.ts'
import type { Brief } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { deliverable } from '#server/db/schema/shoots.ts'
import { getBrief } from './brief-rows.ts'

/** Takes a deliverable out; one that is gone already is no error. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function removeDeliverable(
  ctx: Ctx,
  input: { shootId: ShootId; deliverableId: DeliverableId },
): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  await ctx.db
    .delete(deliverable)
    .where(and(eq(deliverable.shootId, input.shootId), eq(deliverable.id, input.deliverableId)))
  ctx.documents.announce(input.shootId, [['shoots', input.shootId], ['shoots']])
  return getBrief(ctx.db, input.shootId)
}
