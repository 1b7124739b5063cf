import { describe, expect, it } from 'vitest'
import { Awareness, applyAwarenessUpdate } from 'y-protocols/awareness'
import * as Y from 'yjs'
import {
  presenceFrame,
  presenceFrames,
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

describe('presenceFrames', () => {
  const entries = [1, 300, 70_000].map((clientId, i) => ({
    clientId,
    clock: i * 200,
    state: `{"at":"${'é'.repeat(i * 100)}"}`,
  }))
  /** What the library that browsers use makes of a frame. */
  function heard(frame: Uint8Array): [number, unknown][] {
    const message = readMessage(frame)
    if (message.kind !== 'presence') return []
    const awareness = new Awareness(new Y.Doc())
    awareness.setLocalState(null)
    applyAwarenessUpdate(awareness, message.body, 'test')
    awareness.destroy()
    return [...awareness.getStates()]
  }

  it('hold all, or all but one', () => {
    const states = entries.map(({ clientId, state }) => [clientId, JSON.parse(state)])
    const frames = presenceFrames(entries.map((entry) => ({ ...entry, clock: entry.clock + 1 })))
    expect(heard(frames.all)).toEqual(states)
    for (const index of [0, 1, 2]) expect(heard(frames.allBut(index))).toEqual(states.filter((_, i) => i !== index))
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
