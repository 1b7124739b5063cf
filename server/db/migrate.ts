import { fileURLToPath } from 'node:url'
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import pg from 'pg'

const migrationsFolder = fileURLToPath(new URL('../../drizzle', import.meta.url))

/** Any number that nothing else in this database takes an advisory lock on. */
const MIGRATION_LOCK = 7_270_401

/**
 * Brings the database at `url` up to the newest migration. Safe to call from several processes at
 * once: one works, the others wait and then find nothing to do.
 */
export async function migrateDatabase(url: string): Promise<void> {
  const client = new pg.Client({ connectionString: url, options: '-c timezone=UTC -c client_min_messages=warning' })
  await client.connect()
  try {
    // The lock belongs to this connection, so it goes with it even when the process dies.
    await client.query('select pg_advisory_lock($1)', [MIGRATION_LOCK])
    await migrate(drizzle(client), { migrationsFolder })
  } finally {
    await client.end()
  }
}
