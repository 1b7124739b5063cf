import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { eq } from 'drizzle-orm'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, pause, until } from './support/client.ts'
import { type Proxy, startProxy } from './support/proxy.ts'
import { type Shoot, type World, addShoot, startWorld } from './support/world.ts'

const AWAY_MS = 3_000

let database: TestDatabase
let proxy: Proxy
let world: World
let shoot: Shoot

beforeAll(async () => {
  database = await createTestDatabase()
  proxy = await startProxy(database.url)
  world = await startWorld({
    databaseUrl: database.url,
    serverDatabaseUrl: proxy.url,
    limits: {
      retryMinMs: 20,
      retryMaxMs: 200,
      stalledMs: 500,
      recheckMs: 300,
      queueAgeMs: 1_500,
      messagesPerSecond: 1_000,
    },
  })
  shoot = await addShoot(world.db, world.realtime.documents)
})
afterAll(async () => {
  await world.close()
  await proxy.close()
  await database.drop()
})

function open(role: keyof Shoot['people'], kind = 'board') {
  const { sessionId } = shoot.people[role]
  return new TestClient({ url: world.url, shootId: shoot.shootId, kind, sessionId })
}

async function storedItems(): Promise<Y.Map<unknown>> {
  const { rows } = await world.pool.query<{ update: Buffer }>(
    "select u.update from rt_update u join rt_doc d on d.id = u.doc_id where d.shoot_id = $1 and d.kind = 'board' order by seq",
    [shoot.shootId],
  )
  const doc = new Y.Doc()
  for (const row of rows) Y.applyUpdate(doc, row.update)
  return doc.getMap('items')
}

describe('a database that goes away for some seconds while three people type', () => {
  it('acknowledges nothing, goes on between people, then stores everything', async () => {
    const clients = await Promise.all(
      (['photographer', 'stylist', 'client'] as const).map((role) => open(role).ready()),
    )
    let made = 0
    const typing = setInterval(() => {
      clients.forEach((client, i) => client.items.set(`${i}-${made}`, made))
      made++
    }, 20)
    await pause(500)
    proxy.cut()
    const cutMs = performance.now()
    await pause(300)
    const savedWhenCut = clients.map((client) => client.saved)
    const seenWhenCut = clients[1]?.items.size ?? 0
    await pause(700)
    // People still see each other. Later, with more waiting than is good, writers are not read from any more.
    expect(clients[1]?.items.size).toBeGreaterThan(seenWhenCut + 30)
    const someoneNew = open('crew', 'day')
    expect(await someoneNew.ended).not.toBe(1000)
    await until(() => performance.now() - cutMs > AWAY_MS)
    expect(clients.map((client) => client.saved)).toEqual(savedWhenCut)
    expect(clients.every((client) => client.refusals.some(({ reason }) => reason === 'database-down'))).toBe(true)
    expect(clients.every((client) => client.endCode === null)).toBe(true)
    expect(world.lines.some((line) => line.message === 'writers paused')).toBe(true)
    proxy.mend()
    await pause(500)
    clearInterval(typing)
    await until(() => clients.every((client) => client.saved === client.sent), 20_000)
    await until(() => new Set(clients.map((client) => contentOf(client.doc))).size === 1)
    expect((await storedItems()).size).toBe(made * 3)
    expect(world.lines.some((line) => line.message === 'writers resumed')).toBe(true)
    clients.forEach((client) => client.close())
  })

  it('hears of rights that changed while it was not listening', async () => {
    const client = await open('stylist').ready()
    proxy.cut()
    await pause(200)
    await world.db.delete(shootMember).where(eq(shootMember.userId, shoot.people.stylist.userId))
    await pause(300)
    expect(client.endCode).toBe(null)
    proxy.mend()
    expect(await client.ended).toBe(CLOSE.noAccess)
  })
})

describe('rights that cannot be checked for long', () => {
  it('end the connection with 1013: it may come back', async () => {
    const doubtful = await startWorld({
      databaseUrl: database.url,
      serverDatabaseUrl: proxy.url,
      limits: { recheckMs: 200, unverifiedMs: 600 },
    })
    const { sessionId } = shoot.people.client
    const client = await new TestClient({ url: doubtful.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    proxy.cut()
    expect(await client.ended).toBe(CLOSE.tryAgain)
    proxy.mend()
    await doubtful.close()
  })
})
