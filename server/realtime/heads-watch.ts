import type pg from 'pg'
import type { DocId } from '#shared/ids.ts'
import { CLOSE } from '#shared/realtime/protocol.ts'
import type { Room } from './room.ts'
import type { Rooms } from './rooms.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import { reasonOf } from './update-log.ts'

type Row = { id: DocId; head: string; epoch: number; frozen: string | null }

export type HeadsWatch = {
  /** Another process says that the log of a document reaches so far. */
  grew(docId: DocId, head: number): void
  /** Looks at the heads of all that is in memory now, not only when it is due. */
  look(): void
  stop(): void
}

/**
 * Keeps the documents in memory in step with the log when others write to it: at once when they say so, and behind that
 * by a look at the heads every few seconds, because what others say may get lost and the log is the truth. The same
 * look notices documents that are gone, of another epoch, frozen or released.
 */
export function createHeadsWatch(options: {
  pool: pg.Pool
  rooms: Rooms
  settings: RealtimeSettings
  log: RealtimeLog
}): HeadsWatch {
  const { pool, rooms, settings, log } = options
  let isLooking = false
  let looksAgain = false

  function catchUp(room: Room): void {
    room.catchUp().catch((error: unknown) => {
      log.warn({ docId: room.place.docId, error: reasonOf(error) }, 'not caught up with the log')
    })
  }

  async function look(): Promise<void> {
    const all = rooms.all()
    if (all.length === 0) return
    const found = await pool.query<Row>('select id, head, epoch, frozen from rt_doc where id = any($1::uuid[])', [
      all.map((room) => room.place.docId),
    ])
    const rows = new Map(found.rows.map((row) => [row.id, row]))
    for (const room of all) {
      const row = rows.get(room.place.docId)
      if (room.isBroken) rooms.letGo(room, CLOSE.tryAgain, 'the document is loaded anew')
      else if (!row) rooms.letGo(room, CLOSE.unknown, 'the document is gone')
      else if (row.epoch !== room.epoch) rooms.letGo(room, CLOSE.epoch, 'the document is of another epoch')
      else {
        room.freeze(row.frozen)
        if (Number(row.head) > room.head) catchUp(room)
      }
    }
  }

  function lookNow(): void {
    if (isLooking) {
      looksAgain = true
      return
    }
    isLooking = true
    look()
      .catch((error: unknown) => log.warn({ error: reasonOf(error) }, 'heads of the log not read'))
      .finally(() => {
        isLooking = false
        if (!looksAgain) return
        looksAgain = false
        lookNow()
      })
  }

  const timer = setInterval(lookNow, settings.headsMs)

  return {
    grew: (docId, head) => {
      const room = rooms.get(docId)
      if (room && head > room.head) catchUp(room)
    },
    look: lookNow,
    stop: () => clearInterval(timer),
  }
}
