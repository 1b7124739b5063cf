import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import type { PartHandlers } from '../../use-moving.ts'
import type { PeerHold } from '../../use-peer-moves.ts'

type HandleProps = {
  /** Place in the drawing, CSS px. */
  x: number
  y: number
  label: string
  handlers: PartHandlers
  held: boolean
  chosen: boolean
  mayWrite: boolean
  peer?: PeerHold | undefined
  /** Radius of the ring around it, CSS px. */
  ringPx?: number
  children: ReactNode
}

/** Something in a drawing that is chosen with a press and moved by pointer, touch or keys. */
export function Handle({ x, y, label, handlers, held, chosen, mayWrite, peer, ringPx = 20, children }: HandleProps) {
  return (
    <g
      role="button"
      tabIndex={0}
      aria-label={label}
      aria-pressed={chosen}
      data-movable={mayWrite || undefined}
      aria-roledescription={mayWrite ? 'movable part' : undefined}
      className={cn('group outline-none', mayWrite ? (held ? 'cursor-grabbing' : 'cursor-grab') : 'cursor-pointer')}
      style={{ transform: `translate(${x}px, ${y}px)`, ...(peer ? { transition: 'transform 120ms linear' } : {}) }}
      {...handlers}
    >
      <circle r={22} fill="transparent" />
      {children}
      {/* Over the shape: a large one would hide where the focus is. */}
      <circle
        r={ringPx}
        fill={held || chosen ? 'rgb(47 79 112 / 0.07)' : 'none'}
        stroke="var(--color-draft)"
        strokeWidth={1.5}
        strokeDasharray={held ? '3 3' : undefined}
        className={cn(!held && !chosen && 'opacity-0 group-hover:opacity-35', 'group-focus-visible:opacity-100')}
      />
      {peer && (
        <text y={-ringPx - 5} textAnchor="middle" className="text-xs font-semibold" style={{ fill: peer.colour }}>
          {peer.name}
        </text>
      )}
    </g>
  )
}
