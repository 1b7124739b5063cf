import { spawn } from 'node:child_process'
import { randomUUID } from 'node:crypto'
import { once } from 'node:events'
import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import type pg from 'pg'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { type DocId, type UserId, docIdSchema, userIdSchema } from '#shared/ids.ts'
import { putItems, readAll, removeItems } from '#shared/realtime/collection.ts'
import { notes, shots } from '#shared/realtime/documents.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { type Compaction, type CompactionStats, createCompaction } from '#server/realtime/compaction.ts'
import { COMPACT_KIND, LOG_ORIGIN, loadDocument } from '#server/realtime/load.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { DEFAULT_SETTINGS, type RealtimeSettings } from '#server/realtime/settings.ts'
import { until } from '#tests/realtime/support/client.ts'
import { type OpenedRoom, openRoom, quiet } from '#tests/realtime/support/opened-room.ts'
import { type LogLine, addShoot } from '#tests/realtime/support/world.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

const DAY_MS = 24 * 3_600_000
const IN_COMPACTION = "application_name = 'sconce-compaction' and datname = current_database()"

let database: TestDatabase
let db: Db
let pool: pg.Pool
let docId: DocId
const ada = userIdSchema.parse('ada')
const ben = userIdSchema.parse('ben')

beforeAll(async () => {
  database = await createTestDatabase()
  const connected = connectDatabase(database.url, () => undefined)
  db = connected.db
  pool = connected.pool
})
afterAll(async () => {
  await pool.end()
  await database.drop()
})

const compactions: Compaction[] = []
let lines: LogLine[]

beforeEach(async () => {
  lines = []
  const realtime = createRealtime({
    db,
    databaseUrl: database.url,
    auth: async () => null,
    trustedOrigins: [],
    log: quiet,
    limits: { warmUp: false },
  })
  const { shootId } = await addShoot(db, realtime.documents)
  await realtime.drain()
  const { rows } = await pool.query("select id from rt_doc where shoot_id = $1 and kind = 'board'", [shootId])
  docId = docIdSchema.parse(rows[0]?.id)
})
afterEach(async () => {
  await Promise.all(compactions.splice(0).map((compaction) => compaction.stop()))
})

type Process = OpenedRoom & { compaction: Compaction; compact: () => Promise<CompactionStats> }

/** A process with the document in memory. */
async function open(more: Partial<RealtimeSettings> = {}): Promise<Process> {
  const settings = { ...DEFAULT_SETTINGS, compactRows: 1, compactEveryMs: 0, ...more }
  const opened = await openRoom({ pool, docId, settings })
  const say = (level: LogLine['level']) => (details: object, message: string) =>
    void lines.push({ level, message, details })
  const compaction = createCompaction({
    pool,
    databaseUrl: database.url,
    updateLog: opened.updateLog,
    isAlone: () => true,
    settings,
    log: { info: say('info'), warn: say('warn'), error: say('error') },
  })
  compactions.push(compaction)
  return {
    ...opened,
    compaction,
    compact: async () => {
      compaction.consider(opened.room, { logRows: 1, logBytes: 1 })
      await until(() => !compaction.stats().running)
      return compaction.stats()
    },
  }
}

/** So many random edits and deletions, one row of the log each. */
async function edit(process: OpenedRoom, count: number, random: () => number, userId: UserId | null = ada) {
  const root = process.room.doc.getMap<unknown>('items')
  for (let i = 0; i < count; i++) {
    const id = `item-${Math.floor(random() * 12)}`
    await process.edit(userId, () => {
      const item = root.get(id)
      if (!(item instanceof Y.Map)) root.set(id, new Y.Map<unknown>([['box', [random(), 0]]]))
      else if (random() < 0.2) root.delete(id)
      else item.set(random() < 0.5 ? 'box' : 'text', [random()])
    })
  }
}

const items = (doc: Y.Doc) => doc.getMap('items').toJSON()

async function stored(): Promise<Record<string, unknown>> {
  const loaded = await loadDocument(pool, docId)
  if (!loaded) throw new Error('no document')
  return { ...items(loaded.doc) }
}

async function facts() {
  const { rows } = await pool.query<{
    head: number
    snapshot_seq: number
    log_rows: number
    log_bytes: number
    state_bytes: number
    seqs: number[] | null
    snapshots: number[] | null
  }>(
    `select head::int, snapshot_seq::int, log_rows, log_bytes::int, state_bytes::int,
       (select array_agg(seq::int order by seq) from rt_update where doc_id = id) as seqs,
       (select array_agg(seq::int order by seq) from rt_snapshot where doc_id = id and kind = $2) as snapshots
     from rt_doc where id = $1`,
    [docId, COMPACT_KIND],
  )
  const [row] = rows
  if (!row) throw new Error('no document')
  return { ...row, seqs: row.seqs ?? [], snapshots: row.snapshots ?? [] }
}

/** Holds the document's row as a commit to its log does, until let go. */
async function holdRow(): Promise<() => Promise<void>> {
  const client = await pool.connect()
  await client.query('begin')
  await client.query('select 1 from rt_doc where id = $1 for update', [docId])
  return async () => {
    await client.query('commit')
    client.release()
  }
}

/** Keeps snapshots from being put in, until let go. */
async function holdSnapshots(): Promise<() => Promise<void>> {
  const client = await pool.connect()
  await client.query('begin')
  await client.query('lock table rt_snapshot in share mode')
  return async () => {
    await client.query('commit')
    client.release()
  }
}

/** How many compactions wait to put their snapshot in, or for somebody to be done with the row (or with theirs). */
async function waiting(lock: 'relation' | 'row'): Promise<number> {
  const { rows } = await pool.query<{ n: number }>(
    `select count(*)::int as n from pg_stat_activity where ${IN_COMPACTION} and wait_event_type = 'Lock' and wait_event = any($1)`,
    [lock === 'row' ? ['transactionid', 'tuple'] : ['relation']],
  )
  return rows[0]?.n ?? 0
}

const age = (seq: number, ms: number) =>
  pool.query("update rt_snapshot set at = at - $3 * interval '1 millisecond' where doc_id = $1 and seq = $2", [
    docId,
    seq,
    ms,
  ])

describe('a compaction', () => {
  it('makes a snapshot that is the document, after 300 random edits and deletions of two people', async () => {
    const process = await open()
    const random = seededRandom(11)
    for (let round = 0; round < 10; round++) await edit(process, 30, random, round % 2 ? ada : ben)
    const before = await facts()
    expect(before).toMatchObject({ head: 301, snapshot_seq: 0, log_rows: 301 })
    expect(await process.compact()).toMatchObject({ compactions: 1, failedChecks: 0, failures: 0 })
    const after = await facts()
    expect(after).toMatchObject({ head: 301, snapshot_seq: 301, log_rows: 0, log_bytes: 0, snapshots: [301] })
    expect(process.room.sizeBytes).toBeLessThan(before.log_bytes / 3)
    expect(after.state_bytes).toBeLessThan(before.log_bytes / 3)
    expect(await stored()).toEqual(items(process.room.doc))
    expect((await loadDocument(pool, docId))?.sizeBytes).toBe(after.state_bytes)
    expect(lines.map(({ level, message }) => [level, message])).toEqual([['info', 'log compacted']])
  })

  it('is not begun below the bounds, and is by rows or by bytes', async () => {
    const process = await open({ compactRows: 10, compactBytes: 1_000 })
    await edit(process, 20, seededRandom(1))
    process.compaction.consider(process.room, { logRows: 9, logBytes: 999 })
    expect(process.compaction.stats().running).toBe(false)
    process.compaction.consider(process.room, { logRows: 10, logBytes: 1 })
    await until(() => process.compaction.stats().compactions === 1)
    await edit(process, 2, seededRandom(2))
    process.compaction.consider(process.room, { logRows: 1, logBytes: 1_000 })
    await until(() => process.compaction.stats().compactions === 2)
  })

  it('leaves the snapshot before it usable when the newest is damaged, and is then made again', async () => {
    const process = await open()
    const random = seededRandom(5)
    await edit(process, 40, random)
    await process.compact()
    await edit(process, 40, random)
    await process.compact()
    const { snapshots } = await facts()
    expect(snapshots).toEqual([41, 81])
    await pool.query("update rt_snapshot set sha256 = decode(repeat('00', 32), 'hex') where doc_id = $1 and seq = 81", [
      docId,
    ])
    const loaded = await loadDocument(pool, docId)
    expect(loaded?.bad.map((bad) => bad.reason)).toEqual(['log snapshot 81'])
    expect(await stored()).toEqual(items(process.room.doc))
    expect(await process.compact()).toMatchObject({ compactions: 3, failedChecks: 0 })
    expect((await loadDocument(pool, docId))?.bad).toEqual([])
    expect(await stored()).toEqual(items(process.room.doc))
  })

  it('keeps what is committed while it runs', async () => {
    const process = await open()
    const random = seededRandom(8)
    await edit(process, 50, random)
    const letGo = await holdRow()
    const compacted = process.compact()
    await until(async () => (await waiting('row')) === 1)
    const edits = edit(process, 30, random)
    await letGo()
    await Promise.all([compacted, edits])
    expect(process.compaction.stats()).toMatchObject({ compactions: 1, failedChecks: 0 })
    const { head, snapshot_seq, log_rows, seqs } = await facts()
    expect([head, snapshot_seq]).toEqual([81, 51])
    expect(log_rows).toBe(seqs.filter((seq) => seq > 51).length)
    expect(log_rows).toBe(30)
    expect(await stored()).toEqual(items(process.room.doc))
  })

  it('waits for what memory holds and the log does not yet', async () => {
    const here = await open()
    await edit(here, 20, seededRandom(6))
    await here.compact()
    await edit(here, 1, seededRandom(7))
    const there = await open()
    const letGo = await holdRow()
    const edits = edit(here, 1, seededRandom(9))
    const compacted = here.compact()
    // By the time that this one has read the log, the other would have, had it not waited.
    const other = there.compact()
    await until(async () => (await waiting('row')) === 1)
    await letGo()
    await Promise.all([edits, compacted, other])
    expect(here.compaction.stats()).toMatchObject({ failedChecks: 0, failures: 0 })
    expect(await stored()).toEqual(items(here.room.doc))
  })

  it('checks a document that never rests, and one that another process writes to as well', async () => {
    const [here, there] = [await open(), await open()]
    let isOver = false
    const busy = [here, there].map(async (process, i) => {
      for (let seed = i; !isOver; seed += 2) await edit(process, 5, seededRandom(seed))
    })
    for (let round = 0; round < 5; round++) {
      await here.compact()
      await there.room.catchUp()
    }
    isOver = true
    await Promise.all(busy)
    const { compactions, failedChecks, failures } = here.compaction.stats()
    expect({ failedChecks, failures }).toEqual({ failedChecks: 0, failures: 0 })
    expect(compactions).toBeGreaterThan(0)
    await Promise.all([here.room.catchUp(), there.room.catchUp()])
    expect(await stored()).toEqual(items(here.room.doc))
    expect(items(there.room.doc)).toEqual(items(here.room.doc))
  })

  it('replaces nothing when memory holds something else than the log, says so, and does not try on and on', async () => {
    const process = await open()
    await edit(process, 30, seededRandom(4))
    const before = await facts()
    // What comes from the log is not written to it again.
    process.room.doc.transact(() => process.room.doc.getMap('items').set('astray', 1), LOG_ORIGIN)
    expect(await process.compact()).toMatchObject({ compactions: 0, failedChecks: 1, failures: 0 })
    expect(lines).toMatchObject([{ level: 'error', details: { docId, why: 'live: clocks', unreadable: 0 } }])
    expect(await facts()).toEqual(before)
    expect(await process.compact()).toMatchObject({ failedChecks: 1, running: false })
    expect(lines).toHaveLength(1)
  })

  it('replaces nothing when memory lacks something that is in the log', async () => {
    const process = await open()
    await edit(process, 10, seededRandom(4))
    const other = await open()
    await edit(other, 1, seededRandom(40))
    // It believes to have read the row of the other process.
    process.room.head = (await facts()).head
    expect(await process.compact()).toMatchObject({ compactions: 0, failedChecks: 1 })
    expect((await facts()).snapshots).toEqual([])
  })

  it('replaces nothing when rows are missing from the log', async () => {
    const process = await open()
    await edit(process, 10, seededRandom(4))
    await pool.query('delete from rt_update where doc_id = $1 and seq = 5', [docId])
    expect(await process.compact()).toMatchObject({ compactions: 0, failedChecks: 1 })
    expect(lines).toMatchObject([{ level: 'error', details: { why: 'rows are missing' } }])
  })

  it('leaves a document whose epoch is another, and one that is gone', async () => {
    const process = await open()
    await edit(process, 10, seededRandom(4))
    await pool.query('update rt_doc set epoch = epoch + 1 where id = $1', [docId])
    expect(await process.compact()).toMatchObject({ compactions: 0, failedChecks: 0, failures: 0 })
    await pool.query('delete from rt_doc where id = $1', [docId])
    expect(await process.compact()).toMatchObject({ compactions: 0, failedChecks: 0, failures: 0 })
    expect(lines).toEqual([])
  })

  it('keeps who touched what beyond the rows', async () => {
    const process = await open({ keepReplacedMs: 0 })
    await process.edit(ada, () => process.room.doc.getMap('items').set('a', 1))
    await process.edit(ben, () => process.room.doc.getMap('items').set('a', 2))
    await process.compact()
    await process.edit(ben, () => process.room.doc.getMap('items').set('b', 3))
    await process.compact()
    await age((await facts()).snapshot_seq, DAY_MS)
    await process.edit(ben, () => process.room.doc.getMap('items').set('c', 3))
    await process.compact()
    expect((await facts()).seqs.length).toBeLessThan(2)
    const { rows } = await pool.query('select item, user_id from rt_touch where doc_id = $1 order by item, user_id', [
      docId,
    ])
    expect(rows).toEqual([
      { item: 'a', user_id: 'ada' },
      { item: 'a', user_id: 'ben' },
      { item: 'b', user_id: 'ben' },
      { item: 'c', user_id: 'ben' },
    ])
  })
})

describe('two processes that compact one document at once', () => {
  it('make one snapshot, lose nothing, and none complains', async () => {
    const here = await open()
    await edit(here, 60, seededRandom(9))
    const there = await open()
    const letGo = await holdRow()
    const both = [here.compact(), there.compact()]
    await until(async () => (await waiting('row')) === 2)
    await letGo()
    const stats = await Promise.all(both)
    expect(stats.reduce((sum, { compactions }) => sum + compactions, 0)).toBe(1)
    expect(stats.map(({ failedChecks, failures }) => failedChecks + failures)).toEqual([0, 0])
    expect((await facts()).snapshots).toEqual([61])
    expect(await stored()).toEqual(items(here.room.doc))
    expect(lines.map(({ level }) => level)).toEqual(['info'])
  })

  it('do so too when one of them has read more than the other', async () => {
    const here = await open()
    await edit(here, 40, seededRandom(9))
    const there = await open()
    const letGo = await holdSnapshots()
    const first = there.compact()
    await until(async () => (await waiting('relation')) === 1)
    await edit(here, 1, seededRandom(10))
    const second = here.compact()
    await until(async () => (await waiting('relation')) === 2)
    await letGo()
    const stats = await Promise.all([first, second])
    expect(stats.reduce((sum, { compactions }) => sum + compactions, 0)).toBe(1)
    expect(stats.map(({ failedChecks, failures }) => failedChecks + failures)).toEqual([0, 0])
    const { head, snapshot_seq, log_rows, snapshots } = await facts()
    expect([head, snapshots]).toEqual([42, [snapshot_seq]])
    expect(log_rows).toBe(42 - snapshot_seq)
    expect(await stored()).toEqual(items(here.room.doc))
  })

  it('leave it to the one that knows more of the document', async () => {
    const [here, there] = [await open(), await open()]
    await edit(here, 40, seededRandom(9))
    await here.compact()
    await edit(here, 5, seededRandom(10))
    expect(await there.compact()).toMatchObject({ compactions: 0, failedChecks: 0, failures: 0 })
    expect(await facts()).toMatchObject({ snapshots: [41], log_rows: 5 })
    expect(await stored()).toEqual(items(here.room.doc))
  })
})

describe('what a snapshot has replaced', () => {
  it('stays for seven days, then goes up to the newest snapshot that is older', async () => {
    const process = await open()
    const random = seededRandom(2)
    const round = async () => {
      await edit(process, 10, random)
      await process.compact()
      expect(await stored()).toEqual(items(process.room.doc))
      return facts()
    }
    expect(await round()).toMatchObject({ snapshots: [11] })
    expect(await round()).toMatchObject({ snapshots: [11, 21] })
    // The first one is the base to come, and everything is there to do without any of them.
    const third = await round()
    expect(third.snapshots).toEqual([11, 31])
    expect(third.seqs).toEqual(Array.from({ length: 31 }, (_, i) => i + 1))
    await age(11, 8 * DAY_MS)
    const fourth = await round()
    expect(fourth.snapshots).toEqual([11, 31, 41])
    expect(fourth.seqs).toEqual(Array.from({ length: 30 }, (_, i) => i + 12))
    const fifth = await round()
    expect(fifth.snapshots).toEqual([11, 31, 51])
    await age(31, 8 * DAY_MS)
    const sixth = await round()
    expect(sixth.snapshots).toEqual([31, 51, 61])
    expect(sixth.seqs).toEqual(Array.from({ length: 30 }, (_, i) => i + 32))
    expect(process.compaction.stats()).toMatchObject({ compactions: 6, failedChecks: 0, failures: 0 })
  })

  it('is not trusted to a snapshot that is damaged', async () => {
    const process = await open()
    await edit(process, 10, seededRandom(2))
    await process.compact()
    await age(11, 8 * DAY_MS)
    await pool.query("update rt_snapshot set state = '\\x0000' where doc_id = $1", [docId])
    await edit(process, 10, seededRandom(3))
    await process.compact()
    const { seqs, snapshots } = await facts()
    expect(snapshots).toEqual([21])
    expect(seqs).toEqual(Array.from({ length: 21 }, (_, i) => i + 1))
    expect(await stored()).toEqual(items(process.room.doc))
  })

  it('leaves kept versions and other documents alone', async () => {
    const process = await open({ keepReplacedMs: 0 })
    await pool.query(
      "insert into rt_snapshot (doc_id, seq, kind, state, sha256, at) values ($1, 1, 'version', '\\x0000', '\\x00', now() - interval '1 year')",
      [docId],
    )
    const others = async () =>
      (await pool.query('select doc_id, seq from rt_update where doc_id <> $1 order by 1, 2', [docId])).rows
    const before = await others()
    for (let i = 0; i < 3; i++) {
      await edit(process, 5, seededRandom(i))
      await process.compact()
    }
    const { rows } = await pool.query("select seq from rt_snapshot where doc_id = $1 and kind = 'version'", [docId])
    expect(rows).toHaveLength(1)
    expect(await others()).toEqual(before)
    expect(before.length).toBeGreaterThan(0)
  })

  it('undoes a bad snapshot in the way that is written down', async () => {
    const process = await open()
    await edit(process, 20, seededRandom(2))
    await process.compact()
    await edit(process, 20, seededRandom(3))
    await process.compact()
    const text = readFileSync(new URL('../../../server/realtime/compaction.ts', import.meta.url), 'utf8')
    const procedure = /begin;[^]*?commit;/.exec(text)?.[0].replace(/^ \* {0,5}/gm, '') ?? ''
    await pool.query(procedure.replaceAll(':id', `'${docId}'`).replaceAll(':seq', '41'))
    const { snapshots, snapshot_seq, log_rows, seqs } = await facts()
    expect([snapshots, snapshot_seq, log_rows]).toEqual([[21], 21, 20])
    expect(seqs).toHaveLength(41)
    expect(await stored()).toEqual(items(process.room.doc))
    expect(await process.compact()).toMatchObject({ compactions: 3, failedChecks: 0 })
  })
})

describe('beforeUnload', () => {
  it('takes out what was deleted 30 days ago, shortens long keys, writes both to the log, and compacts', async () => {
    const process = await open({ compactIdleRows: 3 })
    const id = () => randomUUID()
    const [old, young] = [id(), id()]
    const note = (noteId: string) => ({ id: noteId, box: [0, 0, 90, 90] as [number, number, number, number] })
    const shot = (title: string, key: string) => ({ id: id(), title, place: ['loose', key] as [string, string] })
    const { doc } = process.room
    await process.edit(ada, () => {
      putItems(doc, notes, [note(old), note(young)], Math.random)
      removeItems(doc, notes, [old], Date.now() - 31 * DAY_MS)
      removeItems(doc, notes, [young], Date.now() - DAY_MS)
      putItems(doc, shots, [shot('second', `a1${'V'.repeat(80)}`), shot('first', 'a1')], Math.random)
    })
    await process.compaction.beforeUnload(process.room)
    expect(process.compaction.stats()).toMatchObject({ compactions: 1, failedChecks: 0 })
    const loaded = await loadDocument(pool, docId)
    if (!loaded) throw new Error('no document')
    expect([...loaded.doc.getMap('notes').keys()]).toEqual([young])
    const places = [...readAll(loaded.doc, shots).items.values()].sort((a, b) => (a.place[1] < b.place[1] ? -1 : 1))
    expect(places.map(({ title }) => title)).toEqual(['first', 'second'])
    expect(Math.max(...places.map(({ place }) => place[1].length))).toBeLessThan(64)
    const { rows } = await pool.query('select user_id from rt_update where doc_id = $1 order by seq', [docId])
    expect(rows.map((row) => row.user_id)).toEqual([null, 'ada', null])
    expect(await facts()).toMatchObject({ snapshot_seq: 3, log_rows: 0 })
  })

  it('leaves a short log, writes nothing when there is nothing to tidy, and not into a frozen document', async () => {
    const process = await open()
    await edit(process, 18, seededRandom(2))
    await process.compaction.beforeUnload(process.room)
    expect(await facts()).toMatchObject({ head: 19, snapshots: [] })
    const doc = process.room.doc
    await process.edit(ada, () => {
      putItems(doc, notes, [{ id: randomUUID(), box: [0, 0, 90, 90] }], Math.random)
      removeItems(doc, notes, [...doc.getMap('notes').keys()], Date.now() - 31 * DAY_MS)
    })
    process.room.freeze('quota')
    await process.compaction.beforeUnload(process.room)
    expect(await facts()).toMatchObject({ head: 20, snapshots: [20] })
    expect(doc.getMap('notes').size).toBe(1)
  })

  it('does not reject when the database refuses', async () => {
    const process = await open()
    await pool.query('alter table rt_snapshot rename to rt_elsewhere')
    await edit(process, 30, seededRandom(2))
    await process.compaction.beforeUnload(process.room)
    await pool.query('alter table rt_elsewhere rename to rt_snapshot')
    expect(process.compaction.stats()).toMatchObject({ compactions: 0, failures: 1, running: false })
    expect(lines).toMatchObject([{ level: 'warn', details: { docId } }])
    expect(await facts()).toMatchObject({ log_rows: 31, snapshots: [] })
  })
})

describe('stop', () => {
  it('ends a compaction that is under way without a trace, and lets go of who waits for it', async () => {
    const process = await open()
    await edit(process, 30, seededRandom(2))
    const letGo = await holdRow()
    const unloading = process.compaction.beforeUnload(process.room)
    await until(async () => (await waiting('row')) === 1)
    await process.compaction.stop()
    await unloading
    await letGo()
    await until(async () => {
      const { rows } = await pool.query(`select 1 from pg_stat_activity where ${IN_COMPACTION}`)
      return rows.length === 0
    })
    expect(await facts()).toMatchObject({ log_rows: 31, snapshots: [] })
    expect(await process.compact()).toMatchObject({ compactions: 0, failures: 0, running: false })
  })
})

describe('a process that is killed', () => {
  const entry = fileURLToPath(new URL('../../realtime/support/compacting-process.ts', import.meta.url))

  function start() {
    const child = spawn(process.execPath, ['--import', 'tsx', entry], {
      cwd: fileURLToPath(new URL('../../..', import.meta.url)),
      env: { PATH: process.env['PATH'], HOME: process.env['HOME'], DATABASE_URL: database.url, DOC_ID: docId },
      stdio: ['ignore', 'pipe', 'inherit'],
    })
    let said = ''
    child.stdout.setEncoding('utf8').on('data', (text: string) => (said += text))
    return {
      /** The last number it has told of with this word, or -1. */
      last: (word: string) =>
        Math.max(-1, ...[...said.matchAll(new RegExp(`${word} (\\d+)`, 'g'))].map(([, n]) => Number(n))),
      kill: async () => {
        const exited = once(child, 'exit')
        child.kill('SIGKILL')
        await exited
      },
    }
  }

  async function checkStored(count: number): Promise<void> {
    const loaded = await loadDocument(pool, docId)
    const map = loaded?.doc.getMap<number>('stored')
    expect(loaded?.bad).toEqual([])
    for (let n = 0; n < count; n++) expect([n, -1]).toContain(map?.get(`${n}`))
    const { snapshot_seq, log_rows, seqs, snapshots } = await facts()
    expect(snapshots.at(-1) ?? 0).toBe(snapshot_seq)
    expect(seqs.filter((seq) => seq > snapshot_seq)).toHaveLength(log_rows)
  }

  it('in the middle of a compaction loses nothing, and the next one compacts', { timeout: 60_000 }, async () => {
    const letSnapshotsIn = await holdSnapshots()
    const first = start()
    await until(async () => (await waiting('relation')) === 1, 30_000)
    // Now it edits no more: the row can be held without stopping it before it compacts.
    const letGoOfRow = await holdRow()
    await letSnapshotsIn()
    await until(async () => (await waiting('row')) === 1)
    await first.kill()
    await letGoOfRow()
    await checkStored(first.last('stored') + 1)
    expect(await facts()).toMatchObject({ log_rows: 11, snapshots: [] })

    const second = start()
    await until(() => second.last('compacted') >= 2, 30_000)
    await second.kill()
    await checkStored(second.last('stored') + 1)
  })

  it('at any moment loses nothing', { timeout: 120_000 }, async () => {
    let compacted = 0
    for (let round = 0; round < 5; round++) {
      const child = start()
      await until(() => child.last('compacted') >= 1, 30_000)
      const from = child.last('stored')
      await until(() => child.last('stored') >= from + round * 3)
      await child.kill()
      compacted += child.last('compacted')
      await checkStored(child.last('stored') + 1)
    }
    expect(compacted).toBeGreaterThanOrEqual(5)
  })
})
