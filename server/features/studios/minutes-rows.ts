import { eq } from 'drizzle-orm'
import type { StudioId } from '#shared/ids.ts'
import { type Minutes, minutesSchema } from '#shared/domain/plan/minutes.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { minutesDefault } from '#server/db/schema/studios.ts'

/** A studio's own minutes; the common ones for what it never set. */
export async function loadMinutes(db: Db | Tx, studioId: StudioId): Promise<Minutes> {
  const [row] = await db
    .select({ minutes: minutesDefault.minutes })
    .from(minutesDefault)
    .where(eq(minutesDefault.studioId, studioId))
  return minutesSchema.parse(row?.minutes ?? {})
}
