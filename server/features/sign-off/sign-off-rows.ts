import { and, desc, eq } from 'drizzle-orm'
import type { SignOff } from '#shared/api/sign-off.ts'
import type { LookId, ShootId } from '#shared/ids.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { signOff } from '#server/db/schema/sign-off.ts'

export function toSignOff(row: typeof signOff.$inferSelect): SignOff {
  const { id, lookId, answer, words, fingerprint, frozen, userId, name, at } = row
  return { id, lookId, answer, words, fingerprint, frozen, userId, name, atMs: at.getTime() }
}

/** Answers of a shoot, or of one look of it, newest first. */
export async function listAnswers(db: Db | Tx, shootId: ShootId, lookId?: LookId): Promise<SignOff[]> {
  const rows = await db
    .select()
    .from(signOff)
    .where(and(eq(signOff.shootId, shootId), lookId === undefined ? undefined : eq(signOff.lookId, lookId)))
    .orderBy(desc(signOff.at), desc(signOff.id))
  return rows.map(toSignOff)
}
