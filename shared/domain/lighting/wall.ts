import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'
import { mainFNumberOf } from './at-sitter.ts'
import { exposureOfFNumber, fNumberOfExposure } from './exposure.ts'
import { type Orientation, type View, projected, rayThrough, viewOf } from './frame.ts'
import { miredOf, stackGels } from './gel.ts'
import { mainPlace } from './geometry.ts'
import { type Emission, axisOnWall, emissionOf, exposureOnWall } from './light-output.ts'
import { ownColourK } from './light-source.ts'
import type { Point } from './schema.ts'

/** The part of the wall that the camera sees, as an upright rectangle about it, metres. */
type Span = { leftM: number; rightM: number; bottomM: number; topM: number }

/** A wall ready to be read: what lights it, and what the camera sees of it. */
type Wall = {
  zM: number
  view: View
  background: Span
  emissions: Emission[]
}

function wallOf(whole: WholeSetup, orientation: Orientation): Wall {
  const { background, camera } = whole.setup
  return {
    zM: background.zM,
    view: viewOf(whole, orientation),
    background: {
      leftM: -background.widthM / 2,
      rightM: background.widthM / 2,
      bottomM: 0,
      topM: background.heightM,
    },
    emissions: whole.lights
      .filter((light) => light.isOn && light.at[2] > background.zM)
      .map((light) => emissionOf(light, camera.shutterS))
      .filter((emission) => emission.output.guideNumberM > 0),
  }
}

/** Slack at the edges of the picture, in halves of it. */
const EDGE = 1 + 1e-9

function isSeen({ view, background, zM }: Wall, x: number, y: number): boolean {
  if (x < background.leftM || x > background.rightM || y < background.bottomM || y > background.topM) return false
  const seen = projected(view, [x, y, zM])
  return seen !== null && Math.abs(seen.across) <= EDGE && Math.abs(seen.up) <= EDGE
}

/** Where the edges of the picture meet the wall; the whole background where one of them never does. */
function seenSpan({ view, background, zM }: Wall): Span | null {
  const corners = [-1, 1].flatMap((across) =>
    [-1, 1].flatMap((up): Point[] => {
      const ray = rayThrough(view, across, up)
      const share = (zM - view.at[2]) / ray[2]
      return share > 0 && Number.isFinite(share) ? [[view.at[0] + ray[0] * share, view.at[1] + ray[1] * share, zM]] : []
    }),
  )
  if (corners.length === 0) return null
  if (corners.length < 4) return background
  const xs = corners.map((corner) => corner[0])
  const ys = corners.map((corner) => corner[1])
  const span: Span = {
    leftM: Math.max(background.leftM, Math.min(...xs)),
    rightM: Math.min(background.rightM, Math.max(...xs)),
    bottomM: Math.max(background.bottomM, Math.min(...ys)),
    topM: Math.min(background.topM, Math.max(...ys)),
  }
  return span.leftM < span.rightM && span.bottomM < span.topM ? span : null
}

function exposureAt({ emissions, zM }: Wall, x: number, y: number): number {
  let sum = 0
  for (const emission of emissions) sum += exposureOnWall(emission, x, y, zM)
  return sum
}

/** Points of the wall, by rows from the top, by columns from the left. */
export type WallMap = {
  xM: number[]
  yM: number[]
  /** Stops under the mains at the sitter: negative is brighter, Infinity is dark; null: the camera does not see it. */
  underMainStops: (number | null)[][]
}

/**
 * What the lights make of the wall, in stops under the mains at the sitter, for a grid over the part of it that the
 * camera sees: E = I(θ)·cos φ/d², all lights that are on summed. The background is centred on x = 0 and stands on the
 * floor. Shadows of sitters, ambient light and what other walls give back are left out. Null where the camera sees
 * nothing of it, or there is no main to compare with.
 */
export function wallMap(
  whole: WholeSetup,
  { columns, rows, orientation = 'upright' }: { columns: number; rows: number; orientation?: Orientation },
): WallMap | null {
  const wall = wallOf(whole, orientation)
  const span = seenSpan(wall)
  const mainFNumber = mainFNumberOf(whole)
  if (!span || mainFNumber === null) return null
  const main = exposureOfFNumber(mainFNumber, whole.setup.camera.iso)
  const spread = (from: number, to: number, count: number) =>
    Array.from({ length: count }, (_, index) => from + ((to - from) * (index + 0.5)) / count)
  const xM = spread(span.leftM, span.rightM, columns)
  const yM = spread(span.topM, span.bottomM, rows)
  const stopsAt = (x: number, y: number) => (isSeen(wall, x, y) ? Math.log2(main / exposureAt(wall, x, y)) : null)
  return { xM, yM, underMainStops: yM.map((y) => xM.map((x) => stopsAt(x, y))) }
}

/** The part of a glow within some stops of its peak, measured through the peak. */
export type Patch = Span & {
  widthM: number
  heightM: number
  /** It goes on past the picture or the background. */
  isCut: boolean
}

export type Glow = {
  /** Its brightest point that the camera sees. */
  point: Point
  fNumber: number
  /** Stops of that point under the mains at the sitter; null without a main. */
  underMainStops: number | null
  /** What each light gives to it, brightest first; the shares add up to 1. */
  shares: { lightId: string; share: number }[]
  withinOneStop: Patch
  withinTwoStops: Patch
  /** Mean of its lights' mired by their shares (assumption); null where that is no colour temperature. */
  kelvin: number | null
  mired: number
  /** Against the camera's white balance: positive is warmer. */
  miredFromWhite: number
  /** Where it meets the sitter as the camera sees them; null without a sitter. */
  shoulders: { heightOnWallM: number; words: string } | null
}

/** Points looked at across and down before the brightest one is made exact, and steps along a line from there. */
const ACROSS = 17
const DOWN = 15
const STEPS = 24
/** How exactly places on the wall are found, metres. */
const EXACT_M = 0.002
/** How far shoulders are below the eyes of somebody upright, metres (assumed measure). */
export const SHOULDERS_BELOW_EYES_M = 0.22

type Peak = { x: number; y: number; exposure: number }

/** The brightest point that the camera sees: of a grid and of where the lights' axes meet the wall, then uphill. */
function brightest(wall: Wall, span: Span): Peak | null {
  const peak: Peak = { x: 0, y: 0, exposure: 0 }
  const look = (x: number, y: number) => {
    const exposure = isSeen(wall, x, y) ? exposureAt(wall, x, y) : 0
    if (exposure <= peak.exposure) return false
    Object.assign(peak, { x, y, exposure })
    return true
  }
  const stepX = (span.rightM - span.leftM) / (ACROSS - 1)
  const stepY = (span.topM - span.bottomM) / (DOWN - 1)
  for (const { light } of wall.emissions) {
    const hit = axisOnWall(light, wall.zM)
    if (hit) look(hit[0], hit[1])
  }
  for (let row = 0; row < DOWN; row++)
    for (let column = 0; column < ACROSS; column++) look(span.leftM + column * stepX, span.bottomM + row * stepY)
  for (let step = Math.max(stepX, stepY) / 2; step > EXACT_M / 2;) {
    const { x, y } = peak
    if (!look(x + step, y) && !look(x - step, y) && !look(x, y + step) && !look(x, y - step)) step /= 2
  }
  return peak.exposure > 0 ? peak : null
}

function patchOf(wall: Wall, span: Span, peak: Peak, stops: number): Patch {
  const least = peak.exposure * 2 ** -stops
  let isCut = false
  /** How far one can go from the peak in a direction before it is darker, or no longer seen. */
  const reach = (dx: number, dy: number, mostM: number) => {
    const isIn = (far: number) => {
      const x = peak.x + dx * far
      const y = peak.y + dy * far
      return isSeen(wall, x, y) && exposureAt(wall, x, y) >= least
    }
    const stepM = Math.max(EXACT_M, mostM / STEPS)
    let inside = 0
    let outside = stepM
    while (outside < mostM && isIn(outside)) {
      inside = outside
      outside += stepM
    }
    while (outside - inside > EXACT_M / 4) {
      const middle = (inside + outside) / 2
      if (isIn(middle)) inside = middle
      else outside = middle
    }
    if (!isSeen(wall, peak.x + dx * outside, peak.y + dy * outside)) isCut = true
    return inside
  }
  const leftM = peak.x - reach(-1, 0, peak.x - span.leftM)
  const rightM = peak.x + reach(1, 0, span.rightM - peak.x)
  const bottomM = peak.y - reach(0, -1, peak.y - span.bottomM)
  const topM = peak.y + reach(0, 1, span.topM - peak.y)
  return { leftM, rightM, bottomM, topM, widthM: rightM - leftM, heightM: topM - bottomM, isCut }
}

function shouldersOf(whole: WholeSetup, patch: Patch, unit: LengthUnit): Glow['shoulders'] {
  const place = mainPlace(whole.places)
  const { camera, background } = whole.setup
  if (!place) return null
  const run = camera.at[2] - place.at[1]
  if (run <= 1e-6) return null
  const share = (camera.at[2] - background.zM) / run
  const y = camera.at[1] + (place.eyeHeightM - SHOULDERS_BELOW_EYES_M - camera.at[1]) * share
  return { heightOnWallM: y, words: shoulderWords(patch, y, unit) }
}

function shoulderWords({ bottomM, topM }: Patch, shouldersM: number, unit: LengthUnit): string {
  const part = 'The part within a stop of its peak'
  if (bottomM > shouldersM + 0.05)
    return `${part} stays ${lengthLabel(bottomM - shouldersM, unit)} above the shoulders.`
  if (topM < shouldersM)
    return `${part} lies behind the body, ${lengthLabel(shouldersM - topM, unit)} under the line of the shoulders.`
  const above = Math.round(((topM - shouldersM) / (topM - bottomM)) * 10) * 10
  return above >= 100
    ? `${part} rises from the shoulders.`
    : `${part} meets the shoulders: ${above} % of its height shows above them.`
}

/**
 * The glow on the wall as the camera sees it: its brightest point, how large the part within one and two stops of it
 * is, its colour, and how it meets the shoulders of the sitter on the mark. Computed as `wallMap` is; words say
 * lengths in `unit`. Null where the camera sees no lit wall.
 */
export function glowOf(
  whole: WholeSetup,
  orientation: Orientation = 'upright',
  mainFNumber: number | null = mainFNumberOf(whole),
  unit: LengthUnit = 'm',
): Glow | null {
  const wall = wallOf(whole, orientation)
  const span = seenSpan(wall)
  const peak = span && brightest(wall, span)
  if (!span || !peak) return null
  const { iso, whiteBalanceK } = whole.setup.camera
  const point: Point = [peak.x, peak.y, wall.zM]
  const parts = wall.emissions.map((emission) => ({
    emission,
    exposure: exposureOnWall(emission, peak.x, peak.y, wall.zM),
  }))
  const sum = parts.reduce((total, part) => total + part.exposure, 0)
  const mired = parts.reduce((total, { emission: { light }, exposure }) => {
    const own = miredOf(ownColourK(light.unit.numbers)) + stackGels(light.gels.map((gel) => gel.numbers)).miredShift
    return total + (own * exposure) / sum
  }, 0)
  const withinOneStop = patchOf(wall, span, peak, 1)
  return {
    point,
    fNumber: fNumberOfExposure(sum, iso),
    underMainStops: mainFNumber === null ? null : Math.log2(exposureOfFNumber(mainFNumber, iso) / sum),
    shares: parts
      .filter((part) => part.exposure > 0)
      .map(({ emission, exposure }) => ({ lightId: emission.light.id, share: exposure / sum }))
      .sort((a, b) => b.share - a.share),
    withinOneStop,
    withinTwoStops: patchOf(wall, span, peak, 2),
    kelvin: mired > 0 ? 1e6 / mired : null,
    mired,
    miredFromWhite: mired - miredOf(whiteBalanceK),
    shoulders: shouldersOf(whole, withinOneStop, unit),
  }
}
