import { ownColourK } from '#shared/domain/lighting/light-source.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Light } from '#shared/domain/lighting/schema.ts'
import { shifted, stackGels } from '#shared/domain/lighting/gel.ts'

/** How a drawing lies on the screen: CSS px per metre and where the origin is. */
export type PlanView = { pxPerM: number; originX: number; originZ: number; width: number; height: number }

export const toX = (view: PlanView, xM: number) => view.originX + xM * view.pxPerM
export const toZ = (view: PlanView, zM: number) => view.originZ + zM * view.pxPerM

type Extent = { minX: number; maxX: number; minZ: number; maxZ: number }

/** What has to be seen of a setup, metres; a wide wall is cut. */
function extentOf(whole: WholeSetup): Extent {
  const { camera, background } = whole.setup
  const points: [number, number][] = [
    [0, 0],
    [camera.at[0], camera.at[2]],
    ...whole.lights.map((light): [number, number] => [light.at[0], light.at[2]]),
    ...whole.places.map((place): [number, number] => [place.at[0], place.at[1]]),
    ...whole.props.map((prop): [number, number] => [prop.at[0], prop.at[2]]),
  ]
  const xs = points.map(([x]) => x)
  const zs = points.map(([, z]) => z)
  const wallHalf = Math.min(background.widthM / 2, 2.2)
  return {
    minX: Math.min(...xs, -wallHalf, -1.6),
    maxX: Math.max(...xs, wallHalf, 1.6),
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

/** Moves labels on the same side apart, top to bottom, so that none covers another. */
export function spreadLabels(labels: readonly Label[]): Label[] {
  const placed: Label[] = []
  for (const label of [...labels].sort((a, b) => a.y - b.y)) {
    const heightOf = (other: Label) => other.lines.length * LINE_PX
    const above = placed.filter((other) => other.side === label.side && Math.abs(other.x - label.x) < 150)
    const floor = Math.max(-Infinity, ...above.map((other) => other.y + heightOf(other) + 3))
    placed.push({ ...label, y: Math.max(label.y, floor) })
  }
  return placed
}
