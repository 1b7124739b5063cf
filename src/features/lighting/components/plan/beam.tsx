import { useId } from 'react'
import type { Light } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { beamForm, outline } from '../../light-form.ts'
import { type Project, beamTint } from '../../plan-view.ts'

type BeamProps = { light: Light; whole: WholeSetup; project: Project; pxPerM: number }

/** The way of a light: true to its beam where that is known, paler with the distance. */
export function Beam({ light, whole, project, pxPerM }: BeamProps) {
  const fadeId = useId()
  const form = light.isOn ? beamForm(light, whole) : null
  if (!form) return null
  const { colour, opacity } = beamTint(light, whole.setup.camera.whiteBalanceK)
  const [x, y] = project(light.at)
  const isBackground = light.purpose === 'background'
  return (
    <g aria-hidden>
      <radialGradient id={fadeId} gradientUnits="userSpaceOnUse" cx={x} cy={y} r={Math.max(1, form.lengthM * pxPerM)}>
        <stop offset="0" stopColor={colour} stopOpacity={opacity * 1.35} />
        <stop offset="1" stopColor={colour} stopOpacity={opacity * (isBackground ? 0.75 : 0.12)} />
      </radialGradient>
      <path d={outline(form.points.map(project))} fill={`url(#${fadeId})`} />
      {isBackground && form.onWall.length > 1 && (
        <path
          d={outline(form.onWall.map(project))}
          stroke={colour}
          strokeWidth={5}
          strokeLinejoin="round"
          opacity={0.6}
        />
      )}
    </g>
  )
}
