import { boomBalanceOf } from '#shared/domain/lighting/boom.ts'
import { beamOf, faceOf } from '#shared/domain/lighting/light-output.ts'
import { type Axes, axesOf, facePoint } from '#shared/domain/lighting/geometry.ts'
import { FRAME_LONG_MM, FRAME_SHORT_MM, angleOfViewDeg } from '#shared/domain/lighting/lens.ts'
import type { Light, Point } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'

/** A light in space, metres: its emitting face at its true size, and signs of the housing behind. */
export type LightForm = {
  face: Point[]
  /** Convex bodies, the farthest from the face last. */
  bodies: Point[][]
  /** A lantern gives light all around: its radius. */
  ballM: number | null
}

type Frame = Axes & { at: Point }

/** Unit vectors of a light: where it looks, to its side, and up along its face. */
export function frameOf(light: Light): Frame {
  return { at: light.at, ...axesOf(light.at, light.aim, [0, 0, 1]) }
}

function put({ at, look, side, up }: Frame, across: number, upward: number, forward: number): Point {
  return [
    at[0] + side[0] * across + up[0] * upward + look[0] * forward,
    at[1] + side[1] * across + up[1] * upward + look[1] * forward,
    at[2] + side[2] * across + up[2] * upward + look[2] * forward,
  ]
}

function rectangle(frame: Frame, halfWidth: number, halfHeight: number, forward: number): Point[] {
  return [
    put(frame, -halfWidth, -halfHeight, forward),
    put(frame, halfWidth, -halfHeight, forward),
    put(frame, halfWidth, halfHeight, forward),
    put(frame, -halfWidth, halfHeight, forward),
  ]
}

function disc(frame: Frame, halfWidth: number, halfHeight: number, forward: number): Point[] {
  return Array.from({ length: 16 }, (_, step) => {
    const turn = (step * Math.PI) / 8
    return put(frame, Math.cos(turn) * halfWidth, Math.sin(turn) * halfHeight, forward)
  })
}

/** Half the width and the length of a head behind its modifier, metres: a sign. */
const HEAD_HALF_M = 0.045
const HEAD_LONG_M = 0.18

/** `leastM`: what is smaller is drawn at this size, so that it can be seen. */
export function lightForm(light: Light, leastM: number): LightForm {
  const frame = frameOf(light)
  const { widthM, heightM } = faceOf(light)
  const halfWidth = Math.max(leastM / 2, widthM / 2)
  const halfHeight = Math.max(leastM / 2, heightM / 2)
  const headHalf = Math.max(HEAD_HALF_M, leastM * 0.4)
  const headLong = Math.max(HEAD_LONG_M, leastM * 1.3)
  const head = (from: number) => [
    ...rectangle(frame, headHalf, headHalf, -from),
    ...rectangle(frame, headHalf, headHalf, -from - headLong),
  ]
  const deep = Math.max(leastM * 0.8, Math.min(0.3, 0.35 * Math.min(widthM, heightM)))
  const tapered = (face: Point[]): LightForm => ({
    face,
    bodies: [[...face, ...rectangle(frame, halfWidth * 0.5, halfHeight * 0.5, -deep)], head(deep)],
    ballM: null,
  })
  switch (light.modifier?.numbers.shape) {
    case 'softbox':
    case 'strip':
      return tapered(rectangle(frame, halfWidth, halfHeight, 0))
    case 'octa':
    case 'beauty dish':
      return tapered(disc(frame, halfWidth, halfHeight, 0))
    case 'umbrella': {
      const face = disc(frame, halfWidth, halfHeight, 0)
      return { face, bodies: [[...face, put(frame, 0, 0, -deep)], head(deep)], ballM: null }
    }
    case 'lantern':
      return { face: [], bodies: [], ballM: Math.max(halfWidth, halfHeight) }
    case 'reflector': {
      const face = disc(frame, Math.max(headHalf * 1.5, halfWidth), Math.max(headHalf * 1.5, halfHeight), 0)
      const neck = headHalf * 1.6
      return { face, bodies: [[...face, ...rectangle(frame, headHalf, headHalf, -neck)], head(neck)], ballM: null }
    }
    case 'snoot': {
      const face = disc(frame, headHalf * 0.6, headHalf * 0.6, 0)
      const neck = headHalf * 3
      return { face, bodies: [[...face, ...rectangle(frame, headHalf, headHalf, -neck)], head(neck)], ballM: null }
    }
    case 'grid': {
      const face = disc(frame, headHalf * 1.15, headHalf * 1.15, 0)
      const neck = headHalf * 0.9
      return {
        face,
        bodies: [[...face, ...disc(frame, headHalf * 1.15, headHalf * 1.15, -neck)], head(neck)],
        ballM: null,
      }
    }
    case 'bare':
    case undefined:
      return { face: rectangle(frame, headHalf, headHalf, 0), bodies: [head(0)], ballM: null }
  }
}

/**
 * Full angle of a light's beam, degrees: its modifier's, else a bare lamp's own, else the mean of what a bare head's zoom
 * covers; null when nobody has said it.
 */
export function beamAngleDeg(light: Light): number | null {
  const { beamDeg, zoomMm, bare } = beamOf(light)
  if (beamDeg !== null) return beamDeg > 0 ? beamDeg : null
  if (!bare || zoomMm === null) return null
  return (angleOfViewDeg(FRAME_LONG_MM, zoomMm) + angleOfViewDeg(FRAME_SHORT_MM, zoomMm)) / 2
}

/** Wider beams are drawn as wide as this, degrees. */
const WIDEST_DEG = 150
/** Half of what a light of unknown beam is drawn to reach, metres: about a head. */
const UNKNOWN_HALF_M = 0.14
/** Farther than this no beam is drawn, metres. */
const FARTHEST_M = 12

export type BeamForm = {
  /** Around the way of the light, from its face to where it ends. */
  points: Point[]
  /** Where it ends on the wall behind the sitter. */
  onWall: Point[]
  lengthM: number
}

/**
 * The way of a light: from its face, as wide as its beam, to the sitter or, for a background light, to the wall. It ends
 * at the wall, the floor and the ceiling. A beam nobody knows narrows to the sitter: a sign, not a promise. Null when it has no length.
 */
export function beamForm(light: Light, whole: WholeSetup): BeamForm | null {
  const frame = frameOf(light)
  const wallM = whole.setup.background.zM
  const eyes = facePoint(whole)
  const toAimM = Math.hypot(...([0, 1, 2] as const).map((axis) => light.aim[axis] - light.at[axis]))
  if (toAimM < 0.05) return null
  const toEyesM = Math.hypot(...([0, 1, 2] as const).map((axis) => eyes[axis] - light.at[axis]))
  const isAtEyes = Math.hypot(...([0, 1, 2] as const).map((axis) => light.aim[axis] - eyes[axis])) < 0.5
  const lengthM = light.purpose === 'background' ? Math.min(FARTHEST_M, 1.8 * toAimM) : isAtEyes ? toEyesM : toAimM
  const beamDeg = beamAngleDeg(light)
  const spread =
    beamDeg === null ? Math.atan(UNKNOWN_HALF_M / lengthM) : (Math.min(WIDEST_DEG, beamDeg) * Math.PI) / 360
  const { widthM, heightM } = faceOf(light)
  // A known beam opens from the edges of its face, an unknown one comes together.
  const wide = beamDeg === null ? 0 : 1
  const onWall: Point[] = []
  const { widthM: wallWidthM, heightM: wallHeightM } = whole.setup.background
  const ceilingM = whole.setup.walled?.ceilingM ?? Infinity
  const ring = Array.from({ length: 24 }, (_, step): Point => {
    const turn = (step * Math.PI) / 12
    const [cos, sin] = [Math.cos(turn), Math.sin(turn)]
    const from = put(frame, (cos * widthM * wide) / 2, (sin * heightM * wide) / 2, 0)
    const far = put(frame, cos * Math.sin(spread), sin * Math.sin(spread), Math.cos(spread))
    const ray: Point = [far[0] - frame.at[0], far[1] - frame.at[1], far[2] - frame.at[2]]
    const toWall = ray[2] < -1e-6 ? (wallM - from[2]) / ray[2] : Infinity
    const toFloor = ray[1] < -1e-6 ? -from[1] / ray[1] : Infinity
    const toCeiling = ray[1] > 1e-6 ? (ceilingM - from[1]) / ray[1] : Infinity
    const run = Math.max(0, Math.min(lengthM, toWall, toFloor, toCeiling))
    const end: Point = [from[0] + ray[0] * run, from[1] + ray[1] * run, from[2] + ray[2] * run]
    if (run === toWall)
      onWall.push([
        Math.min(wallWidthM / 2, Math.max(-wallWidthM / 2, end[0])),
        Math.min(wallHeightM, Math.max(0, end[1])),
        end[2],
      ])
    return end
  })
  const face = beamDeg === null ? lightForm(light, 0).face : disc(frame, widthM / 2, heightM / 2, 0)
  const ends = ring.map((end) => Math.hypot(end[0] - light.at[0], end[1] - light.at[1], end[2] - light.at[2]))
  return { points: [...(face.length > 0 ? face : [light.at]), ...ring], onWall, lengthM: Math.max(...ends) }
}

export type BoomForm = { top: Point; foot: Point; counter: Point }

/** Where a boom stands: its stand lies outwards from the sitter, its weight beyond. Null for what is no boom. */
export function boomForm(light: Light, whole: WholeSetup): BoomForm | null {
  const balance = boomBalanceOf(light)
  if (!balance) return null
  const eyes = facePoint(whole)
  const [x, z] = [light.at[0] - eyes[0], light.at[2] - eyes[2]]
  const out = Math.hypot(x, z)
  // Right over the head there is no outwards: to the side, out of the picture.
  const [ux, uz] = out < 0.15 ? [light.at[0] < eyes[0] ? -1 : 1, 0] : [x / out, z / out]
  const { reachM } = balance
  const counterM = reachM + balance.counterReachM
  const along = (far: number, y: number): Point => [light.at[0] + ux * far, y, light.at[2] + uz * far]
  return { top: along(reachM, light.at[1]), foot: along(reachM, 0), counter: along(counterM, light.at[1]) }
}

export type Flat = readonly [x: number, y: number]

/** The convex outline of flat points, by Andrew's monotone chain. */
export function hull(points: readonly Flat[]): Flat[] {
  const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1])
  const chain = (all: readonly Flat[]) => {
    const kept: Flat[] = []
    for (const point of all) {
      for (;;) {
        const a = kept.at(-2)
        const b = kept.at(-1)
        if (!a || !b || (b[0] - a[0]) * (point[1] - a[1]) - (b[1] - a[1]) * (point[0] - a[0]) > 1e-9) break
        kept.pop()
      }
      kept.push(point)
    }
    return kept.slice(0, -1)
  }
  return sorted.length < 3 ? sorted : [...chain(sorted), ...chain(sorted.toReversed())]
}

/** An SVG path about flat points. */
export function outline(points: readonly Flat[]): string {
  const path = hull(points).map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`)
  return path.length === 0 ? '' : `M${path.join('L')}Z`
}
