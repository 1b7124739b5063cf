import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { ASSUMED_EYE_HEIGHT_M, dot, minus } from './geometry.ts'
import { FRAME_LONG_MM, FRAME_SHORT_MM } from './lens.ts'
import type { Point } from './schema.ts'

export type Orientation = 'upright' | 'across' | 'square'
const EDGES = ['left', 'right', 'top', 'bottom'] as const
export type Edge = (typeof EDGES)[number]

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

/** How far a thing stays outside the picture, metres at its own depth; negative when it is in. */
export type Clearance = { marginM: number; edge: Edge }

/** Nearer to the lens than this nothing is looked at, metres. */
const NEAREST_M = 0.05

/**
 * Clearance of a thing given by the corners of its hull: past the one edge of the picture that it clears best. Null
 * where all of it is behind the camera and nothing is seen.
 */
export function clearanceOf(view: View, corners: readonly Point[]): Clearance | null {
  const past: Record<Edge, number> = { left: Infinity, right: Infinity, top: Infinity, bottom: Infinity }
  let isSeen = false
  for (const corner of corners) {
    const offset = minus(corner, view.at)
    const depth = dot(offset, view.forward)
    if (depth <= NEAREST_M) continue
    isSeen = true
    const across = dot(offset, view.right)
    const above = dot(offset, view.up)
    past.left = Math.min(past.left, -across - depth * view.tanAcross)
    past.right = Math.min(past.right, across - depth * view.tanAcross)
    past.top = Math.min(past.top, above - depth * view.tanUp)
    past.bottom = Math.min(past.bottom, -above - depth * view.tanUp)
  }
  if (!isSeen) return null
  return EDGES.map((edge) => ({ edge, marginM: past[edge] })).reduce((best, next) =>
    next.marginM > best.marginM ? next : best,
  )
}

/** Half the width of a sitter's body, and what rises above the eyes, metres (assumed measures). */
const BODY_HALF_M = 0.2
const CROWN_M = 0.12

/** Whether a sitter's body hides all corners of a thing behind it, as seen from the camera. */
export function hiddenBySitter(view: View, places: WholeSetup['places'], corners: readonly Point[]): boolean {
  return places.some((place) =>
    corners.every((point) => {
      const far = Math.hypot(point[0] - view.at[0], point[2] - view.at[2])
      const near = Math.hypot(place.at[0] - view.at[0], place.at[1] - view.at[2])
      if (far <= near) return false
      const share = near / far
      const along = (index: 0 | 1 | 2) => view.at[index] + (point[index] - view.at[index]) * share
      const sideways = Math.hypot(along(0) - place.at[0], along(2) - place.at[1])
      return sideways < BODY_HALF_M && along(1) < place.eyeHeightM + CROWN_M
    }),
  )
}
