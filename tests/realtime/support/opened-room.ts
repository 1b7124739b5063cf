import type pg from 'pg'
import type { DocId, ShootId, UserId } from '#shared/ids.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import { loadDocument } from '#server/realtime/load.ts'
import { Room } from '#server/realtime/room.ts'
import type { RealtimeLog, RealtimeSettings } from '#server/realtime/settings.ts'
import { type Committed, type UpdateLog, createUpdateLog } from '#server/realtime/update-log.ts'

export const quiet: RealtimeLog = { info: () => undefined, warn: () => undefined, error: () => undefined }

export type OpenedRoom = {
  room: Room
  updateLog: UpdateLog
  /** Changes the document as this person would; resolves when it is stored. */
  edit(userId: UserId | null, fn: () => void): Promise<boolean>
  /** The last commit. */
  committed: Committed | null
}

/** A document in memory as a process has it, without sockets and without other processes. */
export async function openRoom(options: {
  pool: pg.Pool
  docId: DocId
  settings: RealtimeSettings
  onCommitted?: (room: Room, committed: Committed) => void
}): Promise<OpenedRoom> {
  const { pool, docId, settings } = options
  const { rows } = await pool.query<{ shoot_id: ShootId; kind: DocumentKind }>(
    'select shoot_id, kind from rt_doc where id = $1',
    [docId],
  )
  const loaded = await loadDocument(pool, docId)
  const [row] = rows
  if (!row || !loaded) throw new Error('no document')
  const updateLog = createUpdateLog({
    pool,
    settings,
    log: quiet,
    onCommitted: (committed) => {
      opened.committed = committed
      room.committed(committed)
      options.onCommitted?.(room, committed)
    },
    onPressure: () => undefined,
    onStalled: () => undefined,
  })
  const room = new Room({ docId, shootId: row.shoot_id, kind: row.kind }, loaded, {
    log: updateLog,
    pool,
    settings,
    instances: {
      logGrew: () => undefined,
      showPresence: () => undefined,
      askPresence: () => undefined,
      changed: () => undefined,
      others: () => 0,
      isAlone: () => true,
      stop: async () => undefined,
    },
    onBad: () => undefined,
  })
  const opened: OpenedRoom = {
    room,
    updateLog,
    committed: null,
    edit: (userId, fn) => new Promise((resolve) => room.change({ userId, peer: null }, fn, resolve)),
  }
  return opened
}
