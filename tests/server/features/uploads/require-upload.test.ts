import { randomUUID } from 'node:crypto'
import type pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { shootIdSchema } from '#shared/ids.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { requireUpload } from '#server/features/uploads/require-upload.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { makeCtx, makePerson, makeShoot, memoryDocuments } from '#tests/support/media-world.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let db: Db
let pool: pg.Pool

beforeAll(async () => {
  database = await createTestDatabase()
  ;({ db, pool } = connectDatabase(database.url, () => undefined))
})

afterAll(async () => {
  await pool.end()
  await database.drop()
})

describe('requireUpload', () => {
  it.each(['photographer', 'stylist', 'client'] as const)('lets a %s send a file', async (role) => {
    const person = await makePerson(db, 'Some Body')
    const shootId = await makeShoot(db, [[person, role]])
    await expect(requireUpload(makeCtx(db, memoryDocuments(), person), shootId)).resolves.toBeUndefined()
  })

  it('refuses crew, strangers and a shoot that is not there', async () => {
    const crew = await makePerson(db, 'Cato Wren')
    const shootId = await makeShoot(db, [[crew, 'crew']])
    const stranger = await makePerson(db, 'Nobody Here')
    const ask = (person: typeof crew, shoot = shootId) => requireUpload(makeCtx(db, memoryDocuments(), person), shoot)
    await expect(ask(crew)).rejects.toMatchObject({ code: 'FORBIDDEN' })
    await expect(ask(stranger)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    await expect(ask(crew, shootIdSchema.parse(randomUUID()))).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})
