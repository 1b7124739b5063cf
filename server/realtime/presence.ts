import { colourOf, initialsOf } from '#shared/domain/people/face.ts'
import type { Presence } from '#shared/realtime/protocol.ts'
import type { RealtimeSettings } from './settings.ts'
import { type PresenceEntry, presenceFrame, readPresence } from './wire.ts'

/** Who a connection is, as far as presence goes. */
export type PresencePeer = {
  readonly person: { userId: string; name: string; sessionId: string }
  readonly role: string
  send(frame: Uint8Array): void
}

type Shown = PresenceEntry & { peer: PresencePeer }

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
 * message in `presenceFlushMs` to everybody but their own authors.
 */
export class RoomPresence {
  readonly #settings: RealtimeSettings
  readonly #peers: () => Iterable<PresencePeer>
  readonly #shown = new Map<number, Shown>()
  readonly #idOf = new Map<PresencePeer, number>()
  readonly #left = new Map<number, { clock: number; sessionId: string }>()
  readonly #changed = new Map<number, Shown>()
  #timer: NodeJS.Timeout | null = null

  constructor(settings: RealtimeSettings, peers: () => Iterable<PresencePeer>) {
    this.#settings = settings
    this.#peers = peers
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
    if (!this.#bind(peer, entry.clientId, state === null)) return 'not its own'
    if (typeof state !== 'object' || Array.isArray(state)) return 'not a presence'
    const text = state === null ? GONE : JSON.stringify({ ...state, user: stampOf(peer) })
    if (Buffer.byteLength(text) > this.#settings.presenceBytes) return 'too large'
    // Peers ignore what is not newer than what they had, a farewell from an earlier connection included.
    const last = this.#shown.get(entry.clientId)?.clock ?? this.#left.get(entry.clientId)?.clock ?? -1
    this.#left.delete(entry.clientId)
    this.#show({ peer, clientId: entry.clientId, clock: Math.max(entry.clock, last + 1), state: text })
    return 'shown'
  }

  #bind(peer: PresencePeer, clientId: number, isFarewell: boolean): boolean {
    const bound = this.#idOf.get(peer)
    if (bound !== undefined) return bound === clientId
    if (isFarewell) return false
    const owner = this.#shown.get(clientId)?.peer.person.sessionId ?? this.#left.get(clientId)?.sessionId
    if (owner !== undefined && owner !== peer.person.sessionId) return false
    const previous = this.#shown.get(clientId)?.peer
    if (previous) this.#idOf.delete(previous)
    this.#idOf.set(peer, clientId)
    return true
  }

  #show(shown: Shown): void {
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
    const everything = presenceFrame(changed)
    for (const peer of this.#peers()) {
      const own = this.#idOf.get(peer)
      const others = changed.some((entry) => entry.clientId === own)
        ? changed.filter((entry) => entry.clientId !== own)
        : changed
      if (others.length > 0) peer.send(others === changed ? everything : presenceFrame(others))
    }
    this.#timer = setTimeout(() => this.#flush(), this.#settings.presenceFlushMs)
  }

  /** Takes a connection's person off everybody's screen. */
  leave(peer: PresencePeer): void {
    const clientId = this.#idOf.get(peer)
    this.#idOf.delete(peer)
    const shown = clientId === undefined ? undefined : this.#shown.get(clientId)
    if (shown?.peer !== peer) return
    const clock = shown.clock + 1
    this.#left.set(shown.clientId, { clock, sessionId: peer.person.sessionId })
    for (const oldest of this.#left.keys()) {
      if (this.#left.size <= MAX_LEFT) break
      this.#left.delete(oldest)
    }
    this.#show({ ...shown, clock, state: GONE })
  }

  /** Everybody who is here, as one message; without the asker's own session, whose old state would come back to it. */
  everyoneBut(peer: PresencePeer): Uint8Array {
    const { sessionId } = peer.person
    return presenceFrame([...this.#shown.values()].filter((shown) => shown.peer.person.sessionId !== sessionId))
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
