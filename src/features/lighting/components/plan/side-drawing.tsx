import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { useLengthUnit } from '#src/lib/length-unit.ts'
import { eyeLineWords } from '../../measures.ts'
import { type Part, pointOf } from '../../parts.ts'
import { type Project, fitSide, projectSide } from '../../plan-view.ts'
import { holdTouch } from '../../hold-touch.ts'
import { useFrozen } from '../../use-frozen.ts'
import { useSize } from '../../use-size.ts'
import { Aims } from './aims.tsx'
import { Beam } from './beam.tsx'
import { Guides } from './guides.tsx'
import { type MovableSetup, handlePropsIn } from './handle-props.ts'
import { Handle } from './handle.tsx'
import { LightShape } from './light-shape.tsx'
import { PropShape } from './prop-shape.tsx'
import { Readout } from './readout.tsx'
import { SideGround } from './side-ground.tsx'
import { SitterFromSide } from './sitter-shape.tsx'
import { Standing } from './standing.tsx'

export type SideDrawingProps = MovableSetup & { written: WholeSetup; reading: SetupReading; orientation: Orientation }

/** The setup from the side, wall at the left, camera at the right: heights are dragged here. */
export function SideDrawing(props: SideDrawingProps) {
  const { ref, size } = useSize()
  const { held } = props.moving
  return (
    <div ref={ref} className="relative h-full overflow-hidden rounded-r border border-hair bg-white">
      {size && size.width > 0 && <Side {...props} width={size.width} height={size.height} />}
      {held?.drawing === 'side' && <Readout held={held} whole={props.whole} name={props.nameOf(held.part)} />}
    </div>
  )
}

function Side({ written, width, height, ...rest }: SideDrawingProps & { width: number; height: number }) {
  const { whole, reading, orientation, chosenKey, moving } = rest
  const unit = useLengthUnit()
  const view = useFrozen(fitSide(written, width, height), moving.held !== null)
  const project = projectSide(view)
  const at = (part: Part) => {
    const [x, y] = project(pointOf(part, whole))
    return { x, y }
  }
  const common = handlePropsIn(rest, { kind: 'side', pxPerM: view.pxPerM }, unit)
  const places = whole.places.map((place): Part & { kind: 'place' } => ({ kind: 'place', place }))
  const props = whole.props.map((prop): Part & { kind: 'prop' } => ({ kind: 'prop', prop }))
  const lights = whole.lights.map((light): Part & { kind: 'light' } => ({ kind: 'light', light }))
  const camera: Part = { kind: 'camera', setupId: whole.setup.id }
  return (
    <svg
      ref={holdTouch}
      width={width}
      height={height}
      className="absolute inset-0 select-none"
      role="group"
      aria-label="Side of the setup, to scale"
    >
      <SideGround whole={whole} view={view} orientation={orientation} unit={unit} />
      {whole.lights.map((light) => (
        <Beam key={light.id} light={light} whole={whole} project={project} pxPerM={view.pxPerM} />
      ))}
      {props.map((part) => (
        <Handle key={part.prop.id} {...at(part)} {...common(part)}>
          <PropShape prop={part.prop} pxPerM={view.pxPerM} seen="side" />
        </Handle>
      ))}
      {places.map((part) => (
        <Handle key={part.place.id} {...at(part)} {...common(part)}>
          <SitterFromSide place={part.place} pxPerM={view.pxPerM} />
        </Handle>
      ))}
      {whole.lights.map((light) => (
        <Standing key={light.id} light={light} whole={whole} project={project} seen="side" />
      ))}
      <MainHeight whole={whole} reading={reading} project={project} />
      {lights.map((part) => {
        const own = common(part)
        return (
          <Handle key={part.light.id} {...at(part)} {...own}>
            <LightShape
              light={part.light}
              pxPerM={view.pxPerM}
              seen="side"
              chosen={own.chosen || own.held}
              peerColour={own.peer?.colour}
            />
          </Handle>
        )
      })}
      <Handle {...at(camera)} {...common(camera)}>
        <rect x={-4} y={-7} width={24} height={14} rx={2} fill="var(--color-ink)" />
      </Handle>
      <Aims whole={whole} chosenKey={chosenKey} project={project} handle={common} />
      {moving.held?.drawing === 'side' && <Guides guides={moving.held.guides} project={project} />}
    </svg>
  )
}

/** How high the main hangs over the eyes: the figure a photographer looks for first. */
function MainHeight({ whole, reading, project }: { whole: WholeSetup; reading: SetupReading; project: Project }) {
  const main = whole.lights.find((light) => light.purpose === 'main')
  if (!main || !reading.main) return null
  const face = facePoint(whole)
  const [faceX, faceY] = project(face)
  const [mainX, mainY] = project(main.at)
  return (
    <g aria-hidden className="pointer-events-none">
      <path
        d={`M${mainX} ${mainY}L${faceX} ${faceY}`}
        stroke="var(--color-glow)"
        strokeWidth={1.6}
        strokeDasharray="4 4"
      />
      <path d={`M${faceX + 8} ${faceY}H${mainX + 24}`} stroke="var(--color-ink-faint)" strokeDasharray="3 4" />
      <text
        {...eyeWordsAt(mainX, faceX, project(whole.setup.camera.at)[0], faceY)}
        className="fill-glow-ink text-xs font-semibold"
        stroke="#fff"
        strokeWidth={4}
        paintOrder="stroke"
      >
        {eyeLineWords(reading.main.elevationDeg)}
      </text>
    </g>
  )
}

/** About how wide the words of the main's height are, CSS px. */
const EYE_WORDS_PX = 150

/** Over the eye line where there is room before the camera, else under it. */
function eyeWordsAt(mainX: number, faceX: number, cameraX: number, eyeY: number): { x: number; y: number } {
  const x = Math.max(mainX, faceX) + 30
  return x + EYE_WORDS_PX < cameraX - 10 ? { x, y: eyeY - 6 } : { x: faceX + 16, y: eyeY + 17 }
}
