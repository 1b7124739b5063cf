import { and, eq } from 'drizzle-orm'
import type { RoomId, ShootId } from '#shared/ids.ts'
import type { Brief, RoomInput } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { room } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'
import { getBrief } from './brief-rows.ts'

/** Replaces what is said of a room; lengths in metres. @throws SIGNED_OUT, NOT_FOUND (shoot or room), FORBIDDEN */
export async function updateRoom(
  ctx: Ctx,
  input: { shootId: ShootId; roomId: RoomId; room: RoomInput },
): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  const changed = await ctx.db
    .update(room)
    .set(input.room)
    .where(and(eq(room.shootId, input.shootId), eq(room.id, input.roomId)))
    .returning({ id: room.id })
  if (changed.length === 0)
    throw new AppError(
      'NOT_FOUND',
      'This room is gone; somebody took it out. Nothing was changed; add it again if it is needed.',
    )
  ctx.documents.announce(input.shootId, [['shoots', input.shootId]])
  return getBrief(ctx.db, input.shootId)
}
