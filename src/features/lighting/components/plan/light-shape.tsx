import { memo } from 'react'
import type { Light } from '#shared/domain/lighting/schema.ts'

type LightShapeProps = {
  light: Light
  pxPerM: number
  /** Half the width of the face in the drawing, metres: across in the plan, upright in the side view. */
  across: 'width' | 'height'
  chosen: boolean
  /** Somebody else's colour while they move it. */
  peerColour?: string | undefined
}

/**
 * A light seen from above or from the side, its face at 0,0 looking along +x. The face has its true size; housings
 * behind it are signs.
 */
export const LightShape = memo(function LightShape({ light, pxPerM, across, chosen, peerColour }: LightShapeProps) {
  const numbers = light.modifier?.numbers
  const sizeM = numbers ? (across === 'width' ? numbers.widthM : numbers.heightM) : 0
  const half = Math.max(5, (sizeM * pxPerM) / 2)
  const line = {
    fill: '#fff',
    stroke: peerColour ?? 'var(--color-draft)',
    strokeWidth: chosen || peerColour !== undefined ? 2.4 : 1.5,
    strokeLinejoin: 'round' as const,
  }
  switch (numbers?.shape) {
    case 'softbox':
    case 'octa':
    case 'strip':
    case 'beauty dish': {
      const depth = Math.max(8, Math.min(16, half * 0.6))
      const back = Math.max(half * 0.55, half - 14)
      return (
        <g>
          <path d={`M0 ${-half}V${half}L${-depth} ${back}V${-back}Z`} {...line} />
          <rect x={-depth - 7} y={-4} width={7} height={8} {...line} />
        </g>
      )
    }
    case 'umbrella':
      return (
        <g>
          <path d={`M0 ${-half}Q${-half * 0.75} 0 0 ${half}`} {...line} fill="none" />
          <path d={`M${-half * 0.4} 0H12`} {...line} />
          <rect x={8} y={-4} width={9} height={8} {...line} />
        </g>
      )
    case 'lantern':
      return <circle r={half} {...line} />
    case 'reflector':
      return (
        <g>
          <path d={`M0 ${-half}V${half}L-9 5V-5Z`} {...line} />
          <rect x={-24} y={-6} width={15} height={12} {...line} />
        </g>
      )
    case 'snoot':
      return (
        <g>
          <path d="M0 -3V3L-10 6V-6Z" {...line} fill="var(--color-draft)" />
          <rect x={-30} y={-7} width={20} height={14} {...line} />
        </g>
      )
    case 'grid':
      return (
        <g>
          <rect x={-5} y={-8} width={5} height={16} {...line} fill="var(--color-draft)" />
          <rect x={-27} y={-7} width={22} height={14} {...line} />
        </g>
      )
    case 'bare':
    case undefined:
      return <rect x={-22} y={-7} width={22} height={14} {...line} />
  }
})
