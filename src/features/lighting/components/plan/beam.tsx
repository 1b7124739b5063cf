import type { Light, Point } from '#shared/domain/lighting/schema.ts'
import { axisOnWall } from '#shared/domain/lighting/light-output.ts'
import { type PlanView, beamTint, toX, toZ } from '../../plan-view.ts'

type BeamProps = { light: Light; face: Point; wallM: number; whiteK: number; view: PlanView }

/** The way of a light, from its face to the sitter, or to the wall where a background light makes its glow. */
export function Beam({ light, face, wallM, whiteK, view }: BeamProps) {
  const wall = light.purpose === 'background' ? axisOnWall(light, wallM) : null
  const { colour, opacity } = beamTint(light, whiteK)
  const beamDeg = light.modifier?.numbers.beamDeg?.value ?? null
  const target: Point = wall ?? light.aim
  const dx = target[0] - light.at[0]
  const dz = target[2] - light.at[2]
  const length = Math.hypot(dx, dz)
  if (length < 0.05) return null
  const spread = beamDeg === null || beamDeg >= 170 ? Infinity : Math.tan((beamDeg * Math.PI) / 360) * length
  const x = toX(view, light.at[0])
  const z = toZ(view, light.at[2])
  if (wall) {
    const half = Math.min(spread === Infinity ? 0.6 : spread, 1.4) * view.pxPerM
    const wallX = toX(view, wall[0])
    const wallZ = toZ(view, wallM)
    return (
      <g aria-hidden>
        <path d={`M${x} ${z}L${wallX - half} ${wallZ}H${wallX + half}Z`} fill={colour} opacity={opacity} />
        <path
          d={`M${wallX - half * 0.8} ${wallZ - 2.5}H${wallX + half * 0.8}`}
          stroke={colour}
          strokeWidth={5}
          opacity={0.7}
        />
      </g>
    )
  }
  const half = Math.min(spread, light.purpose === 'main' || light.purpose === 'fill' ? 0.26 : 0.18)
  const nx = (-dz / length) * half
  const nz = (dx / length) * half
  // A light that does not look at the sitter is drawn to its aim; one that does ends at the sitter's mark.
  const end: Point = Math.hypot(target[0] - face[0], target[2] - face[2]) < 0.5 ? face : target
  return (
    <path
      aria-hidden
      d={`M${x} ${z}L${toX(view, end[0] + nx)} ${toZ(view, end[2] + nz)}L${toX(view, end[0] - nx)} ${toZ(view, end[2] - nz)}Z`}
      fill={colour}
      opacity={opacity}
    />
  )
}
