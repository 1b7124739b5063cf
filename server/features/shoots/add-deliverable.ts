import { randomUUID } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import { type ShootId, deliverableIdSchema } from '#shared/ids.ts'
import type { Brief, DeliverableInput } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { deliverable } from '#server/db/schema/shoots.ts'
import { getBrief, lockShoot } from './brief-rows.ts'

/** Adds a promised picture or set of pictures at the end of the list. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function addDeliverable(
  ctx: Ctx,
  input: { shootId: ShootId; deliverable: DeliverableInput },
): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, input.shootId)
    const [last] = await tx
      .select({ position: sql<number>`coalesce(max(${deliverable.position}), -1)::int` })
      .from(deliverable)
      .where(eq(deliverable.shootId, input.shootId))
    await tx.insert(deliverable).values({
      id: deliverableIdSchema.parse(randomUUID()),
      shootId: input.shootId,
      position: (last?.position ?? -1) + 1,
      ...input.deliverable,
    })
  })
  ctx.documents.announce(input.shootId, [['shoots', input.shootId], ['shoots']])
  return getBrief(ctx.db, input.shootId)
}
