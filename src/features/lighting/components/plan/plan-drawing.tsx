import { useState } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { distanceBetween, facePoint } from '#shared/domain/lighting/geometry.ts'
import type { Light, Prop, SitterPlace } from '#shared/domain/lighting/schema.ts'
import { inSentence, metresLabel } from '#shared/domain/lighting/words.ts'
import { type Part, partKey } from '../../parts.ts'
import { type Label, type PlanView, fitPlan, spreadLabels, toX, toZ } from '../../plan-view.ts'
import { type Moving, handleLabel } from '../../use-moving.ts'
import type { PeerHold } from '../../use-peer-moves.ts'
import { holdTouch } from '../../hold-touch.ts'
import { useSize } from '../../use-size.ts'
import { Beam } from './beam.tsx'
import { Handle } from './handle.tsx'
import { LightShape } from './light-shape.tsx'
import { PlanGround } from './plan-ground.tsx'

export type PlanDrawingProps = {
  /** The setup as it is shown: with what hands hold. */
  whole: WholeSetup
  /** The setup as it is written: the scale follows this one, so that nothing slides under a hand. */
  written: WholeSetup
  tanAcross: number
  chosenKey: string | null
  moving: Moving
  mayWrite: boolean
  peers: ReadonlyMap<string, PeerHold>
  nameOf: (part: Part) => string
  onChooseNothing: () => void
}

const NARROW_PX = 520

/** The setup from above, to scale, the camera at the foot. */
export function PlanDrawing(props: PlanDrawingProps) {
  const { ref, size } = useSize()
  return (
    <div ref={ref} className="relative h-full overflow-hidden rounded-r border border-hair bg-white">
      {size && size.width > 0 && <Plan {...props} width={size.width} height={size.height} />}
    </div>
  )
}

function Plan({ width, height, written, whole, ...rest }: PlanDrawingProps & { width: number; height: number }) {
  const { moving, mayWrite, chosenKey, peers, nameOf } = rest
  const isNarrow = width < NARROW_PX
  const margins = isNarrow
    ? { left: 54, right: 22, top: 34, bottom: 46 }
    : { left: 150, right: 165, top: 40, bottom: 42 }
  const fitted = fitPlan(written, width, height, margins)
  // While a hand holds something the scale stays, whatever others write.
  const [frozen, setFrozen] = useState<PlanView | null>(null)
  if (moving.held && !frozen) setFrozen(fitted)
  if (!moving.held && frozen) setFrozen(null)
  const view = frozen ?? fitted
  const drawing = { kind: 'plan', pxPerM: view.pxPerM } as const
  const face = facePoint(whole)
  const { camera, background } = whole.setup
  const common = (part: Part) => {
    const key = partKey(part)
    return {
      label: handleLabel(part, whole, nameOf(part)),
      handlers: moving.handlers(part, drawing),
      held: moving.held?.key === key,
      chosen: chosenKey === key,
      peer: peers.get(key),
      mayWrite,
    }
  }
  const labels = spreadLabels([
    ...whole.lights.map((light) => lightLabel(light, whole, view, isNarrow)),
    ...whole.props.map((prop) => propLabel(prop, whole, view)),
  ])
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
      <PlanGround whole={whole} view={view} tanAcross={rest.tanAcross} dimensionX={isNarrow ? 14 : 40} />
      {whole.lights.map((light) => (
        <Beam
          key={light.id}
          light={light}
          face={face}
          wallM={background.zM}
          whiteK={camera.whiteBalanceK}
          view={view}
        />
      ))}
      {whole.props.map((prop) => (
        <Handle key={prop.id} x={toX(view, prop.at[0])} y={toZ(view, prop.at[2])} {...common({ kind: 'prop', prop })}>
          {prop.kind === 'prop' ? (
            <circle
              r={Math.max(6, (prop.widthM / 2) * view.pxPerM)}
              fill="none"
              stroke={prop.colour}
              strokeWidth={1.5}
            />
          ) : (
            <path
              d={`M${(-prop.widthM / 2) * view.pxPerM} 0h${prop.widthM * view.pxPerM}`}
              transform={`rotate(${-prop.turnDeg})`}
              stroke={prop.kind === 'flag' ? 'var(--color-ink)' : 'var(--color-draft)'}
              strokeWidth={5}
            />
          )}
        </Handle>
      ))}
      {whole.places.map((place) => (
        <Handle
          key={place.id}
          x={toX(view, place.at[0])}
          y={toZ(view, place.at[1])}
          {...common({ kind: 'place', place })}
        >
          <circle r={13} fill="#fff" stroke="var(--color-ink)" strokeWidth={1.6} />
          <path d="M0 13v7" stroke="var(--color-ink)" strokeWidth={1.6} />
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
      {whole.lights.map((light) => {
        const x = toX(view, light.at[0])
        const z = toZ(view, light.at[2])
        const turn = (Math.atan2(light.aim[2] - light.at[2], light.aim[0] - light.at[0]) * 180) / Math.PI
        const own = common({ kind: 'light', light })
        return (
          <Handle key={light.id} x={x} y={z} {...own}>
            <g transform={`rotate(${turn})`}>
              <LightShape
                light={light}
                pxPerM={view.pxPerM}
                across="width"
                chosen={own.chosen || own.held}
                peerColour={own.peer?.colour}
              />
            </g>
          </Handle>
        )
      })}
      <Handle
        x={toX(view, camera.at[0])}
        y={toZ(view, camera.at[2])}
        {...common({ kind: 'camera', setupId: whole.setup.id })}
      >
        <rect x={-14} y={-2} width={28} height={15} rx={2} fill="var(--color-ink)" />
        <text x={22} y={10} className="fill-ink text-xs font-semibold">
          Camera · {camera.focalMm} mm
        </text>
      </Handle>
      {whole.lights
        .filter((light) => chosenKey === light.id || chosenKey === `${light.id}:aim`)
        .map((light) => (
          <g key={light.id}>
            <path
              aria-hidden
              d={`M${toX(view, light.at[0])} ${toZ(view, light.at[2])}L${toX(view, light.aim[0])} ${toZ(view, light.aim[2])}`}
              stroke="var(--color-glow)"
              strokeWidth={1.3}
              strokeDasharray="4 4"
              className="pointer-events-none"
            />
            <Handle
              x={toX(view, light.aim[0])}
              y={toZ(view, light.aim[2])}
              {...common({ kind: 'aim', light })}
              ringPx={11}
            >
              <circle r={5} fill="#fff" stroke="var(--color-glow)" strokeWidth={1.8} />
              <path d="M-8 0h16M0 -8v16" stroke="var(--color-glow)" strokeWidth={1.3} />
            </Handle>
          </g>
        ))}
      <g aria-hidden className="pointer-events-none">
        {labels.map((label) => (
          <text
            key={label.key}
            x={label.x}
            y={label.y}
            textAnchor={label.side === 'left' ? 'end' : 'start'}
            stroke="#fff"
            strokeWidth={3}
            paintOrder="stroke"
            className="fill-draft text-xs"
          >
            {label.lines.map((line, index) => (
              <tspan key={line} x={label.x} dy={index === 0 ? 0 : 15} className={index === 0 ? '' : 'fill-ink-faint'}>
                {line}
              </tspan>
            ))}
          </text>
        ))}
        <text x={12} y={height - 12} className="fill-ink-soft text-xs font-semibold">
          Plan · grid 0.5 m
        </text>
      </g>
    </svg>
  )
}

/** About how wide a word is, CSS px a letter, and how much the distances at the left take. */
const LETTER_PX = 6.4
const DIMENSION_PX = 76

/** A label beside a point, outwards from the sitter, or inwards where it would be cut off. */
function besideOf(
  view: PlanView,
  xM: number,
  faceX: number,
  away: number,
  lines: readonly string[],
): Pick<Label, 'x' | 'side'> {
  const width = Math.max(...lines.map((line) => line.length)) * LETTER_PX
  const x = toX(view, xM)
  const left = { x: x - away, side: 'left' } as const
  const right = { x: x + away, side: 'right' } as const
  if (xM < faceX) return left.x - width < DIMENSION_PX ? right : left
  return right.x + width > view.width - 4 ? left : right
}

function lightLabel(light: Light, whole: WholeSetup, view: PlanView, isNarrow: boolean): Label {
  const face = facePoint(whole)
  const sizePx = ((light.modifier?.numbers.widthM ?? 0) * view.pxPerM) / 2
  const name = `${light.group === null ? '' : `${light.group} · `}${light.purpose}`
  const made = [light.modifier, ...light.gels].flatMap((part) => (part ? [inSentence(part.name)] : []))
  const height = light.at[1].toFixed(2).replace(/0$/, '')
  const lines = isNarrow
    ? [name]
    : [[name, ...made].join(', '), `${height} m up · ${metresLabel(distanceBetween(light.at, face))} off`]
  const away = Math.max(26, Math.min(60, sizePx + 12))
  return { key: light.id, ...besideOf(view, light.at[0], face[0], away, lines), y: toZ(view, light.at[2]) + 2, lines }
}

function propLabel(prop: Prop, whole: WholeSetup, view: PlanView): Label {
  const turn = prop.kind === 'prop' ? 0 : (prop.turnDeg * Math.PI) / 180
  const away = Math.max(12, (prop.widthM / 2) * Math.abs(Math.cos(turn)) * view.pxPerM + 10)
  const beside = besideOf(view, prop.at[0], facePoint(whole)[0], away, [prop.name])
  return { key: prop.id, ...beside, y: toZ(view, prop.at[2]) + 4, lines: [prop.name] }
}

/** Where a sitter's name stands: outside at the two ends of a row, above in between. */
function placeNameAt(places: readonly SitterPlace[], place: SitterPlace) {
  const row = [...places].sort((a, b) => a.at[0] - b.at[0] || (a.id < b.id ? -1 : 1))
  const index = row.findIndex((other) => other.id === place.id)
  if (index === 0) return { x: -16, y: -14, textAnchor: 'end' as const }
  if (index === row.length - 1) return { x: 16, y: -14, textAnchor: 'start' as const }
  return { x: 0, y: -4 - 17 * index, textAnchor: 'middle' as const }
}
