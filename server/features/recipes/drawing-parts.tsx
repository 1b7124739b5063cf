/** @jsxRuntime automatic */
import { G, Line, Path, Rect, Svg, Text, View } from '@react-pdf/renderer'
import type { ReactElement } from 'react'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { Mark, Tone } from '#shared/domain/lighting/sketch.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { SheetLight } from '#shared/domain/recipes/sheet.ts'
import { type LengthUnit, METRES_PER_FOOT } from '#shared/units/length.ts'
import { TEXT_FONT } from '#server/features/pdf/fonts.ts'
import { barM, scaleWords } from './paper-scale.ts'

export type DrawingProps = {
  whole: WholeSetup
  orientation: Orientation
  lights: readonly SheetLight[]
  unit: LengthUnit
  width: number
  height: number
  printable: (text: string) => string
}

/** What stands under a drawing: its scale. */
export const FOOT_PT = 20

const INK: Readonly<Record<Tone, string>> = {
  wall: '#555555',
  ink: '#000000',
  light: '#000000',
  panel: '#000000',
  flag: '#000000',
  prop: '#777777',
  'neutral beam': '#e9e9e9',
  'warm beam': '#e9e9e9',
  'cool beam': '#e9e9e9',
}

export function Marks({ marks }: { marks: readonly Mark[] }): ReactElement {
  return (
    <G>
      {marks.map((mark) => {
        const ink = INK[mark.tone]
        if (mark.as === 'area') return <Path key={mark.key} d={mark.d} fill={ink} stroke="none" />
        return (
          <Path
            key={mark.key}
            d={mark.d}
            fill={mark.as === 'shape' ? '#ffffff' : 'none'}
            stroke={ink}
            strokeWidth={mark.weight * 0.75}
          />
        )
      })}
    </G>
  )
}

/** Lines every half metre or foot, or further apart where they would run together. */
export function Grid(props: {
  perM: number
  originX: number
  originZ: number
  width: number
  height: number
  stepM: number
}) {
  const { perM, originX, originZ, width, height, stepM } = props
  const step = stepM * perM
  const along = (origin: number, length: number) => {
    const first = origin - Math.floor(origin / step) * step
    return Array.from({ length: Math.floor((length - first) / step) + 1 }, (_, index) => first + index * step)
  }
  return (
    <G>
      {along(originX, width).map((x) => (
        <Line key={`x${x}`} x1={x} y1={0} x2={x} y2={height} stroke="#dddddd" strokeWidth={0.35} />
      ))}
      {along(originZ, height).map((y) => (
        <Line key={`y${y}`} x1={0} y1={y} x2={width} y2={y} stroke="#dddddd" strokeWidth={0.35} />
      ))}
    </G>
  )
}

export const small = { fontFamily: TEXT_FONT, fontSize: 7, lineHeight: 1.2, color: '#000000' } as const

/** A bar of known length, and the scale at which the drawing has been printed at its full size. */
export function ScaleBar({
  perM,
  unit,
  what,
  x,
  y,
}: {
  perM: number
  unit: LengthUnit
  what: string
  x: number
  y: number
}) {
  const lengthM = barM(perM, unit)
  const width = lengthM * perM
  const label = unit === 'm' ? `${lengthM} m` : `${Math.round(lengthM / METRES_PER_FOOT)}′`
  return (
    <View style={{ position: 'absolute', left: x, top: y, flexDirection: 'row', alignItems: 'center', gap: 5 }}>
      <Svg width={width + 1} height={6}>
        <Rect x={0.5} y={1.5} width={width / 2} height={3} fill="#000000" stroke="#000000" strokeWidth={0.5} />
        <Rect
          x={width / 2 + 0.5}
          y={1.5}
          width={width / 2}
          height={3}
          fill="#ffffff"
          stroke="#000000"
          strokeWidth={0.5}
        />
      </Svg>
      <Text style={small}>{`${label} · ${what} ${scaleWords(perM, unit)}, when printed at full size`}</Text>
    </View>
  )
}
