import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { fitPlan, toX, toZ } from '../../plan-view.ts'
import { Beam } from './beam.tsx'
import { LightShape } from './light-shape.tsx'

const WIDTH = 300
const HEIGHT = 190

/** A setup from above, small, for a card: nothing in it can be pressed. */
export function PlanSketch({ whole }: { whole: WholeSetup }) {
  const view = fitPlan(whole, WIDTH, HEIGHT, { left: 26, right: 26, top: 18, bottom: 24 })
  const { camera, background } = whole.setup
  const half = (Math.min(background.widthM, 6) / 2) * view.pxPerM
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
        <Beam
          key={light.id}
          light={light}
          face={facePoint(whole)}
          wallM={background.zM}
          whiteK={camera.whiteBalanceK}
          view={view}
        />
      ))}
      {whole.props.map((prop) => {
        const half = (prop.widthM / 2) * view.pxPerM
        return (
          <g
            key={prop.id}
            transform={`translate(${toX(view, prop.at[0])} ${toZ(view, prop.at[2])}) rotate(${-prop.turnDeg})`}
          >
            {prop.kind === 'prop' ? (
              <circle r={half} fill="none" stroke={prop.colour} strokeWidth={1.3} />
            ) : (
              <path d={`M${-half} 0h${half * 2}`} stroke="var(--color-draft)" strokeWidth={3.5} />
            )}
          </g>
        )
      })}
      {whole.places.map((place) => (
        <g
          key={place.id}
          transform={`translate(${toX(view, place.at[0])} ${toZ(view, place.at[1])})`}
          stroke="var(--color-ink)"
          strokeWidth={1.4}
          fill="#fff"
        >
          <circle r={8} />
          <path d="M0 8v5" />
        </g>
      ))}
      {whole.lights.map((light) => {
        const turn = (Math.atan2(light.aim[2] - light.at[2], light.aim[0] - light.at[0]) * 180) / Math.PI
        return (
          <g
            key={light.id}
            transform={`translate(${toX(view, light.at[0])} ${toZ(view, light.at[2])}) rotate(${turn}) scale(.8)`}
          >
            <LightShape light={light} pxPerM={view.pxPerM / 0.8} across="width" chosen={false} />
          </g>
        )
      })}
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
