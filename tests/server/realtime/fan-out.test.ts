import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import * as Y from 'yjs'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { FanOut } from '#server/realtime/fan-out.ts'
import { DEFAULT_SETTINGS } from '#server/realtime/settings.ts'
import { readMessage, step2Frame } from '#server/realtime/wire.ts'

/** A browser at the other end of a socket that holds what it is sent until it reads. */
class Reader {
  isSynced = true
  readonly doc = new Y.Doc()
  readonly frames: Uint8Array[] = []
  #unread: Uint8Array[] = []
  readsAtOnce = true
  closed: number | null = null

  get bufferedBytes(): number {
    return this.#unread.reduce((sum, frame) => sum + frame.length, 0)
  }

  send(frame: Uint8Array): void {
    this.frames.push(frame)
    this.#unread.push(frame)
    if (this.readsAtOnce) this.read()
  }

  read(): void {
    for (const frame of this.#unread) {
      const message = readMessage(frame)
      if (message.kind === 'update' || message.kind === 'step 2') Y.applyUpdate(this.doc, message.update)
    }
    this.#unread = []
  }

  close(code: number): void {
    this.closed = code
  }
}

const LAG_BYTES = 2_000
let doc: Y.Doc
let readers: Set<Reader>
let caughtUp: Reader[]
let fanOut: FanOut<Reader>

beforeEach(() => {
  vi.useFakeTimers()
  doc = new Y.Doc()
  readers = new Set()
  caughtUp = []
  fanOut = new FanOut(doc, {
    settings: { ...DEFAULT_SETTINGS, crowd: 2, lagBytes: LAG_BYTES, caughtUpBytes: 100 },
    readers,
    onCaughtUp: (reader) => caughtUp.push(reader),
  })
  doc.on('update', (update: Uint8Array, author: unknown) => {
    const reader = author instanceof Reader ? author : null
    if (reader) Y.applyUpdate(reader.doc, update)
    fanOut.push(update, reader)
  })
})
afterEach(() => {
  fanOut.stop()
  vi.useRealTimers()
})

function join(readsAtOnce = true): Reader {
  const reader = new Reader()
  reader.readsAtOnce = readsAtOnce
  readers.add(reader)
  return reader
}

function set(key: string, value: unknown, author: Reader | null = null): void {
  doc.transact(() => doc.getMap('items').set(key, value), author)
}

const itemsOf = (reader: Reader) => reader.doc.getMap('items').toJSON()

describe('what goes out', () => {
  it('is the first change at once, then one frame for all that comes within the window', () => {
    const [a, b] = [join(), join()]
    set('n', 0)
    expect(a.frames).toHaveLength(1)
    for (let n = 1; n <= 50; n++) set('n', n)
    expect(a.frames).toHaveLength(1)
    vi.advanceTimersByTime(DEFAULT_SETTINGS.mergeMs)
    expect(a.frames).toHaveLength(2)
    expect(itemsOf(a)).toEqual({ n: 50 })
    // One buffer for everybody.
    expect(b.frames[1]).toBe(a.frames[1])
    vi.advanceTimersByTime(DEFAULT_SETTINGS.mergeMs)
    set('n', 51)
    expect(a.frames).toHaveLength(3)
  })

  it('does not go back to its author, unless it is merged with what others wrote', () => {
    const [a, b] = [join(), join()]
    set('a', 1, a)
    expect([a.frames.length, b.frames.length]).toEqual([0, 1])
    set('a', 2, a)
    set('a', 3, a)
    vi.advanceTimersByTime(DEFAULT_SETTINGS.mergeMs)
    expect([a.frames.length, b.frames.length]).toEqual([0, 2])
    set('a', 4, a)
    set('b', 1, b)
    vi.advanceTimersByTime(DEFAULT_SETTINGS.mergeMs)
    expect([itemsOf(a), itemsOf(b)]).toEqual([
      { a: 4, b: 1 },
      { a: 4, b: 1 },
    ])
  })

  it('does not go to who has not asked for the document', () => {
    const a = join()
    a.isSynced = false
    set('n', 1)
    expect(a.frames).toHaveLength(0)
  })
})

describe('a reader that does not keep up', () => {
  it('is sent no more until it has read, and then once all that it missed, deletions too', () => {
    const [slow, other] = [join(false), join()]
    set('old', 'x')
    for (let n = 0; n < 100; n++) {
      set(`n ${n % 10}`, `${n} ${'x'.repeat(200)}`)
      vi.advanceTimersByTime(DEFAULT_SETTINGS.mergeMs)
    }
    doc.getMap('items').delete('old')
    vi.advanceTimersByTime(1_000)
    expect(fanOut.isLagging(slow)).toBe(true)
    expect(fanOut.laggingCount).toBe(1)
    expect(slow.frames.length).toBeLessThan(15)
    expect(other.frames.length).toBeGreaterThan(100)
    slow.readsAtOnce = true
    slow.read()
    const before = slow.frames.length
    vi.advanceTimersByTime(100)
    expect(slow.frames.length).toBe(before + 1)
    expect(caughtUp).toEqual([slow])
    expect(itemsOf(slow)).toEqual(doc.getMap('items').toJSON())
    set('after', 1)
    expect(itemsOf(slow)).toEqual(itemsOf(other))
  })

  it('is given up after the time it may take, longer when much is on its way', () => {
    const [small, large] = [join(false), join(false)]
    large.isSynced = false
    set('n', 'x'.repeat(LAG_BYTES))
    large.send(new Uint8Array(DEFAULT_SETTINGS.slowestBytesPerSecond * 60))
    large.isSynced = true
    set('n', 1)
    vi.advanceTimersByTime(DEFAULT_SETTINGS.lagMs + 2_000)
    expect([small.closed, large.closed]).toEqual([CLOSE.tryAgain, null])
    vi.advanceTimersByTime(60_000)
    expect(large.closed).toBe(CLOSE.tryAgain)
  })

  it('gets its answer later when it asks without reading, and only once', () => {
    const slow = join(false)
    set('n', 'x'.repeat(LAG_BYTES))
    const ask = () => fanOut.answer(slow, Y.encodeStateVector(new Y.Doc()), step2Frame)
    const before = slow.frames.length
    for (let i = 0; i < 50; i++) expect(ask()).toBe(0)
    expect(slow.frames.length).toBe(before)
    set('m', 2)
    slow.read()
    vi.advanceTimersByTime(100)
    expect(slow.frames.slice(before).map((frame) => readMessage(frame).kind)).toEqual(['step 2'])
    slow.read()
    expect(itemsOf(slow)).toEqual(doc.getMap('items').toJSON())
    expect(() => fanOut.answer(slow, Uint8Array.of(200, 1, 1), step2Frame)).toThrow()
  })

  it('that leaves is forgotten', () => {
    const slow = join(false)
    set('n', 'x'.repeat(LAG_BYTES))
    expect(fanOut.laggingCount).toBe(1)
    fanOut.leave(slow)
    expect(fanOut.laggingCount).toBe(0)
    vi.advanceTimersByTime(120_000)
    expect(slow.closed).toBe(null)
  })
})
