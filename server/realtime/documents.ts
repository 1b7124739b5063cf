import { randomUUID } from 'node:crypto'
import type pg from 'pg'
import { type DocId, type ShootId, type UserId, docIdSchema } from '#shared/ids.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import type { Documents } from '#server/adapters/documents.ts'
import { rtDoc, rtUpdate } from '#server/db/schema/realtime.ts'
import { AppError } from '#server/errors.ts'
import { within } from '#server/within.ts'
import { loadDocument } from './load.ts'
import type { Place, Room } from './room.ts'
import type { Rooms } from './rooms.ts'
import type { RealtimeSettings } from './settings.ts'
import type { UpdateLog } from './update-log.ts'

/** Rounds of waiting for a quiet moment before a reader gets a copy from the log instead. */
const QUIET_ROUNDS = 5

const noDocument = () => new AppError('NOT_FOUND', 'There is no such shoot.')
const unavailable = (cause: unknown) =>
  new AppError('STARTING', 'The shoot could not be opened just now. Nothing was changed; try again in a moment.', {
    cause,
  })
const notStored = () =>
  new AppError(
    'STARTING',
    'The change is made but not stored yet: the database does not answer. Look again in a moment.',
  )

/** How verbs reach documents: through the same rooms as everybody else. */
export function createDocuments(options: {
  pool: pg.Pool
  rooms: Rooms
  updateLog: UpdateLog
  settings: RealtimeSettings
  announce: Documents['announce']
}): Documents {
  const { pool, rooms, updateLog, settings, announce } = options

  async function create(...[tx, shootId, kind, encodedState]: Parameters<Documents['create']>): Promise<DocId> {
    const id = docIdSchema.parse(randomUUID())
    const bytes = encodedState.length
    await tx.insert(rtDoc).values({ id, shootId, kind, head: 1, logRows: 1, logBytes: bytes, stateBytes: bytes })
    await tx.insert(rtUpdate).values({ docId: id, seq: 1, update: encodedState })
    return id
  }

  async function getPlace(shootId: ShootId, kind: DocumentKind): Promise<Place & { frozen: string | null }> {
    const found = await pool
      .query<{ id: DocId; frozen: string | null }>('select id, frozen from rt_doc where shoot_id = $1 and kind = $2', [
        shootId,
        kind,
      ])
      .catch((error: unknown) => {
        throw unavailable(error)
      })
    const row = found.rows[0]
    if (!row) throw noDocument()
    return { docId: row.id, shootId, kind, frozen: row.frozen }
  }

  async function withRoom<T>(place: Place, fn: (room: Room) => Promise<T>): Promise<T> {
    const hold = rooms.hold(place)
    try {
      const room = await hold.room.catch((error: unknown) => {
        throw unavailable(error)
      })
      return await fn(room)
    } finally {
      hold.release()
    }
  }

  async function read<T>(...[shootId, kind, fn]: Parameters<Documents['read']>): Promise<T> {
    const place = await getPlace(shootId, kind)
    return withRoom(place, async (room) => {
      for (let round = 0; round < QUIET_ROUNDS; round++) {
        const [stored] = await Promise.all([
          within(settings.writeWaitMs, updateLog.settled(place.docId)),
          catchUp(room),
        ])
        if (stored === undefined) throw unavailable(undefined)
        // From here on nothing else runs, so the document is what the log says up to its head.
        if (updateLog.queuedFor(place.docId) === 0 && !room.isBroken) return fn(room.doc, room.head) as T
      }
      const copy = await loadDocument(pool, place.docId)
      if (!copy) throw noDocument()
      try {
        return fn(copy.doc, copy.head) as T
      } finally {
        copy.doc.destroy()
      }
    })
  }

  async function catchUp(room: Room): Promise<void> {
    try {
      await room.catchUp()
    } catch (error) {
      throw unavailable(error)
    }
  }

  async function write(...[shootId, kind, userId, fn]: Parameters<Documents['write']>): Promise<void> {
    const place = await getPlace(shootId, kind)
    if (place.frozen !== null)
      throw new AppError('CONFLICT', 'This part of the shoot is closed for changes. Nothing was changed.')
    await withRoom(place, async (room) => {
      let failure: unknown
      let hasFailed = false
      const stored = await within(
        settings.writeWaitMs,
        new Promise<boolean>((resolve) => {
          room.change(
            serverAs(userId),
            () => {
              try {
                fn(room.doc)
              } catch (error) {
                // What was changed before is in the document and has to reach the log like everything else.
                hasFailed = true
                failure = error
              }
            },
            resolve,
          )
        }),
      )
      if (hasFailed) throw failure
      if (stored === undefined) throw notStored()
      if (!stored) throw room.isBroken ? unavailable(undefined) : noDocument()
    })
  }

  return { create, read, write, announce }
}

/** Origin of what verbs change on behalf of somebody. */
function serverAs(userId: UserId): { kind: 'server'; userId: UserId; peer: null } {
  return { kind: 'server', userId, peer: null }
}
