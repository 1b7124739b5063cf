import { randomUUID } from 'node:crypto'
import { type StudioId, kitItemIdSchema } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { announceKit, loadKit } from './kit-rows.ts'

/** Puts an item into a studio's kit, as version 1. @throws SIGNED_OUT, NOT_FOUND */
export async function addKitItem(
  ctx: Ctx,
  { studioId, input }: { studioId: StudioId; input: KitInput },
): Promise<{ kit: KitItem[] }> {
  const { actor } = await requireStudio(ctx, studioId, 'kit.write')
  await ctx.db.insert(kitItem).values({
    id: kitItemIdSchema.parse(randomUUID()),
    version: 1,
    studioId,
    input,
    createdBy: actor.userId,
    createdAt: ctx.now(),
  })
  await announceKit(ctx, studioId)
  return { kit: await loadKit(ctx.db, studioId) }
}
