import { randomBytes } from 'node:crypto'
import { pause, until } from '#tests/realtime/support/client.ts'
import { EditBook } from '../edit-book.ts'
import { keepPace } from '../pace.ts'
import { median, round, summary } from '../stats.ts'
import { fourOf } from '../table.ts'
import type { HostileCase } from './stage.ts'

const MIB = 1 << 20
const MESSAGE_MIB = 30
const MESSAGE_MS = 3_000
const LATE_MS = 10_000

export const hugeMessage: HostileCase = {
  name: 'a huge message',
  run: async ({ server, open }) => {
    const client = open(0)
    await client.connect()
    client.doc.getMap<string>('blobs').set('blob', 'x'.repeat(MESSAGE_MIB * MIB))
    await pause(MESSAGE_MS)
    const late = open(1)
    await late.connect(LATE_MS).catch(() => undefined)
    const gotMiB = round((late.doc.getMap<string>('blobs').get('blob')?.length ?? 0) / MIB)
    return [
      {
        question: `refuses a message of ${MESSAGE_MIB} MiB`,
        isGood: server.isAlive() && gotMiB === 0,
        detail: `a late client got ${gotMiB} MiB`,
      },
    ]
  },
}

const SLOW_REPEATS = 5
const SLOW_UPDATES = 400
const SLOW_UPDATE_BYTES = 256 * 1024
const SLOW_MIB = 20
const STORED_MS = 60_000
const SETTLE_MS = 2_000

export const neverReads: HostileCase = {
  name: 'a client that never reads',
  // The writer is meant to be fast: it is what the server does with the reader that is asked.
  limits: { bytesPerSecond: 1 << 30, burstBytes: 1 << 30, stateBytes: 1 << 30 },
  run: async ({ target, server, open }) => {
    const documents = await target.addDocuments(SLOW_REPEATS, 2)
    const grownMiB: number[] = []
    for (const document of documents) {
      const [writer, slow] = [open(0, document), open(1, document)]
      await writer.connect()
      await slow.connect()
      const before = await server.memory()
      slow.stopReading()
      for (let i = 0; i < SLOW_UPDATES; i++) {
        writer.doc.getMap('blobs').set('blob', randomBytes(SLOW_UPDATE_BYTES / 2).toString('hex'))
        if (i % 4 === 0) await pause(20)
      }
      if (target.ack !== 'none') await until(() => writer.acked === writer.sent, STORED_MS)
      else await writer.catchUp()
      await pause(SETTLE_MS)
      const after = await server.memory()
      grownMiB.push(round((after.held - before.held) / MIB))
      slow.vanish()
      writer.vanish()
      await pause(SETTLE_MS)
    }
    const totalMiB = (SLOW_UPDATES * SLOW_UPDATE_BYTES) / MIB
    return [
      {
        question: `grows by at most ${SLOW_MIB} MiB for a client that never reads`,
        isGood: median(grownMiB) <= SLOW_MIB,
        detail: `${median(grownMiB)} MiB held after ${totalMiB} MiB of changes (median of ${grownMiB.join(', ')})`,
      },
    ]
  },
}

const FLOOD_PER_SECOND = 1_000
const FLOOD_S = 8
const OTHERS = 10
const OTHERS_PER_SECOND = 5
const OTHERS_P99_MS = 100
const WARM_UP_MS = 2_000
const ARRIVE_MS = 3_000

export const flood: HostileCase = {
  name: 'a flood of messages',
  run: async ({ open }) => {
    const others = Array.from({ length: OTHERS }, (_, i) => open(i))
    for (const client of others) await client.connect()
    others[0]?.addItems(OTHERS)
    await pause(WARM_UP_MS)
    const flooder = open(OTHERS)
    await flooder.connect()
    const book = new EditBook({ expectsAcks: false })
    others.forEach((client) => book.follow(client))
    book.isMeasuring = true
    let isOver = false
    const flooding = keepPace({
      count: 1,
      perSecond: FLOOD_PER_SECOND,
      isOver: () => isOver,
      act: () => flooder.doc.getMap('flood').set('n', flooder.sent),
    })
    const editing = keepPace({
      count: OTHERS,
      perSecond: OTHERS_PER_SECOND,
      isOver: () => isOver,
      act: (i) => {
        const client = others[i]
        if (client) book.edit(client, () => client.move(`item-${i}`, Math.random(), Math.random()))
      },
    })
    await pause(FLOOD_S * 1000)
    isOver = true
    await Promise.all([flooding, editing])
    await until(() => book.seen >= book.expected(), ARRIVE_MS).catch(() => undefined)
    const times = summary(book.peerMs)
    return [
      {
        question: `others stay under ${OTHERS_P99_MS} ms (p99) while one sends ${FLOOD_PER_SECOND} messages a second`,
        isGood: times !== null && times.p99 < OTHERS_P99_MS && book.seen >= book.expected(),
        detail: `${fourOf(times)} ms, ${book.seen} of ${book.expected()} arrived`,
      },
    ]
  },
}
