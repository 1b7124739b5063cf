import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { MOST_VERSIONS, VERSION_NAME_MAX, type Version } from '#shared/api/versions.ts'
import { noteIdSchema, versionIdSchema } from '#shared/ids.ts'
import { patchItem, putItems, readAll, upsertItem } from '#shared/realtime/collection.ts'
import { notes, shotPlans } from '#shared/realtime/documents.ts'
import { keptVersion, rtDoc, rtSnapshot } from '#server/db/schema/realtime.ts'
import { beginTakeBack } from '#server/features/versions/begin-take-back.ts'
import { getVersion } from '#server/features/versions/get-version.ts'
import { keepVersion } from '#server/features/versions/keep-version.ts'
import { listVersions } from '#server/features/versions/list-versions.ts'
import { removeVersion } from '#server/features/versions/remove-version.ts'
import { renameVersion } from '#server/features/versions/rename-version.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

const clock = clockAt()
let app: TestApp
let world: World
beforeAll(async () => {
  app = await startTestApp({ clock })
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
  await write('as it was')
  app.documents.announced.length = 0
})

const NOTE = noteIdSchema.parse('00000000-0000-4000-8000-000000000001')

/** Writes the one note of the board: a step of the log. */
function write(text: string): Promise<void> {
  return app.documents.write(world.shootId, 'board', world.photographer.userId, (doc) => {
    if (!patchItem(doc, notes, NOTE, { text })) putItems(doc, notes, [{ id: NOTE, box: [0, 0, 80, 40], text }], () => 0)
  })
}

async function keep(name: string, actor = world.photographer): Promise<Version> {
  clock.advanceMs(1000)
  const { versions } = await keepVersion(app.ctxOf(actor), { shootId: world.shootId, name })
  const [newest] = versions
  if (!newest) throw new Error('what was kept is in the list')
  return newest
}

async function textIn(version: Version): Promise<string | undefined> {
  const { board } = await getVersion(app.ctxOf(world.crew), { shootId: world.shootId, versionId: version.id })
  const doc = new Y.Doc()
  Y.applyUpdate(doc, Buffer.from(board, 'base64'))
  return readAll(doc, notes).items.get(NOTE)?.text
}

/** Stored states of this shoot's versions, of board and plan. */
async function states(): Promise<{ kind: string; seq: number }[]> {
  return app.db
    .select({ kind: rtDoc.kind, seq: rtSnapshot.seq })
    .from(rtSnapshot)
    .innerJoin(rtDoc, eq(rtDoc.id, rtSnapshot.docId))
    .where(and(eq(rtDoc.shootId, world.shootId), eq(rtSnapshot.kind, 'version')))
    .orderBy(rtDoc.kind, rtSnapshot.seq)
}

describe('keepVersion', () => {
  it('is first in the list, with who and when, and screens hear of it', async () => {
    await keep('First idea')
    app.documents.announced.length = 0
    const kept = await keep('After the fitting', world.client)
    expect(kept).toEqual({
      id: kept.id,
      name: 'After the fitting',
      userId: world.client.userId,
      by: 'Cleo Marsh',
      atMs: clock.now().getTime(),
      takingBack: null,
    })
    expect(app.documents.announced).toEqual([
      { shootId: world.shootId, queryKeys: [['shoots', world.shootId, 'versions']] },
    ])
  })

  it('keeps both documents, and what is written later does not change them', async () => {
    await app.documents.write(world.shootId, 'plan', world.photographer.userId, (doc) =>
      upsertItem(doc, shotPlans, { id: NOTE, minutes: 35 }),
    )
    const kept = await keep('First idea')
    await write('changed')
    expect(await textIn(kept)).toBe('as it was')
    expect(await textIn(await keep('Second idea'))).toBe('changed')
    const { plan } = await getVersion(app.ctxOf(world.crew), { shootId: world.shootId, versionId: kept.id })
    const doc = new Y.Doc()
    Y.applyUpdate(doc, Buffer.from(plan, 'base64'))
    expect(readAll(doc, shotPlans).items.get(NOTE)?.minutes).toBe(35)
  })

  it('shares the states of a board that has not changed', async () => {
    const first = await keep('First idea')
    const again = await keep('The same')
    expect(await states()).toHaveLength(2)
    await write('changed')
    await keep('Second idea')
    // The plan is still where it was.
    expect((await states()).map(({ kind }) => kind)).toEqual(['board', 'board', 'plan'])
    expect(await textIn(first)).toBe(await textIn(again))
  })

  it('is not for crew, and keeps nothing of theirs', async () => {
    await expect(keep('Mine', world.crew)).rejects.toMatchObject({ code: 'FORBIDDEN' })
    await expect(keep('Mine', world.stranger)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    expect(await states()).toEqual([])
  })

  it(`refuses more than ${MOST_VERSIONS} of a shoot in a sentence`, async () => {
    await app.db.insert(keptVersion).values(
      Array.from({ length: MOST_VERSIONS - 1 }, (_, n) => ({
        id: versionIdSchema.parse(randomUUID()),
        shootId: world.shootId,
        name: `Version ${n}`,
        at: clock.now(),
        userId: world.photographer.userId,
        boardSeq: 1,
        planSeq: 1,
      })),
    )
    const last = await keep('The last')
    await expect(keep('One more')).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringMatching(/as many as it can have\. Nothing was changed; remove one/) as unknown,
    })
    await removeVersion(app.ctxOf(world.photographer), { shootId: world.shootId, versionId: last.id })
    expect((await keep('One more')).name).toBe('One more')
  })
})

describe('listVersions', () => {
  it('shows everybody of the shoot the newest first, and of no other shoot', async () => {
    await keep('First idea')
    await keep('Second idea')
    const names = async (actor: World['crew'], shootId = world.shootId) =>
      (await listVersions(app.ctxOf(actor), shootId)).versions.map(({ name }) => name)
    expect(await names(world.crew)).toEqual(['Second idea', 'First idea'])
    const other = await makeWorld(app)
    expect(await names(other.crew, other.shootId)).toEqual([])
    await expect(names(world.studioMember)).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('getVersion', () => {
  const get = (version: Version, actor = world.client, shootId = world.shootId) =>
    getVersion(app.ctxOf(actor), { shootId, versionId: version.id })

  it('says so when what is stored is damaged or missing', async () => {
    const kept = await keep('First idea')
    const damaged = { code: 'GONE', message: expect.stringMatching(/^This version is damaged/) as unknown }
    await app.db.update(rtSnapshot).set({ state: Uint8Array.of(0, 0) })
    await expect(get(kept)).rejects.toMatchObject(damaged)
    await app.db.delete(rtSnapshot)
    await expect(get(kept)).rejects.toMatchObject(damaged)
  })

  it('is hidden from strangers and from other shoots', async () => {
    const kept = await keep('First idea')
    await expect(get(kept, world.stranger)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    const other = await makeWorld(app)
    await expect(get(kept, other.photographer, other.shootId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('renameVersion', () => {
  it('changes the name alone', async () => {
    const kept = await keep('First idea')
    const { versions } = await renameVersion(app.ctxOf(world.stylist), {
      shootId: world.shootId,
      versionId: kept.id,
      name: 'Before the fitting',
    })
    expect(versions).toEqual([{ ...kept, name: 'Before the fitting' }])
    const other = await makeWorld(app)
    await expect(
      renameVersion(app.ctxOf(other.photographer), { shootId: other.shootId, versionId: kept.id, name: 'Mine' }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('removeVersion', () => {
  const remove = ({ id }: Version) => removeVersion(app.ctxOf(world.stylist), { shootId: world.shootId, versionId: id })

  it('keeps the states that another version needs, and forgets them with the last', async () => {
    const first = await keep('First idea')
    const again = await keep('The same')
    await write('changed')
    const third = await keep('Second idea')
    await remove(first)
    expect(await states()).toHaveLength(3)
    expect(await textIn(again)).toBe('as it was')
    await remove(again)
    expect((await states()).map(({ kind }) => kind)).toEqual(['board', 'plan'])
    expect(await textIn(third)).toBe('changed')
    expect(await remove(third)).toEqual({ versions: [] })
    expect(await states()).toEqual([])
    expect(await remove(third)).toEqual({ versions: [] })
  })

  it('leaves the snapshots of the log alone', async () => {
    const kept = await keep('First idea')
    const [row] = await app.db.select().from(rtSnapshot).where(eq(rtSnapshot.seq, 2))
    if (!row) throw new Error('the board has a state at its second step')
    await app.db.insert(rtSnapshot).values({ ...row, kind: 'compact' })
    await remove(kept)
    expect(
      await app.db.select({ kind: rtSnapshot.kind }).from(rtSnapshot).where(eq(rtSnapshot.docId, row.docId)),
    ).toEqual([{ kind: 'compact' }])
  })
})

describe('beginTakeBack', () => {
  const begin = async ({ id }: Version, actor = world.client) => {
    clock.advanceMs(1000)
    const { versions } = await beginTakeBack(app.ctxOf(actor), { shootId: world.shootId, versionId: id })
    return versions
  }

  it('keeps what is there now and says for what', async () => {
    const kept = await keep('First idea')
    await write('changed')
    const [before, ...rest] = await begin(kept)
    expect(before).toMatchObject({
      name: 'Before taking back ‘First idea’',
      by: 'Cleo Marsh',
      takingBack: 'First idea',
    })
    expect(rest).toEqual([kept])
    expect(before && (await textIn(before))).toBe('changed')
    expect(app.documents.announced).toHaveLength(2)
  })

  it('cuts a long name, never through a character', async () => {
    const room = VERSION_NAME_MAX - 'Before taking back ‘’'.length
    const long = `${'a'.repeat(room - 2)}🕯 and more`
    const [before] = await begin(await keep(long))
    expect(before?.name).toBe(`Before taking back ‘${'a'.repeat(room - 2)}…’`)
    expect(before?.takingBack).toBe(long)
  })

  it('keeps nothing for a version that is gone, or for crew', async () => {
    const kept = await keep('First idea')
    await expect(begin(kept, world.crew)).rejects.toMatchObject({ code: 'FORBIDDEN' })
    await removeVersion(app.ctxOf(world.client), { shootId: world.shootId, versionId: kept.id })
    await expect(begin(kept)).rejects.toMatchObject({ code: 'NOT_FOUND', message: /is not kept any more/ as unknown })
    expect(await states()).toEqual([])
  })
})
