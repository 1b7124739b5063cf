import { eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { loadKit } from './kit-rows.ts'

/** The kit of the studio a shoot belongs to, read through the shoot by anybody with a role in it. @throws SIGNED_OUT, NOT_FOUND */
export async function listShootKit(ctx: Ctx, shootId: ShootId): Promise<{ kit: KitItem[] }> {
  await requireShoot(ctx, shootId, 'kit.read')
  const [row] = await ctx.db.select({ studioId: shoot.studioId }).from(shoot).where(eq(shoot.id, shootId))
  return { kit: row ? await loadKit(ctx.db, row.studioId) : [] }
}
