import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { combineFNumbers } from './exposure.ts'
import { facePoint } from './geometry.ts'
import { arrivalAt } from './light-output.ts'
import type { Background, Light, Point } from './schema.ts'

/** Whether the background stands between a light behind it and a point before it. */
export function isBehindBackground(light: Light, point: Point, background: Background): boolean {
  const { zM, widthM, heightM } = background
  if (light.at[2] >= zM || point[2] <= zM) return false
  const share = (zM - light.at[2]) / (point[2] - light.at[2])
  const x = light.at[0] + (point[0] - light.at[0]) * share
  const y = light.at[1] + (point[1] - light.at[1]) * share
  return Math.abs(x) <= widthM / 2 && y >= 0 && y <= heightM
}

/** All mains that are on, together at the eyes, as an f-number; null when there is none or none gives light there. */
export function mainFNumberOf(whole: WholeSetup): number | null {
  const { camera, background } = whole.setup
  const face = facePoint(whole)
  const mains = whole.lights.filter(
    (light) => light.purpose === 'main' && light.isOn && !isBehindBackground(light, face, background),
  )
  const together = combineFNumbers(mains.map((light) => arrivalAt(light, face, camera.iso, camera.shutterS).fNumber))
  return together > 0 ? together : null
}
