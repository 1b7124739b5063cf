import type { ComponentProps } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Part } from '../../parts.ts'
import type { Project } from '../../plan-view.ts'
import { Handle } from './handle.tsx'

type AimsProps = {
  whole: WholeSetup
  chosenKey: string | null
  project: Project
  handle: (part: Part) => Omit<ComponentProps<typeof Handle>, 'x' | 'y' | 'children'>
}

/** Where the chosen light looks: a handle of its own. */
export function Aims({ whole, chosenKey, project, handle }: AimsProps) {
  return whole.lights
    .filter((light) => chosenKey === light.id || chosenKey === `${light.id}:aim`)
    .map((light) => {
      const [x, y] = project(light.aim)
      return (
        <g key={light.id}>
          <path
            aria-hidden
            d={`M${project(light.at).join(' ')}L${x} ${y}`}
            stroke="var(--color-glow)"
            strokeWidth={1.3}
            strokeDasharray="4 4"
            className="pointer-events-none"
          />
          <Handle x={x} y={y} {...handle({ kind: 'aim', light })} ringPx={11}>
            <circle r={5} fill="#fff" stroke="var(--color-glow)" strokeWidth={1.8} />
            <path d="M-8 0h16M0 -8v16" stroke="var(--color-glow)" strokeWidth={1.3} />
          </Handle>
        </g>
      )
    })
}
