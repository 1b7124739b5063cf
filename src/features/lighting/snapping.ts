import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { facePoint, mainPlace } from '#shared/domain/lighting/geometry.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { METRES_PER_INCH, type LengthUnit } from '#src/lib/length-unit.ts'
import { type DrawingKind, type Part, heightLimits, partKey, snap } from './parts.ts'

/** A thin line that says what a part has snapped to. */
export type Guide = { from: Point; to: Point }
export type Snapped = { at: Point; guides: readonly Guide[] }

/** Places are rounded to this: five centimetres, or two inches. */
export function gridM(unit: LengthUnit): number {
  return unit === 'm' ? 0.05 : 2 * METRES_PER_INCH
}
/** Without snapping. */
export const FINE_M = 0.01

type SnapInput = {
  part: Part
  /** Where the hand is, metres. */
  raw: Point
  drawing: DrawingKind
  whole: WholeSetup
  gridM: number
  /** Nearer than this it snaps to lines and places, metres. */
  reachM: number
  /** A key is held that switches snapping off. */
  isFree: boolean
}

/** How far the line of sight is drawn beyond what it joins, metres. */
const BEYOND_M = 30

type Axis = { from: Point; along: readonly [x: number, z: number] }

/** From the sitter to the camera; straight ahead where it hangs right above. */
function cameraAxis(whole: WholeSetup): Axis {
  const from = facePoint(whole)
  const { at } = whole.setup.camera
  const [x, z] = [at[0] - from[0], at[2] - from[2]]
  const length = Math.hypot(x, z)
  return { from, along: length < 1e-6 ? [0, 1] : [x / length, z / length] }
}

/** The line that a part may lie on in the plan: the camera's axis, or straight before the wall for its two ends. */
function axisFor(part: Part, whole: WholeSetup): Axis {
  if (part.kind === 'camera') return { from: facePoint(whole), along: [0, 1] }
  if (part.kind === 'place' && part.place.id === mainPlace(whole.places)?.id)
    return { from: whole.setup.camera.at, along: [0, 1] }
  return cameraAxis(whole)
}

/** The same place on the other side of the camera's axis; the height stays. */
export function mirroredPlace(at: Point, whole: WholeSetup): Point {
  const {
    from: face,
    along: [ux, uz],
  } = cameraAxis(whole)
  const [x, z] = [at[0] - face[0], at[2] - face[2]]
  const share = 2 * (x * ux + z * uz)
  return [face[0] + share * ux - x, at[1], face[2] + share * uz - z]
}

function otherLights(part: Part, whole: WholeSetup): Point[] {
  return whole.lights.flatMap((light) => (light.id === partKey(part) ? [] : [light.at]))
}

/** Places that a part jumps to, each with the line that says why. */
function marksFor(part: Part, whole: WholeSetup, drawing: DrawingKind): { at: Point; from: Point }[] {
  switch (part.kind) {
    case 'aim':
      return whole.places.map((place) => {
        const eyes: Point = [place.at[0], place.eyeHeightM, place.at[1]]
        return { at: eyes, from: eyes }
      })
    case 'light':
    case 'prop':
      return otherLights(part, whole).map((from) => ({
        at: drawing === 'plan' ? mirroredPlace(from, whole) : from,
        from,
      }))
    case 'place':
    case 'camera':
      return []
  }
}

function snapPlan({ part, raw, whole, gridM: grid, reachM }: SnapInput): Snapped {
  const near = (at: Point) => Math.hypot(at[0] - raw[0], at[2] - raw[2]) < reachM
  const mark = marksFor(part, whole, 'plan').find((candidate) => near(candidate.at))
  if (mark) {
    const at: Point = [mark.at[0], raw[1], mark.at[2]]
    return { at, guides: [{ from: mark.from, to: at }] }
  }
  const { from, along } = axisFor(part, whole)
  const [x, z] = [raw[0] - from[0], raw[2] - from[2]]
  const off = x * along[1] - z * along[0]
  if (Math.abs(off) < reachM) {
    const run = snap(x * along[0] + z * along[1], { gridM: grid })
    const on = (far: number): Point => [from[0] + along[0] * far, raw[1], from[2] + along[1] * far]
    return { at: on(run), guides: [{ from: on(-BEYOND_M), to: on(BEYOND_M) }] }
  }
  return { at: [snap(raw[0], { gridM: grid }), raw[1], snap(raw[2], { gridM: grid })], guides: [] }
}

function snapSide({ part, raw, whole, gridM: grid, reachM }: SnapInput): Snapped {
  const heights = heightLimits(part)
  const near = (at: Point) => Math.hypot(at[1] - raw[1], at[2] - raw[2]) < reachM
  const mark = marksFor(part, whole, 'side').find((candidate) => near(candidate.at))
  if (mark) {
    const at: Point = [raw[0], mark.at[1], mark.at[2]]
    return { at, guides: [{ from: mark.from, to: at }] }
  }
  const z = snap(raw[2], { gridM: grid })
  const eyes = facePoint(whole)[1]
  const isMainPlace = part.kind === 'place' && part.place.id === mainPlace(whole.places)?.id
  if (!isMainPlace && Math.abs(raw[1] - eyes) < reachM) {
    return {
      at: [raw[0], eyes, z],
      guides: [{ from: [raw[0], eyes, -BEYOND_M], to: [raw[0], eyes, BEYOND_M] }],
    }
  }
  return { at: [raw[0], snap(raw[1], { gridM: grid, ...heights }), z], guides: [] }
}

/**
 * Where a part comes to when a hand is here: on an existing light's mirrored place, else on the camera's axis (in the
 * plan) or the eye line (from the side), else on the grid. What the drawing does not show stays as it is.
 */
export function snapPoint(input: SnapInput): Snapped {
  const { raw, drawing, isFree, part } = input
  if (!isFree) return drawing === 'plan' ? snapPlan(input) : snapSide(input)
  const fine = { gridM: FINE_M }
  return drawing === 'plan'
    ? { at: [snap(raw[0], fine), raw[1], snap(raw[2], fine)], guides: [] }
    : { at: [raw[0], snap(raw[1], { ...fine, ...heightLimits(part) }), snap(raw[2], fine)], guides: [] }
}
