import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, pause, until } from './support/client.ts'
import { type Shoot, type World, addShoot, startWorld } from './support/world.ts'

const LIMITS = { messagesPerSecond: 1_000, compactRows: 40, compactIdleRows: 5, compactEveryMs: 0 }

let database: TestDatabase
let world: World
let other: World
let shoot: Shoot

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url, limits: LIMITS })
  other = await startWorld({ databaseUrl: database.url, limits: LIMITS })
  shoot = await addShoot(world.db, world.realtime.documents)
})
afterAll(async () => {
  await Promise.all([world.close(), other.close()])
  await database.drop()
})

function open(at: World, role: keyof Shoot['people'], kind: string) {
  const { sessionId } = shoot.people[role]
  return new TestClient({ url: at.url, shootId: shoot.shootId, kind, sessionId })
}

async function logOf(kind: string) {
  const { rows } = await world.pool.query<{ head: number; snapshot_seq: number; log_rows: number; behind: number }>(
    `select d.head::int, d.snapshot_seq::int, d.log_rows,
       (select count(*)::int from rt_update u where u.doc_id = d.id and u.seq > d.snapshot_seq) behind
     from rt_doc d where shoot_id = $1 and kind = $2`,
    [shoot.shootId, kind],
  )
  return rows[0]
}

describe('a log that gets long', () => {
  it('becomes a snapshot while people at two processes go on typing, and nobody notices', async () => {
    const clients = [
      await open(world, 'photographer', 'board').ready(),
      await open(other, 'stylist', 'board').ready(),
      await open(other, 'client', 'board').ready(),
    ]
    for (let n = 0; n < 120; n++) {
      clients.forEach((client, i) => client.items.set(`${i} ${n % 30}`, n))
      if (n % 5 === 4) clients[n % 3]?.items.delete(`${(n + 1) % 3} ${n % 30}`)
      await pause(8)
    }
    await until(() => clients.every((client) => client.saved === client.sent))
    await until(() => new Set(clients.map((client) => contentOf(client.doc))).size === 1)
    const compactions = () => world.realtime.stats().compactions + other.realtime.stats().compactions
    await until(() => compactions() > 0)
    const log = await logOf('board')
    expect(log?.snapshot_seq).toBeGreaterThan(0)
    expect(log?.log_rows).toBe(log?.behind)
    expect(clients.map((client) => client.endCode)).toEqual([null, null, null])
    // Read anew from what is stored.
    const fresh = await startWorld({ databaseUrl: database.url, limits: LIMITS })
    const late = await open(fresh, 'crew', 'board').ready()
    expect(contentOf(late.doc)).toBe(contentOf(clients[0]?.doc ?? late.doc))
    await fresh.close()
    clients.forEach((client) => client.close())
  })
})

describe('a document that is put away', () => {
  it('leaves a snapshot behind, and whoever comes in the middle of it finds everything', async () => {
    const passing = await startWorld({ databaseUrl: database.url, limits: { ...LIMITS, idleUnloadMs: 20 } })
    let expected = ''
    for (let visit = 0; visit < 12; visit++) {
      const client = await open(passing, 'photographer', 'looks').ready()
      if (visit > 0) expect(contentOf(client.doc)).toBe(expected)
      for (let n = 0; n < 4; n++) {
        client.items.set(`${visit} ${n}`, n)
        await pause(2)
      }
      await until(() => client.saved === client.sent)
      expected = contentOf(client.doc)
      client.close()
      // Comes back at another moment of being put away each time.
      await pause(visit * 6)
    }
    await until(async () => passing.realtime.stats().rooms === 0 && ((await logOf('looks'))?.snapshot_seq ?? 0) > 0)
    expect((await logOf('looks'))?.log_rows).toBeLessThan(LIMITS.compactIdleRows + 5)
    await passing.close()
  })
})
