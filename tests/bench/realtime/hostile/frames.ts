import { randomBytes } from 'node:crypto'
import * as Y from 'yjs'
import { pause } from '#tests/realtime/support/client.ts'
import { fingerprint } from '../client.ts'
import { STEP_1, STEP_2, UPDATE, type Wire } from '../wire.ts'
import type { HostileCase } from './stage.ts'

const BETWEEN_MS = 30
const SETTLE_MS = 300
const LATE_MS = 5_000
const SEAT_OF_LATE = 19

/** Frames that are no messages, and messages whose content is damaged. */
function garbage(wire: Wire, update: Uint8Array): Uint8Array[] {
  return [
    new Uint8Array(0),
    randomBytes(64),
    Uint8Array.of(255, 255, 255, 255, 255, 255, 255, 255, 255, 127),
    Uint8Array.of(0),
    Uint8Array.of(0, 2),
    Uint8Array.of(0, 2, 255, 255, 255, 255, 15),
    Uint8Array.of(0, 9, 1, 1),
    Uint8Array.of(77),
    wire.sync(UPDATE, update.slice(0, -7)),
    wire.sync(UPDATE, randomBytes(50)),
    wire.sync(STEP_1, randomBytes(20)),
    wire.sync(STEP_2, Uint8Array.of(1)),
    new Uint8Array(32),
  ]
}

export const garbageFrames: HostileCase = {
  name: 'garbage frames',
  run: async ({ server, open }) => {
    const good = open(0)
    await good.connect()
    good.addItems(5)
    const frames = garbage(good.wire, Y.encodeStateAsUpdate(good.doc))
    for (const [i, frame] of frames.entries()) {
      const bad = open(i + 1)
      await bad.connect().catch(() => undefined)
      bad.send(frame)
      bad.send('a text frame')
      await pause(BETWEEN_MS)
      bad.vanish()
    }
    await pause(SETTLE_MS)
    const survives = server.isAlive()
    good.addItems(5, 5)
    await pause(SETTLE_MS)
    const late = open(SEAT_OF_LATE)
    await late.connect(LATE_MS).catch(() => undefined)
    return [
      { question: `survives ${frames.length} kinds of garbage frames`, isGood: survives },
      {
        question: 'and a late client gets the intact document',
        isGood: late.items.size === 10 && fingerprint(late) === fingerprint(good),
      },
    ]
  },
}

export const updateWithGap: HostileCase = {
  name: 'an update with a gap',
  run: async ({ open }) => {
    const client = open(0)
    await client.connect()
    client.addItems(1)
    await pause(SETTLE_MS)
    const elsewhere = new Y.Doc()
    const updates: Uint8Array[] = []
    elsewhere.on('update', (update: Uint8Array) => updates.push(update))
    elsewhere.getMap('x').set('k', 1)
    elsewhere.getMap('x').set('k', 2)
    // The second builds on the first, which nobody will ever send.
    client.send(client.wire.sync(UPDATE, updates[1] ?? new Uint8Array()))
    await pause(SETTLE_MS)
    const late = open(SEAT_OF_LATE)
    await late.connect(LATE_MS)
    return [
      {
        question: 'keeps an update with a gap out of the document',
        isGood: late.items.size === 1 && late.doc.store.pendingStructs === null,
      },
    ]
  },
}
