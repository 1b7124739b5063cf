import { randomUUID } from 'node:crypto'
import type pg from 'pg'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type ShootId, type UploadId, uploadIdSchema } from '#shared/ids.ts'
import type { Actor } from '#server/context.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { findRendition } from '#server/features/uploads/find-rendition.ts'
import { storeUpload } from '#server/features/uploads/store-upload.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { makeCtx, makePerson, makeShoot, memoryDocuments } from '#tests/support/media-world.ts'
import { twoTone } from '#tests/support/pictures.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let db: Db
let pool: pg.Pool
let photographer: Actor
let crew: Actor
let stranger: Actor
let shootId: ShootId
let uploadId: UploadId
const documents = memoryDocuments()

beforeAll(async () => {
  database = await createTestDatabase()
  ;({ db, pool } = connectDatabase(database.url, () => undefined))
  photographer = await makePerson(db, 'Ines Marlow')
  crew = await makePerson(db, 'Cato Wren')
  stranger = await makePerson(db, 'Nobody Here')
  shootId = await makeShoot(db, [
    [photographer, 'photographer'],
    [crew, 'crew'],
  ])
  await makeShoot(db, [[stranger, 'photographer']])
  uploadId = uploadIdSchema.parse(randomUUID())
  await storeUpload(makeCtx(db, documents, photographer), {
    shootId,
    uploadId,
    bytes: await twoTone('#8e6a22', '#23304a'),
  })
})

afterAll(async () => {
  await pool.end()
  await database.drop()
})

describe('findRendition', () => {
  it('gives every member of the shoot the picture', async () => {
    const found = await findRendition(makeCtx(db, documents, crew), { uploadId, longEdgePx: 320 })
    expect((await sharp(Buffer.from(await found.read())).metadata()).width).toBe(320)
  })

  it('tells a stranger exactly what it says of a picture that is not there', async () => {
    const caught = (error: unknown) => error
    const asStranger = await findRendition(makeCtx(db, documents, stranger), { uploadId, longEdgePx: 320 }).catch(
      caught,
    )
    const missing = uploadIdSchema.parse(randomUUID())
    const notThere = await findRendition(makeCtx(db, documents, crew), { uploadId: missing, longEdgePx: 320 }).catch(
      caught,
    )
    expect(asStranger).toMatchObject({ code: 'NOT_FOUND' })
    expect(asStranger).toEqual(notThere)
  })

  it('refuses who is signed out', async () => {
    await expect(findRendition(makeCtx(db, documents, null), { uploadId, longEdgePx: 320 })).rejects.toMatchObject({
      code: 'SIGNED_OUT',
    })
  })
})
