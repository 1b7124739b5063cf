import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import type { Express } from 'express'
import type pg from 'pg'
import request from 'supertest'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { errorEnvelopeSchema } from '#shared/api/errors.ts'
import { signOffConflictSchema, signOffsSchema } from '#shared/api/sign-off.ts'
import { freezeLook, fingerprintOf } from '#shared/domain/sign-off/fingerprint.ts'
import type { FrozenLook } from '#shared/domain/sign-off/schema.ts'
import { type LookId, type PieceId, type ShootId, lookIdSchema, pieceIdSchema, sitterIdSchema } from '#shared/ids.ts'
import { patchItem, putItems } from '#shared/realtime/collection.ts'
import { looks, pieces, sitters } from '#shared/realtime/documents.ts'
import type { Actor } from '#server/context.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { signOff } from '#server/db/schema/sign-off.ts'
import { AppError } from '#server/errors.ts'
import { answerLook } from '#server/features/sign-off/answer-look.ts'
import { readLookVersions } from '#server/features/sign-off/look-version-rows.ts'
import { signOffRoutes } from '#server/features/sign-off/routes.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import {
  type MemoryDocuments,
  makeApp,
  makeCtx,
  makePerson,
  makeShoot,
  memoryDocuments,
} from '#tests/support/media-world.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let db: Db
let pool: pg.Pool
let client: Actor
let stylist: Actor
let photographer: Actor
let crew: Actor
let stranger: Actor
let documents: MemoryDocuments
let shootId: ShootId
let lookId: LookId
let glovesId: PieceId
let app: Express

beforeAll(async () => {
  database = await createTestDatabase()
  ;({ db, pool } = connectDatabase(database.url, () => undefined))
  client = await makePerson(db, 'Thea Quill')
  stylist = await makePerson(db, 'Sten Okoro')
  photographer = await makePerson(db, 'Ines Marlow')
  crew = await makePerson(db, 'Cato Wren')
  stranger = await makePerson(db, 'Nobody Here')
})

beforeEach(async () => {
  documents = memoryDocuments()
  shootId = await makeShoot(db, [
    [photographer, 'photographer'],
    [client, 'client'],
    [stylist, 'stylist'],
    [crew, 'crew'],
  ])
  const sitterId = sitterIdSchema.parse(randomUUID())
  lookId = lookIdSchema.parse(randomUUID())
  glovesId = pieceIdSchema.parse(randomUUID())
  const doc = documents.doc(shootId, 'looks')
  putItems(doc, sitters, [{ id: sitterId, name: 'Ada Finch', character: 'The Astronomer' }], () => 0.5)
  putItems(doc, pieces, [{ id: glovesId, name: 'Gloves, black kid', kind: 'accessory' }], () => 0.5)
  putItems(doc, looks, [{ id: lookId, sitterId, name: 'Night coat', pieceIds: [glovesId] }], () => 0.5)
  app = makeApp(db, documents, [client, stylist, photographer, crew, stranger], signOffRoutes())
})

afterAll(async () => {
  await pool.end()
  await database.drop()
})

async function shown(): Promise<{ frozen: FrozenLook; fingerprint: string }> {
  const { looks: planned, pictureHashes } = await readLookVersions(makeCtx(db, documents, client), shootId)
  const look = planned.get(lookId)
  if (!look) throw new Error('the look is there')
  const frozen = freezeLook(look, pictureHashes)
  return { frozen, fingerprint: fingerprintOf(frozen) }
}

async function answer(
  fingerprint: string,
  more: Partial<Parameters<typeof answerLook>[1]> = {},
  actor: Actor | null = client,
) {
  return answerLook(makeCtx(db, documents, actor), {
    shootId,
    lookId,
    answer: 'signed off',
    fingerprint,
    words: '',
    ...more,
  })
}

const rename = (name: string) => patchItem(documents.doc(shootId, 'looks'), pieces, glovesId, { name })

describe('answerLook', () => {
  it('keeps who, when, the version itself and where the log stood', async () => {
    const { frozen, fingerprint } = await shown()
    const kept = await answer(fingerprint)
    expect(kept).toMatchObject({
      lookId,
      answer: 'signed off',
      fingerprint,
      frozen,
      name: 'Thea Quill',
      atMs: Date.UTC(2026, 8, 29, 10),
    })
    const [row] = await db.select().from(signOff).where(eq(signOff.id, kept.id))
    expect(row?.seq).toBeGreaterThan(1)
    expect(row?.frozen).toEqual(frozen)
    expect(documents.announced).toEqual([['shoots', shootId, 'sign-offs']])
  })

  it('refuses an answer to a look that changed meanwhile, says what changed and keeps nothing', async () => {
    const { frozen, fingerprint } = await shown()
    rename('Gloves, grey wool')
    const error: unknown = await answer(fingerprint, { saw: frozen }).catch((caught: unknown) => caught)
    if (!(error instanceof AppError)) throw new Error('refused')
    expect(error.code).toBe('CONFLICT')
    expect(error.details).toEqual({
      fingerprint: (await shown()).fingerprint,
      differences: [{ what: 'Gloves', before: 'black kid', after: 'grey wool' }],
    })
    expect(await db.select().from(signOff).where(eq(signOff.shootId, shootId))).toEqual([])
    expect(documents.announced).toEqual([])
  })

  it('says what changed since the last answer when it never saw the version itself', async () => {
    await answer((await shown()).fingerprint)
    rename('Gloves, grey wool')
    await expect(answer('0'.repeat(64))).rejects.toMatchObject({
      code: 'CONFLICT',
      details: { differences: [{ what: 'Gloves', before: 'black kid', after: 'grey wool' }] },
    })
  })

  it('does not believe a version that has another fingerprint', async () => {
    const { frozen } = await shown()
    await expect(answer('0'.repeat(64), { saw: { ...frozen, hair: 'made up' } })).rejects.toMatchObject({
      details: { differences: [] },
    })
  })

  it('keeps a change asked for with its words', async () => {
    const kept = await answer((await shown()).fingerprint, {
      answer: 'change asked',
      words: 'A softer edge on the collar.',
    })
    expect(kept).toMatchObject({ answer: 'change asked', words: 'A softer edge on the collar.' })
  })

  it('does not know a look that was taken out', async () => {
    const { fingerprint } = await shown()
    await expect(answer(fingerprint, { lookId: lookIdSchema.parse(randomUUID()) })).rejects.toMatchObject({
      code: 'NOT_FOUND',
    })
  })

  it.each([
    ['photographer', () => photographer, 'FORBIDDEN'],
    ['stylist', () => stylist, 'FORBIDDEN'],
    ['crew', () => crew, 'FORBIDDEN'],
    ['stranger', () => stranger, 'NOT_FOUND'],
    ['signed out', () => null, 'SIGNED_OUT'],
  ] as [string, () => Actor | null, string][])('refuses a %s', async (_who, person, code) => {
    await expect(answer((await shown()).fingerprint, {}, person())).rejects.toMatchObject({ code })
  })
})

describe('POST /api/shoots/:shootId/looks/:lookId/sign-offs', () => {
  const post = (body: object, who = client) =>
    request(app).post(`/api/shoots/${shootId}/looks/${lookId}/sign-offs`).set('x-user', who.userId).send(body)

  it('answers 200, and the history has it for everyone in the shoot', async () => {
    const { fingerprint } = await shown()
    expect((await post({ answer: 'signed off', fingerprint })).status).toBe(200)
    const list = await request(app).get(`/api/shoots/${shootId}/sign-offs`).set('x-user', crew.userId)
    expect(signOffsSchema.parse(list.body).signOffs).toHaveLength(1)
  })

  it('answers 409 with the difference', async () => {
    const { fingerprint, frozen } = await shown()
    rename('Gloves, grey wool')
    const response = await post({ answer: 'signed off', fingerprint, saw: frozen })
    expect(response.status).toBe(409)
    expect(
      signOffConflictSchema.parse(errorEnvelopeSchema.parse(response.body).error.details).differences,
    ).toHaveLength(1)
  })

  it('wants words with a change and a whole fingerprint, and says so with paths', async () => {
    const { fingerprint } = await shown()
    const noWords = await post({ answer: 'change asked', fingerprint, words: '  ' })
    expect([noWords.status, errorEnvelopeSchema.parse(noWords.body).error.issues]).toEqual([
      400,
      [{ path: 'words', message: 'say what should change' }],
    ])
    expect((await post({ answer: 'signed off', fingerprint: 'abc' })).status).toBe(400)
  })

  it('answers 404 to a stranger', async () => {
    const { fingerprint } = await shown()
    expect((await post({ answer: 'signed off', fingerprint }, stranger)).status).toBe(404)
  })
})
