import type pg from 'pg'
import type { DocId } from '#shared/ids.ts'
import { type LogEntry, batchLength, rowsOf, touchesOf } from './batch.ts'
import { type Quantiles, Recent } from './recent.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'

/** Rows `first` to `last` of a document's log are this process's own and committed; `logRows` and `logBytes` are behind its newest snapshot. */
export type Committed = { docId: DocId; first: number; last: number; logRows: number; logBytes: number }

export type UpdateLogStats = {
  queuedEntries: number
  queuedBytes: number
  oldestMs: number
  commits: number
  rows: number
  failures: number
  /** Of the latest commits. */
  commitMs: Quantiles
}

export type UpdateLog = {
  enqueue(entry: LogEntry): void
  /** Resolves when all that is queued for the document now is committed; false when the document is gone. */
  settled(docId: DocId): Promise<boolean>
  queuedFor(docId: DocId): number
  /** Whether so much waits that writers are not read from. */
  isUnderPressure(): boolean
  stats(): UpdateLogStats
  /** Resolves when the queue is empty or the time is up; says which. */
  drained(deadlineMs: number): Promise<boolean>
  /** Ends the retrying; what is still queued is given up. */
  stop(): void
}

/**
 * One statement, one commit, for all that is queued: locks the documents in the order of their ids (two processes
 * would deadlock otherwise), hands out the next numbers under these locks, appends, and notes who touched what.
 * Documents that are gone drop out.
 */
const APPEND = `
  with locked as (
    select id from rt_doc where id = any($1::uuid[]) order by id for no key update
  ), grown as (
    update rt_doc d set head = d.head + g.n, log_rows = d.log_rows + g.n, log_bytes = d.log_bytes + g.bytes
    from unnest($1::uuid[], $2::int[], $3::bigint[]) as g(id, n, bytes), locked
    where d.id = g.id and locked.id = d.id
    returning d.id, d.head, g.n, d.log_rows, d.log_bytes
  ), appended as (
    insert into rt_update (doc_id, seq, user_id, update)
    select grown.id, grown.head - grown.n + r.place, r.user_id, r.update
    from unnest($4::uuid[], $5::int[], $6::text[], $7::bytea[]) as r(doc_id, place, user_id, update)
    join grown on grown.id = r.doc_id
  ), touched as (
    insert into rt_touch (doc_id, item, user_id, at)
    select t.doc_id, t.item, t.user_id, now()
    from unnest($8::uuid[], $9::text[], $10::text[]) as t(doc_id, item, user_id)
    join grown on grown.id = t.doc_id
    on conflict (doc_id, item, user_id) do update set at = excluded.at
  )
  select id, head, n, log_rows, log_bytes from grown`

type Grown = { id: DocId; head: string; n: number; log_rows: number; log_bytes: string }

/** The queue of a process and its one writer. `onCommitted` runs before the entries are settled. */
export function createUpdateLog(options: {
  pool: pg.Pool
  settings: RealtimeSettings
  log: RealtimeLog
  onCommitted: (committed: Committed) => void
  onPressure: (isUnderPressure: boolean) => void
  /** Called with every failed attempt after `stalledMs` without a commit. */
  onStalled: () => void
}): UpdateLog {
  const { pool, settings, log, onCommitted, onPressure, onStalled } = options
  const queue: LogEntry[] = []
  const perDoc = new Map<DocId, number>()
  const totals = { commits: 0, rows: 0, failures: 0 }
  const commitMs = new Recent(1_000)
  let queuedBytes = 0
  let isRunning = false
  let isStopped = false
  let pressure = false
  let failuresInARow = 0
  let wake: (() => void) | null = null
  let lastStartMs = -Infinity
  let onEmpty: (() => void)[] = []

  const oldestMs = () => (queue[0] ? Date.now() - queue[0].queuedAtMs : 0)

  function judgePressure(): void {
    const now = queuedBytes > settings.queueBytes || oldestMs() > settings.queueAgeMs
    if (now === pressure) return
    pressure = now
    log.warn(
      { queuedBytes, queuedEntries: queue.length, oldestMs: oldestMs() },
      now ? 'writers paused' : 'writers resumed',
    )
    onPressure(now)
  }

  async function write(batch: readonly LogEntry[]): Promise<Map<DocId, Grown>> {
    const rows = rowsOf(batch)
    // Only markers: what they wait for was committed by the batch before this one.
    if (rows.length === 0) return new Map()
    const docs = new Map<DocId, { n: number; bytes: number }>()
    const places = rows.map((row) => {
      const doc = docs.get(row.docId) ?? { n: 0, bytes: 0 }
      docs.set(row.docId, doc)
      doc.bytes += row.update.length
      return ++doc.n
    })
    const touches = touchesOf(batch)
    const startMs = performance.now()
    const result = await pool.query<Grown>({
      name: 'rt-append',
      text: APPEND,
      values: [
        [...docs.keys()],
        [...docs.values()].map((doc) => doc.n),
        [...docs.values()].map((doc) => doc.bytes),
        rows.map((row) => row.docId),
        places,
        rows.map((row) => row.userId),
        rows.map((row) => Buffer.from(row.update)),
        touches.map((t) => t.docId),
        touches.map((t) => t.item),
        touches.map((t) => t.userId),
      ],
    })
    commitMs.add(performance.now() - startMs)
    totals.commits++
    totals.rows += rows.length
    return new Map(result.rows.map((row) => [row.id, row]))
  }

  function settle(batch: readonly LogEntry[], grown: Map<DocId, Grown>): void {
    queue.splice(0, batch.length)
    for (const entry of batch) {
      queuedBytes -= entry.update?.length ?? 0
      const left = (perDoc.get(entry.docId) ?? 1) - 1
      if (left > 0) perDoc.set(entry.docId, left)
      else perDoc.delete(entry.docId)
    }
    for (const doc of grown.values()) {
      const [last, logBytes] = [Number(doc.head), Number(doc.log_bytes)]
      tell(() => onCommitted({ docId: doc.id, first: last - doc.n + 1, last, logRows: doc.log_rows, logBytes }))
    }
    for (const entry of batch) tell(() => entry.settle(entry.update === null || grown.has(entry.docId)))
  }

  /** One listener's fault must not stop the writer for everybody. */
  function tell(listener: () => void): void {
    try {
      listener()
    } catch (error) {
      log.error({ error: reasonOf(error) }, 'a listener to the log failed')
    }
  }

  async function run(): Promise<void> {
    if (isRunning) return
    isRunning = true
    // Everything that arrives in this turn of the event loop goes into the same commit.
    await Promise.resolve()
    while (queue.length > 0 && !isStopped) {
      await untilDue()
      const batch = queue.slice(0, batchLength(queue, settings.batchRows, settings.batchBytes))
      let grown: Map<DocId, Grown>
      try {
        grown = await write(batch)
      } catch (error) {
        // A commit of unknown outcome is written twice, which changes nothing: updates are idempotent.
        totals.failures++
        failuresInARow++
        log.error(
          { error: reasonOf(error), queuedEntries: queue.length, attempt: failuresInARow },
          'log not written, trying again',
        )
        judgePressure()
        if (oldestMs() > settings.stalledMs) onStalled()
        const backoffMs = Math.min(settings.retryMaxMs, settings.retryMinMs * 2 ** Math.min(failuresInARow - 1, 10))
        await pauseFor(backoffMs * (0.5 + Math.random() / 2))
        continue
      }
      if (failuresInARow > 0) log.info({ attempts: failuresInARow }, 'log is written again')
      failuresInARow = 0
      settle(batch, grown)
      judgePressure()
    }
    isRunning = false
    if (queue.length === 0) {
      for (const done of onEmpty) done()
      onEmpty = []
    }
  }

  /** The first change after quiet is written at once; under load commits keep a distance, and each carries more. */
  async function untilDue(): Promise<void> {
    const waitMs = lastStartMs + settings.commitGapMs - performance.now()
    if (waitMs > 0) await pauseFor(waitMs)
    lastStartMs = performance.now()
  }

  function pauseFor(ms: number): Promise<void> {
    return new Promise((resolve) => {
      const timer = setTimeout(resolve, ms)
      wake = () => {
        clearTimeout(timer)
        resolve()
      }
    })
  }

  function enqueue(entry: LogEntry): void {
    queue.push(entry)
    queuedBytes += entry.update?.length ?? 0
    perDoc.set(entry.docId, (perDoc.get(entry.docId) ?? 0) + 1)
    judgePressure()
    void run()
  }

  return {
    enqueue,
    settled: (docId) =>
      new Promise((resolve) => {
        enqueue({ docId, userId: null, update: null, items: [], queuedAtMs: Date.now(), settle: resolve })
      }),
    queuedFor: (docId) => perDoc.get(docId) ?? 0,
    isUnderPressure: () => pressure,
    stats: () => ({
      queuedEntries: queue.length,
      queuedBytes,
      oldestMs: oldestMs(),
      ...totals,
      commitMs: commitMs.percentiles(),
    }),
    drained: (deadlineMs) =>
      new Promise((resolve) => {
        if (queue.length === 0) return resolve(true)
        const timer = setTimeout(() => resolve(false), deadlineMs)
        onEmpty.push(() => {
          clearTimeout(timer)
          resolve(true)
        })
      }),
    stop: () => {
      isStopped = true
      wake?.()
    },
  }
}

/** What went wrong without what was in it. */
export function reasonOf(error: unknown): string {
  if (!(error instanceof Error)) return 'unknown'
  return 'code' in error && typeof error.code === 'string' ? `${error.name} ${error.code}` : error.name
}
