import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'
import { boomBalanceOf } from './boom.ts'
import type { Caution } from './cautions.ts'
import { type Clearance, type Orientation, type View, clearanceOf, hiddenBySitter, viewOf } from './frame.ts'
import { faceOf } from './light-output.ts'
import { axesOf, minus, panelNormal } from './geometry.ts'
import type { Light, Point, Prop } from './schema.ts'
import { inSentence, purposeWord } from './words.ts'

/** How near one thing and its stand come to the picture. */
export type Sight = { id: string; lightId: string | null; name: string; clearance: Clearance }

/** A thing by the corners of its hulls. */
type Body = { id: string; lightId: string | null; name: string; hulls: Point[][] }

/** Depth of a head behind its face, and half the height of a bare one, metres (assumptions). */
const HEAD_DEPTH_M = 0.25
const HEAD_HALF_M = 0.08

/** Corners of a head: its face turned to its aim, and the housing behind. */
function headCorners(light: Light): Point[] {
  const { look, side, up } = axesOf(light.at, light.aim, [0, 0, 0])
  const { widthM, heightM } = faceOf(light)
  const corner = (across: number, upward: number, back: number): Point => [
    light.at[0] + side[0] * across + up[0] * upward - look[0] * back,
    light.at[1] + side[1] * across + up[1] * upward - look[1] * back,
    light.at[2] + side[2] * across + up[2] * upward - look[2] * back,
  ]
  const halfWidth = Math.max(HEAD_HALF_M, widthM / 2)
  const halfHeight = Math.max(HEAD_HALF_M, heightM / 2)
  const four = (x: number, y: number, back: number) => [
    corner(-x, -y, back),
    corner(x, -y, back),
    corner(-x, y, back),
    corner(x, y, back),
  ]
  return [...four(halfWidth, halfHeight, 0), ...four(HEAD_HALF_M, HEAD_HALF_M, HEAD_DEPTH_M)]
}

function panelCorners(prop: Prop): Point[] {
  const [x, , z] = panelNormal(prop.turnDeg)
  const half = prop.widthM / 2
  return [-half, half].flatMap((across) =>
    [-prop.heightM / 2, prop.heightM / 2].map((up): Point => [
      prop.at[0] + z * across,
      prop.at[1] + up,
      prop.at[2] - x * across,
    ]),
  )
}

/** A pole from a point to the floor. */
function pole([x, y, z]: Point): Point[] {
  return [
    [x, y, z],
    [x, 0, z],
  ]
}

/** Nearer than this on the floor a boom's head counts as straight over what it looks at, metres. */
const OVERHEAD_M = 0.3

/**
 * The arms of a boom that may be meant, each with its pole: level, from the head away from what it looks at, and to
 * either side. Which one is not written in the setup.
 */
function boomHulls(light: Light): Point[][][] {
  const boom = boomBalanceOf(light)
  if (!boom) return []
  const [dx, , dz] = minus(light.at, light.aim)
  const flat = Math.hypot(dx, dz)
  const away: [number, number][] = flat < OVERHEAD_M ? [] : [[dx / flat, dz / flat]]
  return [...away, [1, 0] as const, [-1, 0] as const].map(([x, z]) => {
    const out = (reachM: number): Point => [light.at[0] + x * reachM, light.at[1], light.at[2] + z * reachM]
    return [[light.at, out(boom.reachM + boom.counterReachM)], pole(out(boom.reachM))]
  })
}

/** Each thing with its parts; of what may stand in several ways, each way. */
function bodiesOf(whole: WholeSetup): Body[][] {
  const lights = whole.lights.flatMap((light): Body[][] => {
    const name = purposeWord(light.purpose).toLowerCase()
    const part = (what: string, hulls: Point[][]): Body => ({ id: light.id, lightId: light.id, name: what, hulls })
    const head = [part(name, [headCorners(light)])]
    const kind = light.support?.numbers.kind
    if (kind === 'boom') return [head, boomHulls(light).map((hulls) => part(`${name}’s boom`, hulls))]
    if (kind !== 'stand' && kind !== 'floor stand') return [head]
    return [head, [part(`${name}’s stand`, [pole(light.at)])]]
  })
  const panels = whole.props
    .filter((prop) => prop.kind !== 'prop')
    .map((prop): Body[] => [{ id: prop.id, lightId: null, name: inSentence(prop.name), hulls: [panelCorners(prop)] }])
  return [...lights, ...panels]
}

function clearanceOfHull(corners: readonly Point[], whole: WholeSetup, view: View): Clearance | null {
  if (corners.every((corner) => corner[2] < whole.setup.background.zM)) return null
  if (hiddenBySitter(view, whole.places, corners)) return null
  return clearanceOf(view, corners)
}

/** The least clearance of a thing's parts; null where none is seen. */
function sightOf(body: Body, whole: WholeSetup, view: View): Sight | null {
  const [least] = body.hulls
    .flatMap((corners) => clearanceOfHull(corners, whole, view) ?? [])
    .sort((a, b) => a.marginM - b.marginM)
  return least ? { id: body.id, lightId: body.lightId, name: body.name, clearance: least } : null
}

/** The way to stand that keeps a thing farthest from the picture; null where one of them is not seen at all. */
function bestSight(ways: readonly Body[], whole: WholeSetup, view: View): Sight | null {
  let best: Sight | null = null
  for (const way of ways) {
    const sight = sightOf(way, whole, view)
    if (!sight) return null
    if (!best || sight.clearance.marginM > best.clearance.marginM) best = sight
  }
  return best
}

/**
 * Every light, panel and flag that the camera could see, once, with the least clearance of its head, stand or boom over all
 * orientations; nearest to the picture first. Negative clearance is in the picture.
 */
export function sightsOf(whole: WholeSetup, orientations: readonly Orientation[]): Sight[] {
  const worst = new Map<string, Sight>()
  const bodies = bodiesOf(whole)
  for (const orientation of orientations) {
    const view = viewOf(whole, orientation)
    for (const ways of bodies) {
      const sight = bestSight(ways, whole, view)
      const known = sight && worst.get(sight.id)
      if (sight && (!known || sight.clearance.marginM < known.clearance.marginM)) worst.set(sight.id, sight)
    }
  }
  return [...worst.values()].sort((a, b) => a.clearance.marginM - b.clearance.marginM)
}

const howInFrame = (unit: LengthUnit) =>
  `Every head, panel, stand and boom is projected through the camera by its corners. Assumed: a head reaches ${lengthLabel(HEAD_DEPTH_M, unit, true)} behind its face; a boom’s arm is level and turned to where it clears best; a camera without an aim looks at the sitters with the eyes a third below the top edge; a body hides what stands right behind it.`

/** What stands in the picture (red, one each), or else how far the nearest thing clears it (fine). */
export function frameCautions(
  whole: WholeSetup,
  orientations: readonly Orientation[],
  unit: LengthUnit = 'm',
): Caution[] {
  const sights = sightsOf(whole, orientations)
  const lens = `${whole.setup.camera.focalMm} mm`
  const inside = sights.filter((sight) => sight.clearance.marginM < 0)
  if (inside.length > 0) {
    return inside.map(({ id, lightId, name, clearance }) => ({
      key: `${id}:in-frame`,
      tone: 'red',
      title: `The ${name} is in the picture`,
      words: `It reaches ${lengthLabel(Math.max(0.1, -clearance.marginM), unit)} past the ${clearance.edge} edge at ${lens}. Move it out, or come closer with the camera.`,
      lightId,
      how: howInFrame(unit),
    }))
  }
  const nearest = sights[0]
  if (!nearest) return []
  const words = `The ${nearest.name} clears the ${nearest.clearance.edge} edge by ${lengthLabel(nearest.clearance.marginM, unit)} at ${lens}.`
  return [
    {
      key: 'out-of-frame',
      tone: 'fine',
      title: 'Out of frame',
      words,
      lightId: nearest.lightId,
      how: howInFrame(unit),
    },
  ]
}
