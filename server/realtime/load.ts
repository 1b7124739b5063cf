import { createHash } from 'node:crypto'
import type pg from 'pg'
import * as Y from 'yjs'
import type { DocId, UserId } from '#shared/ids.ts'
import { dropPending, examine, hasPending } from './guard.ts'

/** Origin of what comes from the log: it is there already and is not written again. */
export const LOG_ORIGIN = Object.freeze({ kind: 'log' as const })

/** Kind of the snapshots that stand for a beginning of the log; kept versions have another. */
export const COMPACT_KIND = 'compact'

const ROWS_AFTER = 'select seq, user_id, update from rt_update where doc_id = $1 and seq > $2 order by seq'

export type BadPiece = { reason: string; userId: UserId | null; update: Uint8Array }
export type Loaded = {
  doc: Y.Doc
  head: number
  epoch: number
  /** Why nobody may write, or null. */
  frozen: string | null
  sizeBytes: number
  bad: BadPiece[]
}

/** What the database has of a document, all of it at one moment. */
export type StoredLog = {
  epoch: number
  frozen: string | null
  /** Number of the last row there is, and of the last one that the newest snapshot stands for. */
  head: number
  snapshotSeq: number
  /** The newest sound snapshot, empty when there is none, and the number of the last row that is in it. */
  doc: Y.Doc
  baseSeq: number
  baseBytes: number
  /** Snapshots newer than that one, which are unsound. */
  bad: BadPiece[]
  /** The rows behind it, in order. */
  rows: UpdateRow[]
}

type UpdateRow = { seq: string; user_id: UserId | null; update: Uint8Array }

/**
 * Builds a document from its newest sound snapshot and the rows behind it; undefined when there is no such document.
 * Rows go in one by one inside one transaction: merging them first takes twice as long. What the guard refuses is
 * left out and reported: a bad row costs its own content, never the document.
 */
export async function loadDocument(pool: pg.Pool, docId: DocId): Promise<Loaded | undefined> {
  const log = await readLog(pool, docId)
  if (!log) return undefined
  const { doc, epoch, frozen, rows } = log
  return {
    doc,
    epoch,
    frozen,
    bad: [...log.bad, ...applyRows(doc, rows)],
    head: Number(rows.at(-1)?.seq ?? log.baseSeq),
    sizeBytes: rows.reduce((sum, row) => sum + row.update.length, log.baseBytes),
  }
}

/** Reads what `loadDocument` builds from, without building it; undefined when there is no such document. */
export async function readLog(pool: pg.Pool, docId: DocId): Promise<StoredLog | undefined> {
  const client = await pool.connect()
  let failure: Error | undefined
  try {
    // One view of the database, so that a compaction in between cannot take rows away.
    await client.query('begin isolation level repeatable read read only')
    const found = await client.query<{ epoch: number; frozen: string | null; head: string; snapshot_seq: string }>(
      'select epoch, frozen, head, snapshot_seq from rt_doc where id = $1',
      [docId],
    )
    const [row] = found.rows
    if (!row) {
      await client.query('commit')
      return undefined
    }
    const base = await readBase(client, docId)
    const { rows } = await client.query<UpdateRow>(ROWS_AFTER, [docId, base.baseSeq])
    await client.query('commit')
    const { epoch, frozen } = row
    return { epoch, frozen, head: Number(row.head), snapshotSeq: Number(row.snapshot_seq), ...base, rows }
  } catch (error) {
    failure = error instanceof Error ? error : new Error('not loaded')
    throw failure
  } finally {
    client.release(failure)
  }
}

type Base = Pick<StoredLog, 'doc' | 'baseSeq' | 'baseBytes' | 'bad'>

/** Goes back over the snapshots to one that is sound. One at a time: each may be as large as a document gets. */
async function readBase(client: pg.PoolClient, docId: DocId): Promise<Base> {
  const bad: BadPiece[] = []
  for (let before: string | null = null; ;) {
    const found: pg.QueryResult<{ seq: string; state: Uint8Array; sha256: Uint8Array }> = await client.query(
      `select seq, state, sha256 from rt_snapshot where doc_id = $1 and kind = $2 and ($3::bigint is null or seq < $3)
       order by seq desc limit 1`,
      [docId, COMPACT_KIND, before],
    )
    const [snapshot] = found.rows
    if (!snapshot) return { doc: new Y.Doc(), baseSeq: 0, baseBytes: 0, bad }
    const { seq, state, sha256 } = snapshot
    const isWhole = createHash('sha256').update(state).digest().equals(sha256)
    const doc = isWhole ? documentOf(state) : undefined
    if (doc) return { doc, baseSeq: Number(seq), baseBytes: state.length, bad }
    bad.push({ reason: `log snapshot ${seq}`, userId: null, update: state })
    before = seq
  }
}

/** The document that was encoded, when the guard takes it. */
export function documentOf(state: Uint8Array): Y.Doc | undefined {
  const doc = new Y.Doc()
  if (take(doc, state)) return doc
  doc.destroy()
  return undefined
}

/** Rows of the log behind `head`, in order. */
export async function rowsAfter(pool: pg.Pool, docId: DocId, head: number): Promise<UpdateRow[]> {
  const result = await pool.query<UpdateRow>(ROWS_AFTER, [docId, head])
  return result.rows
}

/** Applies rows of the log with `LOG_ORIGIN` and returns those that could not be. */
export function applyRows(doc: Y.Doc, rows: readonly UpdateRow[]): BadPiece[] {
  const refused: UpdateRow[] = []
  doc.transact(() => {
    for (const row of rows) if (!take(doc, row.update)) refused.push(row)
  }, LOG_ORIGIN)
  // Something refused may have built on what only came later.
  const bad = refused.filter((row) => !take(doc, row.update))
  return bad.map((row) => ({ reason: `log ${row.seq}`, userId: row.user_id, update: row.update }))
}

function take(doc: Y.Doc, update: Uint8Array): boolean {
  const exact = Uint8Array.from(update)
  if (examine(doc, exact).kind !== 'fits') return false
  try {
    Y.applyUpdate(doc, exact, LOG_ORIGIN)
  } catch {
    return false
  } finally {
    if (hasPending(doc)) dropPending(doc)
  }
  return true
}
