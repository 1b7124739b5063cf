import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import * as schema from './schema/index.ts'

export type Db = NodePgDatabase<typeof schema>
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0]

/** A pool and Drizzle over it. An idle client's error (the database went away) is reported, never thrown. */
export function connectDatabase(url: string, onIdleError: (error: Error) => void, max = 12): { db: Db; pool: pg.Pool } {
  const pool = new pg.Pool({ connectionString: url, max })
  pool.on('error', onIdleError)
  return { db: drizzle(pool, { schema }), pool }
}

/** Joins the transaction that is open or starts one. */
export async function withTransaction<T>(db: Db | Tx, fn: (tx: Tx) => Promise<T>): Promise<T> {
  return db.transaction(fn)
}
