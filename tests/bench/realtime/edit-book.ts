import { performance } from 'node:perf_hooks'
import * as Y from 'yjs'
import type { BenchClient } from './client.ts'

/** One client's edits in order. `atMs` is -1 for those made before measuring began. */
type Own = {
  clocks: number[]
  atMs: number[]
  /** By message number: its time, for those that wait for an acknowledgement. */
  waiting: { n: number; atMs: number }[]
}

/**
 * Times edits from their author's transaction until a live peer has them in its document, and until they are
 * acknowledged. Each live client walks down the list of each author in its document, so that edits which a server
 * merged are still timed one by one.
 */
export class EditBook {
  readonly peerMs: number[] = []
  readonly ackMs: number[] = []
  isMeasuring = false
  /** Edits made while measuring. */
  made = 0
  /** Of those, how many times a live peer has seen one. */
  seen = 0
  readonly #own = new Map<number, Own>()
  readonly #clients: BenchClient[] = []
  readonly #expectsAcks: boolean

  constructor(options: { expectsAcks: boolean }) {
    this.#expectsAcks = options.expectsAcks
  }

  /** From now on this client's edits are timed, and what it sees of others. */
  follow(client: BenchClient): void {
    const own: Own = { clocks: [], atMs: [], waiting: [] }
    this.#own.set(client.doc.clientID, own)
    this.#clients.push(client)
    if (client.isLive) {
      const next = new Map<number, number>()
      client.onUpdate = (update) => this.#look(client, update, next)
    }
    client.onAck = (acked) => {
      const now = performance.now()
      let settled = 0
      for (const { n, atMs } of own.waiting) {
        if (n > acked) break
        settled++
        if (atMs > 0) this.ackMs.push(now - atMs)
      }
      own.waiting.splice(0, settled)
    }
  }

  #look(client: BenchClient, update: Uint8Array, next: Map<number, number>): void {
    const now = performance.now()
    for (const [author, end] of Y.parseUpdateMeta(update).to) {
      const own = author === client.doc.clientID ? undefined : this.#own.get(author)
      if (!own) continue
      let i = next.get(author) ?? 0
      for (; (own.clocks[i] ?? Infinity) <= end; i++) {
        const atMs = own.atMs[i] ?? -1
        if (atMs < 0) continue
        this.peerMs.push(now - atMs)
        this.seen++
      }
      next.set(author, i)
    }
  }

  /** Makes an edit and notes it. */
  edit(client: BenchClient, change: () => void): void {
    const own = this.#own.get(client.doc.clientID)
    if (!own || !client.isOpen) return
    const now = performance.now()
    change()
    const atMs = this.isMeasuring ? now : -1
    own.clocks.push(client.clock)
    own.atMs.push(atMs)
    if (this.#expectsAcks) own.waiting.push({ n: client.sent, atMs })
    if (this.isMeasuring) this.made++
  }

  /** How often a live peer should have seen a measured edit, once all have arrived. */
  expected(): number {
    return this.#count((author) => this.#clients.filter((peer) => peer.isLive && isPeer(author, peer)).length)
  }

  /** The same for all peers, the counting ones too. */
  deliveries(): number {
    return this.#count((author) => this.#clients.filter((peer) => isPeer(author, peer)).length)
  }

  #count(peersOf: (author: BenchClient) => number): number {
    let sum = 0
    for (const author of this.#clients) {
      const edits = this.#own.get(author.doc.clientID)?.atMs.filter((atMs) => atMs > 0).length ?? 0
      sum += edits * peersOf(author)
    }
    return sum
  }

  unacknowledged(): number {
    return [...this.#own.values()].reduce((sum, own) => sum + own.waiting.length, 0)
  }
}

function isPeer(author: BenchClient, other: BenchClient): boolean {
  return other !== author && other.seat.documentName === author.seat.documentName
}
