import { createHash } from 'node:crypto'
import type pg from 'pg'
import * as Y from 'yjs'
import type { DocId, UserId } from '#shared/ids.ts'
import { dropPending, examine, hasPending } from './guard.ts'

/** Origin of what comes from the log: it is there already and is not written again. */
export const LOG_ORIGIN = Object.freeze({ kind: 'log' as const })

/** Kind of the snapshots that stand for a beginning of the log; kept versions have another. */
export const COMPACT_KIND = 'compact'

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

type UpdateRow = { seq: string; user_id: UserId | null; update: Uint8Array }

/**
 * Builds a document from its newest sound snapshot and the rows behind it; undefined when there is no such document.
 * Rows go in one by one inside one transaction: merging them first takes twice as long. What the guard refuses is
 * left out and reported: a bad row costs its own content, never the document.
 */
export async function loadDocument(pool: pg.Pool, docId: DocId): Promise<Loaded | undefined> {
  const client = await pool.connect()
  let failure: Error | undefined
  try {
    // One view of the database, so that a compaction in between cannot take rows away.
    await client.query('begin isolation level repeatable read read only')
    const found = await client.query<Pick<Loaded, 'epoch' | 'frozen'>>(
      'select epoch, frozen from rt_doc where id = $1',
      [docId],
    )
    const [row] = found.rows
    if (!row) {
      await client.query('commit')
      return undefined
    }
    const loaded: Loaded = { ...row, ...(await readSnapshot(client, docId)) }
    const rows = await client.query<UpdateRow>(
      'select seq, user_id, update from rt_update where doc_id = $1 and seq > $2 order by seq',
      [docId, loaded.head],
    )
    await client.query('commit')
    loaded.bad.push(...applyRows(loaded.doc, rows.rows))
    loaded.sizeBytes += rows.rows.reduce((sum, row) => sum + row.update.length, 0)
    loaded.head = Number(rows.rows[rows.rows.length - 1]?.seq ?? loaded.head)
    return loaded
  } catch (error) {
    failure = error instanceof Error ? error : new Error('not loaded')
    throw failure
  } finally {
    client.release(failure)
  }
}

async function readSnapshot(client: pg.PoolClient, docId: DocId): Promise<Omit<Loaded, 'epoch' | 'frozen'>> {
  const snapshots = await client.query<{ seq: string; state: Uint8Array; sha256: Uint8Array }>(
    'select seq, state, sha256 from rt_snapshot where doc_id = $1 and kind = $2 order by seq desc limit 2',
    [docId, COMPACT_KIND],
  )
  const bad: BadPiece[] = []
  for (const { seq, state, sha256 } of snapshots.rows) {
    const doc = new Y.Doc()
    const isWhole = createHash('sha256').update(state).digest().equals(sha256)
    if (isWhole && take(doc, state)) return { doc, head: Number(seq), sizeBytes: state.length, bad }
    bad.push({ reason: `log snapshot ${seq}`, userId: null, update: state })
    doc.destroy()
  }
  return { doc: new Y.Doc(), head: 0, sizeBytes: 0, bad }
}

/** Rows of the log behind `head`, in order. */
export async function rowsAfter(pool: pg.Pool, docId: DocId, head: number): Promise<UpdateRow[]> {
  const result = await pool.query<UpdateRow>(
    'select seq, user_id, update from rt_update where doc_id = $1 and seq > $2 order by seq',
    [docId, head],
  )
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
