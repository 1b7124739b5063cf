import { useState } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type View, viewOf } from '#shared/domain/lighting/frame.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { axisOnWall } from '#shared/domain/lighting/light-output.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { type Part, partKey } from '../../parts.ts'
import { beamTint } from '../../plan-view.ts'
import { type Moving, handleLabel } from '../../use-moving.ts'
import type { PeerHold } from '../../use-peer-moves.ts'
import { holdTouch } from '../../hold-touch.ts'
import { useSize } from '../../use-size.ts'
import { Handle } from './handle.tsx'
import { LightShape } from './light-shape.tsx'

export type SideDrawingProps = {
  whole: WholeSetup
  written: WholeSetup
  reading: SetupReading
  orientation: 'upright' | 'across' | 'square'
  chosenKey: string | null
  moving: Moving
  mayWrite: boolean
  peers: ReadonlyMap<string, PeerHold>
  nameOf: (part: Part) => string
}

type SideView = { pxPerM: number; originX: number; floorY: number }

function fitSide(whole: WholeSetup, width: number, height: number): SideView {
  const { camera, background } = whole.setup
  const zs = [camera.at[2] + 0.4, ...whole.lights.map((light) => light.at[2] + 0.4), 0.6]
  const tops = [
    camera.at[1] + 0.3,
    Math.min(background.heightM, 3.2),
    2,
    ...whole.lights.map((light) => light.at[1] + (light.modifier?.numbers.heightM ?? 0.2) / 2 + 0.1),
  ]
  const minZ = Math.min(background.zM, ...whole.lights.map((light) => light.at[2])) - 0.3
  const across = Math.max(...zs) - minZ
  const pxPerM = Math.max(8, Math.min(80, (width - 40) / across, (height - 34) / Math.max(...tops)))
  return { pxPerM, originX: (width - across * pxPerM) / 2 - minZ * pxPerM, floorY: height - 18 }
}

/** The setup from the side, wall at the left, camera at the right: heights are dragged here. */
export function SideDrawing(props: SideDrawingProps) {
  const { ref, size } = useSize()
  return (
    <div ref={ref} className="relative h-full overflow-hidden rounded-r border border-hair bg-white">
      {size && size.width > 0 && <Side {...props} width={size.width} height={size.height} />}
    </div>
  )
}

function Side({
  whole,
  written,
  reading,
  orientation,
  chosenKey,
  moving,
  mayWrite,
  peers,
  nameOf,
  width,
  height,
}: SideDrawingProps & { width: number; height: number }) {
  const fitted = fitSide(written, width, height)
  const [frozen, setFrozen] = useState<SideView | null>(null)
  if (moving.held && !frozen) setFrozen(fitted)
  if (!moving.held && frozen) setFrozen(null)
  const view = frozen ?? fitted
  const X = (zM: number) => view.originX + zM * view.pxPerM
  const Y = (yM: number) => view.floorY - yM * view.pxPerM
  const { camera, background } = whole.setup
  const face = facePoint(whole)
  const main = whole.lights.find((light) => light.purpose === 'main')
  const drawing = { kind: 'side', pxPerM: view.pxPerM } as const
  const common = (part: Part) => {
    const key = partKey(part)
    return {
      label: `${handleLabel(part, whole, nameOf(part))}, seen from the side`,
      handlers: moving.handlers(part, drawing),
      held: moving.held?.key === key,
      chosen: chosenKey === key,
      peer: peers.get(key),
      mayWrite,
    }
  }
  return (
    <svg
      ref={holdTouch}
      width={width}
      height={height}
      className="absolute inset-0 select-none"
      role="group"
      aria-label="Side of the setup, to scale"
    >
      <g aria-hidden>
        <path d={`M0 ${view.floorY}H${width}`} stroke="var(--color-rail)" strokeWidth={2} />
        <rect
          x={X(background.zM) - 6}
          y={Y(background.heightM)}
          width={6}
          height={background.heightM * view.pxPerM}
          fill="var(--color-rail)"
        />
        <Sight view={viewOf(whole, orientation)} wallM={background.zM} X={X} Y={Y} />
        {whole.lights.map((light) => {
          const wall = light.purpose === 'background' ? axisOnWall(light, background.zM) : null
          if (!wall) return null
          const { colour, opacity } = beamTint(light, camera.whiteBalanceK)
          const half = Math.min(0.8, background.heightM / 2)
          return (
            <path
              key={light.id}
              d={`M${X(light.at[2])} ${Y(light.at[1])}L${X(background.zM)} ${Y(wall[1] + half)}V${Y(Math.max(0, wall[1] - half))}Z`}
              fill={colour}
              opacity={opacity}
            />
          )
        })}
        {whole.places.map((place) => (
          <g key={place.id} fill="none" stroke="var(--color-ink)" strokeWidth={1.6}>
            <path
              d={`M${X(place.at[1]) - 0.16 * view.pxPerM} ${view.floorY}Q${X(place.at[1]) - 0.12 * view.pxPerM} ${Y(place.eyeHeightM - 0.2)} ${X(place.at[1])} ${Y(place.eyeHeightM - 0.2)}T${X(place.at[1]) + 0.2 * view.pxPerM} ${view.floorY}`}
            />
            <circle cx={X(place.at[1])} cy={Y(place.eyeHeightM)} r={Math.max(6, 0.13 * view.pxPerM)} fill="#fff" />
          </g>
        ))}
        {whole.lights.map((light) => (
          <Stand
            key={light.id}
            x={X(light.at[2])}
            y={Y(light.at[1])}
            floorY={view.floorY}
            kind={light.support?.numbers.kind ?? null}
          />
        ))}
        <path
          d={`M${X(camera.at[2]) + 8} ${Y(camera.at[1]) + 6}L${X(camera.at[2]) - 4} ${view.floorY}M${X(camera.at[2]) + 8} ${Y(camera.at[1]) + 6}L${X(camera.at[2]) + 22} ${view.floorY}`}
          stroke="var(--color-ink)"
          fill="none"
        />
        {main && reading.main && (
          <g>
            <path
              d={`M${X(main.at[2])} ${Y(main.at[1])}L${X(face[2])} ${Y(face[1])}`}
              stroke="var(--color-glow)"
              strokeWidth={1.6}
              strokeDasharray="4 4"
            />
            <path
              d={`M${X(face[2]) + 8} ${Y(face[1])}H${X(main.at[2]) + 24}`}
              stroke="var(--color-ink-faint)"
              strokeDasharray="3 4"
            />
            <text
              {...eyeWordsAt(X(main.at[2]), X(face[2]), X(camera.at[2]), Y(face[1]))}
              className="fill-glow-ink text-xs font-semibold"
              stroke="#fff"
              strokeWidth={4}
              paintOrder="stroke"
            >
              {`${Math.round(Math.abs(reading.main.elevationDeg))}° ${reading.main.elevationDeg < 0 ? 'below' : 'above'} the eye line`}
            </text>
          </g>
        )}
      </g>
      {whole.lights.map((light) => {
        const turn = (Math.atan2(light.at[1] - light.aim[1], light.aim[2] - light.at[2]) * 180) / Math.PI
        const own = common({ kind: 'light', light })
        return (
          <Handle key={light.id} x={X(light.at[2])} y={Y(light.at[1])} {...own}>
            <g transform={`rotate(${turn})`}>
              <LightShape
                light={light}
                pxPerM={view.pxPerM}
                across="height"
                chosen={own.chosen || own.held}
                peerColour={own.peer?.colour}
              />
            </g>
          </Handle>
        )
      })}
      <Handle x={X(camera.at[2])} y={Y(camera.at[1])} {...common({ kind: 'camera', setupId: whole.setup.id })}>
        <rect x={-4} y={-7} width={24} height={14} rx={2} fill="var(--color-ink)" />
      </Handle>
      <text x={12} y={18} aria-hidden className="pointer-events-none fill-ink-soft text-xs font-semibold">
        Side
      </text>
    </svg>
  )
}

/** Upper and lower edge of what the lens sees. */
function Sight({
  view,
  wallM,
  X,
  Y,
}: {
  view: View
  wallM: number
  X: (zM: number) => number
  Y: (yM: number) => number
}) {
  const edge = (sign: 1 | -1) => {
    const y = view.forward[1] + view.up[1] * view.tanUp * sign
    const z = view.forward[2] + view.up[2] * view.tanUp * sign
    if (z > -0.05) return ''
    const run = (wallM - view.at[2]) / z
    return `M${X(view.at[2])} ${Y(view.at[1])}L${X(wallM)} ${Y(view.at[1] + y * run)}`
  }
  return <path d={edge(1) + edge(-1)} stroke="var(--color-ink-faint)" strokeDasharray="4 5" fill="none" />
}

function Stand({ x, y, floorY, kind }: { x: number; y: number; floorY: number; kind: string | null }) {
  const line = { stroke: 'var(--color-draft)', strokeWidth: 1.4, fill: 'none' }
  switch (kind) {
    case 'stand':
    case 'floor stand':
      return (
        <path
          d={`M${x} ${y}V${floorY}${floorY - y > 30 ? `M${x - 12} ${floorY}L${x} ${floorY - 18}L${x + 12} ${floorY}` : ''}`}
          {...line}
        />
      )
    case 'boom':
      return (
        <path
          d={`M${x} ${y}L${x + 46} ${y + 10}M${x + 34} ${y + 8}V${floorY}M${x + 22} ${floorY}L${x + 34} ${floorY - 18}L${x + 46} ${floorY}`}
          {...line}
        />
      )
    default:
      return <path d={`M${x} ${y}V${floorY}`} {...line} strokeDasharray="2 5" opacity={0.5} />
  }
}

/** About how wide the words of the main's height are, CSS px. */
const EYE_WORDS_PX = 150

/** Over the eye line where there is room before the camera, else under it. */
function eyeWordsAt(mainX: number, faceX: number, cameraX: number, eyeY: number): { x: number; y: number } {
  const x = Math.max(mainX, faceX) + 30
  return x + EYE_WORDS_PX < cameraX - 10 ? { x, y: eyeY - 6 } : { x: faceX + 16, y: eyeY + 17 }
}
