import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import { MESSAGE } from '#shared/realtime/protocol.ts'

/**
 * The two dialects of the Yjs websocket protocol: `yjs` is `[type][body]`, one message a frame, as Sconce and y-websocket
 * speak; in `hocuspocus` each message begins with the document's name, and the first one signs in.
 */
export type Dialect = 'yjs' | 'hocuspocus'

export const STEP_1 = 0
export const STEP_2 = 1
export const UPDATE = 2

const HOCUSPOCUS_AUTH = 2
const HOCUSPOCUS_SYNC_REPLY = 4
const HOCUSPOCUS_SYNC_STATUS = 8

/** What is done with the messages of a frame. */
export type Reader = {
  onSync(step: number, body: Uint8Array): void
  /** `n`: the first n update-carrying messages are acknowledged; null: one more is. */
  onAck(n: number | null): void
  onRefused(reason: string): void
  onPresence(body: Uint8Array): void
}

export type PresenceEntry = { clientId: number; clock: number; state: unknown }

/** Writes and reads frames about one document. */
export class Wire {
  readonly #isHocuspocus: boolean
  readonly #prefix: Uint8Array

  constructor(dialect: Dialect, documentName: string) {
    this.#isHocuspocus = dialect === 'hocuspocus'
    this.#prefix = encoding.encode((encoder) => {
      if (this.#isHocuspocus) encoding.writeVarString(encoder, documentName)
    })
  }

  #frame(write: (encoder: encoding.Encoder) => void): Uint8Array {
    return encoding.encode((encoder) => {
      encoding.writeUint8Array(encoder, this.#prefix)
      write(encoder)
    })
  }

  /** What goes first when the socket opens. */
  greetings(): Uint8Array[] {
    if (!this.#isHocuspocus) return []
    const signIn = this.#frame((encoder) => {
      encoding.writeVarUint(encoder, HOCUSPOCUS_AUTH)
      encoding.writeVarUint(encoder, 0)
      encoding.writeVarString(encoder, 'bench')
    })
    return [signIn]
  }

  sync(step: number, body: Uint8Array): Uint8Array {
    return this.#frame((encoder) => {
      encoding.writeVarUint(encoder, MESSAGE.sync)
      encoding.writeVarUint(encoder, step)
      encoding.writeVarUint8Array(encoder, body)
    })
  }

  presence(entries: readonly PresenceEntry[]): Uint8Array {
    return this.#frame((encoder) => {
      encoding.writeVarUint(encoder, MESSAGE.presence)
      const body = encoding.encode((inner) => {
        encoding.writeVarUint(inner, entries.length)
        for (const { clientId, clock, state } of entries) {
          encoding.writeVarUint(inner, clientId)
          encoding.writeVarUint(inner, clock)
          encoding.writeVarString(inner, JSON.stringify(state))
        }
      })
      encoding.writeVarUint8Array(encoder, body)
    })
  }

  /** Whether this frame is a change of the document. Looks at two bytes and makes nothing. */
  isUpdate(frame: Uint8Array): boolean {
    const at = this.#prefix.length
    return frame[at] === MESSAGE.sync && frame[at + 1] === UPDATE
  }

  /** Whether this frame is somebody's presence. Looks at one byte and makes nothing. */
  isPresence(frame: Uint8Array): boolean {
    return frame[this.#prefix.length] === MESSAGE.presence
  }

  /** Reads all messages of a frame; what the bench has no use for ends it. */
  read(frame: Uint8Array, reader: Reader): void {
    const decoder = decoding.createDecoder(frame)
    while (decoding.hasContent(decoder)) {
      if (this.#isHocuspocus) decoding.readVarString(decoder)
      const type = decoding.readVarUint(decoder)
      if (type === MESSAGE.sync || (this.#isHocuspocus && type === HOCUSPOCUS_SYNC_REPLY)) {
        reader.onSync(decoding.readVarUint(decoder), decoding.readVarUint8Array(decoder))
      } else if (type === MESSAGE.presence) {
        reader.onPresence(decoding.readVarUint8Array(decoder))
      } else if (this.#isHocuspocus) {
        if (type !== HOCUSPOCUS_SYNC_STATUS) return
        if (decoding.readVarUint(decoder) === 1) reader.onAck(null)
        else reader.onRefused('not accepted')
      } else if (type === MESSAGE.saved) {
        reader.onAck(decoding.readVarUint(decoder))
      } else if (type === MESSAGE.refused) {
        decoding.readVarUint(decoder)
        reader.onRefused(decoding.readVarString(decoder))
      } else {
        return
      }
    }
  }
}

/** The entries of a presence message's body. */
export function readPresence(body: Uint8Array): PresenceEntry[] {
  const decoder = decoding.createDecoder(body)
  return Array.from({ length: decoding.readVarUint(decoder) }, () => ({
    clientId: decoding.readVarUint(decoder),
    clock: decoding.readVarUint(decoder),
    state: JSON.parse(decoding.readVarString(decoder)) as unknown,
  }))
}
