import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import * as schema from '#server/db/schema/index.ts'

export type Db = NodePgDatabase<typeof schema>
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0]

/**
 * A pool and Drizzle over it. Connects on first use, so a database that is still starting does no harm here. An idle
 * client's error (the database went away) is reported, never thrown; the pool opens new ones by itself.
 */
export function connectDatabase(url: string, onIdleError: (error: Error) => void, max = 12): { db: Db; pool: pg.Pool } {
  const pool = new pg.Pool({
    connectionString: url,
    max,
    connectionTimeoutMillis: 10_000,
    // A database that accepts and then says nothing is an error, not a wait for ever.
    query_timeout: 30_000,
    keepAlive: true,
    options: '-c timezone=UTC',
  })
  pool.on('error', onIdleError)
  return { db: drizzle(pool, { schema }), pool }
}

/** Joins the transaction that is open or starts one. */
export function withTransaction<T>(db: Db | Tx, fn: (tx: Tx) => Promise<T>): Promise<T> {
  return isTransaction(db) ? fn(db) : db.transaction(fn)
}

function isTransaction(db: Db | Tx): db is Tx {
  return 'rollback' in db
}
