import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { ASSUMED_EYE_HEIGHT_M, dot, minus } from './geometry.ts'
import { FRAME_LONG_MM, FRAME_SHORT_MM } from './lens.ts'
import type { Point } from './schema.ts'

export type Orientation = 'upright' | 'across' | 'square'
export type Edge = 'left' | 'right' | 'top' | 'bottom'

/** Sides of the picture in mm of the frame: a square is cut from the middle. */
export function frameSidesMm(orientation: Orientation): { widthMm: number; heightMm: number } {
  switch (orientation) {
    case 'upright':
      return { widthMm: FRAME_SHORT_MM, heightMm: FRAME_LONG_MM }
    case 'across':
      return { widthMm: FRAME_LONG_MM, heightMm: FRAME_SHORT_MM }
    case 'square':
      return { widthMm: FRAME_SHORT_MM, heightMm: FRAME_SHORT_MM }
  }
}

/** What a camera sees: its place, unit vectors and the tangents of half the angles of view. */
export type View = { at: Point; forward: Point; right: Point; up: Point; tanAcross: number; tanUp: number }

/**
 * The camera's view. It looks at the sitters' middle and is tilted so that the eyes lie a third below the top edge
 * (assumption: where it points is not written in the setup).
 */
export function viewOf(whole: Pick<WholeSetup, 'setup' | 'places'>, orientation: Orientation): View {
  const { at, focalMm } = whole.setup.camera
  const { widthMm, heightMm } = frameSidesMm(orientation)
  const tanAcross = widthMm / (2 * focalMm)
  const tanUp = heightMm / (2 * focalMm)
  const count = whole.places.length
  const mean = (value: (place: WholeSetup['places'][number]) => number, none: number) =>
    count === 0 ? none : whole.places.reduce((sum, place) => sum + value(place), 0) / count
  const x = mean((place) => place.at[0], 0) - at[0]
  const z = mean((place) => place.at[1], 0) - at[2]
  const flat = Math.hypot(x, z) || 1e-9
  const rise = mean((place) => place.eyeHeightM, ASSUMED_EYE_HEIGHT_M) - at[1]
  const pitch = Math.atan2(rise, flat) - Math.atan(tanUp / 3)
  const away: Point = [x / flat, 0, z / flat]
  const forward: Point = [away[0] * Math.cos(pitch), Math.sin(pitch), away[2] * Math.cos(pitch)]
  const up: Point = [-away[0] * Math.sin(pitch), Math.cos(pitch), -away[2] * Math.sin(pitch)]
  const right: Point = [-away[2], 0, away[0]]
  return { at, forward, right, up, tanAcross, tanUp }
}

/** How far a ball of this radius stays outside the picture, metres at its own depth; negative when it is in. */
export type Clearance = { marginM: number; edge: Edge }

/** Clearance of a ball around a point; null behind the camera, where nothing is seen. */
export function clearanceOf(view: View, point: Point, radiusM: number): Clearance | null {
  const offset = minus(point, view.at)
  const depth = dot(offset, view.forward)
  if (depth + radiusM <= 0.05) return null
  const seen = Math.max(depth, 0.05)
  const across = dot(offset, view.right)
  const above = dot(offset, view.up)
  const beyondAcross = Math.abs(across) - seen * view.tanAcross - radiusM
  const beyondUp = Math.abs(above) - seen * view.tanUp - radiusM
  return beyondAcross >= beyondUp
    ? { marginM: beyondAcross, edge: across < 0 ? 'left' : 'right' }
    : { marginM: beyondUp, edge: above < 0 ? 'bottom' : 'top' }
}

/** Half the width of a sitter's body, and what rises above the eyes, metres (assumed measures). */
const BODY_HALF_M = 0.2
const CROWN_M = 0.12

/** Whether a ball behind a sitter is hidden by the body, as seen from the camera. */
export function hiddenBySitter(view: View, places: WholeSetup['places'], point: Point, radiusM: number): boolean {
  const far = Math.hypot(point[0] - view.at[0], point[2] - view.at[2])
  return places.some((place) => {
    const near = Math.hypot(place.at[0] - view.at[0], place.at[1] - view.at[2])
    if (far <= near + radiusM) return false
    const share = near / far
    const x = view.at[0] + (point[0] - view.at[0]) * share
    const y = view.at[1] + (point[1] - view.at[1]) * share
    const z = view.at[2] + (point[2] - view.at[2]) * share
    const sideways = Math.hypot(x - place.at[0], z - place.at[1])
    return sideways + radiusM * share < BODY_HALF_M && y + radiusM * share < place.eyeHeightM + CROWN_M
  })
}
