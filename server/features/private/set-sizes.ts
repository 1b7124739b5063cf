import type { ShootId, SitterId } from '#shared/ids.ts'
import type { SitterPrivates } from '#shared/api/private.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { sitterPrivate } from '#server/db/schema/private.ts'
import { listSizes } from './list-sizes.ts'

export type SetSizes = { shootId: ShootId; sitterId: SitterId; sizes: string; contact: string }

/** Writes down a sitter's sizes and contact. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function setSizes(ctx: Ctx, { shootId, sitterId, sizes, contact }: SetSizes): Promise<SitterPrivates> {
  await requireShoot(ctx, shootId, 'sizes.write')
  await ctx.db
    .insert(sitterPrivate)
    .values({ shootId, sitterId, sizes, contact })
    .onConflictDoUpdate({ target: [sitterPrivate.shootId, sitterPrivate.sitterId], set: { sizes, contact } })
  ctx.documents.announce(shootId, [['shoots', shootId, 'sizes']])
  return listSizes(ctx, shootId)
}
