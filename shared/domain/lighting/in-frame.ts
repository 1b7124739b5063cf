import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Caution } from './cautions.ts'
import { type Clearance, type Orientation, type View, clearanceOf, hiddenBySitter, viewOf } from './frame.ts'
import { faceOf } from './light-output.ts'
import type { Point } from './schema.ts'
import { metresLabel, purposeWord } from './words.ts'

/** How near one thing and its stand come to the picture. */
export type Sight = { id: string; lightId: string | null; name: string; clearance: Clearance }

/** A point of a thing with the radius of the ball around it, metres. */
type Ball = { id: string; lightId: string | null; name: string; at: Point; radiusM: number }

const HEAD_RADIUS_M = 0.12
const POLE_RADIUS_M = 0.03
const STEPS = 10

function ballsOf(whole: WholeSetup): Ball[] {
  const lights = whole.lights.flatMap((light): Ball[] => {
    const { widthM, heightM } = faceOf(light)
    const name = purposeWord(light.purpose).toLowerCase()
    const head: Ball = {
      id: light.id,
      lightId: light.id,
      name,
      at: light.at,
      radiusM: Math.max(HEAD_RADIUS_M, Math.hypot(widthM, heightM) / 2),
    }
    const kind = light.support?.numbers.kind
    if (kind !== 'stand' && kind !== 'floor stand') return [head]
    const pole = Array.from({ length: STEPS }, (_, step): Ball => {
      return {
        ...head,
        name: `${name}’s stand`,
        at: [light.at[0], (light.at[1] * step) / STEPS, light.at[2]],
        radiusM: POLE_RADIUS_M,
      }
    })
    return [head, ...pole]
  })
  const panels = whole.props
    .filter((prop) => prop.kind !== 'prop')
    .map((prop): Ball => ({
      id: prop.id,
      lightId: null,
      name: prop.name.toLowerCase(),
      at: prop.at,
      radiusM: Math.min(prop.widthM, prop.heightM) / 2,
    }))
  return [...lights, ...panels]
}

function sightOf(ball: Ball, whole: WholeSetup, view: View): Sight | null {
  if (ball.at[2] < whole.setup.background.zM) return null
  if (hiddenBySitter(view, whole.places, ball.at, ball.radiusM)) return null
  const clearance = clearanceOf(view, ball.at, ball.radiusM)
  return clearance && { id: ball.id, lightId: ball.lightId, name: ball.name, clearance }
}

/**
 * Every light, panel and flag that the camera could see, once, with the least clearance of its head or stand over all
 * orientations; nearest to the picture first. Negative clearance is in the picture.
 */
export function sightsOf(whole: WholeSetup, orientations: readonly Orientation[]): Sight[] {
  const worst = new Map<string, Sight>()
  for (const orientation of orientations) {
    const view = viewOf(whole, orientation)
    for (const ball of ballsOf(whole)) {
      const sight = sightOf(ball, whole, view)
      const known = worst.get(ball.id)
      if (sight && (!known || sight.clearance.marginM < known.clearance.marginM)) worst.set(ball.id, sight)
    }
  }
  return [...worst.values()].sort((a, b) => a.clearance.marginM - b.clearance.marginM)
}

const HOW =
  'Every head, panel (a ball around its face) and stand (a line) is projected through the camera. Assumed: the camera looks at the sitters with the eyes a third below the top edge; a body hides what stands right behind it.'

/** What stands in the picture (red, one each), or else how far the nearest thing clears it (fine). */
export function frameCautions(whole: WholeSetup, orientations: readonly Orientation[]): Caution[] {
  const sights = sightsOf(whole, orientations)
  const lens = `${whole.setup.camera.focalMm} mm`
  const inside = sights.filter((sight) => sight.clearance.marginM < 0)
  if (inside.length > 0) {
    return inside.map(({ id, lightId, name, clearance }) => ({
      key: `${id}:in-frame`,
      tone: 'red',
      title: `The ${name} is in the picture`,
      words: `It reaches ${metresLabel(Math.max(0.1, -clearance.marginM))} past the ${clearance.edge} edge at ${lens}. Move it out, or come closer with the camera.`,
      lightId,
      how: HOW,
    }))
  }
  const nearest = sights[0]
  if (!nearest) return []
  const words = `The ${nearest.name} clears the ${nearest.clearance.edge} edge by ${metresLabel(nearest.clearance.marginM)} at ${lens}.`
  return [{ key: 'out-of-frame', tone: 'fine', title: 'Out of frame', words, lightId: nearest.lightId, how: HOW }]
}
