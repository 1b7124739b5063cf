import type pg from 'pg'
import * as Y from 'yjs'
import type { DocId, ShootId, UserId } from '#shared/ids.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import { FanOut, type Reader } from './fan-out.ts'
import { dropPending, hasPending } from './guard.ts'
import type { Instances } from './instances.ts'
import { type BadPiece, LOG_ORIGIN, type Loaded, applyRows, rowsAfter } from './load.ts'
import { type PresencePeer, RoomPresence } from './presence.ts'
import type { RealtimeSettings } from './settings.ts'
import { itemsTouchedBy } from './touched.ts'
import type { Committed, UpdateLog } from './update-log.ts'

/** Where a document belongs. */
export type Place = { docId: DocId; shootId: ShootId; kind: DocumentKind }

/** A connection, as far as a room knows it. */
export type RoomPeer = PresencePeer &
  Reader & {
    /** Tells it how things stand with the document. */
    greet(standing: Standing): void
  }

/** `frozen`: why nobody may write, or null. */
export type Standing = { epoch: number; frozen: string | null }

/** What a room needs beside its document. */
export type RoomOutside = {
  log: UpdateLog
  pool: pg.Pool
  settings: RealtimeSettings
  instances: Instances
  onBad: (bad: BadPiece) => void
}

/** `nothing new`: known already. `incomplete`: part of it had to be left out. `broken`: the document cannot be trusted. */
export type Taken = 'taken' | 'nothing new' | 'incomplete' | 'broken'

/** A document is weighed when its size by estimate passes the limit: again after so long, or so much more. */
const WEIGH_AGAIN_MS = 5_000
const WEIGH_AGAIN_BYTES = 1024 * 1024

/** One document in memory with the people in it. Everything that changes it goes through here. */
export class Room {
  readonly place: Place
  readonly doc: Y.Doc
  readonly peers = new Set<RoomPeer>()
  readonly presence: RoomPresence
  readonly fanOut: FanOut<RoomPeer>
  readonly epoch: number
  /** The document holds the log up to here. */
  head: number
  /** Its size by what went into it; above the truth, because deleted content is collected. Bytes. */
  sizeBytes: number
  isBroken = false
  #frozen: string | null
  readonly #log: UpdateLog
  readonly #pool: pg.Pool
  readonly #onBad: (bad: BadPiece) => void
  #captured: Uint8Array[] | null = null
  readonly #touched = new Set<string>()
  #reading: Promise<void> | null = null
  #readingNext: Promise<void> | null = null
  #weighed = { atMs: 0, bytes: 0 }
  #growth = { structs: 0, sinceMs: 0 }

  constructor(place: Place, loaded: Loaded, { log, pool, settings, instances, onBad }: RoomOutside) {
    this.place = place
    this.doc = loaded.doc
    this.head = loaded.head
    this.sizeBytes = loaded.sizeBytes
    this.epoch = loaded.epoch
    this.#frozen = loaded.frozen
    this.#log = log
    this.#pool = pool
    this.#onBad = onBad
    this.presence = new RoomPresence(
      settings,
      () => [...this.peers].filter((peer) => !this.fanOut.isLagging(peer) && peer.bufferedBytes <= settings.lagBytes),
      (entries) => instances.showPresence(place.docId, entries),
    )
    this.fanOut = new FanOut(this.doc, {
      settings,
      readers: this.peers,
      onCaughtUp: (peer) => peer.send(this.presence.everyoneBut(peer)),
    })
    this.doc.on('update', (update: Uint8Array, origin: unknown, _doc: Y.Doc, transaction: Y.Transaction) => {
      if (this.#captured) {
        this.#captured.push(update)
        itemsTouchedBy(transaction, this.#touched)
      } else if (origin === LOG_ORIGIN) {
        this.sizeBytes += update.length
        this.fanOut.push(update, null)
      }
    })
  }

  /**
   * Runs a change of the document as one transaction, hands what was new in it to the peers at once and to the log.
   * `settle` is called when all of it, or the copy that somebody else brought before, is committed; with false when
   * the document is gone or broken.
   */
  change(
    author: { userId: UserId | null; peer: RoomPeer | null },
    fn: () => void,
    settle: (stored: boolean) => void,
  ): Taken {
    if (this.isBroken) {
      settle(false)
      return 'broken'
    }
    this.#captured = []
    this.#touched.clear()
    let failed = false
    try {
      this.doc.transact(fn, author)
    } catch {
      failed = true
    }
    const captured = this.#captured
    const items = [...this.#touched]
    this.#captured = null
    const isIncomplete = hasPending(this.doc)
    if (isIncomplete) dropPending(this.doc)
    if (failed) {
      // Changed half way: what memory holds is no longer what the log makes, and Yjs may not tell of changes any more.
      this.isBroken = true
      settle(false)
      return 'broken'
    }
    const update = captured.length > 1 ? Y.mergeUpdates(captured) : (captured[0] ?? null)
    if (update) {
      this.sizeBytes += update.length
      this.fanOut.push(update, author.peer)
    }
    this.#log.enqueue({ docId: this.place.docId, userId: author.userId, update, items, queuedAtMs: Date.now(), settle })
    return isIncomplete ? 'incomplete' : update ? 'taken' : 'nothing new'
  }

  get frozen(): string | null {
    return this.#frozen
  }

  /** Takes over what the database says; everybody who is here is told. */
  freeze(frozen: string | null): void {
    if (frozen === this.#frozen) return
    this.#frozen = frozen
    for (const peer of this.peers) peer.greet(this)
  }

  /** Takes somebody off: from the readers and from everybody's screen. */
  leave(peer: RoomPeer): void {
    this.peers.delete(peer)
    this.fanOut.leave(peer)
    this.presence.leave(peer)
  }

  /** Counts structs against the growth of a minute; false, and not counted, when they would be too many. */
  mayGrow(structs: number, perMinute: number, nowMs: number): boolean {
    if (nowMs - this.#growth.sinceMs > 60_000) this.#growth = { structs: 0, sinceMs: nowMs }
    if (this.#growth.structs + structs > perMinute) return false
    this.#growth.structs += structs
    return true
  }

  /** Whether so many bytes more fit. Weighs the document anew, now and then, before it says no. */
  hasRoomFor(bytes: number, limitBytes: number, nowMs: number): boolean {
    if (this.sizeBytes + bytes <= limitBytes) return true
    const { atMs, bytes: weighedBytes } = this.#weighed
    if (nowMs - atMs > WEIGH_AGAIN_MS || this.sizeBytes - weighedBytes > WEIGH_AGAIN_BYTES) {
      this.sizeBytes = Y.encodeStateAsUpdate(this.doc).length
      this.#weighed = { atMs: nowMs, bytes: this.sizeBytes }
    }
    return this.sizeBytes + bytes <= limitBytes
  }

  /** Own rows were committed. Rows of other processes before them are fetched. */
  committed({ first, last }: Committed): void {
    if (first <= this.head + 1) this.head = Math.max(this.head, last)
    else this.catchUp().catch(() => undefined)
  }

  /** Brings the document up to where the log is now. */
  catchUp(): Promise<void> {
    if (this.#reading) {
      // What is being read may have been asked for before what the caller has heard of was there.
      this.#readingNext ??= this.#reading
        .catch(() => undefined)
        .then(() => {
          this.#readingNext = null
          return this.catchUp()
        })
      return this.#readingNext
    }
    this.#reading = this.#readOn().finally(() => {
      this.#reading = null
    })
    return this.#reading
  }

  async #readOn(): Promise<void> {
    const rows = await rowsAfter(this.#pool, this.place.docId, this.head)
    let refused: BadPiece[]
    try {
      refused = applyRows(this.doc, rows)
    } catch (error) {
      this.isBroken = true
      throw error
    }
    refused.forEach(this.#onBad)
    this.head = Math.max(this.head, Number(rows[rows.length - 1]?.seq ?? 0))
  }

  get isIdle(): boolean {
    return this.peers.size === 0 && this.#log.queuedFor(this.place.docId) === 0
  }

  /** Forgets the document. There is nothing to save: the log has it. */
  close(): void {
    this.presence.stop()
    this.fanOut.stop()
    this.doc.destroy()
  }
}
