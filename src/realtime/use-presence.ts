import { useMemo, useSyncExternalStore } from 'react'
import type { Presence } from '#shared/realtime/protocol.ts'
import { type ShootDocuments, useShootContext } from './shoot-realtime.tsx'

export type Peer = { clientId: number; presence: Presence }

const INTERVAL_MS = 50

function presenceStore({ board }: ShootDocuments) {
  const { awareness } = board.provider
  let peers: readonly Peer[] = []
  const read = () => {
    peers = [...awareness.getStates()].flatMap(([clientId, state]) =>
      clientId !== board.doc.clientID && isPresence(state) ? [{ clientId, presence: state }] : [],
    )
  }
  let pending: Record<string, unknown> | null = null
  const flush = () => {
    // Without a state of its own the shoot has been left: a late one would stay there as a ghost.
    if (pending && awareness.getLocalState() !== null) awareness.setLocalState(pending)
    pending = null
  }
  read()
  return {
    get: () => peers,
    subscribe(listener: () => void) {
      const handle = () => {
        read()
        listener()
      }
      awareness.on('change', handle)
      return () => awareness.off('change', handle)
    },
    /** Merged for 50 ms: the server takes twenty a second. */
    set(patch: Partial<Presence>) {
      if (pending) Object.assign(pending, patch)
      else {
        pending = { ...awareness.getLocalState(), ...patch }
        setTimeout(flush, INTERVAL_MS)
      }
    },
  }
}

/** The server stamps `user` on every state it relays; one without is not from it. */
function isPresence(state: unknown): state is Presence {
  if (typeof state !== 'object' || state === null || !('user' in state)) return false
  const { user } = state
  return typeof user === 'object' && user !== null && 'id' in user && 'name' in user
}

const stores = new WeakMap<ShootDocuments, ReturnType<typeof presenceStore>>()

function storeOf(documents: ShootDocuments) {
  const store = stores.get(documents) ?? presenceStore(documents)
  stores.set(documents, store)
  return store
}

/** Everybody else with this shoot open, one entry per window. */
export function usePeers(): readonly Peer[] {
  const { documents } = useShootContext()
  const store = storeOf(documents)
  return useSyncExternalStore(store.subscribe, store.get)
}

/** Says where one is and what one holds; merged and sent at most twenty times a second. */
export function useSetPresence(): (patch: Partial<Presence>) => void {
  const { documents } = useShootContext()
  return useMemo(() => storeOf(documents).set, [documents])
}
