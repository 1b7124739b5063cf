import { describe, expect, it } from 'vitest'
import {
  presenceFrame,
  readMessage,
  readPresence,
  refusedFrame,
  savedFrame,
  updateFrame,
} from '#server/realtime/wire.ts'

describe('readMessage', () => {
  it('reads back an update as a copy of exactly its length', () => {
    const message = readMessage(updateFrame(Uint8Array.of(1, 2, 3)))
    expect(message).toEqual({ kind: 'update', update: Uint8Array.of(1, 2, 3) })
    if (message.kind === 'update') expect(message.update.buffer.byteLength).toBe(3)
  })

  it('refuses a length beyond the frame even where its memory goes on', () => {
    const memory = Uint8Array.from([0, 2, 5, 1, 2, 83, 69, 67])
    expect(() => readMessage(memory.subarray(0, 5))).toThrow('shorter')
  })

  it.each([[[]], [[0]], [[0, 7]], [[0, 0]], [[1]], [[255]]])('throws for %j', (bytes) => {
    expect(() => readMessage(Uint8Array.from(bytes))).toThrow()
  })

  it('names a type it does not know', () => {
    expect(readMessage(Uint8Array.of(77, 1))).toEqual({ kind: 'unknown', type: 77 })
  })
})

describe('frames', () => {
  it('are in the encoding of lib0', () => {
    expect([...savedFrame(300)]).toEqual([100, 0xac, 0x02])
    expect([...refusedFrame(1, 'full')]).toEqual([101, 1, 4, 102, 117, 108, 108])
    // What keeps y-websocket from closing itself.
    expect([...presenceFrame([])]).toEqual([1, 1, 0])
  })
})

describe('readPresence', () => {
  it('reads one entry, counts several', () => {
    const entry = { clientId: 5, clock: 6, state: '{"a":1}' }
    const body = (entries: (typeof entry)[]) => {
      const message = readMessage(presenceFrame(entries))
      return message.kind === 'presence' ? message.body : new Uint8Array()
    }
    expect(readPresence(body([entry]))).toEqual(entry)
    expect(readPresence(body([entry, entry]))).toBe(2)
  })

  it('does not read on beyond its end', () => {
    const memory = Uint8Array.from([1, 5, 6, 9, 110, 117, 108, 108, 83, 69, 67, 82, 69, 84])
    expect(() => readPresence(memory.subarray(0, 8))).toThrow('shorter')
  })
})
