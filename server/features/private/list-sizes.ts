import { asc, eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import type { SitterPrivates } from '#shared/api/private.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { sitterPrivate } from '#server/db/schema/private.ts'

/** Sizes and contacts of a shoot's sitters, for those who plan. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function listSizes(ctx: Ctx, shootId: ShootId): Promise<SitterPrivates> {
  await requireShoot(ctx, shootId, 'sizes.read')
  const sitters = await ctx.db
    .select({ sitterId: sitterPrivate.sitterId, sizes: sitterPrivate.sizes, contact: sitterPrivate.contact })
    .from(sitterPrivate)
    .where(eq(sitterPrivate.shootId, shootId))
    .orderBy(asc(sitterPrivate.sitterId))
  return { sitters }
}
