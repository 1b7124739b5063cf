import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { combineFNumbers, fNumberOfExposure } from './exposure.ts'
import { facePoint } from './geometry.ts'
import { type Arrival, arrivalAt, axisOnWall, incidenceShare } from './light-output.ts'
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

/** Where a background light's axis meets the wall; null for other lights, and where it meets none. */
export function wallTargetOf(light: Light, background: Background): Point | null {
  return light.purpose === 'background' ? axisOnWall(light, background.zM) : null
}

/** Where a light is read: at the sitter's eyes, or on the wall where a background light's axis meets it. */
export type ReadArrival = Arrival & { where: 'sitter' | 'wall' }

/** A light as its reading is taken: on the wall with the cosine; at the eyes nothing through the background. */
export function readArrivalOf(light: Light, whole: WholeSetup): ReadArrival {
  const { background, camera } = whole.setup
  const face = facePoint(whole)
  const target = wallTargetOf(light, background)
  const arrival = arrivalAt(light, target ?? face, camera.iso, camera.shutterS)
  const atFace = isBehindBackground(light, face, background) ? 0 : 1
  const exposureLxS = arrival.exposureLxS * (target ? incidenceShare(light, target, [0, 0, 1]) : atFace)
  return {
    ...arrival,
    exposureLxS,
    fNumber: fNumberOfExposure(exposureLxS, camera.iso),
    where: target ? 'wall' : 'sitter',
  }
}

/** All mains that are on, together at the eyes, as an f-number; null when there is none or none gives light there. */
export function mainFNumberOf(whole: WholeSetup): number | null {
  const mains = whole.lights.filter((light) => light.purpose === 'main' && light.isOn)
  const together = combineFNumbers(mains.map((light) => readArrivalOf(light, whole).fNumber))
  return together > 0 ? together : null
}
