import type { Light } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type Flat, boomForm } from '../../light-form.ts'
import type { DrawingKind } from '../../parts.ts'
import type { Project } from '../../plan-view.ts'

type StandingProps = { light: Light; whole: WholeSetup; project: Project; seen: DrawingKind }

/** What a light stands on: the arm of a boom from its stand to the head, and from the side every stand to the floor. */
export function Standing({ light, whole, project, seen }: StandingProps) {
  const line = {
    stroke: light.isOn ? 'var(--color-draft)' : 'var(--color-ink-faint)',
    strokeWidth: 1.4,
    fill: 'none',
  }
  const boom = boomForm(light, whole)
  if (boom) {
    const [head, top, foot, counter] = [light.at, boom.top, boom.foot, boom.counter].map(project)
    if (!head || !top || !foot || !counter) return null
    return (
      <g aria-hidden {...line}>
        <path d={`M${head[0]} ${head[1]}L${counter[0]} ${counter[1]}`} strokeWidth={2} />
        <rect x={counter[0] - 4} y={counter[1] - 4} width={8} height={8} fill={line.stroke} />
        {seen === 'plan' ? <path d={feetFromAbove(foot)} /> : <path d={standFromSide(top, foot)} />}
      </g>
    )
  }
  if (seen === 'plan') return null
  const top = project(light.at)
  const foot = project([light.at[0], 0, light.at[2]])
  switch (light.support?.numbers.kind) {
    case 'stand':
    case 'floor stand':
      return <path aria-hidden d={standFromSide(top, foot)} {...line} />
    case undefined:
    case 'boom':
    case 'clamp':
    case 'floor plate':
    case 'hand':
    case 'magic arm':
      return <path aria-hidden d={`M${top[0]} ${top[1]}V${foot[1]}`} {...line} strokeDasharray="2 5" opacity={0.5} />
  }
}

function standFromSide(top: Flat, foot: Flat): string {
  const [x, floor] = foot
  const legs = floor - top[1] > 30 ? `M${x - 12} ${floor}L${x} ${floor - 18}L${x + 12} ${floor}` : ''
  return `M${top[0]} ${top[1]}L${x} ${floor}${legs}`
}

function feetFromAbove([x, y]: Flat): string {
  return [90, 210, 330]
    .map((deg) => (deg * Math.PI) / 180)
    .map((turn) => `M${x} ${y}L${x + Math.cos(turn) * 12} ${y + Math.sin(turn) * 12}`)
    .join('')
}
