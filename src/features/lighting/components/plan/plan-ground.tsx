import { useId } from 'react'
import { type Orientation, viewOf } from '#shared/domain/lighting/frame.ts'
import { mainPlace } from '#shared/domain/lighting/geometry.ts'
import type { Walled } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { METRES_PER_FOOT, type LengthUnit, lengthLabel } from '#src/lib/length-unit.ts'
import { type PlanView, toX, toZ } from '../../plan-view.ts'

/** The grid that is drawn: half a metre, or two feet. */
const GRIDS: Readonly<Record<LengthUnit, { metres: number; words: string }>> = {
  m: { metres: 0.5, words: 'grid 0.5 m' },
  ft: { metres: 2 * METRES_PER_FOOT, words: 'grid 2 ft' },
}

type PlanGroundProps = {
  whole: WholeSetup
  view: PlanView
  orientation: Orientation
  unit: LengthUnit
  dimensionX: number
}

/** What the lights stand on: grid, walls, what the lens sees, and the two distances that matter. */
export function PlanGround({ whole, view, orientation, unit, dimensionX }: PlanGroundProps) {
  const gridId = useId()
  const { camera, background, walled } = whole.setup
  const grid = GRIDS[unit].metres * view.pxPerM
  const wallZ = toZ(view, background.zM)
  const wallHalf = (background.widthM / 2) * view.pxPerM
  const wallLeft = Math.max(8, toX(view, 0) - wallHalf)
  const wallRight = Math.min(view.width - 8, toX(view, 0) + wallHalf)
  const sitterZ = mainPlace(whole.places)?.at[1] ?? 0
  return (
    <g aria-hidden>
      <defs>
        <pattern id={gridId} width={grid} height={grid} patternUnits="userSpaceOnUse" x={toX(view, 0)} y={toZ(view, 0)}>
          <path d={`M${grid} 0H0V${grid}`} fill="none" stroke="#E6EAEE" />
        </pattern>
      </defs>
      <rect width={view.width} height={view.height} fill={`url(#${gridId})`} />
      {walled && <Room walled={walled} wallM={background.zM} view={view} />}
      <FieldOfView whole={whole} view={view} orientation={orientation} />
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
      <Dimension
        x={dimensionX}
        from={wallZ}
        to={toZ(view, sitterZ)}
        label={lengthLabel(sitterZ - background.zM, unit)}
      />
      {camera.at[2] > sitterZ && (
        <Dimension
          x={dimensionX}
          from={toZ(view, sitterZ)}
          to={toZ(view, camera.at[2])}
          label={lengthLabel(camera.at[2] - sitterZ, unit)}
        />
      )}
      <text x={12} y={view.height - 12} className="fill-ink-soft text-xs font-semibold">
        Plan · {GRIDS[unit].words}
      </text>
    </g>
  )
}

/** Walls at the sides and behind the camera, as far as they are in the drawing. */
function Room({ walled, wallM, view }: { walled: Walled; wallM: number; view: PlanView }) {
  const [left, right] = [toX(view, -walled.leftM), toX(view, walled.rightM)]
  const [back, front] = [toZ(view, wallM), toZ(view, walled.frontM)]
  return (
    <path
      d={`M${left} ${back}V${front}H${right}V${back}`}
      fill="none"
      stroke="var(--color-rail)"
      strokeWidth={4}
      strokeOpacity={0.55}
    />
  )
}

/** From the lens to the wall, where the camera looks. */
function FieldOfView({ whole, view, orientation }: Pick<PlanGroundProps, 'whole' | 'view' | 'orientation'>) {
  const { at, forward, right, tanAcross } = viewOf(whole, orientation)
  const { background, camera } = whole.setup
  const flat = Math.hypot(forward[0], forward[2])
  if (flat < 1e-3) return null
  const edge = (sign: 1 | -1) => {
    const x = forward[0] / flat + right[0] * tanAcross * sign
    const z = forward[2] / flat + right[2] * tanAcross * sign
    const run = z < -0.05 ? Math.max(0, (background.zM - at[2]) / z) : 12
    return `M${toX(view, at[0])} ${toZ(view, at[2])}L${toX(view, at[0] + x * run)} ${toZ(view, at[2] + z * run)}`
  }
  return (
    <>
      <path d={edge(1) + edge(-1)} stroke="var(--color-ink-faint)" strokeDasharray="4 5" fill="none" />
      {camera.aim && (
        <path
          d={`M${toX(view, camera.aim[0]) - 5} ${toZ(view, camera.aim[2])}h10m-5 -5v10`}
          stroke="var(--color-ink)"
          strokeWidth={1.3}
        />
      )}
    </>
  )
}

type DimensionProps = { x: number; from: number; to: number; label: string }

function Dimension({ x, from, to, label }: DimensionProps) {
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
        {label}
      </text>
    </g>
  )
}
