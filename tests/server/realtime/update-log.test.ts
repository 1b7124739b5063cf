import { randomUUID } from 'node:crypto'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { type DocId, docIdSchema, userIdSchema } from '#shared/ids.ts'
import { connectDatabase } from '#server/db/client.ts'
import { DEFAULT_SETTINGS } from '#server/realtime/settings.ts'
import { type Committed, createUpdateLog } from '#server/realtime/update-log.ts'
import { pause } from '#tests/realtime/support/client.ts'
import { addShoot } from '#tests/realtime/support/world.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let pool: pg.Pool
let docIds: DocId[]
const ada = userIdSchema.parse('ada')
const quiet = { info: () => undefined, warn: () => undefined, error: () => undefined }

beforeAll(async () => {
  database = await createTestDatabase()
  const connected = connectDatabase(database.url, () => undefined)
  pool = connected.pool
  const realtime = createRealtime({
    db: connected.db,
    databaseUrl: database.url,
    auth: async () => null,
    trustedOrigins: [],
    log: quiet,
  })
  await addShoot(connected.db, realtime.documents)
  await realtime.drain()
  const { rows } = await pool.query<{ id: string }>('select id from rt_doc')
  docIds = rows.map((row) => docIdSchema.parse(row.id))
})
afterAll(async () => {
  await pool.end()
  await database.drop()
})

function startLog(
  more: {
    onCommitted?: (committed: Committed) => void
    onPressure?: (is: boolean) => void
    settings?: object
    pool?: pg.Pool
  } = {},
) {
  return createUpdateLog({
    pool: more.pool ?? pool,
    settings: { ...DEFAULT_SETTINGS, retryMinMs: 5, retryMaxMs: 20, ...more.settings },
    log: quiet,
    onCommitted: more.onCommitted ?? (() => undefined),
    onPressure: more.onPressure ?? (() => undefined),
    onStalled: () => undefined,
  })
}

function edit(key: string): Uint8Array {
  const doc = new Y.Doc()
  doc.getMap('m').set(key, 1)
  return Y.encodeStateAsUpdate(doc)
}

const entry = (docId: DocId, update: Uint8Array | null, settle: (stored: boolean) => void) => ({
  docId,
  userId: ada,
  update,
  items: ['item'],
  queuedAtMs: Date.now(),
  settle,
})

describe('createUpdateLog', () => {
  it('numbers without gaps in the order of commits while two processes write the same documents', async () => {
    const committed: Committed[] = []
    const logs = [
      startLog({ onCommitted: (c) => committed.push(c) }),
      startLog({ onCommitted: (c) => committed.push(c) }),
    ]
    const settled: Promise<boolean>[] = []
    for (let i = 0; i < 300; i++) {
      const log = logs[i % 2]
      // Not in the order of ids: without sorted locks this is where two processes wait for each other.
      for (const docId of i % 2 ? docIds : [...docIds].reverse()) {
        settled.push(new Promise((resolve) => log?.enqueue(entry(docId, edit(`${i}`), resolve))))
      }
      if (i % 20 === 0) await pause(1)
    }
    expect((await Promise.all(settled)).every(Boolean)).toBe(true)
    for (const docId of docIds) {
      const { rows } = await pool.query<{ seq: string }>('select seq from rt_update where doc_id = $1 order by seq', [
        docId,
      ])
      expect(rows.map((row) => Number(row.seq))).toEqual(rows.map((_, i) => i + 1))
      const mine = committed.filter((c) => c.docId === docId).sort((a, b) => a.first - b.first)
      expect(mine[0]?.first).toBe(2)
      mine.slice(1).forEach((c, i) => expect(c.first).toBe((mine[i]?.last ?? 0) + 1))
      expect(mine[mine.length - 1]?.last).toBe(rows.length)
    }
    expect(logs.every((log) => log.stats().failures === 0)).toBe(true)
  })

  it('settles a marker after what was queued before it, and tells who writes to a document that is gone', async () => {
    const log = startLog()
    const order: string[] = []
    const [docId] = docIds
    if (!docId) throw new Error('no document')
    log.enqueue(entry(docId, edit('a'), (stored) => order.push(`a ${stored}`)))
    log.enqueue(entry(docIdSchema.parse(randomUUID()), edit('b'), (stored) => order.push(`b ${stored}`)))
    log.enqueue(entry(docId, null, (stored) => order.push(`marker ${stored}`)))
    expect(order).toEqual([])
    await log.settled(docId)
    expect(order).toEqual(['a true', 'b false', 'marker true'])
    expect(log.queuedFor(docId)).toBe(0)
  })

  it('keeps what could not be written, says when too much waits, and writes it in the end', async () => {
    const pressures: boolean[] = []
    let isDown = true
    const flaky = new pg.Pool({ connectionString: database.url, max: 1 })
    const real = flaky.query.bind(flaky)
    // The database itself refuses: a name that is not there.
    const [docId] = docIds
    if (!docId) throw new Error('no document')
    const failing = Object.create(flaky) as pg.Pool
    Object.defineProperty(failing, 'query', {
      value: (query: pg.QueryConfig) => (isDown ? real('select * from not_there') : real(query)),
    })
    const log = startLog({ pool: failing, onPressure: (is) => pressures.push(is), settings: { queueBytes: 500 } })
    const settled = Array.from(
      { length: 20 },
      (_, i) => new Promise((resolve) => log.enqueue(entry(docId, edit(`${i}`.padEnd(40)), resolve))),
    )
    await pause(60)
    expect(log.isUnderPressure()).toBe(true)
    expect(log.stats()).toMatchObject({ queuedEntries: 20 })
    expect(await log.drained(10)).toBe(false)
    isDown = false
    expect(await Promise.all(settled)).toEqual(settled.map(() => true))
    expect(pressures).toEqual([true, false])
    expect(await log.drained(10)).toBe(true)
    await flaky.end()
  })

  it('takes a touched item with any characters and goes on', async () => {
    const log = startLog()
    const [docId] = docIds
    if (!docId) throw new Error('no document')
    await new Promise((resolve) => log.enqueue({ ...entry(docId, edit('t'), resolve), items: ['x"{},\\', 'ü'] }))
    const { rows } = await pool.query('select item from rt_touch where doc_id = $1 and item in ($2, $3)', [
      docId,
      'x"{},\\',
      'ü',
    ])
    expect(rows).toHaveLength(2)
  })
})
