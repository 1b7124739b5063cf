import { randomUUID } from 'node:crypto'
import type pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { lookIdSchema, sitterIdSchema, uploadIdSchema } from '#shared/ids.ts'
import { patchItem, putItems } from '#shared/realtime/collection.ts'
import { looks, sitters } from '#shared/realtime/documents.ts'
import type { Actor } from '#server/context.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { answerLook } from '#server/features/sign-off/answer-look.ts'
import { listSignOffs } from '#server/features/sign-off/list-sign-offs.ts'
import { storeUpload } from '#server/features/uploads/store-upload.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { makeCtx, makePerson, makeShoot, memoryDocuments } from '#tests/support/media-world.ts'
import { twoTone } from '#tests/support/pictures.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let db: Db
let pool: pg.Pool
let client: Actor
let stranger: Actor

beforeAll(async () => {
  database = await createTestDatabase()
  ;({ db, pool } = connectDatabase(database.url, () => undefined))
  client = await makePerson(db, 'Thea Quill')
  stranger = await makePerson(db, 'Nobody Here')
})

afterAll(async () => {
  await pool.end()
  await database.drop()
})

describe('listSignOffs', () => {
  it('gives the history newest first and every look as it stands, pictures by content', async () => {
    const documents = memoryDocuments()
    const shootId = await makeShoot(db, [[client, 'client']])
    const other = await makeShoot(db, [[client, 'client']])
    const [sitterId, lookId] = [sitterIdSchema.parse(randomUUID()), lookIdSchema.parse(randomUUID())]
    const [stored, waiting, elsewhere] = [0, 1, 2].map(() => uploadIdSchema.parse(randomUUID()))
    if (!stored || !waiting || !elsewhere) throw new Error('three ids')
    const at = (nowMs: number) => makeCtx(db, documents, client, nowMs)
    const picture = await storeUpload(at(1), { shootId, uploadId: stored, bytes: await twoTone('#8e6a22', '#23304a') })
    await storeUpload(at(1), { shootId: other, uploadId: elsewhere, bytes: await twoTone('#8e6a22', '#000000') })
    const doc = documents.doc(shootId, 'looks')
    putItems(doc, sitters, [{ id: sitterId, name: 'Ada Finch' }], () => 0.5)
    // A picture that waits on a device, and one of another shoot, are not part of what the client saw.
    putItems(
      doc,
      looks,
      [{ id: lookId, sitterId, name: 'Night coat', pictureIds: [waiting, stored, elsewhere] }],
      () => 0.5,
    )

    const [before] = (await listSignOffs(at(2), shootId)).current
    expect(before?.pictures).toEqual([{ uploadId: stored, sha256: picture.sha256 }])
    expect(before?.frozen).toMatchObject({ name: 'Night coat', pictures: [picture.sha256] })
    const first = await answerLook(at(3), {
      shootId,
      lookId,
      answer: 'signed off',
      fingerprint: before?.fingerprint ?? '',
      words: '',
    })
    patchItem(doc, looks, lookId, { hair: 'pinned' })
    const [after] = (await listSignOffs(at(4), shootId)).current
    expect(after?.fingerprint).not.toBe(before?.fingerprint)
    const second = await answerLook(at(5), {
      shootId,
      lookId,
      answer: 'change asked',
      fingerprint: after?.fingerprint ?? '',
      words: 'Loose, please.',
    })
    expect((await listSignOffs(at(6), shootId)).signOffs).toEqual([second, first])
  })

  it('hides the shoot from a stranger', async () => {
    const shootId = await makeShoot(db, [[client, 'client']])
    await expect(listSignOffs(makeCtx(db, memoryDocuments(), stranger), shootId)).rejects.toMatchObject({
      code: 'NOT_FOUND',
    })
  })
})
