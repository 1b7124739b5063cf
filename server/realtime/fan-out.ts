import * as Y from 'yjs'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { mergedUpdates } from './merged-updates.ts'
import type { RealtimeSettings } from './settings.ts'
import { updateFrame } from './wire.ts'

/** A connection, as far as handing it changes goes. */
export type Reader = {
  /** Whether it has asked for the document and so is told what changes. */
  readonly isSynced: boolean
  /** What was sent and has not left this machine. Bytes. */
  readonly bufferedBytes: number
  send(frame: Uint8Array): void
  close(code: number, why: string): void
}

type FrameOf = (update: Uint8Array) => Uint8Array
/** What a reader that lags has, how what it lacks is to be wrapped, and until when it may lag. */
type Lag = { since: Uint8Array; frameOf: FrameOf; untilMs: number }

/** Waiting for less costs more than it saves. */
const SHORTEST_WINDOW_MS = 3

/** How often readers that lag are looked at. */
const LOOK_MS = 50

/**
 * The one way out for changes of a document.
 *
 * The first change after quiet goes out in the same turn of the event loop; what comes within a moment after it, up to
 * `mergeMs` with many readers, is merged into one frame, the same bytes for everybody. No reader has a queue: one that
 * does not keep up is sent nothing more, the state it has is remembered, and once its socket is nearly empty it gets one
 * update for all it missed. However slow it is, it costs its state vector and what its socket holds.
 */
export class FanOut<R extends Reader> {
  readonly #doc: Y.Doc
  readonly #settings: RealtimeSettings
  readonly #readers: ReadonlySet<R>
  readonly #onCaughtUp: (reader: R) => void
  #pending: Uint8Array[] = []
  /** Whose all of `#pending` is; null when it is of several, or of nobody here. */
  #author: R | null = null
  #window: NodeJS.Timeout | null = null
  readonly #lagging = new Map<R, Lag>()
  #look: NodeJS.Timeout | null = null

  /** @param onCaughtUp runs after a reader that had lagged was sent what it missed. */
  constructor(
    doc: Y.Doc,
    outside: { settings: RealtimeSettings; readers: ReadonlySet<R>; onCaughtUp: (reader: R) => void },
  ) {
    this.#doc = doc
    this.#settings = outside.settings
    this.#readers = outside.readers
    this.#onCaughtUp = outside.onCaughtUp
  }

  get laggingCount(): number {
    return this.#lagging.size
  }

  isLagging(reader: R): boolean {
    return this.#lagging.has(reader)
  }

  /** Takes a change that the document has just made; its author is not told what it said itself. */
  push(update: Uint8Array, author: R | null): void {
    if (this.#pending.length === 0) this.#author = author
    else if (this.#author !== author) this.#author = null
    this.#pending.push(update)
    if (!this.#window) this.#flush()
  }

  #flush(): void {
    this.#window = null
    if (this.#pending.length === 0) return
    const updates = this.#pending
    this.#pending = []
    this.#sendToAll(mergedUpdates(updates).map(updateFrame), this.#author)
    // What merging saves grows with the readers; a few of them may have each change at once.
    const { mergeMs, crowd } = this.#settings
    const windowMs = mergeMs * Math.min(1, this.#readers.size / crowd)
    if (windowMs >= SHORTEST_WINDOW_MS) this.#window = setTimeout(() => this.#flush(), windowMs)
  }

  #sendToAll(frames: readonly Uint8Array[], author: R | null): void {
    let state: Uint8Array | null = null
    for (const reader of this.#readers) {
      if (!reader.isSynced || reader === author || this.#lagging.has(reader)) continue
      for (const frame of frames) reader.send(frame)
      // Nothing is pending now, so the document is what this reader has been sent.
      if (reader.bufferedBytes > this.#settings.lagBytes) this.#mark(reader, (state ??= Y.encodeStateVector(this.#doc)))
    }
  }

  /** Sends no more to a reader until it has taken in what is on its way. Asking again gives no more time. */
  #mark(reader: R, since: Uint8Array, frameOf: FrameOf = updateFrame): void {
    const { lagMs, slowestBytesPerSecond } = this.#settings
    const allowedMs = Math.max(lagMs, (reader.bufferedBytes / slowestBytesPerSecond) * 1000)
    const untilMs = this.#lagging.get(reader)?.untilMs ?? Date.now() + allowedMs
    this.#lagging.set(reader, { since, frameOf, untilMs })
    this.#look ??= setInterval(() => this.#lookAtLagging(), LOOK_MS)
  }

  /**
   * Sends a reader what it lacks since the given state vector, wrapped by `frameOf`. One that has not taken in what is
   * on its way gets it later, so asking again and again without reading fills nothing.
   *
   * @returns the size of the answer in bytes, 0 when it is put off.
   * @throws when the state vector does not decode.
   */
  answer(reader: R, since: Uint8Array, frameOf: FrameOf): number {
    if (this.#lagging.has(reader) || reader.bufferedBytes > this.#settings.lagBytes) {
      Y.decodeStateVector(since)
      this.#mark(reader, since, frameOf)
      return 0
    }
    const diff = Y.encodeStateAsUpdate(this.#doc, since)
    reader.send(frameOf(diff))
    if (reader.bufferedBytes > this.#settings.lagBytes) this.#mark(reader, Y.encodeStateVector(this.#doc))
    return diff.length
  }

  #lookAtLagging(): void {
    const nowMs = Date.now()
    for (const [reader, { since, frameOf, untilMs }] of this.#lagging) {
      if (reader.bufferedBytes <= this.#settings.caughtUpBytes) {
        this.#lagging.delete(reader)
        try {
          this.answer(reader, since, frameOf)
          this.#onCaughtUp(reader)
        } catch {
          // A throw from a timer would end the process; the reader comes back and asks anew.
          reader.close(CLOSE.tryAgain, 'what was missed could not be told')
        }
      } else if (nowMs > untilMs) {
        this.#lagging.delete(reader)
        reader.close(CLOSE.tryAgain, 'reads too slowly')
      }
    }
    if (this.#lagging.size === 0 && this.#look) {
      clearInterval(this.#look)
      this.#look = null
    }
  }

  leave(reader: R): void {
    this.#lagging.delete(reader)
  }

  stop(): void {
    if (this.#window) clearTimeout(this.#window)
    if (this.#look) clearInterval(this.#look)
    this.#window = this.#look = null
    this.#pending = []
    this.#lagging.clear()
  }
}
