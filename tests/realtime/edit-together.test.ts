import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import WebSocket from 'ws'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import { MESSAGE } from '#shared/realtime/protocol.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, pause, until } from './support/client.ts'
import { ORIGIN, type Shoot, type World, addShoot, startWorld } from './support/world.ts'

let database: TestDatabase
let world: World
let shoot: Shoot

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url })
})
afterAll(async () => {
  await world.close()
  await database.drop()
})

async function open(role: keyof Shoot['people'], more: Partial<ConstructorParameters<typeof TestClient>[0]> = {}) {
  const { sessionId } = shoot.people[role]
  return new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'board', sessionId, ...more })
}

async function docRow() {
  const result = await world.pool.query<{ id: string; head: string; log_rows: number }>(
    "select id, head, log_rows from rt_doc where shoot_id = $1 and kind = 'board'",
    [shoot.shootId],
  )
  const row = result.rows[0]
  if (!row) throw new Error('no document')
  return row
}

async function storedDoc(): Promise<Y.Doc> {
  const { id } = await docRow()
  const rows = await world.pool.query<{ update: Buffer }>(
    'select update from rt_update where doc_id = $1 order by seq',
    [id],
  )
  const doc = new Y.Doc()
  for (const row of rows.rows) Y.applyUpdate(doc, row.update)
  return doc
}

describe('the realtime server', () => {
  it('keeps two y-websocket clients in step, both ways, and after one comes back', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const provide = (role: keyof Shoot['people'], doc: Y.Doc) => {
      const headers = { 'x-test-session': shoot.people[role].sessionId, origin: ORIGIN }
      class Socket extends WebSocket {
        constructor(url: string) {
          super(url, { headers })
        }
      }
      // The provider wants the browser's class; ws has the part of it that is used.
      const polyfill = Socket as unknown as typeof globalThis.WebSocket
      return new WebsocketProvider(`${world.url}/rt/${shoot.shootId}`, 'board', doc, {
        WebSocketPolyfill: polyfill,
        disableBc: true,
      })
    }
    const [a, b] = [new Y.Doc(), new Y.Doc()]
    const providers = [provide('photographer', a), provide('stylist', b)]
    await until(() => providers.every((provider) => provider.synced))
    a.getMap('frames').set('one', new Y.Map([['box', [1, 2, 3, 4]]]))
    b.getMap('frames').set('two', new Y.Map([['box', [5, 6, 7, 8]]]))
    await until(() => contentOf(a) === contentOf(b) && a.getMap('frames').size === 2)
    providers[1]?.disconnect()
    a.getMap('frames').delete('one')
    b.getMap('frames').set('three', new Y.Map([['box', [9, 9, 9, 9]]]))
    providers[1]?.connect()
    await until(() => contentOf(a) === contentOf(b) && a.getMap('frames').size === 2)
    expect(Object.keys(a.getMap('frames').toJSON()).sort()).toEqual(['three', 'two'])
    providers[0]?.awareness.setLocalState({ pointer: [3, 4] })
    await until(() => [...(providers[1]?.awareness.getStates().values() ?? [])].some((state) => 'pointer' in state))
    for (const provider of providers) provider.destroy()
  })

  it('acknowledges an edit only after its commit, and shows it to peers before', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const author = await (await open('photographer')).ready()
    const peer = await (await open('stylist')).ready()
    const { id } = await docRow()
    const blocker = await world.pool.connect()
    await blocker.query('begin')
    await blocker.query('select 1 from rt_doc where id = $1 for update', [id])
    author.items.set('a', 1)
    const n = author.sent
    await until(() => peer.items.get('a') === 1)
    await pause(300)
    expect(author.saved).toBe(n - 1)
    await blocker.query('commit')
    blocker.release()
    await until(() => author.saved === n)
    expect((await storedDoc()).getMap('items').get('a')).toBe(1)
    author.close()
    peer.close()
  })

  it('acknowledges a delete when it is stored', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const author = await (await open('photographer')).ready()
    author.items.set('a', 1)
    author.items.set('b', 2)
    author.items.delete('a')
    await until(() => author.saved === author.sent)
    expect((await storedDoc()).getMap('items').toJSON()).toEqual({ b: 2 })
    author.close()
  })

  it('acknowledges a message that brings nothing new only after the copy queued before it', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const first = await (await open('photographer')).ready()
    const second = await (await open('stylist')).ready()
    const { id } = await docRow()
    const blocker = await world.pool.connect()
    await blocker.query('begin')
    await blocker.query('select 1 from rt_doc where id = $1 for update', [id])
    first.items.set('a', 1)
    await until(() => second.items.get('a') === 1)
    second.sendUpdate(Y.encodeStateAsUpdate(second.doc))
    await pause(200)
    expect(second.saved).toBe(second.sent - 1)
    await blocker.query('commit')
    blocker.release()
    await until(() => second.saved === second.sent && first.saved === first.sent)
    first.close()
    second.close()
  })

  it('keeps a run of one person as one row, in order, under their name, with what they touched', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const author = await (await open('stylist')).ready()
    author.doc.transact(() => author.doc.getMap('frames').set('frame-1', new Y.Map([['note', 'x']])))
    for (let i = 0; i < 50; i++) author.items.set('a', i)
    await until(() => author.saved === author.sent)
    const { id, head, log_rows } = await docRow()
    const rows = await world.pool.query<{ seq: string; user_id: string | null }>(
      'select seq, user_id from rt_update where doc_id = $1 order by seq',
      [id],
    )
    expect(rows.rows.map((row) => Number(row.seq))).toEqual(rows.rows.map((_, i) => i + 1))
    expect(rows.rows.length).toBeLessThan(50)
    expect(Number(head)).toBe(rows.rows.length)
    expect(log_rows).toBe(rows.rows.length)
    expect(new Set(rows.rows.slice(1).map((row) => row.user_id))).toEqual(new Set([shoot.people.stylist.userId]))
    const touched = await world.pool.query<{ item: string; user_id: string }>(
      'select item, user_id from rt_touch where doc_id = $1 order by item',
      [id],
    )
    expect(touched.rows).toEqual([
      { item: 'a', user_id: shoot.people.stylist.userId },
      { item: 'frame-1', user_id: shoot.people.stylist.userId },
    ])
    author.close()
  })

  it('keeps what no schema of ours knows', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const newer = await (await open('photographer')).ready()
    newer.doc.getMap('holograms').set('h1', new Y.Map<unknown>([['spin', { from: 'a newer program' }]]))
    await until(() => newer.saved === newer.sent)
    const other = await (await open('client')).ready()
    expect(other.doc.getMap('holograms').toJSON()).toEqual({ h1: { spin: { from: 'a newer program' } } })
    newer.close()
    other.close()
  })

  it('serves everybody who joins while the document is loading from one load, with what they sent early', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const { id } = await docRow()
    const blocker = await world.pool.connect()
    await blocker.query('begin')
    await blocker.query('lock table rt_snapshot in access exclusive mode')
    const joining = await Promise.all((['photographer', 'stylist', 'client'] as const).map((role) => open(role)))
    await until(() => joining.every((client) => client.hello !== null))
    joining.forEach((client, i) => client.items.set(`early-${i}`, i))
    await pause(100)
    expect(joining.every((client) => !client.isSynced)).toBe(true)
    await blocker.query('commit')
    blocker.release()
    await Promise.all(joining.map((client) => client.ready()))
    await until(() => joining.every((client) => client.items.size === 3))
    expect((await storedDoc()).getMap('items').size).toBe(3)
    expect(world.realtime.stats().rooms).toBeGreaterThan(0)
    expect(id).toBeTypeOf('string')
    for (const client of joining) client.close()
  })

  it('says 100 to 103 only to those who ask for them, hello first', async () => {
    shoot = await addShoot(world.db, world.realtime.documents)
    const asks = await (await open('photographer')).ready()
    expect(asks.types[0]).toBe(MESSAGE.hello)
    expect(asks.hello).toEqual({ role: 'photographer', mayWrite: true, epoch: 1, schema: 1, frozen: null })
    const plain = await open('stylist', { acks: false })
    await until(() => plain.isSynced)
    plain.items.set('b', 1)
    await until(() => asks.items.get('b') === 1)
    world.realtime.documents.announce(shoot.shootId, [['comments', 'x']])
    await until(() => asks.changed.length === 1)
    expect(asks.changed).toEqual([[['comments', 'x']]])
    expect(plain.types.every((type) => type < 100)).toBe(true)
    asks.close()
    plain.close()
  })
})

describe('a room', () => {
  it('is forgotten when nobody is in it and comes back from the log', async () => {
    const small = await startWorld({ databaseUrl: database.url, limits: { idleUnloadMs: 50 } })
    shoot = await addShoot(small.db, small.realtime.documents)
    const { sessionId } = shoot.people.photographer
    const first = await new TestClient({ url: small.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    first.items.set('a', 1)
    await until(() => first.saved === first.sent)
    first.close()
    await until(() => small.realtime.stats().rooms === 0)
    const second = await new TestClient({ url: small.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    expect(second.items.toJSON()).toEqual({ a: 1 })
    second.close()
    await small.close()
  })
})

describe('drain', () => {
  it('stores what is queued, sends the last acknowledgements, closes with 1012 and takes nobody new', async () => {
    const leaving = await startWorld({ databaseUrl: database.url })
    shoot = await addShoot(leaving.db, leaving.realtime.documents)
    const at = {
      url: leaving.url,
      shootId: shoot.shootId,
      kind: 'board',
      sessionId: shoot.people.photographer.sessionId,
    }
    const client = await new TestClient(at).ready()
    for (let i = 0; i < 200; i++) client.items.set(`k${i}`, i)
    await until(() => leaving.realtime.stats().queuedEntries > 0 || client.saved === client.sent)
    const drained = leaving.realtime.drain()
    expect(await client.ended).toBe(1012)
    const stored = (await storedDoc()).getMap('items').size
    expect(client.saved).toBeGreaterThan(0)
    expect(stored).toBeGreaterThanOrEqual(client.saved - 1)
    expect(await new TestClient(at).ended).toBe(-503)
    await drained
    await leaving.close()
  })
})
