import type pg from 'pg'
import type { DocId, UserId } from '#shared/ids.ts'
import type { RealtimeLog } from './settings.ts'
import { reasonOf } from './update-log.ts'

/** Keeps a bad update out of the document and within reach of whoever looks into it. Never fails its caller. */
export async function quarantine(
  pool: pg.Pool,
  log: RealtimeLog,
  bad: { docId: DocId; userId: UserId | null; reason: string; update: Uint8Array },
): Promise<void> {
  try {
    // A row of the log is met again at every load and kept here once.
    await pool.query(
      `insert into rt_quarantine (doc_id, user_id, reason, update)
       select $1::uuid, $2, $3::text, $4 where exists (select from rt_doc where id = $1::uuid)
       and not ($3::text like 'log %' and exists (select from rt_quarantine where doc_id = $1::uuid and reason = $3::text))`,
      [bad.docId, bad.userId, bad.reason, Buffer.from(bad.update)],
    )
  } catch (error) {
    log.error(
      { docId: bad.docId, reason: bad.reason, bytes: bad.update.length, error: reasonOf(error) },
      'quarantine not written',
    )
  }
}
