import { useEffect, useMemo } from 'react'
import type { Box } from '#shared/domain/board/schema.ts'
import { type Peer, usePeers } from '#src/realtime/use-presence.ts'
import { useStore } from '../use-wall-state.ts'
import { useWall } from '../wall-control.ts'
import type { Mark } from '../wall-state.ts'

function heldBy(peers: readonly Peer[]): Map<string, Box> {
  const boxes = new Map<string, Box>()
  for (const { presence } of peers) {
    for (const [id, box] of Object.entries(presence.dragging ?? {})) boxes.set(id, box)
  }
  return boxes
}

function selectedBy(peers: readonly Peer[]): Map<string, Mark> {
  const marks = new Map<string, Mark>()
  for (const { presence } of peers) {
    const { name, initials, colour } = presence.user
    for (const id of presence.selected ?? []) marks.set(id, { name, initials, colour })
  }
  return marks
}

/** Where the others are: their pointers, and what they hold and have selected on the things themselves. */
export function PeersLayer() {
  const { state, isPast } = useWall()
  const everywhere = usePeers()
  const peers = useMemo(
    () => (isPast ? [] : everywhere.filter(({ presence }) => presence.at === 'board')),
    [everywhere, isPast],
  )
  const detail = useStore(state.detail)

  useEffect(() => {
    const held = heldBy(peers)
    state.remote.set(held)
    const marks = selectedBy(peers)
    // Pointers move twenty times a second; selections do not.
    if (JSON.stringify([...marks]) !== JSON.stringify([...state.marks.get()])) state.marks.set(marks)
  }, [peers, state])

  return peers.map(({ clientId, presence }) => {
    if (!presence.pointer) return null
    const [x, y] = presence.pointer
    return (
      <div
        key={clientId}
        data-peer={presence.user.id}
        className="absolute top-0 left-0 transition-transform duration-200 ease-linear motion-reduce:transition-none"
        style={{ transform: `translate(${x}px, ${y}px)` }}
      >
        <div className="flex origin-top-left items-start" style={{ scale: `${1 / detail}` }}>
          <svg width="16" height="18" viewBox="0 0 16 18" aria-hidden>
            <path
              d="M1 1l13 7-6 1.6L5 16z"
              fill={presence.user.colour}
              stroke="#fff"
              strokeWidth="1.2"
              strokeLinejoin="round"
            />
          </svg>
          <span
            className="mt-3 -ml-1 rounded-full px-2 py-px text-[11px] font-semibold whitespace-nowrap text-white"
            style={{ background: presence.user.colour }}
          >
            {presence.user.name}
          </span>
        </div>
      </div>
    )
  })
}
