import { randomBytes } from 'node:crypto'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { migrateDatabase } from '#server/db/migrate.ts'
import { databaseUrl, onCluster } from '#tests/support/template.ts'

const name = `t_${randomBytes(6).toString('hex')}`
const url = databaseUrl(inject('pgUrl'), name)
beforeAll(() => onCluster(inject('pgUrl'), `create database ${name}`))
afterAll(() => onCluster(inject('pgUrl'), `drop database ${name} with (force)`))

describe('migrateDatabase', () => {
  it('lets several processes at once bring an empty database up to date, each migration once', async () => {
    await Promise.all([migrateDatabase(url), migrateDatabase(url), migrateDatabase(url)])
    const client = new pg.Client({ connectionString: url })
    await client.connect()
    const { rows } = await client.query<{ hash: string }>('select hash from drizzle.__drizzle_migrations')
    await client.end()
    expect(rows.length).toBeGreaterThan(0)
    expect(new Set(rows.map((row) => row.hash)).size).toBe(rows.length)
  })
})
