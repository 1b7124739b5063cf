import { randomUUID } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import { type ShootId, roomIdSchema } from '#shared/ids.ts'
import type { Brief, RoomInput } from '#shared/domain/shoots/schema.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { room } from '#server/db/schema/shoots.ts'
import { getBrief, lockShoot } from './brief-rows.ts'

/** Adds a room at the end of the list; lengths in metres. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function addRoom(ctx: Ctx, input: { shootId: ShootId; room: RoomInput }): Promise<Brief> {
  await requireShoot(ctx, input.shootId, 'brief.write')
  await withTransaction(ctx.db, async (tx) => {
    await lockShoot(tx, input.shootId)
    const [last] = await tx
      .select({ position: sql<number>`coalesce(max(${room.position}), -1)::int` })
      .from(room)
      .where(eq(room.shootId, input.shootId))
    await tx.insert(room).values({
      id: roomIdSchema.parse(randomUUID()),
      shootId: input.shootId,
      position: (last?.position ?? -1) + 1,
      ...input.room,
    })
  })
  ctx.documents.announce(input.shootId, [['shoots', input.shootId]])
  return getBrief(ctx.db, input.shootId)
}
