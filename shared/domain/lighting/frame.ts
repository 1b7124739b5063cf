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

/** Nearer to each other than this, camera and aim leave no direction, metres. */
const NO_DIRECTION_M = 1e-6

/** Looking along `forward` (a unit vector), upright; straight up or down the top of the picture is away from z. */
export function viewAlong(at: Point, forward: Point, tanAcross: number, tanUp: number): View {
  const flat = Math.hypot(forward[0], forward[2])
  const away: Point = flat < NO_DIRECTION_M ? [0, 0, -1] : [forward[0] / flat, 0, forward[2] / flat]
  const up: Point = [-away[0] * forward[1], flat, -away[2] * forward[1]]
  const right: Point = [-away[2], 0, away[0]]
  return { at, forward, right, up, tanAcross, tanUp }
}

/**
 * The camera's view: at its aim, or without one at the sitters' middle, tilted so that the eyes lie a third below the
 * top edge (assumption).
 */
export function viewOf(whole: Pick<WholeSetup, 'setup' | 'places'>, orientation: Orientation): View {
  const { at, focalMm, aim } = whole.setup.camera
  const { widthMm, heightMm } = frameSidesMm(orientation)
  const tanAcross = widthMm / (2 * focalMm)
  const tanUp = heightMm / (2 * focalMm)
  if (aim) {
    const [x, y, z] = minus(aim, at)
    const length = Math.hypot(x, y, z)
    if (length > NO_DIRECTION_M) return viewAlong(at, [x / length, y / length, z / length], tanAcross, tanUp)
  }
  const count = whole.places.length
  const mean = (value: (place: WholeSetup['places'][number]) => number, none: number) =>
    count === 0 ? none : whole.places.reduce((sum, place) => sum + value(place), 0) / count
  const x = mean((place) => place.at[0], 0) - at[0]
  const z = mean((place) => place.at[1], 0) - at[2]
  const flat = Math.hypot(x, z) || 1e-9
  const rise = mean((place) => place.eyeHeightM, ASSUMED_EYE_HEIGHT_M) - at[1]
  const pitch = Math.atan2(rise, flat) - Math.atan(tanUp / 3)
  return viewAlong(at, [(x / flat) * Math.cos(pitch), Math.sin(pitch), (z / flat) * Math.cos(pitch)], tanAcross, tanUp)
}

/** A point in the picture: across and up from its middle in halves of the picture (±1 are the edges), and its depth. */
export type Seen = { across: number; up: number; depthM: number }

/** Where a point lies in the picture; null behind the camera. */
export function projected(view: View, point: Point): Seen | null {
  const offset = minus(point, view.at)
  const depthM = dot(offset, view.forward)
  if (depthM <= NEAREST_M) return null
  return {
    across: dot(offset, view.right) / (depthM * view.tanAcross),
    up: dot(offset, view.up) / (depthM * view.tanUp),
    depthM,
  }
}

/** The direction in which a place of the picture is seen, not of unit length: depth along the axis is 1. */
export function rayThrough(view: View, across: number, up: number): Point {
  const along = (axis: 0 | 1 | 2) =>
    view.forward[axis] + view.right[axis] * across * view.tanAcross + view.up[axis] * up * view.tanUp
  return [along(0), along(1), along(2)]
}

/** The point at a place of the picture and a depth along the camera's axis, metres: `projected` turned back. */
export function unprojected(view: View, { across, up, depthM }: Seen): Point {
  const ray = rayThrough(view, across, up)
  return [view.at[0] + ray[0] * depthM, view.at[1] + ray[1] * depthM, view.at[2] + ray[2] * depthM]
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
export const BODY_HALF_M = 0.2
export const CROWN_M = 0.12

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
