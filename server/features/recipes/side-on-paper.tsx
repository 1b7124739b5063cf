/** @jsxRuntime automatic */
import { Path, Svg, Text, View } from '@react-pdf/renderer'
import type { ReactElement } from 'react'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { faceOf } from '#shared/domain/lighting/light-output.ts'
import { type SideFit, fitSideSketch, sideMarks } from '#shared/domain/lighting/sketch.ts'
import { lengthLabel } from '#shared/units/length.ts'
import { type DrawingProps, FOOT_PT, Marks, ScaleBar, small } from './drawing-parts.tsx'
import { onRuler } from './paper-scale.ts'

const MOST_HEIGHTS = 8

/** The setup from the side, at a scale of its own: heights and the main's angle above the eyes. */
export function SideOnPaper({ whole, lights, unit, width, height, printable }: DrawingProps): ReactElement {
  const drawn = { width, height: height - FOOT_PT }
  const fit: SideFit = fitSideSketch(whole, { ...drawn, left: 40, right: 60, top: 12, bottom: 8 }, onRuler(unit))
  const Y = (y: number) => fit.floorY - y * fit.perM
  const X = (z: number) => fit.originX + z * fit.perM
  const face = facePoint(whole)
  const main = whole.lights.find((light) => light.purpose === 'main')
  const label = (metres: number) => lengthLabel(metres, unit, true)
  // With many lights the table alone says how high they are.
  const heights =
    whole.lights.length > MOST_HEIGHTS
      ? []
      : whole.lights
          .map((light, index) => ({
            id: light.id,
            x: X(light.at[2]),
            y: Y(light.at[1]) - Math.max(10, (faceOf(light).heightM * fit.perM) / 2) - 14,
            words: `${lights[index]?.group ?? lights[index]?.name ?? ''} ${label(light.at[1])}`,
          }))
          .sort((a, b) => a.x - b.x)
  // One above the other where they would lie on one another.
  const taken: { x: number; y: number }[] = []
  const placed = heights.map((one) => {
    let y = Math.max(0, one.y)
    while (taken.some((other) => Math.abs(other.x - one.x) < 46 && Math.abs(other.y - y) < 8)) y += 8
    taken.push({ x: one.x, y })
    return { ...one, y }
  })
  return (
    <View style={{ width, height }}>
      <Svg width={width} height={drawn.height} style={{ position: 'absolute', left: 0, top: 0 }}>
        <Marks marks={sideMarks(whole, fit)} />
        <Path d={`M0 ${Y(face[1])}H${width}`} stroke="#777777" strokeWidth={0.4} strokeDasharray="2 2" fill="none" />
        {main && (
          <Path
            d={`M${X(main.at[2])} ${Y(main.at[1])}L${X(face[2])} ${Y(face[1])}`}
            stroke="#000000"
            strokeWidth={0.7}
            strokeDasharray="3 2"
            fill="none"
          />
        )}
      </Svg>
      <Text
        style={{ ...small, position: 'absolute', left: 0, top: Y(face[1]) - 9, fontSize: 6.5 }}
      >{`eyes ${label(face[1])}`}</Text>
      {placed.map((one) => (
        <Text
          key={one.id}
          style={{
            ...small,
            position: 'absolute',
            left: one.x - 12,
            top: one.y,
            width: 90,
            fontSize: 6.5,
            maxLines: 1,
            textOverflow: 'ellipsis',
          }}
        >
          {printable(one.words)}
        </Text>
      ))}
      <Text
        style={{
          ...small,
          position: 'absolute',
          left: X(whole.setup.camera.at[2]) + 18,
          top: Y(whole.setup.camera.at[1]) + 8,
          fontSize: 6.5,
        }}
      >
        {`camera ${label(whole.setup.camera.at[1])}`}
      </Text>
      <ScaleBar perM={fit.perM} unit={unit} what="side" x={0} y={height - 14} />
    </View>
  )
}
