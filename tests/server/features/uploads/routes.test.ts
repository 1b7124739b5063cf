import { randomUUID } from 'node:crypto'
import type { Express } from 'express'
import type pg from 'pg'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { uploadSchema } from '#shared/api/uploads.ts'
import { errorEnvelopeSchema } from '#shared/api/errors.ts'
import type { ShootId } from '#shared/ids.ts'
import type { Actor } from '#server/context.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { uploadsRoutes } from '#server/features/uploads/routes.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { makeApp, makePerson, makeShoot, memoryDocuments } from '#tests/support/media-world.ts'
import { cameraJpeg, twoTone } from '#tests/support/pictures.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let db: Db
let pool: pg.Pool
let app: Express
let client: Actor
let crew: Actor
let stranger: Actor
let shootId: ShootId

beforeAll(async () => {
  database = await createTestDatabase()
  ;({ db, pool } = connectDatabase(database.url, () => undefined))
  client = await makePerson(db, 'Thea Quill')
  crew = await makePerson(db, 'Cato Wren')
  stranger = await makePerson(db, 'Nobody Here')
  shootId = await makeShoot(db, [
    [client, 'client'],
    [crew, 'crew'],
  ])
  app = makeApp(db, memoryDocuments(), [client, crew, stranger], uploadsRoutes())
})

afterAll(async () => {
  await pool.end()
  await database.drop()
})

const put = (who: Actor | null, bytes: Buffer, id: string = randomUUID(), name = 'Blick auf die Kuppel – größer.jpg') =>
  request(app)
    .put(`/api/shoots/${shootId}/uploads/${id}`)
    .set('x-user', who?.userId ?? '')
    .attach('file', bytes, name)

const errorOf = (body: unknown) => errorEnvelopeSchema.parse(body).error

describe('PUT /api/shoots/:shootId/uploads/:uploadId', () => {
  it('keeps a picture and answers the same a second time', async () => {
    const bytes = await cameraJpeg()
    const id = randomUUID()
    const first = await put(client, bytes, id)
    expect(first.status).toBe(200)
    expect(uploadSchema.parse(first.body)).toMatchObject({ id, widthPx: 1200 })
    const again = await put(client, bytes, id)
    expect([again.status, again.body]).toEqual([200, first.body])
  })

  it('answers 401, 404 and 403 to who may not', async () => {
    const bytes = await twoTone('#8e6a22', '#23304a', 40, 30)
    expect((await put(null, bytes)).status).toBe(401)
    expect((await put(stranger, bytes)).status).toBe(404)
    expect((await put(crew, bytes)).status).toBe(403)
    expect((await put(client, bytes, 'not-an-id')).status).toBe(404)
  })

  it('refuses 30 MB with a sentence, told its length or not', async () => {
    const large = Buffer.alloc(30 * 1024 * 1024, 7)
    const told = await put(client, large)
    expect([told.status, errorOf(told.body).message]).toEqual([413, expect.stringContaining('larger than 25 MB')])
    const boundary = 'a-boundary'
    const untold = await new Promise<{ status: number; body: unknown }>((resolve, reject) => {
      const sent = request(app)
        .put(`/api/shoots/${shootId}/uploads/${randomUUID()}`)
        .set('x-user', client.userId)
        .set('content-type', `multipart/form-data; boundary=${boundary}`)
      sent.write(`--${boundary}\r\ncontent-disposition: form-data; name="file"; filename="a.jpg"\r\n\r\n`)
      for (let part = 0; part < 30; part++) sent.write(large.subarray(0, 1024 * 1024))
      sent.write(`\r\n--${boundary}--\r\n`)
      sent.end((error, response) =>
        response ? resolve(response) : reject(error instanceof Error ? error : new Error('no answer')),
      )
    })
    expect([untold.status, errorOf(untold.body).code]).toEqual([413, 'TOO_LARGE'])
  })

  it('refuses text named .jpg as what it is', async () => {
    const response = await put(client, Buffer.from('only words\n'), randomUUID(), 'portrait.jpg')
    expect([response.status, errorOf(response.body)]).toEqual([
      415,
      { code: 'UNSUPPORTED', message: expect.stringContaining('a text file') },
    ])
  })

  it('refuses a request without a file, or with two', async () => {
    const none = await request(app)
      .put(`/api/shoots/${shootId}/uploads/${randomUUID()}`)
      .set('x-user', client.userId)
      .send({})
    expect(none.status).toBe(400)
    const bytes = await twoTone('#8e6a22', '#23304a', 40, 30)
    expect((await put(client, bytes).attach('file', bytes, 'second.png')).status).toBe(400)
  })

  it('slows down who sends too many', async () => {
    const narrow = makeApp(db, memoryDocuments(), [client], uploadsRoutes(1))
    const send = () =>
      request(narrow).put(`/api/shoots/${shootId}/uploads/${randomUUID()}`).set('x-user', client.userId).send({})
    expect((await send()).status).toBe(400)
    expect((await send()).status).toBe(429)
  })
})

describe('GET /api/uploads/:uploadId/:rendition', () => {
  it('sends WebP that browsers may keep, and 304 when they have it', async () => {
    const id = randomUUID()
    await put(client, await cameraJpeg(), id)
    const get = (who: Actor | null, edge: number | string = 960) =>
      request(app)
        .get(`/api/uploads/${id}/${edge}`)
        .set('x-user', who?.userId ?? '')
    const response = await get(crew)
    expect(response.status).toBe(200)
    expect(response.headers).toMatchObject({
      'content-type': 'image/webp',
      'cache-control': 'private, max-age=31536000, immutable',
      'x-content-type-options': 'nosniff',
    })
    const kept = await get(crew).set('if-none-match', String(response.headers['etag']))
    expect([kept.status, kept.text ?? '']).toEqual([304, ''])
    expect((await get(stranger)).status).toBe(404)
    expect((await get(stranger).set('if-none-match', String(response.headers['etag']))).status).toBe(404)
    expect((await get(null)).status).toBe(401)
    expect((await get(crew, 961)).status).toBe(404)
    expect((await get(crew, 'full')).status).toBe(404)
  })
})
