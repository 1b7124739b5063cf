import type { ShootId } from '#shared/ids.ts'
import type { Brief, Location } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { location } from '#server/db/schema/shoots.ts'
import { getBrief } from './brief-rows.ts'

/** Says where the shoot is: latitude and longitude in degrees, north and east positive. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function setLocation(ctx: Ctx, input: { shootId: ShootId; location: Location }): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  await ctx.db
    .insert(location)
    .values({ shootId: input.shootId, ...input.location })
    .onConflictDoUpdate({ target: location.shootId, set: input.location })
  ctx.documents.announce(input.shootId, [['shoots', input.shootId], ['shoots']])
  return getBrief(ctx.db, input.shootId)
}
