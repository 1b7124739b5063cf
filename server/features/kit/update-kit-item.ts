import type { KitItemId, StudioId } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { lockStudio } from '#server/features/studios/studio-rows.ts'
import { announceKit, findKitItem, loadKit } from './kit-rows.ts'

export type UpdateKitItem = {
  studioId: StudioId
  kitId: KitItemId
  /** The version the editor saw. */
  version: number
  input: KitInput
}

/**
 * Writes a new version of an item; lights that copied an earlier one keep its numbers.
 *
 * @throws SIGNED_OUT, NOT_FOUND (studio or item); CONFLICT with `{ item }`, the newer one, when somebody changed it meanwhile
 */
export async function updateKitItem(
  ctx: Ctx,
  { studioId, kitId, version, input }: UpdateKitItem,
): Promise<{ kit: KitItem[] }> {
  const { actor } = await requireStudio(ctx, studioId, 'kit.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const newest = await findKitItem(tx, studioId, kitId)
    if (!newest || newest.isRemoved)
      throw new AppError(
        'NOT_FOUND',
        'This item was taken out of the kit. Nothing was changed; what you typed is still here, add it as a new item if it is needed.',
      )
    if (newest.item.version !== version) {
      throw new AppError(
        'CONFLICT',
        'Somebody changed this item while you had it open. Nothing was changed; what you typed is still here. Look at the newer numbers and save again.',
        {
          details: { item: newest.item },
        },
      )
    }
    await tx
      .insert(kitItem)
      .values({ id: kitId, version: version + 1, studioId, input, createdBy: actor.userId, createdAt: ctx.now() })
  })
  await announceKit(ctx, studioId)
  return { kit: await loadKit(ctx.db, studioId) }
}
