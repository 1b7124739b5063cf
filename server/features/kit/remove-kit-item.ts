import type { KitItemId, StudioId } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import { kitFieldsSchema } from '#shared/domain/kit/schema.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { lockStudio } from '#server/features/studios/studio-rows.ts'
import { announceKit, findKitItem, loadKit } from './kit-rows.ts'

/** Takes an item out of a studio's kit; lights that copied it keep its numbers. One that is out already is no error. @throws SIGNED_OUT, NOT_FOUND */
export async function removeKitItem(
  ctx: Ctx,
  { studioId, kitId }: { studioId: StudioId; kitId: KitItemId },
): Promise<{ kit: KitItem[] }> {
  const { actor } = await requireStudio(ctx, studioId, 'kit.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const newest = await findKitItem(tx, studioId, kitId)
    if (!newest || newest.isRemoved) return
    const { version } = newest.item
    const at = ctx.now()
    await tx.insert(kitItem).values({
      id: kitId,
      version: version + 1,
      studioId,
      input: kitFieldsSchema.parse(newest.item),
      removedAt: at,
      createdBy: actor.userId,
      createdAt: at,
    })
  })
  await announceKit(ctx, studioId)
  return { kit: await loadKit(ctx.db, studioId) }
}
