import { ownColourK } from '#shared/domain/lighting/light-source.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Light, Point } from '#shared/domain/lighting/schema.ts'
import { shifted, stackGels } from '#shared/domain/lighting/gel.ts'
import { type BoomForm, type Flat, boomForm } from './light-form.ts'

/** How a drawing lies on the screen: CSS px per metre and where the origin is. */
export type PlanView = { pxPerM: number; originX: number; originZ: number; width: number; height: number }

export const toX = (view: PlanView, xM: number) => view.originX + xM * view.pxPerM
export const toZ = (view: PlanView, zM: number) => view.originZ + zM * view.pxPerM

/** Where a point lies on the screen, CSS px. */
export type Project = (point: Point) => Flat

export const projectPlan =
  (view: PlanView): Project =>
  ([x, , z]) => [toX(view, x), toZ(view, z)]

/** A drawing from the side, wall at the left: CSS px per metre, and where the sitter's mark is. */
export type SideView = { pxPerM: number; originX: number; floorY: number; width: number; height: number }

export const projectSide =
  (view: SideView): Project =>
  ([, y, z]) => [view.originX + z * view.pxPerM, view.floorY - y * view.pxPerM]

type Extent = { minX: number; maxX: number; minZ: number; maxZ: number }

/** A wall at the side or in front that is no further away than this is in the plan as it is fitted, metres. */
const NEAR_WALL_M = 3.2

const feetOf = (boom: BoomForm | null): Point[] => (boom ? [boom.top, boom.counter] : [])

/** What has to be seen of a setup, metres; a wide wall is cut. */
function extentOf(whole: WholeSetup): Extent {
  const { camera, background, walled } = whole.setup
  const points: [number, number][] = [
    [0, 0],
    [camera.at[0], camera.at[2]],
    ...whole.lights.flatMap((light): [number, number][] => [
      [light.at[0], light.at[2]],
      ...feetOf(boomForm(light, whole)).map(([x, , z]): [number, number] => [x, z]),
    ]),
    ...whole.places.map((place): [number, number] => [place.at[0], place.at[1]]),
    ...whole.props.map((prop): [number, number] => [prop.at[0], prop.at[2]]),
  ]
  const xs = points.map(([x]) => x)
  const zs = points.map(([, z]) => z)
  const wallHalf = Math.min(background.widthM / 2, 2.2)
  const near = (metres: number | undefined) => (metres === undefined || metres > NEAR_WALL_M ? 0 : metres + 0.1)
  return {
    minX: Math.min(...xs, -wallHalf, -1.6, -near(walled?.leftM)),
    maxX: Math.max(...xs, wallHalf, 1.6, near(walled?.rightM)),
    minZ: Math.min(...zs, background.zM),
    maxZ: Math.max(...zs),
  }
}

type Margins = { left: number; right: number; top: number; bottom: number }

/** The largest scale at which everything is seen, with room for words around it. */
export function fitPlan(whole: WholeSetup, width: number, height: number, margins: Margins): PlanView {
  const extent = extentOf(whole)
  const across = Math.max(1, width - margins.left - margins.right)
  const down = Math.max(1, height - margins.top - margins.bottom)
  const pxPerM = Math.min(130, across / (extent.maxX - extent.minX), down / (extent.maxZ - extent.minZ))
  const spareX = across - (extent.maxX - extent.minX) * pxPerM
  const spareZ = down - (extent.maxZ - extent.minZ) * pxPerM
  return {
    pxPerM,
    originX: margins.left + spareX / 2 - extent.minX * pxPerM,
    originZ: margins.top + spareZ / 2 - extent.minZ * pxPerM,
    width,
    height,
  }
}

/** The largest scale at which everything is seen from the side. */
export function fitSide(whole: WholeSetup, width: number, height: number): SideView {
  const { camera, background } = whole.setup
  const booms = whole.lights.flatMap((light) => feetOf(boomForm(light, whole)))
  const zs = [
    camera.at[2] + 0.4,
    0.6,
    ...whole.lights.map((light) => light.at[2] + 0.4),
    ...whole.props.map((prop) => prop.at[2] + 0.3),
    ...booms.map(([, , z]) => z + 0.2),
  ]
  const tops = [
    camera.at[1] + 0.3,
    Math.min(background.heightM, 3.2),
    2,
    ...whole.lights.map((light) => light.at[1] + (light.modifier?.numbers.heightM ?? 0.2) / 2 + 0.1),
    ...whole.props.map((prop) => prop.at[1] + prop.heightM / 2),
  ]
  const minZ = Math.min(background.zM, ...whole.lights.map((light) => light.at[2]), ...booms.map(([, , z]) => z)) - 0.3
  const across = Math.max(...zs) - minZ
  const pxPerM = Math.max(8, Math.min(80, (width - 40) / across, (height - 34) / Math.max(...tops)))
  return { pxPerM, originX: (width - across * pxPerM) / 2 - minZ * pxPerM, floorY: height - 18, width, height }
}

/** Tint of a light's beam in a drawing: drawing blue when neutral, amber when warm, a clear blue when cool. */
export function beamTint(light: Light, whiteK: number): { colour: string; opacity: number } {
  const kelvin = shifted(ownColourK(light.unit.numbers), stackGels(light.gels.map((gel) => gel.numbers)).miredShift)
  const mired = (kelvin === null ? 0 : 1e6 / kelvin) - 1e6 / whiteK
  if (mired > 25) return { colour: '#C9711F', opacity: 0.18 }
  if (mired < -25) return { colour: '#3F78BC', opacity: 0.2 }
  return { colour: '#2F4F70', opacity: 0.11 }
}

export type Label = { key: string; x: number; y: number; side: 'left' | 'right'; lines: readonly string[] }

const LINE_PX = 15
/** About how wide a letter is, CSS px. */
const LETTER_PX = 6.4

/** About how wide words in a drawing are, CSS px. */
export function wordsWidth(lines: readonly string[]): number {
  return Math.max(...lines.map((line) => line.length)) * LETTER_PX
}

/** Moves labels down, top to bottom, so that none covers another or one of those that stay where they are. */
export function spreadLabels(labels: readonly Label[], fixed: readonly Label[] = []): Label[] {
  const spanOf = ({ x, side, lines }: Label) =>
    side === 'left' ? [x - wordsWidth(lines), x] : [x, x + wordsWidth(lines)]
  const heightOf = ({ lines }: Label) => lines.length * LINE_PX
  const placed: Label[] = [...fixed]
  for (const label of [...labels].sort((a, b) => a.y - b.y)) {
    const [from = 0, to = 0] = spanOf(label)
    const beside = placed.filter((other) => {
      const [otherFrom = 0, otherTo = 0] = spanOf(other)
      return from < otherTo && otherFrom < to
    })
    let { y } = label
    for (const other of beside.sort((a, b) => a.y - b.y))
      if (y < other.y + heightOf(other) + 3 && other.y < y + heightOf(label) + 3) y = other.y + heightOf(other) + 3
    placed.push({ ...label, y })
  }
  return placed.slice(fixed.length)
}
