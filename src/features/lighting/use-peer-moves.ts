import { useMemo } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { usePeers } from '#src/realtime/use-presence.ts'
import { type Moves, type Part, partKey, pointOf } from './parts.ts'

export type PeerHold = { colour: string; name: string }
export type PeerMoves = { moves: Moves; holds: ReadonlyMap<string, PeerHold> }

/** Everything of a setup that can be moved. */
export function partsOf(whole: WholeSetup): Part[] {
  return [
    { kind: 'camera', setupId: whole.setup.id },
    ...whole.places.map((place): Part => ({ kind: 'place', place })),
    ...whole.props.map((prop): Part => ({ kind: 'prop', prop })),
    ...whole.lights.flatMap((light): Part[] => [
      { kind: 'light', light },
      { kind: 'aim', light },
    ]),
  ]
}

/** What others hold in this setup right now, where they hold it. */
export function usePeerMoves(whole: WholeSetup): PeerMoves {
  const peers = usePeers()
  return useMemo(() => {
    const parts = new Map(partsOf(whole).map((part) => [partKey(part), part]))
    const moves = new Map<string, ReturnType<typeof pointOf>>()
    const holds = new Map<string, PeerHold>()
    for (const { presence } of peers) {
      for (const [key, place] of Object.entries(presence.moving ?? {})) {
        const part = parts.get(key)
        if (!part || !Array.isArray(place) || !place.every(Number.isFinite)) continue
        moves.set(key, [place[0], pointOf(part, whole)[1], place[1]])
        holds.set(key, { colour: presence.user.colour, name: presence.user.name })
      }
    }
    return { moves, holds }
  }, [peers, whole])
}
