import { performance } from 'node:perf_hooks'
import * as Y from 'yjs'
import { pause } from '#tests/realtime/support/client.ts'
import { BenchClient } from '../client.ts'
import { keepPace } from '../pace.ts'
import type { ServerChild } from '../server-child.ts'
import type { BenchDocument, Target } from '../targets/target.ts'

/** One edit: a key of its own, so that no loss hides behind an overwrite. */
export type Mark = {
  key: string
  documentName: string
  author: BenchClient
  /** The author's clock just past it, and the number of the message that carried it. */
  clock: number
  n: number
  atMs: number
}

export const MARKS = 'marks'

/** Clients that make marks, and who has seen them. */
export class MarkMakers {
  readonly clients: BenchClient[] = []
  readonly marks: Mark[] = []
  readonly ackMs: number[] = []
  /** How far any peer has seen each author. */
  readonly #seen = new Map<number, number>()
  readonly #ownMarks = new Map<BenchClient, Mark[]>()

  static async sitDown(
    target: Target,
    server: ServerChild,
    documents: readonly BenchDocument[],
    count: number,
  ): Promise<MarkMakers> {
    const makers = new MarkMakers()
    for (let i = 0; i < count; i++) {
      const seat = documents[i % documents.length]?.seat(server, Math.floor(i / documents.length))
      if (!seat) throw new Error('no document')
      const client = new BenchClient(seat, { dialect: target.dialect })
      makers.clients.push(client)
      await client.connect()
      makers.#follow(client)
    }
    return makers
  }

  #follow(client: BenchClient): void {
    client.onUpdate = (update) => {
      for (const [author, end] of Y.parseUpdateMeta(update).to) {
        if (author === client.doc.clientID) continue
        this.#seen.set(author, Math.max(this.#seen.get(author) ?? 0, end))
      }
    }
    let next = 0
    const own: Mark[] = []
    this.#ownMarks.set(client, own)
    client.onAck = (acked) => {
      const now = performance.now()
      for (let mark = own[next]; mark && mark.n <= acked; mark = own[++next]) this.ackMs.push(now - mark.atMs)
    }
  }

  /** Everybody makes marks, so many a second, for so many seconds. */
  async make(perSecond: number, seconds: number): Promise<void> {
    const endMs = performance.now() + seconds * 1000
    await keepPace({
      count: this.clients.length,
      perSecond,
      isOver: () => performance.now() >= endMs,
      act: (i) => {
        const author = this.clients[i]
        const own = author && this.#ownMarks.get(author)
        if (!author?.isOpen || !own) return
        const key = `${author.doc.clientID}.${own.length}`
        const atMs = performance.now()
        author.doc.getMap(MARKS).set(key, 1)
        const { documentName } = author.seat
        const mark = { key, documentName, author, clock: author.clock, n: author.sent, atMs }
        own.push(mark)
        this.marks.push(mark)
      },
    })
  }

  isSeen({ author, clock }: Mark): boolean {
    return clock <= (this.#seen.get(author.doc.clientID) ?? 0)
  }

  isAcked({ author, n }: Mark): boolean {
    return n <= author.acked
  }

  vanish(): void {
    this.clients.forEach((client) => client.vanish())
  }
}

/** What a newcomer finds in each document. */
export async function marksLeft(
  target: Target,
  server: ServerChild,
  documents: readonly BenchDocument[],
): Promise<(mark: Mark) => boolean> {
  const left = new Map<string, ReadonlySet<string>>()
  for (const document of documents) {
    const client = new BenchClient(document.seat(server, 0), { dialect: target.dialect })
    await client.connect()
    await pause(20)
    left.set(client.seat.documentName, new Set(client.doc.getMap(MARKS).keys()))
    client.close()
  }
  return ({ documentName, key }) => left.get(documentName)?.has(key) ?? false
}
