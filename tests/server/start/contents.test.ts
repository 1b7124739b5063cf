import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { contentsOf, differences } from '#server/start/contents.mjs'
import { withConnection } from '#server/start/sql.mjs'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
  await run('create table probe (id serial, word text, bytes bytea, at timestamptz)')
  await run(
    "insert into probe (word, bytes, at) select 'word ' || n, sha256(n::text::bytea), now() from generate_series(1, 50) n",
  )
})
afterAll(() => database.drop())

function run(statement: string): Promise<unknown> {
  return withConnection(database.url, (client) => client.query(statement))
}

function contents(setting = 'select 1'): Promise<Awaited<ReturnType<typeof contentsOf>>> {
  return withConnection(database.url, async (client) => {
    await client.query(setting)
    await client.query('begin isolation level repeatable read read only')
    return contentsOf(client)
  })
}

describe('contentsOf', () => {
  it('counts every table, the empty ones too, and knows the newest migration', async () => {
    const { tables, sequences, lastMigrationMs } = await contents()
    expect(tables['public.probe']?.rows).toBe('50')
    expect(tables['public.shoot']).toEqual({ rows: '0', content: '' })
    expect(sequences['public.probe_id_seq']).toBe('50')
    expect(lastMigrationMs).toBeGreaterThan(Date.UTC(2026, 0, 1))
  })

  it('does not depend on the order of rows or on the settings of the connection', async () => {
    const before = await contents()
    // An update writes a row anew, at the end of its table.
    await run('update probe set word = word where id < 20')
    const after = await contents("set timezone = 'Asia/Tokyo'; set bytea_output = 'escape'; set datestyle = 'German'")
    expect(after.tables['public.probe']).toEqual(before.tables['public.probe'])
  })
})

describe('differences', () => {
  it('finds nothing between a database and itself', async () => {
    expect(differences(await contents(), await contents())).toEqual([])
  })

  it('names a table with other rows, with other content, missing, or too many', async () => {
    const before = await contents()
    await run("update probe set word = 'other' where id = 3")
    expect(differences(before, await contents())).toEqual(['Table public.probe has other content.'])
    await run('delete from probe where id = 3')
    expect(differences(before, await contents())).toEqual(['Table public.probe has 49 rows instead of 50.'])
    await run('create table extra ()')
    expect(differences(before, await contents())).toContain('Table public.extra is not in the backup.')
    await run('drop table probe')
    expect(differences(before, await contents())).toEqual(
      expect.arrayContaining(['Table public.probe is missing.', 'Sequence public.probe_id_seq is behind.']),
    )
  })
})
