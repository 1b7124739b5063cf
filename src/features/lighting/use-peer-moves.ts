import { useMemo } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { usePeers } from '#src/realtime/use-presence.ts'
import { type Point, pointSchema } from '#shared/domain/lighting/schema.ts'
import { type Moves, partKey, partsOf } from './parts.ts'

export type PeerHold = { colour: string; name: string }
export type PeerMoves = { moves: Moves; holds: ReadonlyMap<string, PeerHold> }

/** A place out of somebody else's presence, which may be anything. */
function heldAt(place: unknown): Point | null {
  const read = pointSchema.safeParse(place)
  return read.success ? read.data : null
}

/** What others hold in this setup right now, where they hold it. */
export function usePeerMoves(whole: WholeSetup): PeerMoves {
  const peers = usePeers()
  return useMemo(() => {
    const parts = new Map(partsOf(whole).map((part) => [partKey(part), part]))
    const moves = new Map<string, Point>()
    const holds = new Map<string, PeerHold>()
    for (const { presence } of peers) {
      for (const [key, place] of Object.entries(presence.moving ?? {})) {
        const part = parts.get(key)
        const at = heldAt(place)
        if (!part || !at) continue
        moves.set(key, at)
        holds.set(key, { colour: presence.user.colour, name: presence.user.name })
      }
    }
    return { moves, holds }
  }, [peers, whole])
}
