import { pause } from '#tests/realtime/support/client.ts'
import { BenchClient } from '../client.ts'
import type { ServerChild } from '../server-child.ts'
import type { Target } from '../targets/target.ts'

/** The first so many clients of a document apply what they hear, the others count. */
const LIVE_EACH = 8
const JOIN_AT_ONCE = 10
const MADE_MS = 500

export type People = {
  clients: BenchClient[]
  /** How many clients have each document open. */
  documents: number
  /** Milliseconds to the first sync of everybody but the first of each document. */
  joinMs: number[]
}

/** Seats so many clients at so many documents, which the first at each fills with items. */
export async function seatPeople(
  target: Target,
  server: ServerChild,
  options: { clients: number; documents: number; items: number },
): Promise<People> {
  const { clients: count, documents: documentCount, items } = options
  const documents = await target.addDocuments(documentCount, Math.ceil(count / documentCount))
  const clients: BenchClient[] = []
  const joinMs: number[] = []
  const join = async (i: number) => {
    const place = Math.floor(i / documentCount)
    const seat = documents[i % documentCount]?.seat(server, place)
    if (!seat) throw new Error('no document')
    const client = new BenchClient(seat, { dialect: target.dialect, isLive: place < LIVE_EACH })
    clients[i] = client
    const { ms } = await client.connect()
    return ms
  }
  for (let i = 0; i < documentCount; i++) {
    await join(i)
    clients[i]?.addItems(items)
  }
  await pause(MADE_MS)
  for (let i = documentCount; i < count; i += JOIN_AT_ONCE) {
    const together = Array.from({ length: Math.min(JOIN_AT_ONCE, count - i) }, (_, k) => join(i + k))
    joinMs.push(...(await Promise.all(together)))
  }
  return { clients, documents: documentCount, joinMs }
}
