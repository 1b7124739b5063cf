import { type Orientation, type View, viewOf } from '#shared/domain/lighting/frame.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#src/lib/length-unit.ts'
import { type Project, type SideView, projectSide } from '../../plan-view.ts'

type SideGroundProps = { whole: WholeSetup; view: SideView; orientation: Orientation; unit: LengthUnit }

/** Floor, wall, ceiling, what the lens sees, and the camera's stand. */
export function SideGround({ whole, view, orientation, unit }: SideGroundProps) {
  const project = projectSide(view)
  const { camera, background, walled } = whole.setup
  const [wallX, wallTop] = project([0, background.heightM, background.zM])
  const [cameraX, cameraY] = project(camera.at)
  const ceilingY = walled ? project([0, walled.ceilingM, 0])[1] : null
  return (
    <g aria-hidden>
      <path d={`M0 ${view.floorY}H${view.width}`} stroke="var(--color-rail)" strokeWidth={2} />
      <rect x={wallX - 6} y={wallTop} width={6} height={view.floorY - wallTop} fill="var(--color-rail)" />
      <rect x={wallX - 2} y={wallTop} width={2} height={view.floorY - wallTop} fill={background.colour} />
      {walled && ceilingY !== null && ceilingY > 2 && (
        <g>
          <path d={`M0 ${ceilingY}H${view.width}`} stroke="var(--color-rail)" strokeWidth={3} strokeOpacity={0.55} />
          <text x={view.width - 10} y={ceilingY + 15} textAnchor="end" className="fill-ink-soft text-xs">
            Ceiling {lengthLabel(walled.ceilingM, unit)}
          </text>
        </g>
      )}
      <Sight view={viewOf(whole, orientation)} wallM={background.zM} project={project} />
      <path
        d={`M${cameraX + 8} ${cameraY + 6}L${cameraX - 4} ${view.floorY}M${cameraX + 8} ${cameraY + 6}L${cameraX + 22} ${view.floorY}`}
        stroke="var(--color-ink)"
        fill="none"
      />
      <text x={12} y={18} className="fill-ink-soft text-xs font-semibold">
        Side
      </text>
    </g>
  )
}

/** Upper and lower edge of what the lens sees. */
function Sight({ view, wallM, project }: { view: View; wallM: number; project: Project }) {
  const edge = (sign: 1 | -1) => {
    const y = view.forward[1] + view.up[1] * view.tanUp * sign
    const z = view.forward[2] + view.up[2] * view.tanUp * sign
    if (z > -0.05) return ''
    const run = (wallM - view.at[2]) / z
    return `M${project(view.at).join(' ')}L${project([0, view.at[1] + y * run, wallM]).join(' ')}`
  }
  return <path d={edge(1) + edge(-1)} stroke="var(--color-ink-faint)" strokeDasharray="4 5" fill="none" />
}
