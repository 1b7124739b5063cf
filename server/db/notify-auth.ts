import { sql } from 'drizzle-orm'
import type { Db, Tx } from '#server/db/client.ts'

/** PostgreSQL channel on which a change of somebody's rights is told to every process. */
export const AUTH_CHANNEL = 'rt_auth'

/** Whose rights changed: everybody's in a shoot, one person's everywhere, both narrowed, or one session. */
export type AuthScope = { shootId?: string; userId?: string; sessionId?: string }

/**
 * Tells every process that rights within `scope` changed, so that open sockets are judged anew. Call it in the
 * transaction that makes the change: it is delivered if and only if that commits.
 *
 * @throws when the scope is empty, which would mean everybody.
 */
export async function notifyAuth(tx: Db | Tx, scope: AuthScope): Promise<void> {
  const { shootId, userId, sessionId } = scope
  if (!shootId && !userId && !sessionId) throw new Error('A change of rights needs a shoot, a person or a session.')
  const payload = JSON.stringify({ shootId, userId, sessionId })
  await tx.execute(sql`select pg_notify(${AUTH_CHANNEL}, ${payload})`)
}
