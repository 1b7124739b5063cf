import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { distanceBetween, facePoint } from '#shared/domain/lighting/geometry.ts'
import type { Light, Prop, SitterPlace } from '#shared/domain/lighting/schema.ts'
import { inSentence } from '#shared/domain/lighting/words.ts'
import { type LengthUnit, lengthLabel } from '#src/lib/length-unit.ts'
import { type Label, type PlanView, spreadLabels, toX, toZ, wordsWidth } from '../../plan-view.ts'

type Around = { whole: WholeSetup; view: PlanView; isNarrow: boolean; unit: LengthUnit }
type PlanLabelsProps = Around & {
  /** The name that stands at a sitter's place: other words keep clear of it. */
  nameOf: (place: SitterPlace) => string
}

/** What each light and thing is, beside it. */
export function PlanLabels({ whole, view, isNarrow, unit, nameOf }: PlanLabelsProps) {
  const labels = spreadLabels(
    [
      ...whole.lights.map((light) => lightLabel(light, { whole, view, isNarrow, unit })),
      ...whole.props.map((prop) => propLabel(prop, whole, view)),
      cameraLabel(whole, view),
    ],
    whole.places.map((place) => nameLabel(place, whole.places, nameOf(place), view)),
  )
  const off = new Set<string>(whole.lights.filter((light) => !light.isOn).map((light) => light.id))
  const classOf = (label: Label) => {
    if (label.key === CAMERA) return 'fill-ink text-xs font-semibold'
    return off.has(label.key) ? 'fill-ink-faint text-xs' : 'fill-draft text-xs'
  }
  return (
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
          className={classOf(label)}
        >
          {label.lines.map((line, index) => (
            <tspan key={line} x={label.x} dy={index === 0 ? 0 : 15} className={index === 0 ? '' : 'fill-ink-faint'}>
              {line}
            </tspan>
          ))}
        </text>
      ))}
    </g>
  )
}

/** How much the distances at the left take, CSS px. */
const DIMENSION_PX = 76

/** How far over a thing its label stands that has no room beside it, CSS px. */
const OVER_PX = 24

type Beside = Pick<Label, 'x' | 'side'> & { overPx: number }

/** A label beside a point, outwards from the sitter; over it along the edge where it would be cut off. */
function besideOf(view: PlanView, xM: number, faceX: number, away: number, lines: readonly string[]): Beside {
  const width = wordsWidth(lines)
  const x = toX(view, xM)
  if (xM < faceX)
    return x - away - width < DIMENSION_PX
      ? { x: DIMENSION_PX, side: 'right', overPx: OVER_PX }
      : { x: x - away, side: 'left', overPx: 0 }
  return x + away + width > view.width - 4
    ? { x: view.width - 4, side: 'left', overPx: OVER_PX }
    : { x: x + away, side: 'right', overPx: 0 }
}

function lightLabel(light: Light, { whole, view, isNarrow, unit }: Around): Label {
  const face = facePoint(whole)
  const sizePx = ((light.modifier?.numbers.widthM ?? 0) * view.pxPerM) / 2
  const name = `${light.group === null ? '' : `${light.group} · `}${light.purpose}${light.isOn ? '' : ', off'}`
  const made = [light.modifier, ...light.gels].flatMap((part) => (part ? [inSentence(part.name)] : []))
  const off = lengthLabel(distanceBetween(light.at, face), unit)
  const lines = isNarrow
    ? [name]
    : [[name, ...made].join(', '), `${lengthLabel(light.at[1], unit, true)} up · ${off} off`]
  const away = Math.max(26, Math.min(60, sizePx + 12))
  const { overPx, ...beside } = besideOf(view, light.at[0], face[0], away, lines)
  return { key: light.id, ...beside, y: toZ(view, light.at[2]) + 2 - overPx, lines }
}

const CAMERA = 'camera'

/** Beside the camera, at the left where a light stands close to its right. */
function cameraLabel({ setup: { camera }, lights }: WholeSetup, view: PlanView): Label {
  const [x, y] = [toX(view, camera.at[0]), toZ(view, camera.at[2]) + 10]
  const isTaken = lights.some(({ at }) => {
    const [right, down] = [toX(view, at[0]) - x, toZ(view, at[2]) - y]
    return right > 0 && right < 160 && Math.abs(down) < 60
  })
  const beside = isTaken ? ({ x: x - 22, side: 'left' } as const) : ({ x: x + 22, side: 'right' } as const)
  return { key: CAMERA, ...beside, y, lines: [`Camera · ${camera.focalMm} mm`] }
}

function propLabel(prop: Prop, whole: WholeSetup, view: PlanView): Label {
  const turn = prop.kind === 'prop' ? 0 : (prop.turnDeg * Math.PI) / 180
  const halfPx = (prop.widthM / 2) * view.pxPerM
  const away = Math.max(12, halfPx * Math.abs(Math.cos(turn)) + 10)
  const { overPx, ...beside } = besideOf(view, prop.at[0], facePoint(whole)[0], away, [prop.name])
  // Over all of a panel that stands in depth, not over its middle.
  const clearPx = overPx === 0 ? 0 : Math.max(overPx, halfPx * Math.abs(Math.sin(turn)) + 12)
  return { key: prop.id, ...beside, y: toZ(view, prop.at[2]) + 4 - clearPx, lines: [prop.name] }
}

/** Where a sitter's name stands: outside at the two ends of a row, above in between. */
export function placeNameAt(places: readonly SitterPlace[], place: SitterPlace) {
  const row = [...places].sort((a, b) => a.at[0] - b.at[0] || (a.id < b.id ? -1 : 1))
  const index = row.findIndex((other) => other.id === place.id)
  if (index === 0) return { x: -18, y: -16, textAnchor: 'end' as const }
  if (index === row.length - 1) return { x: 18, y: -16, textAnchor: 'start' as const }
  return { x: 0, y: -6 - 17 * index, textAnchor: 'middle' as const }
}

function nameLabel(place: SitterPlace, places: readonly SitterPlace[], name: string, view: PlanView): Label {
  const { x, y, textAnchor } = placeNameAt(places, place)
  const from = toX(view, place.at[0]) + x
  return {
    key: place.id,
    x: textAnchor === 'middle' ? from - wordsWidth([name]) / 2 : from,
    side: textAnchor === 'end' ? 'left' : 'right',
    y: toZ(view, place.at[1]) + y,
    lines: [name],
  }
}
