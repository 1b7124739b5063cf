import { randomUUID } from 'node:crypto'
import { type StudioId, kitItemIdSchema } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { lockStudio } from '#server/features/studios/studio-rows.ts'
import { announceKit, loadKit, requireRoom } from './kit-rows.ts'

/** Puts an item into a studio's kit, as version 1. @throws SIGNED_OUT, NOT_FOUND; CONFLICT when the kit is full */
export async function addKitItem(
  ctx: Ctx,
  { studioId, input }: { studioId: StudioId; input: KitInput },
): Promise<{ kit: KitItem[] }> {
  const { actor } = await requireStudio(ctx, studioId, 'kit.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    requireRoom((await loadKit(tx, studioId)).length, 1)
    await tx.insert(kitItem).values({
      id: kitItemIdSchema.parse(randomUUID()),
      version: 1,
      studioId,
      input,
      createdBy: actor.userId,
      createdAt: ctx.now(),
    })
  })
  await announceKit(ctx, studioId)
  return { kit: await loadKit(ctx.db, studioId) }
}
