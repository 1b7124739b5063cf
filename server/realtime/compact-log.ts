import { createHash } from 'node:crypto'
import type pg from 'pg'
import * as Y from 'yjs'
import type { DocId } from '#shared/ids.ts'
import { type Difference, differenceOf } from './difference.ts'
import { COMPACT_KIND, type StoredLog, applyRows, documentOf, readLog } from './load.ts'

/**
 * What to compact. `live` is the document as people have it, encoded when it held the log up to `head`; whatever else
 * it held then must be in the log by now.
 */
export type CompactJob = { docId: DocId; epoch: number; live: { head: number; state: Uint8Array } }

/**
 * `left`: nothing to do, or somebody else has done it. `unequal`: a snapshot would not have been the document that
 * people have; the log is as it was.
 */
export type Compacted =
  | { kind: 'compacted'; seq: number; rows: number; sizeBytes: number; trimmed: number }
  | { kind: 'left' }
  | { kind: 'unequal'; why: Fault; unreadable: number }

type Fault = 'rows are missing' | 'not encodable' | 'live document not readable' | `${'copy' | 'live'}: ${Difference}`

/** A snapshot that may not replace what it was made from. */
class Unequal extends Error {
  readonly fault: Fault
  constructor(fault: Fault) {
    super(fault)
    this.fault = fault
  }
}

/**
 * Replaces the log of a document by a snapshot, when that snapshot is shown to be the same document, and then deletes
 * what nothing needs any more. Work for the processor; not for the thread that serves people.
 */
export async function compactLog(pool: pg.Pool, job: CompactJob, keepReplacedMs: number): Promise<Compacted> {
  const log = await readLog(pool, job.docId)
  const isOvertaken = !log || log.epoch !== job.epoch || log.snapshotSeq > job.live.head || log.rows.length === 0
  if (isOvertaken) return { kind: 'left' }
  const unreadable = [...log.bad, ...applyRows(log.doc, log.rows)].length
  let state: Uint8Array
  try {
    state = soundStateOf(log, job.live)
  } catch (error) {
    if (error instanceof Unequal) return { kind: 'unequal', why: error.fault, unreadable }
    throw error
  }
  if (!(await replaceLog(pool, job.docId, log, state))) return { kind: 'left' }
  const trimmed = await trimLog(pool, job.docId, keepReplacedMs)
  return { kind: 'compacted', seq: log.head, rows: log.rows.length, sizeBytes: state.length, trimmed }
}

/**
 * The encoded state of what was built from the log: complete, the same when decoded as loading decodes it, and the
 * same as the live document brought forward by the rows behind its head. The latter is exact however busy the document
 * is: the live state is in the log, so the rows it lacks are behind its head, and rows it has twice change nothing.
 */
function soundStateOf({ doc, baseSeq, head, rows }: StoredLog, live: CompactJob['live']): Uint8Array {
  if (rows.length !== head - baseSeq) throw new Unequal('rows are missing')
  const state = Y.encodeStateAsUpdate(doc)
  const copy = documentOf(state)
  if (!copy) throw new Unequal('not encodable')
  const copyDiffers = differenceOf(doc, copy)
  if (copyDiffers) throw new Unequal(`copy: ${copyDiffers}`)
  copy.destroy()
  const forward = documentOf(live.state)
  if (!forward) throw new Unequal('live document not readable')
  const behind = rows.filter((row) => Number(row.seq) > live.head)
  applyRows(forward, behind)
  const liveDiffers = differenceOf(doc, forward)
  if (liveDiffers) throw new Unequal(`live: ${liveDiffers}`)
  return state
}

/**
 * Puts the snapshot in, unless somebody else was faster; says whether. The large insert comes before the lock, so that
 * the log waits as short as possible. The lock is the weaker of the two that keep other writers of the row away: two
 * compactions both hold the key of the row by then, and the stronger one would have them wait for each other.
 */
async function replaceLog(pool: pg.Pool, docId: DocId, log: StoredLog, state: Uint8Array): Promise<boolean> {
  const client = await pool.connect()
  let failure: Error | undefined
  try {
    await client.query('begin')
    // There is one of this number already when it was found to be damaged.
    await client.query(
      `insert into rt_snapshot (doc_id, seq, kind, state, sha256) values ($1, $2, $3, $4, $5)
       on conflict (doc_id, seq, kind) do update set state = excluded.state, sha256 = excluded.sha256, at = excluded.at`,
      [docId, log.head, COMPACT_KIND, Buffer.from(state), createHash('sha256').update(state).digest()],
    )
    const { rows } = await client.query<{ epoch: number; snapshot_seq: string }>(
      'select epoch, snapshot_seq from rt_doc where id = $1 for no key update',
      [docId],
    )
    const [row] = rows
    if (row?.epoch !== log.epoch || Number(row.snapshot_seq) !== log.snapshotSeq) {
      await client.query('rollback')
      return false
    }
    await client.query(
      `update rt_doc set snapshot_seq = $2, state_bytes = $3, log_rows = behind.rows, log_bytes = behind.bytes
       from (select count(*) as rows, coalesce(sum(octet_length(update)), 0) as bytes
             from rt_update where doc_id = $1 and seq > $2) behind
       where id = $1`,
      [docId, log.head, state.length],
    )
    await client.query('commit')
    return true
  } catch (error) {
    failure = error instanceof Error ? error : new Error('not replaced')
    throw failure
  } finally {
    client.release(failure)
  }
}

const TRIM_ROWS = 10_000

/**
 * Deletes what is no longer needed to undo a bad snapshot, and returns how many rows went. Three snapshots stay: the
 * newest; the base, which is the newest one older than `keepReplacedMs`, with all rows behind it; and the first one
 * behind the base, which is the base to come (without it a document compacted every day would never get another base).
 * Without a base the rows begin with the first and all of them stay. Only snapshots whose sum is right count. Other
 * kinds of snapshots and rows that no base stands for are never touched.
 */
async function trimLog(pool: pg.Pool, docId: DocId, keepReplacedMs: number): Promise<number> {
  const { rows } = await pool.query<{ seq: string }>(
    `with sound as materialized (
       select seq, at from rt_snapshot where doc_id = $1 and kind = $2 and sha256(state) = sha256
     ), base as (
       select coalesce(max(seq), 0) as seq from sound where at < now() - $3 * interval '1 millisecond'
     ), kept as (
       select max(sound.seq) as seq from sound
       union select seq from base
       union select min(sound.seq) from sound, base where sound.seq > base.seq
     ), dropped as (
       delete from rt_snapshot where doc_id = $1 and kind = $2 and seq not in (select seq from kept where seq is not null)
     )
     select seq from base`,
    [docId, COMPACT_KIND, keepReplacedMs],
  )
  const baseSeq = rows[0]?.seq ?? '0'
  let trimmed = 0
  for (let last = TRIM_ROWS; last === TRIM_ROWS; trimmed += last) {
    const deleted = await pool.query(
      `delete from rt_update where doc_id = $1 and seq in
         (select seq from rt_update where doc_id = $1 and seq <= $2 order by seq limit $3)`,
      [docId, baseSeq, TRIM_ROWS],
    )
    last = deleted.rowCount ?? 0
  }
  return trimmed
}
