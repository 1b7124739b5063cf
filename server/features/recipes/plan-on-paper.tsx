/** @jsxRuntime automatic */
import { Path, Rect, Svg, Text, View } from '@react-pdf/renderer'
import type { ReactElement } from 'react'
import { type Orientation, viewOf } from '#shared/domain/lighting/frame.ts'
import { mainPlace } from '#shared/domain/lighting/geometry.ts'
import { fitPlanSketch, planMarks } from '#shared/domain/lighting/sketch.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { METRES_PER_FOOT, lengthLabel } from '#shared/units/length.ts'
import { type DrawingProps, FOOT_PT, Grid, Marks, ScaleBar, small } from './drawing-parts.tsx'
import { gridM, onRuler } from './paper-scale.ts'

/** A distance down the paper, with its ends. */
function Measure({ x, from, to }: { x: number; from: number; to: number }) {
  return (
    <Path
      d={`M${x} ${from}V${to}M${x - 3} ${from}h6M${x - 3} ${to}h6`}
      stroke="#000000"
      strokeWidth={0.5}
      fill="none"
    />
  )
}

type Callout = { id: string; title: string; lines: string[]; x: number; y: number }

/** Names of the lights and what stands beside them, in two columns at the sides, as far down as what they name. */
function spread(callouts: readonly Callout[], width: number, height: number) {
  const rows = [...callouts].sort((a, b) => a.x - b.x)
  const half = Math.ceil(rows.length / 2)
  const isLeft = (one: Callout, index: number) =>
    rows.length > 12 ? index < half : one.x < width / 2 - 1 || (Math.abs(one.x - width / 2) <= 1 && index < half)
  const place = (column: readonly Callout[]) => {
    const lines = column.length > 12 ? 0 : column.length > 7 ? 1 : 2
    const step = Math.min(11 + lines * 8, height / Math.max(1, column.length))
    let floor = 0
    const placed = [...column]
      .sort((a, b) => a.y - b.y)
      .map((one) => {
        const top = Math.max(floor, one.y - 5)
        floor = top + step
        return { ...one, lines: one.lines.slice(0, lines), top, fontSize: Math.min(7, step - 0.5) }
      })
    const over = Math.max(0, floor - height)
    // Those that would hang over the foot push the ones above them up.
    let ceiling = height
    for (const one of [...placed].reverse()) {
      if (over > 0) one.top = Math.min(one.top, ceiling - step)
      ceiling = one.top
    }
    return placed
  }
  return {
    left: place(rows.filter(isLeft)),
    right: place(rows.filter((one, index) => !isLeft(one, index))),
  }
}

/** Both edges of what the lens sees, from the camera to the wall. */
function sightOf(
  whole: WholeSetup,
  orientation: Orientation,
  X: (x: number) => number,
  Z: (z: number) => number,
): string {
  const view = viewOf(whole, orientation)
  return [-1, 1]
    .map((side) => {
      const dx = view.forward[0] + view.right[0] * view.tanAcross * side
      const dz = view.forward[2] + view.right[2] * view.tanAcross * side
      if (dz > -0.05) return ''
      const run = (whole.setup.background.zM - view.at[2]) / dz
      return `M${X(view.at[0])} ${Z(view.at[2])}L${X(view.at[0] + dx * run)} ${Z(view.at[2] + dz * run)}`
    })
    .join('')
}

const COLUMN_PT = 116

/** The setup from above, to scale, the camera at the foot. */
export function PlanOnPaper({
  whole,
  orientation,
  lights,
  unit,
  width,
  height,
  printable,
}: DrawingProps): ReactElement {
  const drawn = { width, height: height - FOOT_PT }
  const box = { ...drawn, left: COLUMN_PT + 40, right: COLUMN_PT + 14, top: 22, bottom: 20 }
  const fit = fitPlanSketch(whole, box, onRuler(unit))
  const { camera, background } = whole.setup
  const X = (x: number) => fit.originX + x * fit.perM
  const Z = (z: number) => fit.originZ + z * fit.perM
  const sitterZ = mainPlace(whole.places)?.at[1] ?? 0
  const dimensionX = COLUMN_PT + 14
  const stepM = gridM(fit.perM, unit)
  const label = (metres: number) => lengthLabel(Math.abs(metres), unit, true)
  const measures = [
    { from: Z(background.zM), to: Z(sitterZ), words: label(sitterZ - background.zM) },
    ...(camera.at[2] > sitterZ
      ? [{ from: Z(sitterZ), to: Z(camera.at[2]), words: label(camera.at[2] - sitterZ) }]
      : []),
  ]
  const callouts = [
    ...whole.lights.flatMap((light, index): Callout[] => {
      const row = lights[index]
      if (!row) return []
      const title = row.group === null ? row.name : `${row.group} · ${row.name}`
      return [
        {
          id: light.id,
          title,
          lines: [`${row.height}, ${row.distance}`, row.made],
          x: X(light.at[0]),
          y: Z(light.at[2]),
        },
      ]
    }),
    ...whole.props.map((prop) => ({ id: prop.id, title: prop.name, lines: [], x: X(prop.at[0]), y: Z(prop.at[2]) })),
  ]
  const { left, right } = spread(callouts, width, drawn.height)
  return (
    <View style={{ width, height }}>
      <Svg width={width} height={drawn.height} style={{ position: 'absolute', left: 0, top: 0 }}>
        <Grid {...fit} stepM={stepM} />
        <Rect x={0} y={0} width={COLUMN_PT} height={drawn.height} fill="#ffffff" stroke="none" />
        <Rect x={width - COLUMN_PT} y={0} width={COLUMN_PT} height={drawn.height} fill="#ffffff" stroke="none" />
        <Path
          d={sightOf(whole, orientation, X, Z)}
          stroke="#888888"
          strokeWidth={0.5}
          strokeDasharray="3 3"
          fill="none"
        />
        <Marks marks={planMarks(whole, fit)} />
        {measures.map((one) => (
          <Measure key={one.words + String(one.from)} x={dimensionX} from={one.from} to={one.to} />
        ))}
        {[
          ...left.map((one) => ({ ...one, edge: COLUMN_PT - 4 })),
          ...right.map((one) => ({ ...one, edge: width - COLUMN_PT + 4 })),
        ].map((one) => (
          <Path
            key={one.id}
            d={`M${one.edge} ${one.top + 5}L${one.x} ${one.y}`}
            stroke="#666666"
            strokeWidth={0.4}
            strokeDasharray="1.5 1.5"
            fill="none"
          />
        ))}
      </Svg>
      <Text
        style={{
          ...small,
          position: 'absolute',
          left: X(0) - 80,
          width: 160,
          top: Math.max(0, Z(background.zM) - 15),
          textAlign: 'center',
        }}
      >
        {printable(background.what === '' ? 'Back wall' : background.what)}
      </Text>
      {measures.map((one) => (
        <Text
          key={one.words + String(one.from)}
          style={{
            ...small,
            position: 'absolute',
            left: dimensionX + 4,
            top: (one.from + one.to) / 2 - 5,
            backgroundColor: '#ffffff',
          }}
        >
          {one.words}
        </Text>
      ))}
      <Text
        style={{ ...small, position: 'absolute', left: X(camera.at[0]) + 11, top: Z(camera.at[2]) - 3 }}
      >{`Camera · ${camera.focalMm} mm`}</Text>
      <Callouts rows={left} x={0} align="right" printable={printable} />
      <Callouts rows={right} x={width - COLUMN_PT + 8} align="left" printable={printable} />
      <ScaleBar
        perM={fit.perM}
        unit={unit}
        what={`grid ${unit === 'm' ? `${stepM} m` : `${Math.round(stepM / METRES_PER_FOOT)}′`} · plan`}
        x={0}
        y={height - 14}
      />
    </View>
  )
}

type Placed = ReturnType<typeof spread>['left']

function Callouts(props: { rows: Placed; x: number; align: 'left' | 'right'; printable: (text: string) => string }) {
  return props.rows.map((one) => (
    <View key={one.id} style={{ position: 'absolute', left: props.x, top: one.top, width: COLUMN_PT - 8 }}>
      <Text
        style={{
          ...small,
          fontSize: one.fontSize,
          fontWeight: 600,
          textAlign: props.align,
          maxLines: 1,
          textOverflow: 'ellipsis',
        }}
      >
        {props.printable(one.title)}
      </Text>
      {one.lines.map((line, index) => (
        <Text
          key={index}
          style={{ ...small, fontSize: 6.5, textAlign: props.align, maxLines: 1, textOverflow: 'ellipsis' }}
        >
          {props.printable(line)}
        </Text>
      ))}
    </View>
  ))
}
