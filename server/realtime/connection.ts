import type { Duplex } from 'node:stream'
import type WebSocket from 'ws'
import type { RawData } from 'ws'
import type { Role } from '#shared/access/roles.ts'
import { canWriteDocument } from '#shared/access/roles.ts'
import type { UserId } from '#shared/ids.ts'
import { CLOSE, type Refusal } from '#shared/realtime/protocol.ts'
import { websocketFrame } from './framing.ts'
import { KEEP_ALIVE } from './presence.ts'
import type { Place, RoomPeer, Standing } from './room.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import { TokenBucket } from './token-bucket.ts'
import { reasonOf } from './update-log.ts'
import { helloFrame, refusedFrame, savedFrame } from './wire.ts'

export type Person = { userId: UserId; name: string; sessionId: string; expiresAtMs: number }

/** Why a socket is not read from. */
type Pause = 'rate' | 'early' | 'pressure' | 'drain'

/** An answer of so many bytes counts as one that came in. */
const ANSWER_SHARE = 8

/** One person's socket on one document: frames, rates, acknowledgements. What frames mean is inbound.ts. */
export class Connection implements RoomPeer {
  readonly number: number
  readonly person: Person
  readonly place: Place
  readonly role: Role
  readonly mayWrite: boolean
  isSynced = false
  /** Update-carrying messages so far; what acknowledgements and refusals count. */
  received = 0
  /** When the rights of this connection were last known to be right. */
  verifiedAtMs = Date.now()
  expiresAtMs: number
  readonly #ws: WebSocket
  readonly #socket: Duplex
  readonly #settings: RealtimeSettings
  readonly #log: RealtimeLog
  readonly #wantsAcks: boolean
  readonly #schema: number
  readonly #messages: TokenBucket
  readonly #bytes: TokenBucket
  readonly #pauses = new Set<Pause>()
  /** The first message that was not taken and that a later step 2 will bring; nothing from it on is acknowledged. */
  #heldAt: number | null = null
  #saved = 0
  #toldSaved = 0
  #early: Uint8Array[] | null = []
  /** Came in one packet with what was too much; handled when it is time. */
  #late: Uint8Array[] = []
  #earlyBytes = 0
  #receive: ((frame: Uint8Array) => void) | null = null
  #isClosing = false
  #missedPongs = 0
  #isToldStalled = false

  constructor(options: {
    ws: WebSocket
    /** What `ws` writes to. */
    socket: Duplex
    number: number
    person: Person
    place: Place
    role: Role
    wantsAcks: boolean
    /** Lowest document schema a writer must know. */
    schema: number
    settings: RealtimeSettings
    log: RealtimeLog
  }) {
    this.number = options.number
    this.person = options.person
    this.place = options.place
    this.role = options.role
    this.mayWrite = canWriteDocument(options.role, options.place.kind)
    this.expiresAtMs = options.person.expiresAtMs
    this.#ws = options.ws
    this.#socket = options.socket
    this.#settings = options.settings
    this.#log = options.log
    this.#wantsAcks = options.wantsAcks
    this.#schema = options.schema
    const now = Date.now()
    this.#messages = new TokenBucket(this.#settings.messagesPerSecond, this.#settings.messagesPerSecond * 2, now)
    this.#bytes = new TokenBucket(this.#settings.bytesPerSecond, this.#settings.burstBytes, now)
    this.#ws.on('message', (data, isBinary) => this.#onFrame(data, isBinary))
    // Without a listener one frame above the limit would end the process.
    this.#ws.on('error', (error) => this.#log.warn({ ...this.facts, error: error.message }, 'socket error'))
    this.#ws.on('pong', () => (this.#missedPongs = 0))
  }

  get isOpen(): boolean {
    return !this.#isClosing && this.#ws.readyState === this.#ws.OPEN
  }

  get bufferedBytes(): number {
    return this.#ws.bufferedAmount
  }

  /** What is logged about it: nobody's name. */
  get facts(): Record<string, string | number> {
    return { connection: this.number, docId: this.place.docId, kind: this.place.kind, role: this.role }
  }

  #onFrame(data: RawData, isBinary: boolean): void {
    if (!this.isOpen) return
    const frame = isBinary ? bytesOf(data) : new Uint8Array(0)
    this.#take(1, frame.length)
    if (!this.#receive) return this.#hold(frame)
    // What came in one packet with it still comes after a pause.
    if (this.#pauses.has('rate') || this.#late.length > 0) this.#late.push(frame)
    else this.#hand(frame)
  }

  /** A frame that trips something up ends its own connection, not the process. */
  #hand(frame: Uint8Array): void {
    try {
      this.#receive?.(frame)
    } catch (error) {
      this.#log.error({ ...this.facts, error: reasonOf(error) }, 'a frame was not handled')
      this.close(CLOSE.tryAgain, 'a frame could not be handled')
    }
  }

  /** Uses up some of what one may send; beyond it the socket is not read from for as long as it takes. */
  #take(messages: number, bytes: number): void {
    const waitMs = this.#owedMs(messages, bytes)
    if (waitMs === 0 || this.#pauses.has('rate')) return
    this.pause('rate')
    setTimeout(() => this.#paidOff(), waitMs).unref()
  }

  /** Takes from what may be used up and returns how long it takes to pay off. Milliseconds. */
  #owedMs(messages: number, bytes: number): number {
    const now = Date.now()
    return Math.max(this.#messages.take(messages, now), this.#bytes.take(bytes, now))
  }

  /** Works off what came late, as far as that costs nothing more, and listens again. */
  #paidOff(): void {
    // What came late was counted when it came.
    const waitMs = this.#owedMs(0, 0)
    if (waitMs > 0 && this.isOpen) {
      setTimeout(() => this.#paidOff(), waitMs).unref()
      return
    }
    this.resume('rate')
    let handled = 0
    for (const frame of this.#late) {
      if (!this.isOpen || this.#pauses.has('rate')) break
      handled++
      this.#hand(frame)
    }
    this.#late = this.isOpen ? this.#late.slice(handled) : []
  }

  /** Keeps a frame that came while the document is loading, within bounds. */
  #hold(frame: Uint8Array): void {
    this.#early?.push(frame)
    this.#earlyBytes += frame.length
    const { earlyFrames, earlyBytes } = this.#settings
    if ((this.#early?.length ?? 0) >= earlyFrames || this.#earlyBytes > earlyBytes) this.pause('early')
    // Frames of one packet still come after a pause.
    if ((this.#early?.length ?? 0) > earlyFrames * 8 || this.#earlyBytes > earlyBytes * 2) {
      this.close(CLOSE.tryAgain, 'too much before the document was there')
    }
  }

  /** The document is there: frames go to `receive`, the held ones first. */
  start(receive: (frame: Uint8Array) => void): void {
    const early = this.#early ?? []
    this.#early = null
    this.#receive = receive
    for (const frame of early) if (this.isOpen) this.#hand(frame)
    this.resume('early')
  }

  send(frame: Uint8Array): void {
    if (!this.isOpen) return
    if (this.#ws.bufferedAmount > this.#settings.outboundBytes) {
      this.close(CLOSE.tryAgain, 'reads too slowly')
      this.#ws.terminate()
      return
    }
    // Nothing of ours is compressed, so this goes out in order with what `ws` itself says.
    this.#socket.write(websocketFrame(frame))
  }

  /** Tells who one is here and how things stand with the document: the first frame, and again when that changes. */
  greet({ epoch, frozen }: Standing): void {
    const { role } = this
    this.sendExtra(
      helloFrame({ role, mayWrite: this.mayWrite && frozen === null, epoch, schema: this.#schema, frozen }),
    )
  }

  /** Counts an answer against what one may use up, though for less than what is sent in: it costs work as well. */
  charge(answerBytes: number): void {
    this.#take(0, answerBytes / ANSWER_SHARE)
  }

  /** For 100 to 103, which only those get who asked. */
  sendExtra(frame: Uint8Array): void {
    if (this.#wantsAcks) this.send(frame)
  }

  /** How far an entry queued now may be acknowledged, once it is stored. */
  get ackable(): number {
    return this.#heldAt === null ? this.received : this.#heldAt - 1
  }

  get isHolding(): boolean {
    return this.#heldAt !== null
  }

  /** Message n was not taken: nothing from it on is acknowledged until `unhold`. */
  holdAt(n: number): void {
    this.#heldAt ??= n
  }

  /** A step 2 was taken, which holds all that this client has: it covers what was left out before it. */
  unhold(): void {
    this.#heldAt = null
  }

  /** The first n messages are durable. One frame for all that a commit stored. */
  saved(n: number): void {
    if (n <= this.#saved) return
    this.#isToldStalled = false
    if (this.#saved === this.#toldSaved) {
      queueMicrotask(() => {
        this.#toldSaved = this.#saved
        this.sendExtra(savedFrame(this.#saved))
      })
    }
    this.#saved = n
  }

  /** The database does not answer: who waits for an acknowledgement is told why, once until the next one. */
  stalled(): void {
    if (this.#isToldStalled || this.received === this.#saved) return
    this.#isToldStalled = true
    this.sendExtra(refusedFrame(this.#saved + 1, 'database-down'))
  }

  refuse(n: number, reason: Refusal): void {
    this.#log.warn({ ...this.facts, reason, n }, 'update refused')
    this.sendExtra(refusedFrame(n, reason))
  }

  pause(why: Pause): void {
    if (this.#isClosing) return
    this.#pauses.add(why)
    this.#ws.pause()
  }

  resume(why: Pause): void {
    this.#pauses.delete(why)
    if (this.#pauses.size === 0) this.#ws.resume()
  }

  keepAlive(): void {
    this.send(KEEP_ALIVE)
  }

  /** Ends a connection that no longer answers. Nobody can answer while we do not listen. */
  ping(): void {
    if (!this.isOpen) return
    if (this.#pauses.size === 0 && this.#missedPongs >= 2) {
      this.#log.info(this.facts, 'no answer to two pings')
      this.#ws.terminate()
      return
    }
    this.#missedPongs = this.#pauses.size === 0 ? this.#missedPongs + 1 : 0
    this.#ws.ping()
  }

  /** Closes with a code; nothing that comes after it is looked at. */
  close(code: number, why: string): void {
    if (this.#isClosing) return
    if (code !== CLOSE.restart) this.#log.warn({ ...this.facts, code, why }, 'connection closed')
    this.#isClosing = true
    this.#early = null
    // A paused socket would not hear the other side's goodbye.
    this.#pauses.clear()
    this.#ws.resume()
    this.#ws.close(code, why)
    setTimeout(() => this.#ws.terminate(), 3_000).unref()
  }
}

function bytesOf(data: RawData): Uint8Array {
  if (Array.isArray(data)) return Buffer.concat(data)
  return data instanceof ArrayBuffer ? new Uint8Array(data) : data
}
