import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Point, SitterPlace } from './schema.ts'

/** Eye height of a standing grown-up, metres: used where a setup has no sitter yet (assumption). */
export const ASSUMED_EYE_HEIGHT_M = 1.55

/** Difference a − b, metres. */
export function minus(a: Point, b: Point): Point {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
}

/** Scalar product. */
export function dot(a: Point, b: Point): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

/** Straight distance between two points, metres. */
export function distanceBetween(a: Point, b: Point): number {
  return lengthOf(minus(a, b))
}

/** Length of a direction. (`Math.hypot` is many times slower.) */
export function lengthOf([x, y, z]: Point): number {
  return Math.sqrt(x * x + y * y + z * z)
}

/** Distance on the floor, metres: heights left out. */
export function floorDistance(a: Point, b: Point): number {
  return Math.hypot(a[0] - b[0], a[2] - b[2])
}

/** Angle between two directions, degrees in [0, 180]; 0 when either has no length. */
export function angleBetweenDeg(a: Point, b: Point): number {
  const lengths = lengthOf(a) * lengthOf(b)
  if (lengths === 0) return 0
  return (Math.acos(Math.min(1, Math.max(-1, dot(a, b) / lengths))) * 180) / Math.PI
}

export type Axes = { look: Point; side: Point; up: Point }

/**
 * Unit vectors of something at `at` that looks at `aim`: where it looks, to its side, and up along its face. Without a
 * direction it looks along `otherwise`; looking straight up or down its side is +x.
 */
export function axesOf(
  at: readonly [number, number, number],
  aim: readonly [number, number, number],
  otherwise: Point,
): Axes {
  const [dx, dy, dz] = [aim[0] - at[0], aim[1] - at[1], aim[2] - at[2]]
  const length = Math.hypot(dx, dy, dz)
  const look: Point = length < 1e-6 ? otherwise : [dx / length, dy / length, dz / length]
  const flat = Math.hypot(look[0], look[2])
  const side: Point = flat < 1e-6 ? [1, 0, 0] : [-look[2] / flat, 0, look[0] / flat]
  const up: Point = [
    side[1] * look[2] - side[2] * look[1],
    side[2] * look[0] - side[0] * look[2],
    side[0] * look[1] - side[1] * look[0],
  ]
  return { look, side, up }
}

/** The place on the origin (the nearest to it, ties by id), or null when the setup has no sitter. */
export function mainPlace(places: readonly SitterPlace[]): SitterPlace | null {
  const reach = (place: SitterPlace) => Math.hypot(place.at[0], place.at[1])
  return places.reduce<SitterPlace | null>(
    (best, place) =>
      best === null || reach(place) < reach(best) || (reach(place) === reach(best) && place.id < best.id)
        ? place
        : best,
    null,
  )
}

/** Where readings are taken: the eyes of the sitter on the origin. [x, y, z] metres. */
export function facePoint(whole: Pick<WholeSetup, 'places'>): Point {
  const place = mainPlace(whole.places)
  return place ? [place.at[0], place.eyeHeightM, place.at[1]] : [0, ASSUMED_EYE_HEIGHT_M, 0]
}

/** Direction in which a panel faces: turn 0 faces the camera (+z), positive is anticlockwise seen from above. */
export function panelNormal(turnDeg: number): Point {
  const turn = (turnDeg * Math.PI) / 180
  return [Math.sin(turn), 0, Math.cos(turn)]
}
