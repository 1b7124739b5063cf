import { and, eq } from 'drizzle-orm'
import type { DeliverableId, ShootId } from '#shared/ids.ts'
import type { Brief, DeliverableInput } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { deliverable } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'
import { getBrief } from './brief-rows.ts'

/** Replaces what is said of a deliverable. @throws SIGNED_OUT, NOT_FOUND (shoot or deliverable), FORBIDDEN */
export async function updateDeliverable(
  ctx: Ctx,
  input: { shootId: ShootId; deliverableId: DeliverableId; deliverable: DeliverableInput },
): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  const changed = await ctx.db
    .update(deliverable)
    .set(input.deliverable)
    .where(and(eq(deliverable.shootId, input.shootId), eq(deliverable.id, input.deliverableId)))
    .returning({ id: deliverable.id })
  if (changed.length === 0) {
    throw new AppError(
      'NOT_FOUND',
      'This deliverable is gone; somebody took it out. Nothing was changed; add it again if it is needed.',
    )
  }
  ctx.documents.announce(input.shootId, [['shoots', input.shootId], ['shoots']])
  return getBrief(ctx.db, input.shootId)
}
