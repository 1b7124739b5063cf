import { eq } from 'drizzle-orm'
import type { z } from 'zod'
import type { ShootId } from '#shared/ids.ts'
import type { briefPatchSchema } from '#shared/api/shoots.ts'
import type { Brief } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { getBrief } from './brief-rows.ts'

type UpdateBrief = { shootId: ShootId; patch: z.output<typeof briefPatchSchema> }

/** Changes the fields that are given and leaves the others; answers with the whole brief. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function updateBrief(ctx: Ctx, { shootId, patch }: UpdateBrief): Promise<Brief> {
  await requireShoot(ctx, shootId, 'brief.write')
  const given = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined))
  if (Object.keys(given).length > 0) await ctx.db.update(shoot).set(given).where(eq(shoot.id, shootId))
  ctx.documents.announce(shootId, [['shoots', shootId], ['shoots']])
  return getBrief(ctx.db, shootId)
}
