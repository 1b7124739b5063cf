// @vitest-environment jsdom
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import { type Reconnecting, keepConnected, reconnectDelayMs } from '#src/realtime/reconnect.ts'

/** A socket whose far end is the test. */
class TestSocket {
  static all: TestSocket[] = []
  static readonly OPEN = 1
  readonly OPEN = 1
  binaryType = ''
  readyState = 0
  onopen: (() => void) | null = null
  onmessage: ((event: { data: ArrayBuffer }) => void) | null = null
  onclose: ((event: { code: number; reason: string }) => void) | null = null
  onerror: (() => void) | null = null

  constructor() {
    TestSocket.all.push(this)
  }
  static get last(): TestSocket {
    const socket = TestSocket.all.at(-1)
    if (!socket) throw new Error('no socket yet')
    return socket
  }
  send() {
    // Nobody reads it.
  }
  close() {
    this.readyState = 3
  }
  open() {
    this.readyState = 1
    this.onopen?.()
  }
  /** An empty step 2: in step with the server. */
  sync() {
    this.onmessage?.({ data: new Uint8Array([0, 1, 2, 0, 0]).buffer })
  }
  fall(code = 1006) {
    this.readyState = 3
    this.onclose?.({ code, reason: '' })
  }
}

let provider: WebsocketProvider
let connection: Reconnecting
let failures: number[]

beforeEach(() => {
  vi.useFakeTimers()
  TestSocket.all = []
  failures = []
  provider = new WebsocketProvider('ws://test', 'doc', new Y.Doc(), {
    connect: false,
    disableBc: true,
    // It asks for the browser's own type of socket, of which it uses what this one has.
    WebSocketPolyfill: TestSocket as unknown as typeof WebSocket,
  })
  connection = keepConnected(provider, (count) => failures.push(count))
})
afterEach(() => {
  connection.destroy()
  provider.destroy()
  vi.restoreAllMocks()
  vi.useRealTimers()
})

function hearKeepAlive() {
  // The empty presence update.
  TestSocket.last.onmessage?.({ data: new Uint8Array([1, 1, 0]).buffer })
  // The library took the real clock before the test's was there.
  provider.wsLastMessageReceived = Date.now()
}
const wake = () => document.dispatchEvent(new Event('visibilitychange'))
const sockets = () => TestSocket.all.length

describe('reconnectDelayMs', () => {
  it('grows to 3 s in the first two minutes and to 30 s after them', () => {
    const longest = (attempt: number, downForMs: number) => reconnectDelayMs(attempt, downForMs, 1)
    expect([0, 1, 2, 3, 9].map((attempt) => longest(attempt, 1_000))).toEqual([500, 1_000, 2_000, 3_000, 3_000])
    expect(longest(3, 119_999)).toBe(3_000)
    expect(longest(20, 120_000)).toBe(30_000)
    expect(reconnectDelayMs(0, 0, 0)).toBeGreaterThan(0)
  })

  it('spreads those who fell together evenly over the pause', () => {
    const tenths = Array.from({ length: 10 }, () => 0)
    for (let n = 0; n < 1000; n++) {
      const tenth = Math.min(9, Math.floor((reconnectDelayMs(3, 0, (n + 0.5) / 1000) / 3_000) * 10))
      tenths[tenth] = (tenths[tenth] ?? 0) + 1
    }
    expect(Math.max(...tenths)).toBeLessThanOrEqual(115)
  })
})

describe('keepConnected', () => {
  it('comes back by itself, again and again, until the connection is in step', async () => {
    connection.start()
    TestSocket.last.open()
    TestSocket.last.sync()
    for (let n = 1; n <= 6; n++) {
      TestSocket.last.fall()
      await vi.advanceTimersByTimeAsync(3_000)
      expect(sockets()).toBe(n + 1)
    }
    expect(failures).toEqual([1, 2, 3, 4, 5, 6])
    TestSocket.last.open()
    TestSocket.last.sync()
    await vi.advanceTimersByTimeAsync(11_000)
    TestSocket.last.fall()
    expect(failures.at(-1)).toBe(1)
  })

  it('is in no more hurry when the server lets it in and throws it out at once, again and again', async () => {
    vi.spyOn(Math, 'random').mockReturnValue(0.999)
    connection.start()
    while (sockets() < 5) {
      if (TestSocket.last.readyState === 0) {
        TestSocket.last.open()
        TestSocket.last.sync()
        TestSocket.last.fall()
      }
      await vi.advanceTimersByTimeAsync(100)
    }
    expect(failures).toEqual([1, 2, 3, 4])
    const before = sockets()
    TestSocket.last.fall()
    await vi.advanceTimersByTimeAsync(2_500)
    expect(sockets()).toBe(before)
  })

  it('never connects again once it is over', async () => {
    connection.start()
    connection.destroy()
    provider.destroy()
    connection.start()
    await vi.advanceTimersByTimeAsync(10_000)
    expect(sockets()).toBe(1)
  })

  it('is in no hurry after two minutes', async () => {
    vi.spyOn(Math, 'random').mockReturnValue(0.999)
    connection.start()
    TestSocket.last.fall()
    while (failures.length < 60) {
      await vi.advanceTimersByTimeAsync(100)
      if (TestSocket.last.readyState === 0) TestSocket.last.fall()
    }
    const before = sockets()
    await vi.advanceTimersByTimeAsync(20_000)
    expect(sockets()).toBe(before)
    await vi.advanceTimersByTimeAsync(11_000)
    expect(sockets()).toBe(before + 1)
  })

  it('gives up an attempt without an answer', async () => {
    connection.start()
    await vi.advanceTimersByTimeAsync(10_000)
    expect(failures).toEqual([1])
    await vi.advanceTimersByTimeAsync(500)
    expect(sockets()).toBe(2)
  })

  it('makes a connection anew on waking when the server was silent for longer than it ever is', async () => {
    connection.start()
    const first = TestSocket.last
    first.open()
    first.sync()
    // A phone that sleeps: the clock goes on, timers do not.
    vi.setSystemTime(Date.now() + 3_600_000)
    expect(sockets()).toBe(1)
    wake()
    expect(sockets()).toBe(2)
    expect(first.readyState).toBe(3)
    TestSocket.last.open()
    TestSocket.last.sync()
    await vi.advanceTimersByTimeAsync(60)
    expect(sockets()).toBe(2)
  })

  it.each(['pageshow', 'resume', 'visibilitychange'])('wakes on %s', (event) => {
    connection.start()
    TestSocket.last.open()
    vi.setSystemTime(Date.now() + 21_000)
    ;(event === 'pageshow' ? window : document).dispatchEvent(new Event(event))
    expect(sockets()).toBe(2)
  })

  it('leaves a connection alone that was heard from', () => {
    connection.start()
    TestSocket.last.open()
    vi.setSystemTime(Date.now() + 15_000)
    hearKeepAlive()
    vi.setSystemTime(Date.now() + 15_000)
    wake()
    expect(sockets()).toBe(1)
  })

  it('does not wait for the pause to end when the page is seen again, nor wakes one that is hidden', () => {
    vi.spyOn(Math, 'random').mockReturnValue(0.999)
    connection.start()
    TestSocket.last.fall()
    const visibility = vi.spyOn(document, 'visibilityState', 'get').mockReturnValue('hidden')
    wake()
    expect(sockets()).toBe(1)
    visibility.mockReturnValue('visible')
    wake()
    expect(sockets()).toBe(2)
  })

  it('trusts no connection of before when there is a network again', () => {
    connection.start()
    TestSocket.last.open()
    hearKeepAlive()
    window.dispatchEvent(new Event('online'))
    expect(sockets()).toBe(2)
  })

  it('stays away after a close for good, and after being stopped', async () => {
    connection.start()
    TestSocket.last.open()
    TestSocket.last.fall(4404)
    await vi.advanceTimersByTimeAsync(60_000)
    wake()
    window.dispatchEvent(new Event('online'))
    expect(sockets()).toBe(1)
    connection.start()
    expect(sockets()).toBe(2)
    connection.stop()
    await vi.advanceTimersByTimeAsync(60_000)
    expect(sockets()).toBe(2)
  })
})
