import { sql } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connectDatabase, withTransaction } from '#server/db/client.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let client: ReturnType<typeof connectDatabase>
const lost: Error[] = []
beforeAll(async () => {
  database = await createTestDatabase()
  client = connectDatabase(database.url, (error) => lost.push(error), 2)
  await client.db.execute(sql`create table probe (n int)`)
})
afterAll(async () => {
  await client.pool.end()
  await database.drop()
})

async function count(): Promise<unknown> {
  return (await client.db.execute(sql`select count(*)::int as n from probe`)).rows[0]?.['n']
}

describe('withTransaction', () => {
  it('joins the transaction that is open, so the whole of it goes or stays', async () => {
    const failing = client.db.transaction(async (outer) => {
      await withTransaction(outer, (tx) => tx.execute(sql`insert into probe values (1)`))
      throw new Error('changed my mind')
    })
    await expect(failing).rejects.toThrow('changed my mind')
    expect(await count()).toBe(0)
  })

  it('starts one where there is none', async () => {
    const failing = withTransaction(client.db, async (tx) => {
      await tx.execute(sql`insert into probe values (1)`)
      throw new Error('changed my mind')
    })
    await expect(failing).rejects.toThrow('changed my mind')
    expect(await count()).toBe(0)
    await withTransaction(client.db, (tx) => tx.execute(sql`insert into probe values (1)`))
    expect(await count()).toBe(1)
  })
})

describe('connectDatabase', () => {
  it('reports a connection that is cut while idle, and opens another', async () => {
    await count()
    const other = connectDatabase(database.url, () => undefined, 1)
    await other.db.execute(sql`
      select pg_terminate_backend(pid) from pg_stat_activity
      where datname = current_database() and pid <> pg_backend_pid()`)
    await other.pool.end()
    await expect.poll(() => lost.length).toBeGreaterThan(0)
    expect(await count()).toBe(1)
  })
})
