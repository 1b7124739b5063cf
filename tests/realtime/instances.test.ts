import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import { session } from '#server/db/schema/auth.ts'
import { rtDoc } from '#server/db/schema/realtime.ts'
import { shoot as shootTable, shootMember } from '#server/db/schema/shoots.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { startServerChild } from './support/child.ts'
import { TestClient, contentOf, pause, until } from './support/client.ts'
import { type Proxy, startProxy } from './support/proxy.ts'
import { type Shoot, type Someone, type World, addPerson, addSession, addShoot, startWorld } from './support/world.ts'

const RARELY_MS = 600_000

let database: TestDatabase
let proxy: Proxy
/** One process reaches the database directly, the other by a way that can be cut. */
let here: World
let there: World
let shoot: Shoot
let open: TestClient[] = []

beforeAll(async () => {
  database = await createTestDatabase()
  proxy = await startProxy(database.url)
  // Looks at the heads so rarely that what arrives in time has been said.
  const limits = {
    headsMs: RARELY_MS,
    instanceGoneMs: RARELY_MS,
    retryMinMs: 20,
    retryMaxMs: 200,
    messagesPerSecond: 1_000,
  }
  here = await startWorld({ databaseUrl: database.url, limits })
  there = await startWorld({ databaseUrl: database.url, serverDatabaseUrl: proxy.url, limits })
  shoot = await addShoot(here.db, here.realtime.documents)
  await until(() => here.realtime.stats().instances === 1 && there.realtime.stats().instances === 1)
})
afterEach(() => {
  for (const client of open) client.close()
  open = []
})
afterAll(async () => {
  await Promise.all([here.close(), there.close()])
  await proxy.close()
  await database.drop()
})

function connect(world: { url: string }, someone: Someone, kind = 'board', doc?: Y.Doc): TestClient {
  const { sessionId } = someone
  const client = new TestClient({ url: world.url, shootId: shoot.shootId, kind, sessionId, ...(doc ? { doc } : {}) })
  open.push(client)
  return client
}

const sameContent = (...clients: TestClient[]) => new Set(clients.map((client) => contentOf(client.doc))).size === 1

async function storedContent(): Promise<{ content: string; rows: number }> {
  const { rows } = await here.pool.query<{ seq: string; update: Buffer }>(
    "select u.seq, u.update from rt_update u join rt_doc d on d.id = u.doc_id where d.shoot_id = $1 and d.kind = 'board' order by seq",
    [shoot.shootId],
  )
  const doc = new Y.Doc()
  for (const row of rows) Y.applyUpdate(doc, row.update)
  expect(rows.map((row) => Number(row.seq))).toEqual(rows.map((_, i) => i + 1))
  expect(doc.store.pendingStructs).toBe(null)
  return { content: contentOf(doc), rows: rows.length }
}

describe('two processes on one database', () => {
  it('hand on edits and deletions both ways, at once', async () => {
    const a = await connect(here, shoot.people.photographer).ready()
    const b = await connect(there, shoot.people.stylist).ready()
    a.items.set('from here', 1)
    await until(() => b.items.get('from here') === 1)
    b.items.set('from there', 2)
    b.items.delete('from here')
    await until(() => a.items.get('from there') === 2 && !a.items.has('from here'))
    await until(() => a.saved === a.sent && b.saved === b.sent)
    // A late one at each of them is given the same.
    const late = await Promise.all([
      connect(here, shoot.people.client).ready(),
      connect(there, shoot.people.client).ready(),
    ])
    expect(sameContent(a, b, ...late)).toBe(true)
  })

  it('end in one document and one log when people type into both', async () => {
    const { photographer, stylist, client } = shoot.people
    const people = [photographer, stylist, client, photographer]
    const clients = await Promise.all(people.map((someone, i) => connect(i % 2 ? there : here, someone).ready()))
    for (let n = 0; n < 60; n++) {
      clients.forEach((one, i) => {
        one.items.set(`${i}-${n % 10}`, n)
        // The same key from both sides, so that one of them has to win everywhere.
        one.items.set('contested', `${i} ${n}`)
        if (n % 7 === 6) one.items.delete(`${(i + 1) % 4}-${n % 10}`)
      })
      await pause(5)
    }
    await until(() => clients.every((one) => one.saved === one.sent))
    await until(() => sameContent(...clients))
    expect((await storedContent()).content).toBe(contentOf(clients[0]?.doc ?? new Y.Doc()))
  })

  it('show each other who is there, as the session has it, and when they leave', async () => {
    const a = await connect(here, shoot.people.photographer, 'looks').ready()
    a.show(11, 1, { pointer: [1, 1], user: { id: 'x', name: 'Somebody else' } })
    const b = await connect(there, shoot.people.stylist, 'looks').ready()
    await until(() => b.presence.has(11))
    const { userId, name } = shoot.people.photographer
    expect(b.presence.get(11)).toMatchObject({ user: { id: userId, name, role: 'photographer' }, pointer: [1, 1] })
    b.show(12, 1, { pointer: [2, 2] })
    await until(() => a.presence.has(12))
    // Nobody speaks for somebody who is connected elsewhere.
    const c = await connect(there, shoot.people.crew, 'looks').ready()
    c.show(11, 50, { pointer: [66, 66] })
    for (let i = 0; i < 5; i++) a.show(11, 2 + i, { pointer: [i, i] })
    await until(() => JSON.stringify(c.presence.get(11) ?? {}).includes('[4,4]'))
    expect(c.presence.get(11)).toMatchObject({ user: { id: userId } })
    a.close()
    await until(() => !b.presence.has(11) && !c.presence.has(11))
  })

  it('keep somebody who moves from one to the other with the same id', async () => {
    const watcher = await connect(there, shoot.people.crew, 'plan').ready()
    const first = await connect(here, shoot.people.photographer, 'plan').ready()
    first.show(21, 5, { at: 'board' })
    await until(() => watcher.presence.has(21))
    const second = await connect(there, shoot.people.photographer, 'plan').ready()
    second.show(21, 1, { at: 'order' })
    await until(() => JSON.stringify(watcher.presence.get(21)).includes('order'))
    first.close()
    // What the first one's server says about its leaving is about nobody any more.
    second.show(21, 2, { at: 'lighting' })
    await until(() => JSON.stringify(watcher.presence.get(21) ?? {}).includes('lighting'))
    await pause(200)
    expect(watcher.presence.has(21)).toBe(true)
  })

  it('announce to everybody what changed over HTTP', async () => {
    const a = await connect(here, shoot.people.photographer).ready()
    const b = await connect(there, shoot.people.crew).ready()
    there.realtime.documents.announce(shoot.shootId, [['shoots', shoot.shootId, 'comments']])
    await until(() => a.changed.length > 0 && b.changed.length > 0)
    expect(a.changed).toEqual([[['shoots', shoot.shootId, 'comments']]])
    expect(b.changed).toEqual(a.changed)
  })

  it('read for a verb what the other has acknowledged', async () => {
    const a = await connect(here, shoot.people.photographer).ready()
    a.items.set('signed off', 'yes')
    await until(() => a.saved === a.sent)
    const read = await there.realtime.documents.read(shoot.shootId, 'board', (doc) =>
      doc.getMap('items').get('signed off'),
    )
    expect(read).toBe('yes')
  })
})

describe('rights that change', () => {
  async function guest(role: 'stylist' | 'client'): Promise<Someone> {
    const someone = await addPerson(here.db, 'Bea Quist')
    await here.db.insert(shootMember).values({ shootId: shoot.shootId, userId: someone.userId, role })
    return someone
  }
  const endings = (clients: TestClient[]) =>
    Promise.race([
      Promise.all(clients.map((client) => client.ended)),
      pause(2_000).then(() => 'not within two seconds'),
    ])

  it('close the sockets of a changed role on both, and the next one knows the new role', async () => {
    const someone = await guest('stylist')
    const both = [await connect(here, someone).ready(), await connect(there, someone).ready()]
    await here.db.transaction(async (tx) => {
      await tx.update(shootMember).set({ role: 'client' }).where(eq(shootMember.userId, someone.userId))
      await notifyAuth(tx, { shootId: shoot.shootId, userId: someone.userId })
    })
    expect(await endings(both)).toEqual([CLOSE.roleChanged, CLOSE.roleChanged])
    const again = await connect(there, someone, 'plan').ready()
    expect(again.hello).toMatchObject({ role: 'client', mayWrite: false })
  })

  it('close the sockets of somebody removed, and of a session ended, on both', async () => {
    const someone = await guest('client')
    const elsewhere = randomUUID()
    await addSession(here.db, someone.userId, elsewhere)
    const signedOut = [
      await connect(here, { ...someone, sessionId: elsewhere }).ready(),
      await connect(there, { ...someone, sessionId: elsewhere }).ready(),
    ]
    const both = [await connect(here, someone).ready(), await connect(there, someone).ready()]
    await there.db.transaction(async (tx) => {
      await tx.delete(session).where(eq(session.id, elsewhere))
      await notifyAuth(tx, { sessionId: elsewhere })
    })
    expect(await endings(signedOut)).toEqual([CLOSE.signedOut, CLOSE.signedOut])
    expect(both.map((client) => client.endCode)).toEqual([null, null])
    await there.db.transaction(async (tx) => {
      await tx.delete(shootMember).where(eq(shootMember.userId, someone.userId))
      await notifyAuth(tx, { shootId: shoot.shootId, userId: someone.userId })
    })
    expect(await endings(both)).toEqual([CLOSE.noAccess, CLOSE.noAccess])
  })
})

describe('what is said and not heard', () => {
  it('is caught up with when the listening connection is there again', async () => {
    const a = await connect(here, shoot.people.photographer).ready()
    const b = await connect(there, shoot.people.stylist).ready()
    const listeners = "select pid from pg_stat_activity where datname = current_database() and query ilike 'listen %'"
    const { rows } = await here.pool.query<{ pid: number }>(listeners)
    expect(rows.length).toBeGreaterThanOrEqual(4)
    await here.pool.query(`select pg_terminate_backend(pid) from (${listeners}) l`)
    for (let n = 0; n < 20; n++) {
      a.items.set(`deaf ${n}`, n)
      b.items.set(`mute ${n}`, n)
      await pause(2)
    }
    await until(() => a.saved === a.sent && b.saved === b.sent)
    await until(() => sameContent(a, b))
    expect(a.items.get('mute 19')).toBe(19)
    expect([a.endCode, b.endCode]).toEqual([null, null])
  })

  it('is found by the regular look at the heads', async () => {
    const looking = await startWorld({ databaseUrl: database.url, limits: { headsMs: 100 } })
    const a = await connect(looking, shoot.people.photographer).ready()
    // A process that writes to the log and tells nobody.
    const doc = new Y.Doc()
    doc.getMap('items').set('unheard', 1)
    await here.pool.query(
      `with grown as (update rt_doc set head = head + 1 where shoot_id = $1 and kind = 'board' returning id, head)
       insert into rt_update (doc_id, seq, update) select id, head, $2 from grown`,
      [shoot.shootId, Buffer.from(Y.encodeStateAsUpdate(doc))],
    )
    await until(() => a.items.get('unheard') === 1)
    await looking.close()
  })

  it('loses nothing when one of them is cut off from the database for a while', async () => {
    const a = await connect(here, shoot.people.photographer).ready()
    const b = await connect(there, shoot.people.stylist).ready()
    proxy.cut()
    for (let n = 0; n < 30; n++) {
      a.items.set(`a ${n}`, n)
      b.items.set(`b ${n}`, n)
      await pause(10)
    }
    expect(b.saved).toBeLessThan(b.sent)
    expect(b.items.has('a 29')).toBe(false)
    proxy.mend()
    await until(() => a.saved === a.sent && b.saved === b.sent)
    await until(() => sameContent(a, b))
    expect(a.items.get('b 29')).toBe(29)
    expect([a.endCode, b.endCode]).toEqual([null, null])
    expect((await storedContent()).content).toBe(contentOf(a.doc))
  })
})

describe('a process that is killed', () => {
  it('loses nothing acknowledged; its people go on at the other, and are not shown for ever', async () => {
    const limits = { headsMs: 150, instanceGoneMs: 600 }
    const doomed = await startServerChild(database.url, { ...limits, warmUp: false })
    const staying = await startWorld({ databaseUrl: database.url, limits })
    await until(() => staying.realtime.stats().instances >= 2)
    const { photographer, stylist } = shoot.people
    const a = await connect(staying, photographer).ready()
    const b = await connect(doomed, stylist).ready()
    b.show(31, 1, { at: 'board' })
    await until(() => a.presence.has(31))
    const acknowledged = new Map<string, number>()
    const sentAt: string[] = []
    b.onSaved = (n) => sentAt.slice(0, n + 1).forEach((key, i) => key && acknowledged.set(key, i))
    for (let n = 0; n < 80; n++) {
      b.items.set(`doomed ${n}`, n)
      sentAt[b.sent] = `doomed ${n}`
      a.items.set(`staying ${n}`, n)
      await pause(5)
      if (n === 60) await doomed.kill('SIGKILL')
    }
    expect(acknowledged.size).toBeGreaterThan(10)
    await until(() => a.saved === a.sent)
    const { content } = await storedContent()
    for (const key of acknowledged.keys()) expect(content).toContain(`"${key}"`)
    // Back at the other process, as a browser does it: with what it has.
    const again = await connect(staying, stylist, 'board', b.doc).ready()
    await until(() => sameContent(a, again))
    expect(a.items.get('doomed 79')).toBe(79)
    await until(() => !a.presence.has(31))
    await staying.close()
  })
})

describe('a document that is', () => {
  const setDoc = (values: Partial<typeof rtDoc.$inferInsert>, kind: 'day' | 'lighting') =>
    here.db
      .update(rtDoc)
      .set(values)
      .where(and(eq(rtDoc.shootId, shoot.shootId), eq(rtDoc.kind, kind)))

  it('frozen is read-only for everybody who is there, until it is released', async () => {
    const looking = await startWorld({ databaseUrl: database.url, limits: { headsMs: 50 } })
    const a = await connect(looking, shoot.people.photographer, 'lighting').ready()
    await setDoc({ frozen: 'quarantine' }, 'lighting')
    await until(() => a.hello?.frozen === 'quarantine')
    expect(a.hello?.mayWrite).toBe(false)
    a.items.set('refused', 1)
    await until(() => a.refusals.length > 0)
    expect(a.refusals[0]?.reason).toBe('frozen')
    await expect(
      looking.realtime.documents.write(shoot.shootId, 'lighting', shoot.people.photographer.userId, () => undefined),
    ).rejects.toThrow('closed for changes')
    const late = connect(looking, shoot.people.photographer, 'lighting')
    await until(() => late.hello !== null)
    expect(late.hello).toMatchObject({ frozen: 'quarantine', mayWrite: false })
    await setDoc({ frozen: null }, 'lighting')
    await until(() => a.hello?.mayWrite === true)
    await looking.close()
  })

  it('of another epoch or gone lets everybody go', async () => {
    const looking = await startWorld({ databaseUrl: database.url, limits: { headsMs: 50 } })
    const a = await connect(looking, shoot.people.photographer, 'day').ready()
    await setDoc({ epoch: 2 }, 'day')
    expect(await a.ended).toBe(CLOSE.epoch)
    const again = await connect(looking, shoot.people.photographer, 'day').ready()
    expect(again.hello?.epoch).toBe(2)
    await here.db.delete(shootTable).where(eq(shootTable.id, shoot.shootId))
    expect([CLOSE.unknown, CLOSE.noAccess]).toContain(await again.ended)
    await looking.close()
  })
})
