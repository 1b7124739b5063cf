import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { shootIdSchema, userIdSchema } from '#shared/ids.ts'
import { AppError } from '#server/errors.ts'
import { TestClient, pause, until } from '#tests/realtime/support/client.ts'
import { type Shoot, type World, addShoot, startWorld } from '#tests/realtime/support/world.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let world: World
let shoot: Shoot

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url, limits: { writeWaitMs: 700 } })
})
beforeEach(async () => {
  shoot = await addShoot(world.db, world.realtime.documents)
})
afterAll(async () => {
  await world.close()
  await database.drop()
})

const itemsOf = (doc: Y.Doc) => doc.getMap('items').toJSON()

async function storedItems(): Promise<unknown> {
  const { rows } = await world.pool.query<{ update: Buffer; user_id: string | null }>(
    "select u.update from rt_update u join rt_doc d on d.id = u.doc_id where d.shoot_id = $1 and d.kind = 'looks' order by seq",
    [shoot.shootId],
  )
  const doc = new Y.Doc()
  for (const row of rows) Y.applyUpdate(doc, row.update)
  return itemsOf(doc)
}

function open(role: keyof Shoot['people']) {
  const { sessionId } = shoot.people[role]
  return new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'looks', sessionId })
}

describe('documents.create', () => {
  it('puts the first content as seq 1, and nothing when the transaction does not commit', async () => {
    const source = new Y.Doc()
    source.getMap('items').set('first', 1)
    const { documents } = world.realtime
    await world.pool.query("delete from rt_doc where shoot_id = $1 and kind = 'looks'", [shoot.shootId])
    const state = Y.encodeStateAsUpdate(source)
    await world.db
      .transaction(async (tx) => {
        await documents.create(tx, shoot.shootId, 'looks', state)
        throw new Error('no')
      })
      .catch(() => undefined)
    await expect(documents.read(shoot.shootId, 'looks', itemsOf)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    await world.db.transaction((tx) => documents.create(tx, shoot.shootId, 'looks', state))
    expect(await documents.read(shoot.shootId, 'looks', (doc, seq) => [itemsOf(doc), seq])).toEqual([{ first: 1 }, 1])
  })
})

describe('documents.write', () => {
  it('is durable when it resolves, reaches who is connected, and carries its author', async () => {
    const client = await open('photographer').ready()
    await world.realtime.documents.write(shoot.shootId, 'looks', shoot.people.stylist.userId, (doc) => {
      doc.getMap('items').set('a', 1)
      doc.transact(() => doc.getMap('items').set('b', 2), 'another origin')
    })
    expect(await storedItems()).toEqual({ a: 1, b: 2 })
    await until(() => client.items.size === 2)
    const { rows } = await world.pool.query(
      "select u.user_id from rt_update u join rt_doc d on d.id = u.doc_id where d.shoot_id = $1 and d.kind = 'looks' and seq > 1",
      [shoot.shootId],
    )
    expect(rows).toEqual([{ user_id: shoot.people.stylist.userId }])
    client.close()
  })

  it('passes on what its function throws, with what was changed before stored like everything else', async () => {
    const write = world.realtime.documents.write(shoot.shootId, 'looks', shoot.people.stylist.userId, (doc) => {
      doc.getMap('items').set('half', 1)
      throw new AppError('CONFLICT', 'No.')
    })
    await expect(write).rejects.toMatchObject({ code: 'CONFLICT' })
    expect(await world.realtime.documents.read(shoot.shootId, 'looks', itemsOf)).toEqual({ half: 1 })
    expect(await storedItems()).toEqual({ half: 1 })
  })

  it('says so when the database does not answer in time', async () => {
    const blocker = await world.pool.connect()
    await blocker.query('begin')
    await blocker.query("select 1 from rt_doc where shoot_id = $1 and kind = 'looks' for update", [shoot.shootId])
    const write = world.realtime.documents.write(shoot.shootId, 'looks', shoot.people.stylist.userId, (doc) => {
      doc.getMap('items').set('late', 1)
    })
    await expect(write).rejects.toMatchObject({ code: 'STARTING' })
    await blocker.query('rollback')
    blocker.release()
    await until(async () => JSON.stringify(await storedItems()) === '{"late":1}')
  })

  it('knows only documents that exist', async () => {
    const nowhere = shootIdSchema.parse(randomUUID())
    const write = world.realtime.documents.write(nowhere, 'looks', userIdSchema.parse('x'), () => undefined)
    await expect(write).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('documents.read', () => {
  it('sees the log up to its head, rows of other processes among them', async () => {
    const { documents } = world.realtime
    await documents.read(shoot.shootId, 'looks', () => undefined)
    const elsewhere = await startWorld({ databaseUrl: database.url })
    await elsewhere.realtime.documents.write(shoot.shootId, 'looks', shoot.people.stylist.userId, (doc) => {
      doc.getMap('items').set('theirs', 1)
    })
    await elsewhere.close()
    expect(await documents.read(shoot.shootId, 'looks', (doc, seq) => [itemsOf(doc), seq])).toEqual([{ theirs: 1 }, 2])
  })

  it('gives a state that the log has, with its number, while people type', async () => {
    const client = await open('photographer').ready()
    let typed = 0
    const typing = setInterval(() => client.items.set('n', ++typed), 1)
    for (let round = 0; round < 20; round++) {
      const [seen, seq] = await world.realtime.documents.read(
        shoot.shootId,
        'looks',
        (doc, at) => [itemsOf(doc), at] as const,
      )
      const { rows } = await world.pool.query<{ update: Buffer }>(
        "select u.update from rt_update u join rt_doc d on d.id = u.doc_id where d.shoot_id = $1 and d.kind = 'looks' and seq <= $2 order by seq",
        [shoot.shootId, seq],
      )
      const doc = new Y.Doc()
      for (const row of rows) Y.applyUpdate(doc, row.update)
      expect(itemsOf(doc)).toEqual(seen)
      await pause(10)
    }
    clearInterval(typing)
    client.close()
  })
})

describe('a document that is removed while people are in it', () => {
  it('closes them with 4404 at their next edit', async () => {
    const client = await open('photographer').ready()
    await world.pool.query('delete from rt_doc where shoot_id = $1', [shoot.shootId])
    client.items.set('a', 1)
    expect(await client.ended).toBe(4404)
  })
})
