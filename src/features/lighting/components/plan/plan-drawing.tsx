import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import { useLengthUnit } from '#src/lib/length-unit.ts'
import { fitPlan, projectPlan, toX, toZ } from '../../plan-view.ts'
import { holdTouch } from '../../hold-touch.ts'
import { useFrozen } from '../../use-frozen.ts'
import { useSize } from '../../use-size.ts'
import { Aims } from './aims.tsx'
import { Beam } from './beam.tsx'
import { Guides } from './guides.tsx'
import { type MovableSetup, handlePropsIn } from './handle-props.ts'
import { Handle } from './handle.tsx'
import { LightShape } from './light-shape.tsx'
import { PlanGround } from './plan-ground.tsx'
import { PlanLabels, placeNameAt } from './plan-labels.tsx'
import { PropShape } from './prop-shape.tsx'
import { Readout } from './readout.tsx'
import { SitterFromAbove } from './sitter-shape.tsx'
import { Standing } from './standing.tsx'

export type PlanDrawingProps = MovableSetup & {
  /** The setup as it is written: the scale follows this one, so that nothing slides under a hand. */
  written: WholeSetup
  orientation: Orientation
  onChooseNothing: () => void
}

const NARROW_PX = 520

/** The setup from above, to scale, the camera at the foot. */
export function PlanDrawing(props: PlanDrawingProps) {
  const { ref, size } = useSize()
  const { held } = props.moving
  return (
    <div ref={ref} className="relative h-full overflow-hidden rounded-r border border-hair bg-white">
      {size && size.width > 0 && <Plan {...props} width={size.width} height={size.height} />}
      {held?.drawing === 'plan' && <Readout held={held} whole={props.whole} name={props.nameOf(held.part)} />}
    </div>
  )
}

function Plan({ width, height, written, ...rest }: PlanDrawingProps & { width: number; height: number }) {
  const { whole, moving, chosenKey, nameOf } = rest
  const unit = useLengthUnit()
  const isNarrow = width < NARROW_PX
  const margins = isNarrow
    ? { left: 54, right: 22, top: 34, bottom: 46 }
    : { left: 150, right: 165, top: 40, bottom: 42 }
  const view = useFrozen(fitPlan(written, width, height, margins), moving.held !== null)
  const project = projectPlan(view)
  const { camera } = whole.setup
  const common = handlePropsIn(rest, { kind: 'plan', pxPerM: view.pxPerM }, unit)
  return (
    <svg
      ref={holdTouch}
      width={width}
      height={height}
      className="absolute inset-0 select-none"
      role="group"
      aria-label="Plan of the setup, to scale"
      onPointerDown={rest.onChooseNothing}
    >
      <PlanGround
        whole={whole}
        view={view}
        orientation={rest.orientation}
        unit={unit}
        dimensionX={isNarrow ? 14 : 40}
      />
      {whole.lights.map((light) => (
        <Beam key={light.id} light={light} whole={whole} project={project} pxPerM={view.pxPerM} />
      ))}
      {whole.props.map((prop) => (
        <Handle key={prop.id} x={toX(view, prop.at[0])} y={toZ(view, prop.at[2])} {...common({ kind: 'prop', prop })}>
          <PropShape prop={prop} pxPerM={view.pxPerM} seen="plan" />
        </Handle>
      ))}
      {whole.places.map((place) => (
        <Handle
          key={place.id}
          x={toX(view, place.at[0])}
          y={toZ(view, place.at[1])}
          {...common({ kind: 'place', place })}
        >
          <SitterFromAbove place={place} pxPerM={view.pxPerM} />
          <text
            {...placeNameAt(whole.places, place)}
            className="fill-ink text-xs font-semibold"
            stroke="#fff"
            strokeWidth={3}
            paintOrder="stroke"
          >
            {nameOf({ kind: 'place', place })}
          </text>
        </Handle>
      ))}
      {whole.lights.map((light) => (
        <Standing key={light.id} light={light} whole={whole} project={project} seen="plan" />
      ))}
      {whole.lights.map((light) => {
        const own = common({ kind: 'light', light })
        return (
          <Handle key={light.id} x={toX(view, light.at[0])} y={toZ(view, light.at[2])} {...own}>
            <LightShape
              light={light}
              pxPerM={view.pxPerM}
              seen="plan"
              chosen={own.chosen || own.held}
              peerColour={own.peer?.colour}
            />
          </Handle>
        )
      })}
      <Handle
        x={toX(view, camera.at[0])}
        y={toZ(view, camera.at[2])}
        {...common({ kind: 'camera', setupId: whole.setup.id })}
      >
        <rect x={-14} y={-2} width={28} height={15} rx={2} fill="var(--color-ink)" />
      </Handle>
      <Aims whole={whole} chosenKey={chosenKey} project={project} handle={common} />
      {moving.held?.drawing === 'plan' && <Guides guides={moving.held.guides} project={project} />}
      <PlanLabels
        whole={whole}
        view={view}
        isNarrow={isNarrow}
        unit={unit}
        nameOf={(place) => nameOf({ kind: 'place', place })}
      />
    </svg>
  )
}
