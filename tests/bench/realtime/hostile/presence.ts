import { pause } from '#tests/realtime/support/client.ts'
import type { BenchClient } from '../client.ts'
import { readPresence } from '../wire.ts'
import type { HostileCase } from './stage.ts'

const SHOWN_MS = 300
const FLOOD_MS = 1_500
const INVENTED = 20_000
const CLAIMED = 'victim'

function nameIn(state: unknown): unknown {
  const user = typeof state === 'object' && state !== null && 'user' in state ? state.user : undefined
  return typeof user === 'object' && user !== null && 'name' in user ? user.name : undefined
}

/** What a client has been told about others: by client id, null for gone. */
function watch(client: BenchClient): Map<number, unknown> {
  const states = new Map<number, unknown>()
  client.onPresence = (body) => {
    for (const { clientId, state } of readPresence(body)) states.set(clientId, state)
  }
  return states
}

export const foreignPresence: HostileCase = {
  name: 'presence in the name of others',
  run: async ({ open }) => {
    const [victim, spoofer, watcher] = [open(0), open(1), open(2)]
    for (const client of [victim, spoofer, watcher]) await client.connect()
    const states = watch(watcher)
    const clientId = victim.doc.clientID
    // Where the server knows who somebody is, that is the name which others must see.
    const name = victim.seat.personName ?? CLAIMED
    const say = (clock: number, state: unknown) => spoofer.send(spoofer.wire.presence([{ clientId, clock, state }]))

    victim.show({ user: { name: CLAIMED } })
    await pause(SHOWN_MS)
    const isRelayed = nameIn(states.get(clientId)) === name
    say(2, { user: { name: 'impostor' } })
    await pause(SHOWN_MS)
    const isUntouched = nameIn(states.get(clientId)) === name

    victim.point(1, 1, CLAIMED)
    victim.point(2, 2, CLAIMED)
    await pause(SHOWN_MS)
    say(10, null)
    await pause(SHOWN_MS)
    const isStillThere = states.get(clientId) !== null

    spoofer.show({ user: { name } })
    await pause(SHOWN_MS)
    const isUnmasked = nameIn(states.get(spoofer.doc.clientID)) !== name

    states.clear()
    const crowd = Array.from({ length: INVENTED }, (_, i) => ({
      clientId: 5_000_000 + i,
      clock: 1,
      state: { user: { name: 'nobody' } },
    }))
    spoofer.send(spoofer.wire.presence(crowd))
    await pause(FLOOD_MS)
    return [
      { question: "a client cannot speak for another's presence", isGood: isRelayed ? isUntouched : null },
      { question: 'nor remove it', isGood: isRelayed ? isStillThere : null },
      { question: "nor show itself under another's name", isGood: isRelayed ? isUnmasked : null },
      {
        question: `${INVENTED.toLocaleString('en')} invented users in one message are refused`,
        isGood: states.size < 100,
        detail: `${states.size} reached a peer`,
      },
    ]
  },
}
