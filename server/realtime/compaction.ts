import { setImmediate, setTimeout as pause } from 'node:timers/promises'
import type pg from 'pg'
import * as Y from 'yjs'
import type { DocId } from '#shared/ids.ts'
import { purgeDeleted, shortenKeys } from '#shared/realtime/tidy.ts'
import { createCompactThread } from './compact-thread.ts'
import type { Room } from './room.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import { type Committed, type UpdateLog, reasonOf } from './update-log.ts'

/** What of a room is used. */
export type CompactedRoom = Pick<
  Room,
  'place' | 'doc' | 'epoch' | 'head' | 'frozen' | 'isBroken' | 'peers' | 'sizeBytes' | 'change'
>

export type Compaction = {
  /** To be told of every commit to a document in memory; looks whether its log is long by now. */
  consider(room: CompactedRoom, committed: Pick<Committed, 'logRows' | 'logBytes'>): void
  /**
   * For a room with nobody in it that is about to be put away: takes out what was deleted long ago, shortens order
   * keys, and compacts a log of some length. Resolves when that is stored or has failed; never rejects. Somebody may
   * come in meanwhile and edit.
   */
  beforeUnload(room: CompactedRoom): Promise<void>
  stats(): CompactionStats
  /** Ends it all, at once: nothing half done stays in the database. */
  stop(): Promise<void>
}

export type CompactionStats = {
  compactions: number
  /** Times a snapshot was not the document that people have: somebody has to look into each of them. */
  failedChecks: number
  failures: number
  running: boolean
  waiting: number
  /** The last one: all of it, and the part in which nothing else ran. Milliseconds. */
  lastMs: number
  lastCaptureMs: number
}

/** How long a document is left alone after a failed check, and after trouble with the database or the thread. */
const AFTER_FAILED_CHECK_MS = 3_600_000
const AFTER_FAILURE_MS = 60_000

/** Between two documents: a multiple of what the last one took, up to so long. */
const PAUSE_SHARE = 4
const MAX_PAUSE_MS = 2_000

type Waiting = { room: CompactedRoom; done: Promise<void>; finish: () => void }

/**
 * Replaces long logs by snapshots: one document at a time, the work on another thread. The log stays the truth: a
 * snapshot goes in only when it is shown to be the document that people have, and what it replaces stays for
 * `keepReplacedMs`. Several processes may try the same document; the first one wins and the others leave it at that.
 *
 * To undo a bad snapshot within that time: stop the server, then for the document `id` and the snapshot's `seq`
 *
 *     begin;
 *     delete from rt_snapshot where doc_id = :id and kind = 'compact' and seq >= :seq;
 *     update rt_doc set snapshot_seq = coalesce(
 *       (select max(seq) from rt_snapshot where doc_id = :id and kind = 'compact'), 0) where id = :id;
 *     update rt_doc d set (log_rows, log_bytes) = (select count(*), coalesce(sum(octet_length(u.update)), 0)
 *       from rt_update u where u.doc_id = d.id and u.seq > d.snapshot_seq) where id = :id;
 *     commit;
 *
 * and start it. The document is then built from the snapshot before, or from the beginning, and all rows behind it;
 * whoever has it open gets what was missing.
 */
export function createCompaction(options: {
  pool: pg.Pool
  databaseUrl: string
  updateLog: Pick<UpdateLog, 'settled'>
  /** Whether people are served by this process only. */
  isAlone: () => boolean
  settings: RealtimeSettings
  log: RealtimeLog
}): Compaction {
  const { pool, databaseUrl, updateLog, isAlone, settings, log } = options
  const { statementMs, keepReplacedMs } = settings
  const thread = createCompactThread({ databaseUrl, statementMs, keepReplacedMs })
  /** In the order in which they came; the first is the one under way. */
  const queue = new Map<DocId, Waiting>()
  /** Documents that are left alone for a while: after any attempt, longer after one that failed. */
  const restUntilMs = new Map<DocId, number>()
  const totals = { compactions: 0, failedChecks: 0, failures: 0, lastMs: 0, lastCaptureMs: 0 }
  let isRunning = false
  let isStopped = false

  function enqueue(room: CompactedRoom): Promise<void> {
    const { docId } = room.place
    const known = queue.get(docId)
    if (known) return known.done
    if (isStopped || Date.now() < (restUntilMs.get(docId) ?? 0)) return Promise.resolve()
    let finish: () => void = () => undefined
    const done = new Promise<void>((resolve) => (finish = resolve))
    queue.set(docId, { room, done, finish })
    void run()
    return done
  }

  async function run(): Promise<void> {
    if (isRunning) return
    isRunning = true
    for (const [docId, { room, finish }] of queue) {
      const startedAtMs = performance.now()
      await compact(room).catch((error: unknown) => onFailure(docId, reasonOf(error)))
      queue.delete(docId)
      finish()
      // Many documents get long at the same time: people must not notice.
      if (queue.size > 0)
        await pause(Math.min(MAX_PAUSE_MS, PAUSE_SHARE * (performance.now() - startedAtMs)), undefined, { ref: false })
    }
    isRunning = false
  }

  async function compact(room: CompactedRoom): Promise<void> {
    // The commit that this follows is acknowledged first: encoding holds everybody up.
    await setImmediate()
    if (isStopped || room.isBroken) return
    const { docId } = room.place
    const nowMs = Date.now()
    for (const [id, untilMs] of restUntilMs) if (untilMs <= nowMs) restUntilMs.delete(id)
    restUntilMs.set(docId, nowMs + settings.compactEveryMs)
    const startedAtMs = performance.now()
    const live = { head: room.head, state: Y.encodeStateAsUpdate(room.doc) }
    room.sizeBytes = live.state.length
    totals.lastCaptureMs = performance.now() - startedAtMs
    // From here on all that the state holds is in the log, whatever was on its way.
    await updateLog.settled(docId)
    if (isStopped) return
    const answer = await thread.run({ docId, epoch: room.epoch, live })
    if (isStopped) return
    const ms = Math.round(performance.now() - startedAtMs)
    switch (answer.kind) {
      case 'left':
        return
      case 'compacted': {
        totals.compactions++
        totals.lastMs = ms
        const { seq, rows, sizeBytes, trimmed } = answer
        return log.info({ docId, seq, rows, sizeBytes, trimmed, ms }, 'log compacted')
      }
      case 'unequal':
        totals.failedChecks++
        restUntilMs.set(docId, Date.now() + AFTER_FAILED_CHECK_MS)
        return log.error(
          { docId, head: live.head, why: answer.why, unreadable: answer.unreadable },
          'a snapshot would not have been the document; its log stays as it is',
        )
      case 'failed':
        return onFailure(docId, answer.reason)
    }
  }

  function onFailure(docId: DocId, reason: string): void {
    totals.failures++
    restUntilMs.set(docId, Date.now() + AFTER_FAILURE_MS)
    log.warn({ docId, error: reason }, 'log not compacted')
  }

  async function beforeUnload(room: CompactedRoom): Promise<void> {
    if (isStopped || room.isBroken) return
    try {
      if (room.frozen === null) await tidy(room)
      const { rows } = await pool.query<{ log_rows: number; log_bytes: string }>(
        'select log_rows, log_bytes from rt_doc where id = $1',
        [room.place.docId],
      )
      const [row] = rows
      const { compactIdleRows, compactBytes } = settings
      if (row && (row.log_rows >= compactIdleRows || Number(row.log_bytes) >= compactBytes)) await enqueue(room)
    } catch (error) {
      log.warn({ docId: room.place.docId, error: reasonOf(error) }, 'document not tidied')
    }
  }

  /** A change like any other: in the log, and so in every process. */
  function tidy(room: CompactedRoom): Promise<boolean> {
    const { doc, place } = room
    return new Promise((resolve) => {
      room.change(
        { userId: null, peer: null },
        () => {
          purgeDeleted(doc, place.kind, Date.now() - settings.purgeDeletedMs)
          if (room.peers.size === 0 && isAlone()) shortenKeys(doc, place.kind, settings.longestKey, Math.random)
        },
        resolve,
      )
    })
  }

  return {
    consider: (room, { logRows, logBytes }) => {
      // A large document is not written anew for every few hundred small moves.
      const times = Math.max(1, room.sizeBytes / settings.compactBytes)
      if (logRows >= settings.compactRows * times || logBytes >= settings.compactBytes * times) void enqueue(room)
    },
    beforeUnload,
    stats: () => ({ ...totals, running: isRunning, waiting: Math.max(0, queue.size - (isRunning ? 1 : 0)) }),
    stop: async () => {
      isStopped = true
      for (const { finish } of queue.values()) finish()
      await thread.stop()
    },
  }
}
