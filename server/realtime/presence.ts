import { colourOf, initialsOf } from '#shared/domain/people/face.ts'
import type { Presence } from '#shared/realtime/protocol.ts'
import type { PresenceElsewhere } from './instances.ts'
import type { RealtimeSettings } from './settings.ts'
import { type PresenceEntry, presenceFrame, presenceFrames, readPresence } from './wire.ts'

/** Who a connection is, as far as presence goes. */
export type PresencePeer = {
  readonly person: { userId: string; name: string; sessionId: string }
  readonly role: string
  send(frame: Uint8Array): void
}

/** `peer` is null for somebody who is connected to another process, `instance`. */
type Shown = PresenceEntry & { sessionId: string } & (
    { peer: PresencePeer; instance: null } | { peer: null; instance: string }
  )

const MAX_CLIENT_ID = 2 ** 32 - 1
const MAX_CLOCK = 2 ** 31
const GONE = 'null'
/** Ids that left, of which the clock is remembered. */
const MAX_LEFT = 1000

/** What a server says to everybody who would otherwise hear nothing: a presence message of nobody. */
export const KEEP_ALIVE = presenceFrame([])

export type Outcome = 'shown' | 'not a presence' | 'not its own' | 'too large'

/**
 * Who is in a room and what they point at, relayed by the server.
 *
 * A connection speaks for one client id, bound at its first message and not owned by another session; `user` is
 * written here from the session. Changes are gathered: the first after quiet goes out at once, then at most one
 * message in `presenceFlushMs` to everybody but their own authors. People connected to other processes are shown too.
 */
export class RoomPresence {
  readonly #settings: RealtimeSettings
  readonly #peers: () => Iterable<PresencePeer>
  readonly #tellElsewhere: (entries: readonly PresenceElsewhere[]) => void
  readonly #shown = new Map<number, Shown>()
  readonly #idOf = new Map<PresencePeer, number>()
  readonly #left = new Map<number, { clock: number; sessionId: string }>()
  readonly #changed = new Map<number, Shown>()
  #timer: NodeJS.Timeout | null = null

  /**
   * @param peers those who are to be told, in the order of telling.
   * @param tellElsewhere is given what changed among those who are connected here.
   */
  constructor(
    settings: RealtimeSettings,
    peers: () => Iterable<PresencePeer>,
    tellElsewhere: (entries: readonly PresenceElsewhere[]) => void,
  ) {
    this.#settings = settings
    this.#peers = peers
    this.#tellElsewhere = tellElsewhere
  }

  /** Takes one presence message. Others' states in it are what y-websocket echoes: ignored, no offence. */
  receive(peer: PresencePeer, body: Uint8Array): Outcome {
    if (body.length > this.#settings.presenceBytes + 64) return 'too large'
    let entry: PresenceEntry | number
    let state: unknown
    try {
      entry = readPresence(body)
      state = typeof entry === 'number' ? null : JSON.parse(entry.state)
    } catch {
      return 'not a presence'
    }
    if (typeof entry === 'number') return 'not its own'
    if (entry.clientId > MAX_CLIENT_ID || entry.clock > MAX_CLOCK) return 'not a presence'
    if (typeof state !== 'object' || Array.isArray(state)) return 'not a presence'
    const text = state === null ? GONE : JSON.stringify({ ...state, user: stampOf(peer) })
    if (Buffer.byteLength(text) > this.#settings.presenceBytes) return 'too large'
    // Last: whoever takes an id over must also show it, or nobody would say its farewell.
    if (!this.#bind(peer, entry.clientId, state === null)) return 'not its own'
    // Peers ignore what is not newer than what they had, a farewell from an earlier connection included.
    const { sessionId } = peer.person
    const clock = this.#newerThan(entry)
    this.#show({ peer, instance: null, sessionId, clientId: entry.clientId, clock, state: text })
    return 'shown'
  }

  /** The clock for an entry: its own, or as much more as it takes for peers to believe it. */
  #newerThan({ clientId, clock }: { clientId: number; clock: number }): number {
    const last = this.#shown.get(clientId)?.clock ?? this.#left.get(clientId)?.clock ?? -1
    return Math.max(clock, last + 1)
  }

  /** Takes what another process says of the people connected there. Whoever is connected here by now stays. */
  takeElsewhere(instance: string, entries: readonly PresenceElsewhere[]): void {
    for (const entry of entries) {
      const shown = this.#shown.get(entry.clientId)
      if (shown?.peer) continue
      if (entry.state !== GONE) this.#show({ ...entry, peer: null, instance, clock: this.#newerThan(entry) })
      else if (shown?.instance === instance) this.#goodbye(shown)
    }
  }

  /** Takes everybody off who was connected to a process that is gone. */
  instanceGone(instance: string): void {
    for (const shown of [...this.#shown.values()]) if (shown.instance === instance) this.#goodbye(shown)
  }

  /** Everybody who is connected here, for other processes. */
  here(): PresenceElsewhere[] {
    return [...this.#shown.values()].filter((shown) => shown.peer !== null)
  }

  #bind(peer: PresencePeer, clientId: number, isFarewell: boolean): boolean {
    const bound = this.#idOf.get(peer)
    if (bound !== undefined) return bound === clientId
    if (isFarewell) return false
    const shown = this.#shown.get(clientId)
    const owner = shown?.sessionId ?? this.#left.get(clientId)?.sessionId
    if (owner !== undefined && owner !== peer.person.sessionId) return false
    const previous = shown?.peer
    if (previous) this.#idOf.delete(previous)
    this.#idOf.set(peer, clientId)
    return true
  }

  #show(shown: Shown): void {
    this.#left.delete(shown.clientId)
    if (shown.state === GONE) this.#shown.delete(shown.clientId)
    else this.#shown.set(shown.clientId, shown)
    this.#changed.set(shown.clientId, shown)
    if (!this.#timer) this.#flush()
  }

  #flush(): void {
    this.#timer = null
    if (this.#changed.size === 0) return
    const changed = [...this.#changed.values()]
    this.#changed.clear()
    this.#tellElsewhere(changed.filter((entry) => entry.peer !== null))
    const frames = presenceFrames(changed)
    const indexOf = new Map(changed.map((entry, index) => [entry.clientId, index]))
    let told = 0
    for (const peer of this.#peers()) {
      const own = indexOf.get(this.#idOf.get(peer) ?? -1)
      if (own === undefined) peer.send(frames.all)
      else if (changed.length > 1) peer.send(frames.allBut(own))
      told++
    }
    // Everybody pointing for everybody grows with the square: in a crowd pointers move in larger steps.
    const { presenceFlushMs, presenceSlowestMs, presencePerFlush } = this.#settings
    const waitMs = Math.min(
      presenceSlowestMs,
      presenceFlushMs * Math.max(1, (changed.length * told) / presencePerFlush),
    )
    this.#timer = setTimeout(() => this.#flush(), waitMs)
  }

  /** Takes a connection's person off everybody's screen. */
  leave(peer: PresencePeer): void {
    const clientId = this.#idOf.get(peer)
    this.#idOf.delete(peer)
    const shown = clientId === undefined ? undefined : this.#shown.get(clientId)
    if (shown?.peer === peer) this.#goodbye(shown)
  }

  #goodbye(shown: Shown): void {
    const { clientId, sessionId } = shown
    const clock = shown.clock + 1
    this.#show({ ...shown, clock, state: GONE })
    this.#left.set(clientId, { clock, sessionId })
    for (const oldest of this.#left.keys()) {
      if (this.#left.size <= MAX_LEFT) break
      this.#left.delete(oldest)
    }
  }

  /**
   * Everybody who is here, as one message; without the asker's own session, whose old state would come back to it.
   * Under a new clock each time: a browser that was away for a moment has forgotten them, not their clocks.
   */
  everyoneBut(peer: PresencePeer): Uint8Array {
    const others = [...this.#shown.values()].filter((shown) => shown.sessionId !== peer.person.sessionId)
    for (const shown of others) shown.clock++
    return presenceFrame(others)
  }

  stop(): void {
    if (this.#timer) clearTimeout(this.#timer)
    this.#timer = null
    this.#changed.clear()
  }
}

function stampOf(peer: PresencePeer): Presence['user'] {
  const { userId, name } = peer.person
  return { id: userId, name, initials: initialsOf(name), colour: colourOf(userId), role: peer.role }
}
