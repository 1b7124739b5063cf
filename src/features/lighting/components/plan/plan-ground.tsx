import { useId } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { mainPlace } from '#shared/domain/lighting/geometry.ts'
import { metresLabel } from '#shared/domain/lighting/words.ts'
import { type PlanView, toX, toZ } from '../../plan-view.ts'

type PlanGroundProps = { whole: WholeSetup; view: PlanView; tanAcross: number; dimensionX: number }

/** What the lights stand on: grid, wall, what the lens sees, and the two distances that matter. */
export function PlanGround({ whole, view, tanAcross, dimensionX }: PlanGroundProps) {
  const gridId = useId()
  const { camera, background } = whole.setup
  const half = view.pxPerM / 2
  const wallZ = toZ(view, background.zM)
  const wallHalf = (background.widthM / 2) * view.pxPerM
  const wallLeft = Math.max(8, toX(view, 0) - wallHalf)
  const wallRight = Math.min(view.width - 8, toX(view, 0) + wallHalf)
  const sitterZ = mainPlace(whole.places)?.at[1] ?? 0
  return (
    <g aria-hidden>
      <defs>
        <pattern id={gridId} width={half} height={half} patternUnits="userSpaceOnUse" x={toX(view, 0)} y={toZ(view, 0)}>
          <path d={`M${half} 0H0V${half}`} fill="none" stroke="#E6EAEE" />
        </pattern>
      </defs>
      <rect width={view.width} height={view.height} fill={`url(#${gridId})`} />
      <FieldOfView whole={whole} view={view} tanAcross={tanAcross} />
      <rect x={wallLeft} y={wallZ - 7} width={Math.max(0, wallRight - wallLeft)} height={7} fill="var(--color-rail)" />
      <rect
        x={wallLeft}
        y={wallZ - 7}
        width={Math.max(0, wallRight - wallLeft)}
        height={2.5}
        fill={background.colour}
      />
      <text x={wallLeft} y={wallZ - 13} className="fill-ink-soft text-xs">
        {background.what === '' ? 'Back wall' : background.what}
      </text>
      <Dimension x={dimensionX} from={wallZ} to={toZ(view, sitterZ)} metres={sitterZ - background.zM} />
      {camera.at[2] > sitterZ && (
        <Dimension
          x={dimensionX}
          from={toZ(view, sitterZ)}
          to={toZ(view, camera.at[2])}
          metres={camera.at[2] - sitterZ}
        />
      )}
    </g>
  )
}

/** From the lens to the wall, along the middle of the sitters. */
function FieldOfView({ whole, view, tanAcross }: Omit<PlanGroundProps, 'dimensionX'>) {
  const { camera, background } = whole.setup
  const [x, , z] = camera.at
  const count = Math.max(1, whole.places.length)
  const middleX = whole.places.reduce((sum, place) => sum + place.at[0], 0) / count
  const middleZ = whole.places.reduce((sum, place) => sum + place.at[1], 0) / count
  const turn = Math.atan2(middleX - x, z - middleZ)
  const spread = Math.atan(tanAcross)
  const edge = (angle: number) => {
    const run = Math.cos(angle) > 0.05 ? (z - background.zM) / Math.cos(angle) : 12
    return `M${toX(view, x)} ${toZ(view, z)}L${toX(view, x + Math.sin(angle) * run)} ${toZ(view, z - Math.cos(angle) * run)}`
  }
  return (
    <path
      d={edge(turn - spread) + edge(turn + spread)}
      stroke="var(--color-ink-faint)"
      strokeDasharray="4 5"
      fill="none"
    />
  )
}

type DimensionProps = { x: number; from: number; to: number; metres: number }

function Dimension({ x, from, to, metres }: DimensionProps) {
  if (Math.abs(to - from) < 24) return null
  return (
    <g>
      <path
        d={`M${x} ${from}V${to}M${x - 6} ${from}h12M${x - 6} ${to}h12`}
        stroke="var(--color-ink-faint)"
        fill="none"
      />
      <text
        x={x + 8}
        y={(from + to) / 2 + 4}
        className="fill-ink-soft text-xs"
        stroke="#fff"
        strokeWidth={4}
        paintOrder="stroke"
      >
        {metresLabel(Math.abs(metres))}
      </text>
    </g>
  )
}
