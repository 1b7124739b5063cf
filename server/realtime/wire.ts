import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import { type Hello, MESSAGE, type Refusal } from '#shared/realtime/protocol.ts'

/** What a browser says; protocol.ts describes the frames. */
export type ClientMessage =
  | { kind: 'step 1'; stateVector: Uint8Array }
  | { kind: 'step 2'; update: Uint8Array }
  | { kind: 'update'; update: Uint8Array }
  | { kind: 'presence'; body: Uint8Array }
  | { kind: 'query presence' }
  | { kind: 'unknown'; type: number }

const STEP_1 = 0
const STEP_2 = 1
const UPDATE = 2

/**
 * Reads one frame; throws when it is no message.
 *
 * Payloads are copies of exactly their length: lib0 reads by view and does not stop at the end of one, so a forged
 * length inside an update would otherwise read on into whatever memory the frame's buffer shares.
 */
export function readMessage(frame: Uint8Array): ClientMessage {
  const decoder = decoding.createDecoder(frame)
  const type = decoding.readVarUint(decoder)
  if (type === MESSAGE.sync) {
    const step = decoding.readVarUint(decoder)
    if (step === STEP_1) return { kind: 'step 1', stateVector: readBytes(decoder) }
    if (step === STEP_2) return { kind: 'step 2', update: readBytes(decoder) }
    if (step === UPDATE) return { kind: 'update', update: readBytes(decoder) }
    throw new Error('no such sync message')
  }
  if (type === MESSAGE.presence) return { kind: 'presence', body: readBytes(decoder) }
  if (type === MESSAGE.queryPresence) return { kind: 'query presence' }
  return { kind: 'unknown', type }
}

function readBytes(decoder: decoding.Decoder): Uint8Array {
  const length = decoding.readVarUint(decoder)
  const from = decoder.pos
  if (length > decoder.arr.length - from) throw new Error('shorter than it says')
  decoder.pos += length
  return new Uint8Array(decoder.arr.subarray(from, from + length))
}

function sync(step: number, body: Uint8Array): Uint8Array {
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, MESSAGE.sync)
    encoding.writeVarUint(encoder, step)
    encoding.writeVarUint8Array(encoder, body)
  })
}

export const step1Frame = (stateVector: Uint8Array): Uint8Array => sync(STEP_1, stateVector)
export const step2Frame = (update: Uint8Array): Uint8Array => sync(STEP_2, update)
export const updateFrame = (update: Uint8Array): Uint8Array => sync(UPDATE, update)

export function savedFrame(n: number): Uint8Array {
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, MESSAGE.saved)
    encoding.writeVarUint(encoder, n)
  })
}

export function refusedFrame(n: number, reason: Refusal): Uint8Array {
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, MESSAGE.refused)
    encoding.writeVarUint(encoder, n)
    encoding.writeVarString(encoder, reason)
  })
}

export function helloFrame(hello: Hello): Uint8Array {
  return jsonFrame(MESSAGE.hello, hello)
}

export function changedFrame(queryKeys: readonly (readonly string[])[]): Uint8Array {
  return jsonFrame(MESSAGE.changed, queryKeys)
}

function jsonFrame(type: number, value: unknown): Uint8Array {
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, type)
    encoding.writeVarString(encoder, JSON.stringify(value))
  })
}

/** One person's presence; `state` is JSON, `null` for gone. */
export type PresenceEntry = { clientId: number; clock: number; state: string }

export function presenceFrame(entries: readonly PresenceEntry[]): Uint8Array {
  return presenceFrames(entries).all
}

/** The frame with all entries, and those with all but one, made from the same bytes: everybody is told of the others. */
export function presenceFrames(entries: readonly PresenceEntry[]): {
  all: Uint8Array
  allBut(index: number): Uint8Array
} {
  const starts: number[] = []
  const encoder = encoding.createEncoder()
  for (const entry of entries) {
    starts.push(encoding.length(encoder))
    encoding.writeVarUint(encoder, entry.clientId)
    encoding.writeVarUint(encoder, entry.clock)
    encoding.writeVarString(encoder, entry.state)
  }
  const bytes = encoding.toUint8Array(encoder)
  return {
    all: presenceMessage(entries.length, bytes),
    allBut: (index) => {
      const start = starts[index] ?? bytes.length
      const end = starts[index + 1] ?? bytes.length
      return presenceMessage(entries.length - 1, bytes.subarray(0, start), bytes.subarray(end))
    },
  }
}

function presenceMessage(count: number, ...parts: readonly Uint8Array[]): Uint8Array {
  const countBytes = encoding.encode((encoder) => encoding.writeVarUint(encoder, count))
  return encoding.encode((encoder) => {
    encoding.writeVarUint(encoder, MESSAGE.presence)
    encoding.writeVarUint(
      encoder,
      parts.reduce((sum, part) => sum + part.length, countBytes.length),
    )
    for (const part of [countBytes, ...parts]) encoding.writeUint8Array(encoder, part)
  })
}

/** The single entry of a presence message, or how many there are instead; throws when it is none. */
export function readPresence(body: Uint8Array): PresenceEntry | number {
  const decoder = decoding.createDecoder(body)
  const count = decoding.readVarUint(decoder)
  if (count !== 1) return count
  const clientId = decoding.readVarUint(decoder)
  const clock = decoding.readVarUint(decoder)
  const state = new TextDecoder('utf-8', { fatal: true }).decode(readBytes(decoder))
  return { clientId, clock, state }
}
