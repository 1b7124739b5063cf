import { performance } from 'node:perf_hooks'
import WebSocket from 'ws'
import * as Y from 'yjs'
import { type Dialect, type Reader, STEP_1, STEP_2, UPDATE, Wire } from './wire.ts'

/** A place at a document for one person. */
export type Seat = {
  /** Of the socket. */
  url: string
  /** Sent with the upgrade: who it is. */
  headers: Record<string, string>
  documentName: string
  /** Under which others see this person; null where clients say it themselves. */
  personName: string | null
}

export type FirstSync = { ms: number; bytes: number; applyMs: number }

const SYNC_MS = 60_000
/** Nothing that a client is sent is too large for it: limits are the server's. */
const MAX_FRAME_BYTES = 1 << 30

type Item = Y.Map<unknown>

/**
 * A lean client: one socket, one document, no reconnection. A `live` one applies what it hears; the others only count
 * it and catch up at the end, so that hundreds of them fit into one process beside the server.
 */
export class BenchClient {
  readonly doc = new Y.Doc()
  readonly items: Y.Map<Item> = this.doc.getMap('items')
  readonly seat: Seat
  readonly wire: Wire
  readonly isLive: boolean
  updatesReceived = 0
  presenceReceived = 0
  bytesReceived = 0
  /** Update-carrying messages sent, and how many of them the server has acknowledged. */
  sent = 0
  acked = 0
  readonly refusals: string[] = []
  /** Why the socket is closed: its code; null while it is open. */
  closeCode: number | null = null
  onUpdate: (update: Uint8Array) => void = () => undefined
  onAck: (acked: number) => void = () => undefined
  onPresence: (body: Uint8Array) => void = () => undefined
  #ws: WebSocket | null = null
  #onStep2: ((bytes: number, applyMs: number) => void) | null = null
  #presenceClock = 0
  readonly #reader: Reader = {
    onSync: (step, body) => this.#onSync(step, body),
    onAck: (n) => {
      this.acked = n ?? this.acked + 1
      this.onAck(this.acked)
    },
    onRefused: (reason) => this.refusals.push(reason),
    onPresence: (body) => {
      this.presenceReceived++
      this.onPresence(body)
    },
  }

  constructor(seat: Seat, options: { dialect: Dialect; isLive?: boolean }) {
    this.seat = seat
    this.wire = new Wire(options.dialect, seat.documentName)
    this.isLive = options.isLive ?? true
    this.doc.on('update', (update: Uint8Array, origin: unknown) => {
      if (origin !== this) this.#sendUpdate(UPDATE, update)
    })
  }

  /** Opens the socket and resolves after the first sync. */
  connect(limitMs = SYNC_MS): Promise<FirstSync> {
    const startedMs = performance.now()
    const { url, headers } = this.seat
    const ws = new WebSocket(url, { headers, perMessageDeflate: false, maxPayload: MAX_FRAME_BYTES })
    this.#ws = ws
    ws.on('message', (frame: Buffer) => this.#hear(frame))
    ws.on('open', () => {
      for (const frame of this.wire.greetings()) ws.send(frame)
      ws.send(this.wire.sync(STEP_1, Y.encodeStateVector(this.doc)))
    })
    return new Promise((resolve, reject) => {
      const fail = (why: string) => {
        clearTimeout(timer)
        reject(new Error(`${why}: ${url}`))
      }
      const timer = setTimeout(() => {
        ws.terminate()
        fail(`no sync within ${limitMs} ms`)
      }, limitMs)
      ws.on('error', (error) => fail(error.message))
      ws.on('close', (code) => {
        this.closeCode = code
        fail(`closed with ${code} before it was in step`)
      })
      this.#onStep2 = (bytes, applyMs) => {
        clearTimeout(timer)
        resolve({ ms: performance.now() - startedMs, bytes, applyMs })
      }
    })
  }

  /** Asks for all that this client lacks and resolves when it has it; false when no answer came. */
  catchUp(limitMs = SYNC_MS): Promise<boolean> {
    return new Promise((resolve) => {
      if (!this.isOpen) return resolve(false)
      const timer = setTimeout(() => resolve(false), limitMs)
      this.#onStep2 = () => {
        clearTimeout(timer)
        resolve(true)
      }
      this.send(this.wire.sync(STEP_1, Y.encodeStateVector(this.doc)))
    })
  }

  #hear(frame: Buffer): void {
    this.bytesReceived += frame.length
    if (!this.isLive) {
      if (this.wire.isUpdate(frame)) {
        this.updatesReceived++
        return
      }
      if (this.wire.isPresence(frame)) {
        this.presenceReceived++
        return
      }
    }
    this.wire.read(frame, this.#reader)
  }

  #onSync(step: number, body: Uint8Array): void {
    if (step === STEP_1) {
      this.#sendUpdate(STEP_2, Y.encodeStateAsUpdate(this.doc, body))
      return
    }
    const startedMs = performance.now()
    Y.applyUpdate(this.doc, body, this)
    if (step === STEP_2) {
      const done = this.#onStep2
      this.#onStep2 = null
      done?.(body.length, performance.now() - startedMs)
    } else {
      this.updatesReceived++
      this.onUpdate(body)
    }
  }

  #sendUpdate(step: number, update: Uint8Array): void {
    if (!this.isOpen) return
    this.sent++
    this.send(this.wire.sync(step, update))
  }

  get isOpen(): boolean {
    return this.#ws?.readyState === WebSocket.OPEN
  }

  send(frame: Uint8Array | string): void {
    if (this.isOpen) this.#ws?.send(frame)
  }

  /** Reads no more, and keeps the socket. */
  stopReading(): void {
    this.#ws?.pause()
  }

  /** The clock just past this client's own latest change. */
  get clock(): number {
    return Y.getState(this.doc.store, this.doc.clientID)
  }

  addItems(count: number, from = 0): void {
    this.doc.transact(() => {
      for (let i = from; i < from + count; i++) this.items.set(`item-${i}`, newItem(i))
    })
  }

  move(id: string, x: number, y: number): void {
    this.doc.transact(() => {
      const item = this.items.get(id)
      item?.set('x', x)
      item?.set('y', y)
    })
  }

  /** Shows others where this client's pointer is. */
  point(x: number, y: number, name = 'bench'): void {
    this.show({ user: { name }, pointer: [x, y] })
  }

  show(state: unknown): void {
    this.send(this.wire.presence([{ clientId: this.doc.clientID, clock: ++this.#presenceClock, state }]))
  }

  close(): void {
    this.#ws?.close()
    this.doc.destroy()
  }

  /** Goes without a goodbye. */
  vanish(): void {
    this.#ws?.removeAllListeners('message')
    this.#ws?.terminate()
  }
}

// Seven keys, as a thing on a wall has them; position is two of them, so that a move is two sets in one transaction.
function newItem(i: number): Item {
  return new Y.Map<unknown>([
    ['kind', 'card'],
    ['title', `Item number ${i}`],
    ['color', '#aabbcc'],
    ['x', i % 100],
    ['y', Math.floor(i / 100)],
    ['w', 120],
    ['h', 80],
  ])
}

/** State vector and content of a client's document: equal for equal documents. */
export function fingerprint({ doc, items }: BenchClient): string {
  const vector = [...Y.decodeStateVector(Y.encodeStateVector(doc))].sort(([a], [b]) => a - b)
  const content = Object.entries(items.toJSON())
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([id, item]) => [id, Object.entries(item as object).sort(([a], [b]) => (a < b ? -1 : 1))])
  return JSON.stringify([vector, content])
}
