import type pg from 'pg'
import type { DocId } from '#shared/ids.ts'
import type { Compaction } from './compaction.ts'
import type { Instances } from './instances.ts'
import { loadDocument } from './load.ts'
import { quarantine } from './quarantine.ts'
import { type Place, Room } from './room.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import type { Committed, UpdateLog } from './update-log.ts'

/** A claim on a room: it stays in memory until the claim is given back, once. */
export type Hold = { room: Promise<Room>; release: () => void }

export type RoomsStats = {
  rooms: number
  /** Documents of whose log something could not be read. */
  flagged: number
  /** Readers that do not keep up. */
  lagging: number
}

export type Rooms = {
  hold(place: Place): Hold
  /** The room of a document when it is in memory. */
  get(docId: DocId): Room | undefined
  all(): Room[]
  committed(committed: Committed): void
  /** Forgets a room at once and closes everybody's connection to it; whoever comes next loads it anew. */
  letGo(room: Room, code: number, why: string): void
  stats(): RoomsStats
  stop(): void
}

type Slot = { opening: Promise<Room>; room: Room | null; holds: number; idle: NodeJS.Timeout | null }

export class UnknownDocument extends Error {}

/**
 * Documents in memory: loaded once however many ask at the same time, dropped after a minute without anybody and with
 * nothing queued.
 */
export function createRooms(options: {
  pool: pg.Pool
  updateLog: UpdateLog
  instances: Instances
  compaction: Compaction
  settings: RealtimeSettings
  log: RealtimeLog
}): Rooms {
  const { pool, updateLog, instances, compaction, settings, log } = options
  const slots = new Map<DocId, Slot>()
  /** Rooms on their way out; who joins meanwhile waits and loads anew. */
  const closing = new Map<DocId, Promise<void>>()
  const flagged = new Set<DocId>()

  function hold(place: Place): Hold {
    let slot = slots.get(place.docId)
    if (!slot) {
      const empty: Omit<Slot, 'opening'> = { room: null, holds: 0, idle: null }
      slot = Object.assign(empty, { opening: open(place, empty) })
      slot.opening.catch(() => undefined)
      slots.set(place.docId, slot)
    }
    // Taken before anything is awaited, so that the room cannot go in between.
    const taken = slot
    taken.holds++
    if (taken.idle) clearTimeout(taken.idle)
    taken.idle = null
    let isHeld = true
    return {
      room: taken.opening,
      release: () => {
        if (!isHeld) return
        isHeld = false
        taken.holds--
        if (taken.holds === 0) scheduleUnload(place.docId, taken)
      },
    }
  }

  async function open(place: Place, slot: Omit<Slot, 'opening'>): Promise<Room> {
    try {
      await closing.get(place.docId)
      if (updateLog.isUnderPressure()) throw new Error('the log is behind')
      const loaded = await loadDocument(pool, place.docId)
      if (!loaded) throw new UnknownDocument('no such document')
      const onBad = (bad: (typeof loaded.bad)[number]) => {
        flagged.add(place.docId)
        log.error(
          { docId: place.docId, reason: bad.reason, bytes: bad.update.length },
          'a piece of the log is unreadable',
        )
        void quarantine(pool, log, { docId: place.docId, ...bad })
      }
      loaded.bad.forEach(onBad)
      slot.room = new Room(place, loaded, { log: updateLog, pool, settings, instances, onBad })
      instances.askPresence(place.docId)
      return slot.room
    } catch (error) {
      if (slots.get(place.docId) === slot) slots.delete(place.docId)
      throw error
    }
  }

  function scheduleUnload(docId: DocId, slot: Slot): void {
    if (slots.get(docId) !== slot) return
    slot.idle = setTimeout(() => void unloadWhenIdle(docId, slot), settings.idleUnloadMs)
  }

  async function unloadWhenIdle(docId: DocId, slot: Slot): Promise<void> {
    const mayGo = () => slot.holds === 0 && slots.get(docId) === slot
    const { room } = slot
    if (!mayGo()) return
    if (!room) return scheduleUnload(docId, slot)
    // Still there meanwhile: whoever comes in finds it as it is.
    if (room.isIdle) await compaction.beforeUnload(room)
    if (!mayGo()) return
    if (room.isIdle) unload(docId, slot, room)
    else scheduleUnload(docId, slot)
  }

  function unload(docId: DocId, slot: Slot, room: Room): void {
    if (slot.idle) clearTimeout(slot.idle)
    slots.delete(docId)
    // What the document still has in the queue must be in the log before it is read from there again.
    const closed = updateLog.settled(docId).then(() => {
      room.close()
      if (closing.get(docId) === closed) closing.delete(docId)
    })
    closing.set(docId, closed)
  }

  const all = () => [...slots.values()].flatMap(({ room }) => room ?? [])

  return {
    hold,
    get: (docId) => slots.get(docId)?.room ?? undefined,
    all,
    committed: (committed) => {
      const room = slots.get(committed.docId)?.room
      if (!room) return
      room.committed(committed)
      compaction.consider(room, committed)
    },
    letGo: (room, code, why) => {
      const slot = slots.get(room.place.docId)
      if (slot?.room === room) unload(room.place.docId, slot, room)
      for (const peer of [...room.peers]) peer.close(code, why)
    },
    stats: () => ({
      rooms: slots.size,
      flagged: flagged.size,
      lagging: all().reduce((sum, room) => sum + room.fanOut.laggingCount, 0),
    }),
    stop: () => {
      for (const slot of slots.values()) {
        if (slot.idle) clearTimeout(slot.idle)
        slot.room?.close()
      }
      slots.clear()
    },
  }
}
