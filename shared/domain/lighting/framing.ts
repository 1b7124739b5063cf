import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'
import { BODY_HALF_M, CROWN_M, type Orientation, type View, projected, rayThrough, viewOf } from './frame.ts'
import { dot, facePoint, mainPlace, minus } from './geometry.ts'
import type { Point, SitterPlace } from './schema.ts'

export const CROPS = [
  'face',
  'head and shoulders',
  'head and chest',
  'half length',
  'three-quarter length',
  'nearly full length',
  'full length',
] as const
export type Crop = (typeof CROPS)[number]

/**
 * How far below the eyes the bottom edge may lie for each crop, as a share of somebody's height: chin, armpits, waist,
 * hips, knees, shins (body measures after Drillis and Contini 1966, from memory; names common practice, no source).
 */
const CROP_LIMITS: readonly (readonly [Crop, number])[] = [
  ['face', 0.13],
  ['head and shoulders', 0.24],
  ['head and chest', 0.33],
  ['half length', 0.47],
  ['three-quarter length', 0.68],
]
/** Eyes of somebody standing, as a share of their height (same source, from memory); height taken for the seated. */
const EYES_OF_HEIGHT = 0.936
const SEATED_HEIGHT_M = 1.7

export type SitterFraming = {
  placeId: string
  /** Between the body and the edge at its depth, metres; negative is cut. Above the crown for `topM`. */
  leftM: number
  rightM: number
  topM: number
  words: string
}

export type Framing = {
  orientation: Orientation
  /** What the frame covers at the sitter on the mark, metres, and where its edges lie above the floor there. */
  widthM: number
  heightM: number
  bottomM: number
  topM: number
  distanceM: number
  crop: Crop
  /** Above the crown, metres; negative cuts the head. */
  headRoomM: number
  sitters: SitterFraming[]
  words: string
}

function cropOf(place: Pick<SitterPlace, 'eyeHeightM' | 'pose'> | null, eyesM: number, bottomM: number): Crop {
  const heightM = place?.pose === 'seated' ? SEATED_HEIGHT_M : eyesM / EYES_OF_HEIGHT
  const below = (eyesM - bottomM) / heightM
  const found = CROP_LIMITS.find(([, limit]) => below <= limit)
  if (found) return found[0]
  return bottomM <= 0 ? 'full length' : 'nearly full length'
}

/** Height above the floor at which an edge of the picture passes a place; the eyes' depth decides for a level view. */
function edgeHeightM(view: View, up: number, at: Point): number {
  const ray = rayThrough(view, 0, up)
  const flat = Math.hypot(ray[0], ray[2])
  const away = Math.hypot(at[0] - view.at[0], at[2] - view.at[2])
  return flat < 1e-9 ? view.at[1] : view.at[1] + (ray[1] / flat) * away
}

function sitterFraming(view: View, place: SitterPlace, unit: LengthUnit): SitterFraming | null {
  const eyes: Point = [place.at[0], place.eyeHeightM, place.at[1]]
  const seen = projected(view, eyes)
  if (!seen) return null
  const half = seen.depthM * view.tanAcross
  const across = seen.across * half
  const topM = edgeHeightM(view, 1, eyes) - (place.eyeHeightM + CROWN_M)
  const leftM = half + across - BODY_HALF_M
  const rightM = half - across - BODY_HALF_M
  return { placeId: place.id, leftM, rightM, topM, words: sitterWords(leftM, rightM, topM, unit) }
}

function sitterWords(leftM: number, rightM: number, topM: number, unit: LengthUnit): string {
  const cut = [...(topM < 0 ? ['top'] : []), ...(leftM < 0 ? ['left'] : []), ...(rightM < 0 ? ['right'] : [])]
  if (leftM < -2 * BODY_HALF_M || rightM < -2 * BODY_HALF_M) return 'Out of the picture.'
  if (cut.length > 0) return `Cut at the ${cut.join(' and ')}.`
  return `${lengthLabel(leftM, unit)} free at the left, ${lengthLabel(rightM, unit)} at the right.`
}

/**
 * What the camera frames in an orientation: its field at the sitter on the mark, the crop in words (limits are
 * assumptions), head room, and how each sitter stands in it. Words say lengths in `unit`.
 */
export function framingOf(whole: WholeSetup, orientation: Orientation, unit: LengthUnit = 'm'): Framing {
  const view = viewOf(whole, orientation)
  const face = facePoint(whole)
  const place = mainPlace(whole.places)
  const distanceM = Math.max(0, dot(minus(face, view.at), view.forward))
  const topM = edgeHeightM(view, 1, face)
  const bottomM = edgeHeightM(view, -1, face)
  const headRoomM = topM - face[1] - CROWN_M
  const crop = cropOf(place, face[1], bottomM)
  const room = headRoomM < 0 ? 'the top edge cuts the head' : `${lengthLabel(headRoomM, unit)} above the head`
  return {
    orientation,
    widthM: 2 * distanceM * view.tanAcross,
    heightM: 2 * distanceM * view.tanUp,
    bottomM,
    topM,
    distanceM,
    crop,
    headRoomM,
    sitters: whole.places.flatMap((entry) => sitterFraming(view, entry, unit) ?? []),
    words: `${crop[0]?.toUpperCase()}${crop.slice(1)}, ${room}.`,
  }
}
