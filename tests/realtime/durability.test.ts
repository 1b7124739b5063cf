import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type pg from 'pg'
import { migrateDatabase } from '#server/db/migrate.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { createRealtime } from '#server/realtime/server.ts'
import type { Cluster } from '#tests/support/cluster.ts'
import { startDurableCluster } from '#tests/support/durable-cluster.ts'
import { startServerChild } from './support/child.ts'
import { TestClient, pause } from './support/client.ts'
import { type Shoot, addShoot } from './support/world.ts'

const ROUNDS = 5
const EDITS_MS = 10

let cluster: Cluster
let db: Db
let pool: pg.Pool
let shoot: Shoot

beforeAll(async () => {
  cluster = await startDurableCluster()
  await migrateDatabase(cluster.url)
  const connected = connectDatabase(cluster.url, () => undefined, 4)
  db = connected.db
  pool = connected.pool
  const log = { info: () => undefined, warn: () => undefined, error: () => undefined }
  const realtime = createRealtime({ db, databaseUrl: cluster.url, auth: async () => null, trustedOrigins: [], log })
  shoot = await addShoot(db, realtime.documents)
  await realtime.drain()
})
afterAll(async () => {
  await pool.end()
  await cluster.stop()
})

describe('an acknowledged edit', () => {
  it('is kept by a database that really writes', async () => {
    for (const setting of ['fsync', 'synchronous_commit', 'full_page_writes']) {
      const { rows } = await pool.query<Record<string, string>>(`show ${setting}`)
      expect(rows[0]?.[setting]).toBe('on')
    }
  })

  it(`is there after ${ROUNDS} times kill -9 while three people type, deletes too`, { timeout: 120_000 }, async () => {
    const people = [shoot.people.photographer, shoot.people.stylist, shoot.people.client]
    const acked = new Map<string, number>()
    const deleted = new Set<string>()
    let made = 0
    let lost = 0
    for (let round = 0; round <= ROUNDS; round++) {
      const server = await startServerChild(cluster.url)
      const at = { url: server.url, shootId: shoot.shootId, kind: 'board' }
      // A newcomer looks at what the log makes of it.
      const look = await new TestClient({ ...at, sessionId: people[0]?.sessionId ?? '' }).ready()
      for (const [key, value] of acked) if (look.items.get(key) !== value) lost++
      for (const key of deleted) if (look.items.has(key)) lost++
      look.vanish()
      if (round === ROUNDS) {
        await server.kill('SIGKILL')
        break
      }
      const clients = await Promise.all(people.map(({ sessionId }) => new TestClient({ ...at, sessionId }).ready()))
      const typing = clients.map((client, person) => {
        // Each edit sets a key of its own, so that no loss hides behind an overwrite; every tenth is taken back.
        const bySent = new Map<number, () => void>()
        client.onSaved = (n) => {
          for (const [sent, note] of bySent) {
            if (sent > n) break
            note()
            bySent.delete(sent)
          }
        }
        let i = 0
        return setInterval(() => {
          const key = `${round}-${person}-${i++}`
          client.items.set(key, i)
          const value = i
          made++
          if (i % 10 !== 0) {
            bySent.set(client.sent, () => acked.set(key, value))
            return
          }
          client.items.delete(key)
          bySent.set(client.sent, () => deleted.add(key))
        }, EDITS_MS)
      })
      await pause(700 + round * 230)
      const killed = server.kill('SIGKILL')
      typing.forEach(clearInterval)
      await killed
      // Everybody is gone with the server: nobody can hand anything back.
      clients.forEach((client) => client.vanish())
    }
    expect(acked.size + deleted.size).toBeGreaterThan(made / 2)
    expect(lost).toBe(0)
  })
})
