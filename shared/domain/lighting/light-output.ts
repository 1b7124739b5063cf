import { type BeamKind, relativeIntensity } from './beam.ts'
import {
  discFactor,
  fNumberOfExposure,
  guideNumberAfterLoss,
  guideNumberAtPower,
  guideNumberAtZoom,
  luminousExposure,
} from './exposure.ts'
import { stackGels } from './gel.ts'
import { angleBetweenDeg, distanceBetween, dot, minus } from './geometry.ts'
import { type Light, type Point, isLamp } from './schema.ts'

/** The chain from a head's guide number to what it gives on axis, step by step, for showing how a figure came about. */
export type Output = {
  /** Full power at this zoom, bare. */
  fullGuideNumberM: number
  modifierLossStops: number
  gelLossStops: number
  /** After power, modifier and gels. */
  guideNumberM: number
}

/** What a light gives on its axis. Guide numbers in metres at ISO 100. */
export function outputOf(light: Light): Output {
  const { numbers } = light.unit
  const fullGuideNumberM = isLamp(numbers) ? 0 : guideNumberAtZoom(numbers, light.zoomMm)
  const modifierLossStops = light.modifier?.numbers.lossStops.value ?? 0
  const gelLossStops = stackGels(light.gels.map((gel) => gel.numbers)).lossStops
  const guideNumberM = guideNumberAfterLoss(
    guideNumberAtPower(fullGuideNumberM, light.power),
    modifierLossStops + gelLossStops,
  )
  return { fullGuideNumberM, modifierLossStops, gelLossStops, guideNumberM }
}

/** Width of a bare head's window, metres (assumption). */
const BARE_HEAD_M = 0.06

/** Width and height of the emitting face, metres; a bare head's is small. */
export function faceOf(light: Light): { widthM: number; heightM: number } {
  const numbers = light.modifier?.numbers
  if (!numbers || numbers.widthM === 0 || numbers.heightM === 0) return { widthM: BARE_HEAD_M, heightM: BARE_HEAD_M }
  return { widthM: numbers.widthM, heightM: numbers.heightM }
}

/** Radius of the disc with the same area as the emitting face, metres. */
export function faceRadiusM(light: Light): number {
  const { widthM, heightM } = faceOf(light)
  return Math.sqrt((widthM * heightM) / Math.PI)
}

/** What arrives at a point, with every factor on the way. */
export type Arrival = Output & {
  distanceM: number
  offAxisDeg: number
  beamShare: number
  beamKind: BeamKind
  discShare: number
  /** Towards the light, lx·s. */
  exposureLxS: number
  fNumber: number
}

/**
 * A light at a point, metered towards it: H = 2.5·GN²/d² on axis, times the beam's share off axis, times
 * d²/(d² + r²) for a face of the same area as a disc of radius r.
 */
export function arrivalAt(light: Light, point: Point, iso: number): Arrival {
  const output = outputOf(light)
  const distanceM = Math.max(0.05, distanceBetween(light.at, point))
  const offAxisDeg = angleBetweenDeg(minus(light.aim, light.at), minus(point, light.at))
  const beam = relativeIntensity(offAxisDeg, {
    beamDeg: light.modifier?.numbers.beamDeg?.value ?? null,
    zoomMm: light.zoomMm,
    bare: light.modifier === null,
  })
  const discShare = discFactor(distanceM, faceRadiusM(light))
  const exposureLxS = luminousExposure(output.guideNumberM, distanceM) * beam.share * discShare
  return {
    ...output,
    distanceM,
    offAxisDeg,
    beamShare: beam.share,
    beamKind: beam.kind,
    discShare,
    exposureLxS,
    fNumber: fNumberOfExposure(exposureLxS, iso),
  }
}

/** Cosine of the angle at which a light meets a surface with this unit normal; 0 from behind. */
export function incidenceShare(light: Light, point: Point, normal: Point): number {
  const toLight = minus(light.at, point)
  const length = Math.hypot(...toLight)
  return length === 0 ? 0 : Math.max(0, dot(toLight, normal) / length)
}

/** Where a light's axis meets the upright plane z = `zM`; null when it does not. */
export function axisOnWall(light: Light, zM: number): Point | null {
  const direction = minus(light.aim, light.at)
  if (direction[2] >= -1e-6 || light.at[2] <= zM) return null
  const share = (zM - light.at[2]) / direction[2]
  return [light.at[0] + direction[0] * share, light.at[1] + direction[1] * share, zM]
}
