import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { distanceBetween, facePoint, floorDistance } from '#shared/domain/lighting/geometry.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { elevationDeg } from '#shared/domain/lighting/softness.ts'
import { type LengthUnit, lengthLabel } from '#src/lib/length-unit.ts'
import type { Part } from './parts.ts'

/** Where a thing stands as somebody with a tape and a string sees it, from the sitter's eyes. */
export type Measures = {
  /** Straight to the eyes, metres. */
  toEyesM: number
  /** About the sitter, from the camera; in (−180, 180], negative to the left as the camera sees it. */
  fromAxisDeg: number
  /** Above the eye line; negative below. */
  elevationDeg: number
  /** To the wall behind the sitter, metres. */
  toWallM: number
}

const degrees = (radians: number) => (radians * 180) / Math.PI

/** Direction of a point about the sitter, radians: 0 towards +z, positive to the right. */
function bearing(point: Point, face: Point): number {
  return Math.atan2(point[0] - face[0], point[2] - face[2])
}

/** Direction of the camera about the sitter; straight ahead where it hangs right above. */
function cameraBearing(whole: WholeSetup, face: Point): number {
  return floorDistance(whole.setup.camera.at, face) < 1e-6 ? 0 : bearing(whole.setup.camera.at, face)
}

export function measuresOf(at: Point, whole: WholeSetup): Measures {
  const face = facePoint(whole)
  const turnDeg = floorDistance(at, face) < 1e-6 ? 0 : degrees(bearing(at, face) - cameraBearing(whole, face))
  return {
    toEyesM: distanceBetween(at, face),
    fromAxisDeg: turnDeg > 180 ? turnDeg - 360 : turnDeg <= -180 ? turnDeg + 360 : turnDeg,
    elevationDeg: elevationDeg(at[1] - face[1], floorDistance(at, face)),
    toWallM: at[2] - whole.setup.background.zM,
  }
}

/** The place with these measures at this height, metres; right above or below where the distance is too short for it. */
export function pointAt(
  { toEyesM, fromAxisDeg }: Pick<Measures, 'toEyesM' | 'fromAxisDeg'>,
  heightM: number,
  whole: WholeSetup,
): Point {
  const face = facePoint(whole)
  const floorM = Math.sqrt(Math.max(0, toEyesM ** 2 - (heightM - face[1]) ** 2))
  const turn = cameraBearing(whole, face) + (fromAxisDeg * Math.PI) / 180
  return [face[0] + Math.sin(turn) * floorM, heightM, face[2] + Math.cos(turn) * floorM]
}

/** "45° to the left", as the camera sees it. */
export function axisWords(fromAxisDeg: number): string {
  const whole = Math.round(Math.abs(fromAxisDeg))
  if (whole === 0) return 'on the camera’s axis'
  if (whole === 180) return 'straight behind'
  return `${whole}° to the ${fromAxisDeg < 0 ? 'left' : 'right'}`
}

export function eyeLineWords(deg: number): string {
  const whole = Math.round(Math.abs(deg))
  return whole === 0 ? 'on the eye line' : `${whole}° ${deg < 0 ? 'below' : 'above'} the eye line`
}

export type MeasureLine = [name: string, value: string]

/** What is shown beside the hand, line by line: what says nothing about this kind of part is left out. */
export function measureLines(kind: Part['kind'], at: Point, whole: WholeSetup, unit: LengthUnit): MeasureLine[] {
  const { toEyesM, fromAxisDeg, elevationDeg: upDeg, toWallM } = measuresOf(at, whole)
  const length = (metres: number) => lengthLabel(metres, unit, true)
  const wall: MeasureLine = ['To the wall', toWallM < 0 ? 'behind it' : length(toWallM)]
  if (kind === 'place')
    return [
      ['To the camera', length(distanceBetween(at, whole.setup.camera.at))],
      ['Eyes', `${length(at[1])} up`],
      wall,
    ]
  return [
    ['To the eyes', length(toEyesM)],
    ...(kind === 'camera' ? [] : [['From the camera', axisWords(fromAxisDeg)] satisfies MeasureLine]),
    ['Height', `${length(at[1])}, ${eyeLineWords(upDeg)}`],
    wall,
  ]
}
