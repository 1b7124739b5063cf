import { pause } from '#tests/realtime/support/client.ts'
import { BenchClient, fingerprint } from '../client.ts'
import type { HostileCase } from './stage.ts'

const SETTLE_MS = 500

export const writingReader: HostileCase = {
  name: 'a reader that writes',
  isFor: (target) => target.name === 'sconce',
  run: async ({ target, server, document, open }) => {
    const owner = open(0)
    await owner.connect()
    owner.addItems(3)
    await pause(SETTLE_MS)
    const seat = document.readerSeat(server)
    if (!seat) throw new Error('no seat for a reader')
    const reader = new BenchClient(seat, { dialect: target.dialect })
    await reader.connect()
    const canRead = reader.items.size === 3
    reader.move('item-0', 9999, 9999)
    reader.items.delete('item-1')
    await pause(SETTLE_MS)
    const late = open(1)
    await late.connect()
    reader.vanish()
    return [
      {
        question: "a reader's edits go nowhere, and it is told",
        isGood: canRead && fingerprint(late) === fingerprint(owner) && reader.refusals.length >= 2,
        detail: `refused: ${reader.refusals.join(', ') || 'nothing'}`,
      },
    ]
  },
}
