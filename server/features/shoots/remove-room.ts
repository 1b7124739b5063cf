import { and, eq } from 'drizzle-orm'
import type { RoomId, ShootId } from '#shared/ids.ts'
import type { Brief } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { room } from '#server/db/schema/shoots.ts'
import { getBrief } from './brief-rows.ts'

/** Takes a room out; sets in it are then in no room. A room that is gone already is no error. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function removeRoom(ctx: Ctx, input: { shootId: ShootId; roomId: RoomId }): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  await ctx.db.delete(room).where(and(eq(room.shootId, input.shootId), eq(room.id, input.roomId)))
  ctx.documents.announce(input.shootId, [['shoots', input.shootId]])
  return getBrief(ctx.db, input.shootId)
}
