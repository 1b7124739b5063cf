import { performance } from 'node:perf_hooks'
import { migrateDatabase } from '#server/db/migrate.ts'
import { connectDatabase } from '#server/db/client.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { startServerChild } from '#tests/realtime/support/child.ts'
import { TestClient, contentOf, pause, until } from '#tests/realtime/support/client.ts'
import { addShoot } from '#tests/realtime/support/world.ts'
import { startDurableCluster } from '#tests/support/durable-cluster.ts'

/**
 * People moving items of one document: how long until a peer has an edit in its own document, and until it is called
 * durable. The server is a process of its own on a cluster with fsync on; generator, server and database share the machine.
 */
const CLIENTS = 10
const EDITS_PER_SECOND = 5
const WARM_UP_MS = 2_000
const MEASURED_MS = 10_000

const cluster = await startDurableCluster()
await migrateDatabase(cluster.url)
const { db, pool } = connectDatabase(cluster.url, () => undefined, 4)
const log = { info: () => undefined, warn: () => undefined, error: () => undefined }
const seeding = createRealtime({ db, databaseUrl: cluster.url, auth: async () => null, trustedOrigins: [], log })
const shoot = await addShoot(db, seeding.documents)
await seeding.drain()
const fsync = (await pool.query<{ fsync: string }>('show fsync')).rows[0]?.fsync
const server = await startServerChild(cluster.url)

const writers = [shoot.people.photographer, shoot.people.stylist, shoot.people.client]
const madeAtMs = new Map<string, number>()
const peerMs: number[] = []
const ackMs: number[] = []
let isMeasuring = false
let edits = 0

const clients = await Promise.all(
  Array.from({ length: CLIENTS }, (_, i) => {
    const { sessionId } = writers[i % writers.length] ?? shoot.people.photographer
    return new TestClient({ url: server.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
  }),
)
clients.forEach((client, me) => {
  const sentAtMs: number[] = []
  client.onSaved = (n) => {
    for (let at = 0; at <= n; at++) {
      const sent = sentAtMs[at]
      if (sent !== undefined && isMeasuring) ackMs.push(performance.now() - sent)
      delete sentAtMs[at]
    }
  }
  client.items.observe((event) => {
    if (event.transaction.local) return
    for (const key of event.keysChanged) {
      const atMs = madeAtMs.get(`${key} ${String(client.items.get(key))}`)
      if (atMs !== undefined && isMeasuring) peerMs.push(performance.now() - atMs)
    }
  })
  const everyMs = 1000 / EDITS_PER_SECOND
  setTimeout(
    () => {
      let n = 0
      const timer = setInterval(() => {
        const value = `${me}.${n++}`
        madeAtMs.set(`item-${me} ${value}`, performance.now())
        if (isMeasuring) edits++
        const before = performance.now()
        client.items.set(`item-${me}`, value)
        sentAtMs[client.sent] = before
      }, everyMs)
      setTimeout(() => clearInterval(timer), WARM_UP_MS + MEASURED_MS)
    },
    (me / CLIENTS) * everyMs,
  )
})
await pause(WARM_UP_MS)
isMeasuring = true
await pause(MEASURED_MS)
isMeasuring = false
await until(
  () =>
    clients.every((client) => client.saved === client.sent) && new Set(clients.map((c) => contentOf(c.doc))).size === 1,
)

const result = {
  bench: 'realtime',
  clients: CLIENTS,
  documents: 1,
  editsPerSecond: EDITS_PER_SECOND,
  seconds: MEASURED_MS / 1000,
  fsync,
  edits,
  peerMs: percentiles(peerMs),
  ackMs: percentiles(ackMs),
}
process.stdout.write(`${JSON.stringify(result)}\n`)
clients.forEach((client) => client.vanish())
await server.kill('SIGTERM')
await pool.end()
await cluster.stop()

function percentiles(values: number[]) {
  const sorted = [...values].sort((a, b) => a - b)
  const at = (share: number) =>
    Math.round((sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? 0) * 10) / 10
  return { n: sorted.length, p50: at(0.5), p95: at(0.95), p99: at(0.99), max: at(1) }
}
