import { asc, eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import { type Brief, briefSchema } from '#shared/domain/shoots/schema.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { deliverable, location, room, shoot } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'

/** A shoot's brief with its place, rooms and deliverables in their order. @throws NOT_FOUND */
export async function getBrief(db: Db | Tx, shootId: ShootId): Promise<Brief> {
  const [row] = await db
    .select()
    .from(shoot)
    .leftJoin(location, eq(location.shootId, shoot.id))
    .where(eq(shoot.id, shootId))
  if (!row) throw new AppError('NOT_FOUND', 'There is no such shoot, or you do not belong to it.')
  const rooms = await db.select().from(room).where(eq(room.shootId, shootId)).orderBy(asc(room.position), asc(room.id))
  const deliverables = await db
    .select()
    .from(deliverable)
    .where(eq(deliverable.shootId, shootId))
    .orderBy(asc(deliverable.position), asc(deliverable.id))
  return briefSchema.parse({ ...row.shoot, location: row.location ?? {}, rooms, deliverables })
}

/** Holds a shoot's row until the transaction ends, so that changes of its lists and people come one after another. */
export async function lockShoot(tx: Tx, shootId: ShootId): Promise<void> {
  const found = await tx.select({ id: shoot.id }).from(shoot).where(eq(shoot.id, shootId)).for('update')
  if (found.length === 0) throw new AppError('NOT_FOUND', 'There is no such shoot, or you do not belong to it.')
}
