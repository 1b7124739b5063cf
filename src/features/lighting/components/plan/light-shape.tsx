import { memo } from 'react'
import type { Light, Point } from '#shared/domain/lighting/schema.ts'
import { type Flat, lightForm, outline } from '../../light-form.ts'
import type { DrawingKind } from '../../parts.ts'

type LightShapeProps = {
  light: Light
  pxPerM: number
  /** From which side it is seen: from above or from the sitter's right. */
  seen: DrawingKind
  chosen: boolean
  /** Somebody else's colour while they move it. */
  peerColour?: string | undefined
  /** What is smaller is drawn at this size, CSS px. */
  leastPx?: number
}

/**
 * A light with the middle of its face at 0,0. The face has its true size and turn; housings behind it are signs. One that
 * is switched off is drawn hollow and grey.
 */
export const LightShape = memo(function LightShape({
  light,
  pxPerM,
  seen,
  chosen,
  peerColour,
  leastPx = 9,
}: LightShapeProps) {
  const form = lightForm(light, leastPx / pxPerM)
  const own = (point: Point): Flat => {
    const [x, y, z] = [point[0] - light.at[0], point[1] - light.at[1], point[2] - light.at[2]]
    return seen === 'plan' ? [x * pxPerM, z * pxPerM] : [z * pxPerM, -y * pxPerM]
  }
  const stroke = peerColour ?? (light.isOn ? 'var(--color-draft)' : 'var(--color-ink-faint)')
  const line = {
    fill: light.isOn ? '#fff' : 'none',
    stroke,
    strokeWidth: chosen || peerColour !== undefined ? 2.4 : 1.5,
    strokeLinejoin: 'round' as const,
    strokeDasharray: light.isOn ? undefined : '3 2.5',
  }
  if (form.ballM !== null) return <circle r={form.ballM * pxPerM} {...line} />
  const shape = light.modifier?.numbers.shape
  const isNarrow = shape === 'grid' || shape === 'snoot'
  return (
    <g>
      {form.bodies.toReversed().map((body, index) => (
        <path
          key={index}
          d={outline(body.map(own))}
          {...line}
          {...(isNarrow && light.isOn && index === form.bodies.length - 1 ? { fill: stroke } : {})}
        />
      ))}
      <path
        d={outline(form.face.map(own))}
        fill={light.isOn ? 'var(--color-draft-wash)' : 'none'}
        stroke={stroke}
        strokeWidth={light.isOn ? 2.6 : 1.5}
        strokeLinejoin="round"
        strokeDasharray={light.isOn ? undefined : '3 2.5'}
      />
    </g>
  )
})
