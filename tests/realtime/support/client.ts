import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import WebSocket from 'ws'
import * as Y from 'yjs'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import { type Hello, MESSAGE, documentPath } from '#shared/realtime/protocol.ts'
import { ORIGIN } from './world.ts'

export type ClientOptions = {
  url: string
  shootId: string
  kind: DocumentKind | string
  /** Its row in `session`; none for somebody who is signed out. */
  sessionId?: string
  acks?: boolean
  origin?: string | null
  /** Starts with what another client has. */
  doc?: Y.Doc
  /** Whether to say step 1 at once, as y-websocket does. */
  asks?: boolean
}

/** A lean client: one socket, one document, no reconnection; it keeps everything it hears. */
export class TestClient {
  readonly doc: Y.Doc
  readonly ws: WebSocket
  /** Close code, or minus the HTTP status of a refused upgrade. */
  readonly ended: Promise<number>
  sent = 0
  saved = 0
  isSynced = false
  endCode: number | null = null
  hello: Hello | null = null
  readonly refusals: { n: number; reason: string }[] = []
  readonly changed: unknown[] = []
  readonly presence = new Map<number, unknown>()
  readonly types: number[] = []
  readonly savedAt: { n: number; atMs: number }[] = []
  onSaved: (n: number) => void = () => undefined
  onUpdate: () => void = () => undefined
  /** When set, updates are not sent by themselves. */
  isSilent = false
  /** Whether it answers the server's step 1. */
  answers = true

  constructor(options: ClientOptions) {
    this.doc = options.doc ?? new Y.Doc()
    const path = documentPath(options.shootId, options.kind)
    this.ws = new WebSocket(`${options.url}${path}${options.acks === false ? '' : '?ack=1'}`, {
      headers: {
        ...(options.sessionId ? { 'x-test-session': options.sessionId } : {}),
        ...(options.origin === null ? {} : { origin: options.origin ?? ORIGIN }),
      },
      perMessageDeflate: false,
    })
    this.ended = new Promise((resolve) => {
      const end = (code: number) => {
        this.endCode ??= code
        resolve(this.endCode)
      }
      this.ws.on('close', end)
      this.ws.on('unexpected-response', (_, response) => {
        end(-(response.statusCode ?? 0))
        this.ws.terminate()
      })
    })
    this.ws.on('error', () => undefined)
    this.ws.on('message', (data: Buffer) => this.#hear(Uint8Array.from(data)))
    if (options.asks !== false) this.ws.on('open', () => this.ask())
    this.doc.on('update', (update: Uint8Array, origin: unknown) => {
      if (origin !== this && !this.isSilent) this.sendUpdate(update)
    })
  }

  #hear(frame: Uint8Array): void {
    const decoder = decoding.createDecoder(frame)
    const type = decoding.readVarUint(decoder)
    this.types.push(type)
    if (type === MESSAGE.sync) {
      const step = decoding.readVarUint(decoder)
      const body = decoding.readVarUint8Array(decoder)
      if (step === 0 && !this.answers) return
      if (step === 0) {
        this.sent++
        this.send(syncFrame(1, Y.encodeStateAsUpdate(this.doc, body)))
        return
      }
      Y.applyUpdate(this.doc, body, this)
      if (step === 1) this.isSynced = true
      this.onUpdate()
    } else if (type === MESSAGE.saved) {
      this.saved = decoding.readVarUint(decoder)
      this.savedAt.push({ n: this.saved, atMs: performance.now() })
      this.onSaved(this.saved)
    } else if (type === MESSAGE.refused) {
      this.refusals.push({ n: decoding.readVarUint(decoder), reason: decoding.readVarString(decoder) })
    } else if (type === MESSAGE.hello) this.hello = JSON.parse(decoding.readVarString(decoder))
    else if (type === MESSAGE.changed) this.changed.push(JSON.parse(decoding.readVarString(decoder)))
    else if (type === MESSAGE.presence) {
      const inner = decoding.createDecoder(decoding.readVarUint8Array(decoder))
      for (let left = decoding.readVarUint(inner); left > 0; left--) {
        const clientId = decoding.readVarUint(inner)
        decoding.readVarUint(inner)
        const state: unknown = JSON.parse(decoding.readVarString(inner))
        if (state === null) this.presence.delete(clientId)
        else this.presence.set(clientId, state)
      }
    }
  }

  send(frame: Uint8Array | string): void {
    if (this.ws.readyState === WebSocket.OPEN) this.ws.send(frame)
  }

  sendUpdate(update: Uint8Array): void {
    if (this.ws.readyState !== WebSocket.OPEN) return
    this.sent++
    this.send(syncFrame(2, update))
  }

  ask(): void {
    this.send(syncFrame(0, Y.encodeStateVector(this.doc)))
  }

  show(clientId: number, clock: number, state: unknown): void {
    this.send(presenceMessage([{ clientId, clock, state }]))
  }

  get items(): Y.Map<unknown> {
    return this.doc.getMap('items')
  }

  /** Resolves when the first exchange is done and all that was sent is acknowledged. */
  async ready(): Promise<this> {
    await until(() => (this.isSynced && this.sent > 0 && this.saved === this.sent) || this.endCode !== null)
    if (this.endCode !== null) throw new Error(`closed with ${this.endCode}`)
    return this
  }

  close(): void {
    this.ws.close()
  }

  vanish(): void {
    this.ws.terminate()
  }
}

export function syncFrame(step: 0 | 1 | 2, body: Uint8Array): Uint8Array {
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, MESSAGE.sync)
    encoding.writeVarUint(encoder, step)
    encoding.writeVarUint8Array(encoder, body)
  })
}

export function presenceMessage(entries: readonly { clientId: number; clock: number; state: unknown }[]): Uint8Array {
  const body = encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, entries.length)
    for (const { clientId, clock, state } of entries) {
      encoding.writeVarUint(encoder, clientId)
      encoding.writeVarUint(encoder, clock)
      encoding.writeVarString(encoder, JSON.stringify(state))
    }
  })
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, MESSAGE.presence)
    encoding.writeVarUint8Array(encoder, body)
  })
}

/** Waits for something that comes by itself. Fails after a time no healthy machine needs. */
export async function until(isSo: () => boolean | Promise<boolean>, limitMs = 10_000): Promise<void> {
  const startMs = performance.now()
  while (!(await isSo())) {
    if (performance.now() - startMs > limitMs) throw new Error(`not so after ${limitMs} ms: ${isSo.toString()}`)
    await pause(5)
  }
}

export function pause(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms))
}

/** A document's content in a form that is equal for equal content. */
export function contentOf(doc: Y.Doc): string {
  const sorted = (value: unknown): unknown => {
    if (Array.isArray(value)) return value.map(sorted)
    if (typeof value !== 'object' || value === null) return value
    return Object.fromEntries(
      Object.entries(value)
        .sort(([a], [b]) => (a < b ? -1 : 1))
        .map(([key, inner]) => [key, sorted(inner)]),
    )
  }
  return JSON.stringify(sorted(Object.fromEntries([...doc.share.keys()].map((key) => [key, doc.getMap(key).toJSON()]))))
}
