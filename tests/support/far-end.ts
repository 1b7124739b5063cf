import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import { readSyncMessage, writeSyncStep1, writeUpdate } from 'y-protocols/sync'
import * as Y from 'yjs'
import { DOCUMENT_SCHEMA } from '#shared/realtime/documents.ts'
import { type Hello, MESSAGE, type Refusal } from '#shared/realtime/protocol.ts'

type Socket = {
  url: string
  /** Update-carrying messages that came over it. */
  received: Uint8Array[]
  give(type: number, write: (encoder: encoding.Encoder) => void): void
  fall(code: number): void
}

export type FarEnd = {
  /** One document, as the server has it. */
  doc: Y.Doc
  /** What the next connection is told. */
  hello: Hello
  /** Sockets opened so far, the newest last. */
  sockets: Socket[]
  /** How an attempt to connect ends: it is taken, or closed with a code (1006: no answer). */
  answer: 'take' | number
  /** Whether update-carrying messages are acknowledged, left without an answer, or refused. */
  updates: 'save' | 'hold' | Refusal
  /** Acknowledges everything that was left without an answer. */
  release(): void
  /** Asks for everything the other side has. */
  ask(): void
  /** Says hello again on the living connection. */
  sayHello(change: Partial<Hello>): void
  /** Ends the living connection. */
  fall(code?: number): void
  /** The class to put in place of the browser's. */
  WebSocket: typeof WebSocket
}

/** The server's side of one document's sockets, in the hands of a test. */
export function farEnd(): FarEnd {
  const doc = new Y.Doc()
  const end = {
    doc,
    hello: { role: 'photographer', mayWrite: true, epoch: 1, schema: DOCUMENT_SCHEMA, frozen: null } as Hello,
    sockets: [] as Socket[],
    answer: 'take' as FarEnd['answer'],
    updates: 'save' as FarEnd['updates'],
  }

  class FakeSocket extends EventTarget {
    static readonly OPEN = 1
    readonly OPEN = 1
    binaryType = 'arraybuffer'
    readyState = 0
    onopen: (() => void) | null = null
    onmessage: ((event: { data: ArrayBuffer }) => void) | null = null
    onclose: ((event: { code: number; reason: string }) => void) | null = null
    onerror: (() => void) | null = null
    received: Uint8Array[] = []
    #forward = (update: Uint8Array, origin: unknown) => {
      if (origin !== this) this.give(MESSAGE.sync, (encoder) => writeUpdate(encoder, update))
    }

    readonly url: string

    constructor(url: string) {
      super()
      this.url = url
      end.sockets.push(this)
      queueMicrotask(() => {
        if (this.readyState !== 0) return
        if (end.answer !== 'take') return this.fall(end.answer)
        this.readyState = 1
        this.onopen?.()
        this.give(MESSAGE.hello, (encoder) => encoding.writeVarString(encoder, JSON.stringify(end.hello)))
        this.give(MESSAGE.sync, (encoder) => writeSyncStep1(encoder, doc))
        doc.on('update', this.#forward)
      })
    }

    send(data: Uint8Array) {
      if (this.readyState !== 1) return
      const decoder = decoding.createDecoder(data)
      if (decoding.readVarUint(decoder) !== MESSAGE.sync) return
      if (data[1] === 0) return this.#answer(decoder)
      this.received.push(data)
      const n = this.received.length
      if (end.updates !== 'save' && end.updates !== 'hold') {
        const reason = end.updates
        return this.give(MESSAGE.refused, (encoder) => {
          encoding.writeVarUint(encoder, n)
          encoding.writeVarString(encoder, reason)
        })
      }
      readSyncMessage(decoder, encoding.createEncoder(), doc, this)
      if (end.updates === 'save') this.save()
    }

    #answer(decoder: decoding.Decoder) {
      this.give(MESSAGE.sync, (encoder) => readSyncMessage(decoder, encoder, doc, this))
      this.give(MESSAGE.sync, (encoder) => writeSyncStep1(encoder, doc))
    }

    save() {
      this.give(MESSAGE.saved, (encoder) => encoding.writeVarUint(encoder, this.received.length))
    }

    give(type: number, write: (encoder: encoding.Encoder) => void) {
      const encoder = encoding.createEncoder()
      encoding.writeVarUint(encoder, type)
      write(encoder)
      const data = new Uint8Array(encoding.toUint8Array(encoder)).buffer
      queueMicrotask(() => this.readyState === 1 && this.onmessage?.({ data }))
    }

    close() {
      this.readyState = 3
      doc.off('update', this.#forward)
    }

    fall(code: number) {
      this.close()
      this.onclose?.({ code, reason: '' })
    }
  }

  const living = () => end.sockets.at(-1)
  return Object.assign(end, {
    release() {
      end.updates = 'save'
      const socket = living()
      if (socket instanceof FakeSocket) socket.save()
    },
    ask() {
      living()?.give(MESSAGE.sync, (encoder) => writeSyncStep1(encoder, doc))
    },
    sayHello(change: Partial<Hello>) {
      end.hello = { ...end.hello, ...change }
      living()?.give(MESSAGE.hello, (encoder) => encoding.writeVarString(encoder, JSON.stringify(end.hello)))
    },
    fall(code = 1006) {
      living()?.fall(code)
    },
    // It has the parts of the browser's that are used.
    WebSocket: FakeSocket as unknown as typeof WebSocket,
  })
}
