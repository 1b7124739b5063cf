import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { fitPlan, projectPlan, toX, toZ } from '../../plan-view.ts'
import { Beam } from './beam.tsx'
import { LightShape } from './light-shape.tsx'
import { PropShape } from './prop-shape.tsx'
import { SitterFromAbove } from './sitter-shape.tsx'
import { Standing } from './standing.tsx'

const WIDTH = 300
const HEIGHT = 190

/** A setup from above, small, for a card: nothing in it can be pressed. */
export function PlanSketch({ whole }: { whole: WholeSetup }) {
  const view = fitPlan(whole, WIDTH, HEIGHT, { left: 26, right: 26, top: 18, bottom: 24 })
  const project = projectPlan(view)
  const { camera, background } = whole.setup
  const half = (Math.min(background.widthM, 6) / 2) * view.pxPerM
  const at = (x: number, z: number) => `translate(${toX(view, x)} ${toZ(view, z)})`
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className="block w-full border-b border-hair bg-white" aria-hidden>
      <rect
        x={Math.max(4, toX(view, 0) - half)}
        y={toZ(view, background.zM) - 4}
        width={Math.min(WIDTH - 8, half * 2)}
        height={4}
        fill="var(--color-rail)"
      />
      {whole.lights.map((light) => (
        <Beam key={light.id} light={light} whole={whole} project={project} pxPerM={view.pxPerM} />
      ))}
      {whole.props.map((prop) => (
        <g key={prop.id} transform={at(prop.at[0], prop.at[2])}>
          <PropShape prop={prop} pxPerM={view.pxPerM} seen="plan" />
        </g>
      ))}
      {whole.places.map((place) => (
        <g key={place.id} transform={at(place.at[0], place.at[1])}>
          <SitterFromAbove place={place} pxPerM={view.pxPerM} leastHeadPx={5} />
        </g>
      ))}
      {whole.lights.map((light) => (
        <g key={light.id}>
          <Standing light={light} whole={whole} project={project} seen="plan" />
          <g transform={at(light.at[0], light.at[2])}>
            <LightShape light={light} pxPerM={view.pxPerM} seen="plan" chosen={false} leastPx={6} />
          </g>
        </g>
      ))}
      <rect
        x={toX(view, camera.at[0]) - 9}
        y={toZ(view, camera.at[2]) - 2}
        width={18}
        height={10}
        rx={1.5}
        fill="var(--color-ink)"
      />
    </svg>
  )
}
