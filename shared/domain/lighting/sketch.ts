import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { wallTargetOf } from './at-sitter.ts'
import { facePoint } from './geometry.ts'
import { shifted, stackGels } from './gel.ts'
import { beamOf } from './light-output.ts'
import { ownColourK } from './light-source.ts'
import type { Light, Point } from './schema.ts'

/**
 * A setup as flat marks, for a card, a list or paper: whoever draws them chooses the colours. Everything is in the
 * drawing's own unit (px, pt), y down.
 */
export type Tone = 'wall' | 'ink' | 'light' | 'panel' | 'flag' | 'prop' | 'neutral beam' | 'warm beam' | 'cool beam'
export type Mark = {
  key: string
  /** An SVG path in absolute coordinates. */
  d: string
  tone: Tone
  /** `area`: filled with its tone; `shape`: outlined, paper inside; `line`: outlined only. */
  as: 'area' | 'shape' | 'line'
  /** Width of the outline. */
  weight: number
  /** A prop's own colour. */
  colour?: string
}

/** A drawing from above: units per metre and where the sitter's mark lies. */
export type PlanFit = { perM: number; originX: number; originZ: number; width: number; height: number }
/** A drawing from the side, wall at the left, camera at the right. */
export type SideFit = { perM: number; originX: number; floorY: number; width: number; height: number }
export type SketchBox = { width: number; height: number; left: number; right: number; top: number; bottom: number }

type Extent = { minX: number; maxX: number; minZ: number; maxZ: number }

/** Half of a wide wall that is still drawn, metres. */
const WALL_HALF_M = 2.2

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
  const half = Math.min(background.widthM / 2, WALL_HALF_M)
  return {
    minX: Math.min(...xs, -half, -1.6),
    maxX: Math.max(...xs, half, 1.6),
    minZ: Math.min(...zs, background.zM),
    maxZ: Math.max(...zs),
  }
}

/** Room inside a box, and the largest scale that `allowed` knows at which `across` × `down` metres fit into it. */
function scaleFor(box: SketchBox, acrossM: number, downM: number, allowed: (perM: number) => number) {
  const across = Math.max(1, box.width - box.left - box.right)
  const down = Math.max(1, box.height - box.top - box.bottom)
  const perM = allowed(Math.min(across / Math.max(0.1, acrossM), down / Math.max(0.1, downM)))
  return { perM, spareX: across - acrossM * perM, spareY: down - downM * perM }
}

const asItIs = (perM: number) => perM

/** The scale at which everything is seen from above. `allowed` rounds a scale (units per metre) down to a wanted one. */
export function fitPlanSketch(whole: WholeSetup, box: SketchBox, allowed = asItIs): PlanFit {
  const { minX, maxX, minZ, maxZ } = extentOf(whole)
  const { perM, spareX, spareY } = scaleFor(box, maxX - minX, maxZ - minZ, allowed)
  return {
    perM,
    originX: box.left + spareX / 2 - minX * perM,
    originZ: box.top + spareY / 2 - minZ * perM,
    width: box.width,
    height: box.height,
  }
}

/** The scale at which everything is seen from the side. */
export function fitSideSketch(whole: WholeSetup, box: SketchBox, allowed = asItIs): SideFit {
  const { camera, background } = whole.setup
  const zs = [camera.at[2] + 0.4, 0.6, ...whole.lights.map((light) => light.at[2] + 0.4)]
  const minZ = Math.min(background.zM, ...whole.lights.map((light) => light.at[2])) - 0.3
  const top = Math.max(
    camera.at[1] + 0.3,
    Math.min(background.heightM, 3.2),
    2,
    ...whole.lights.map((light) => light.at[1] + (light.modifier?.numbers.heightM ?? 0.2) / 2 + 0.1),
  )
  const acrossM = Math.max(...zs) - minZ
  const { perM, spareX, spareY } = scaleFor(box, acrossM, top, allowed)
  return {
    perM,
    originX: box.left + spareX / 2 - minZ * perM,
    floorY: box.height - box.bottom - spareY / 2,
    width: box.width,
    height: box.height,
  }
}

const n = (value: number) => String(Math.round(value * 100) / 100)
type Flat = readonly [x: number, y: number]

function polygon(points: readonly Flat[], closed = true): string {
  return points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${n(x)} ${n(y)}`).join('') + (closed ? 'Z' : '')
}

function circle([x, y]: Flat, radius: number): string {
  const r = n(radius)
  return `M${n(x - radius)} ${n(y)}A${r} ${r} 0 1 0 ${n(x + radius)} ${n(y)}A${r} ${r} 0 1 0 ${n(x - radius)} ${n(y)}Z`
}

function rectangle(x: number, y: number, width: number, height: number): string {
  return `M${n(x)} ${n(y)}H${n(x + width)}V${n(y + height)}H${n(x)}Z`
}

/** Tint of a light's beam: warm or cool against the camera's white balance by more than 25 mired (about a quarter gel). */
export function beamTone(light: Light, whiteK: number): Tone {
  const kelvin = shifted(ownColourK(light.unit.numbers), stackGels(light.gels.map((gel) => gel.numbers)).miredShift)
  const mired = (kelvin === null ? 0 : 1e6 / kelvin) - 1e6 / whiteK
  return mired > 25 ? 'warm beam' : mired < -25 ? 'cool beam' : 'neutral beam'
}

type Pose = { at: Flat; turnRad: number; perM: number; across: 'width' | 'height' }

/** Housings behind the face are signs; they are drawn at this share of their size on the screen. */
const SIGN = 0.8

/** A light seen from above or the side: its face at its true size, and a sign of what is behind it. */
function lightMarks(light: Light, { at, turnRad, perM, across }: Pose): Mark[] {
  const numbers = light.modifier?.numbers
  const sizeM = numbers ? (across === 'width' ? numbers.widthM : numbers.heightM) : 0
  const half = Math.max(4, (sizeM * perM) / 2)
  const [cos, sin] = [Math.cos(turnRad), Math.sin(turnRad)]
  const put = (points: readonly Flat[]): Flat[] =>
    points.map(([x, y]) => [at[0] + x * cos - y * sin, at[1] + x * sin + y * cos])
  const box = (x: number, halfHeight: number, width: number): Flat[] =>
    [
      [x, -halfHeight],
      [x + width, -halfHeight],
      [x + width, halfHeight],
      [x, halfHeight],
    ].map(([px = 0, py = 0]): Flat => [px * SIGN, py * SIGN])
  const mark = (part: string, d: string, as: Mark['as'] = 'shape'): Mark => ({
    key: `${light.id}:${part}`,
    d,
    tone: 'light',
    as,
    weight: 1.2,
  })
  const body = (points: readonly Flat[]) => mark('body', polygon(put(points)))
  switch (numbers?.shape) {
    case 'softbox':
    case 'octa':
    case 'strip':
    case 'beauty dish': {
      const depth = Math.max(6.4, Math.min(13, half * 0.6))
      const back = Math.max(half * 0.55, half - 11)
      const shell: Flat[] = [
        [0, -half],
        [0, half],
        [-depth, back],
        [-depth, -back],
      ]
      return [mark('shell', polygon(put(shell))), body(box(-depth / SIGN - 7, 4, 7))]
    }
    case 'umbrella': {
      const [start, bend, end] = put([
        [0, -half],
        [-half * 0.75, 0],
        [0, half],
      ])
      if (!start || !bend || !end) return []
      const bow = `M${n(start[0])} ${n(start[1])}Q${n(bend[0])} ${n(bend[1])} ${n(end[0])} ${n(end[1])}`
      const shaft: Flat[] = [
        [-half * 0.4, 0],
        [10, 0],
      ]
      return [mark('bow', bow, 'line'), mark('shaft', polygon(put(shaft), false), 'line'), body(box(8, 4, 9))]
    }
    case 'lantern':
      return [mark('body', circle(at, half))]
    case 'reflector': {
      const dish: Flat[] = [
        [0, -half],
        [0, half],
        [-9 * SIGN, 5 * SIGN],
        [-9 * SIGN, -5 * SIGN],
      ]
      return [mark('dish', polygon(put(dish))), body(box(-24, 6, 15))]
    }
    case 'snoot':
      return [mark('tube', polygon(put(box(-10, 4, 10))), 'area'), body(box(-30, 7, 20))]
    case 'grid':
      return [mark('cells', polygon(put(box(-5, 8, 5))), 'area'), body(box(-27, 7, 22))]
    case 'bare':
    case undefined:
      return [body(box(-22, 7, 22))]
  }
}

/** The way of a light, to where it looks; a background light's to the wall, where it makes its glow. */
function beamMark(light: Light, whole: WholeSetup, at: (x: number, z: number) => Flat): Mark | null {
  const { background, camera } = whole.setup
  const face = facePoint(whole)
  const wall = wallTargetOf(light, background)
  const target: Point = wall ?? light.aim
  const dx = target[0] - light.at[0]
  const dz = target[2] - light.at[2]
  const length = Math.hypot(dx, dz)
  if (length < 0.05 || !light.isOn) return null
  const { beamDeg } = beamOf(light)
  const isKnown = beamDeg !== null && beamDeg > 0 && beamDeg < 170
  const spread = isKnown ? Math.tan((beamDeg * Math.PI) / 360) * length : Infinity
  const widest = wall ? 0.9 : light.purpose === 'main' || light.purpose === 'fill' ? 0.26 : 0.18
  const half = Math.min(spread, widest)
  const looksAtFace = !wall && Math.hypot(target[0] - face[0], target[2] - face[2]) < 0.5
  const [x, , z] = looksAtFace ? face : target
  const [nx, nz] = wall ? [half, 0] : [(-dz / length) * half, (dx / length) * half]
  return {
    key: `${light.id}:beam`,
    d: polygon([at(light.at[0], light.at[2]), at(x + nx, z + nz), at(x - nx, z - nz)]),
    tone: beamTone(light, camera.whiteBalanceK),
    as: 'area',
    weight: 0,
  }
}

/** A setup from above, from back to front. The face of each light has its true size at the drawing's scale. */
export function planMarks(whole: WholeSetup, fit: PlanFit): Mark[] {
  const { camera, background } = whole.setup
  const at = (x: number, z: number): Flat => [fit.originX + x * fit.perM, fit.originZ + z * fit.perM]
  const wallHalf = (Math.min(background.widthM, 6) / 2) * fit.perM
  const [middle, wallZ] = at(0, background.zM)
  const left = Math.max(4, middle - wallHalf)
  const right = Math.min(fit.width - 4, middle + wallHalf)
  const [cameraX, cameraZ] = at(camera.at[0], camera.at[2])
  return [
    { key: 'wall', d: rectangle(left, wallZ - 4, Math.max(0, right - left), 4), tone: 'wall', as: 'area', weight: 0 },
    ...whole.lights.flatMap((light) => beamMark(light, whole, at) ?? []),
    ...whole.props.map((prop): Mark => {
      const half = (prop.widthM / 2) * fit.perM
      const turn = (prop.turnDeg * Math.PI) / 180
      const [x, z] = at(prop.at[0], prop.at[2])
      if (prop.kind === 'prop')
        return { key: prop.id, d: circle([x, z], half), tone: 'prop', as: 'line', weight: 1.2, colour: prop.colour }
      const ends: Flat[] = [-half, half].map((along) => [x + along * Math.cos(turn), z - along * Math.sin(turn)])
      return { key: prop.id, d: polygon(ends, false), tone: prop.kind, as: 'line', weight: 3.5 }
    }),
    ...whole.places.map((place): Mark => {
      const [x, z] = at(place.at[0], place.at[1])
      const turn = (place.turnDeg * Math.PI) / 180
      const ahead = (reach: number): Flat => [x + Math.sin(turn) * reach, z + Math.cos(turn) * reach]
      const nose = polygon([ahead(8), ahead(13)], false)
      return { key: place.id, d: circle([x, z], 8) + nose, tone: 'ink', as: 'shape', weight: 1.4 }
    }),
    ...whole.lights.flatMap((light) =>
      lightMarks(light, {
        at: at(light.at[0], light.at[2]),
        turnRad: Math.atan2(light.aim[2] - light.at[2], light.aim[0] - light.at[0]),
        perM: fit.perM,
        across: 'width',
      }),
    ),
    { key: 'camera', d: rectangle(cameraX - 9, cameraZ - 2, 18, 10), tone: 'ink', as: 'area', weight: 0 },
  ]
}

/** What a light hangs on, from the side: a pole with feet, a boom, or nothing but its height. */
function supportMark(light: Light, [x, y]: Flat, floorY: number): Mark {
  const kind = light.support?.numbers.kind ?? null
  const feet = (at: number) =>
    floorY - y > 24 ? `M${n(at - 9)} ${n(floorY)}L${n(at)} ${n(floorY - 14)}L${n(at + 9)} ${n(floorY)}` : ''
  const pole = (at: number, from: number) => `M${n(at)} ${n(from)}V${n(floorY)}${feet(at)}`
  const d =
    kind === 'boom'
      ? `M${n(x)} ${n(y)}L${n(x + 36)} ${n(y + 8)}${pole(x + 27, y + 6)}`
      : kind === 'stand' || kind === 'floor stand'
        ? pole(x, y)
        : `M${n(x)} ${n(y)}V${n(floorY)}`
  return { key: `${light.id}:support`, d, tone: 'light', as: 'line', weight: 1 }
}

/** A setup from the side, from back to front: heights are true at the drawing's scale. */
export function sideMarks(whole: WholeSetup, fit: SideFit): Mark[] {
  const { camera, background } = whole.setup
  const at = (z: number, y: number): Flat => [fit.originX + z * fit.perM, fit.floorY - y * fit.perM]
  const [wallX, wallTop] = at(background.zM, background.heightM)
  const top = Math.max(2, wallTop)
  const [cameraX, cameraY] = at(camera.at[2], camera.at[1])
  const legs = `M${n(cameraX + 6)} ${n(cameraY + 5)}L${n(cameraX - 3)} ${n(fit.floorY)}M${n(cameraX + 6)} ${n(cameraY + 5)}L${n(cameraX + 16)} ${n(fit.floorY)}`
  return [
    { key: 'floor', d: `M0 ${n(fit.floorY)}H${n(fit.width)}`, tone: 'wall', as: 'line', weight: 1.5 },
    { key: 'wall', d: rectangle(wallX - 5, top, 5, fit.floorY - top), tone: 'wall', as: 'area', weight: 0 },
    ...whole.places.flatMap((place): Mark[] => {
      const [x, eyes] = at(place.at[1], place.eyeHeightM)
      const shoulder = eyes + 0.22 * fit.perM
      const wide = 0.17 * fit.perM
      const body = `M${n(x - wide)} ${n(fit.floorY)}Q${n(x - wide * 0.8)} ${n(shoulder)} ${n(x)} ${n(shoulder)}Q${n(x + wide * 0.8)} ${n(shoulder)} ${n(x + wide)} ${n(fit.floorY)}`
      return [
        { key: `${place.id}:body`, d: body, tone: 'ink', as: 'line', weight: 1.2 },
        {
          key: place.id,
          d: circle([x, eyes], Math.max(4, 0.12 * fit.perM)),
          tone: 'ink',
          as: 'shape',
          weight: 1.2,
        },
      ]
    }),
    ...whole.lights.map((light) => supportMark(light, at(light.at[2], light.at[1]), fit.floorY)),
    { key: 'legs', d: legs, tone: 'ink', as: 'line', weight: 0.8 },
    ...whole.lights.flatMap((light) =>
      lightMarks(light, {
        at: at(light.at[2], light.at[1]),
        turnRad: Math.atan2(light.at[1] - light.aim[1], light.aim[2] - light.at[2]),
        perM: fit.perM,
        across: 'height',
      }),
    ),
    { key: 'camera', d: rectangle(cameraX - 3, cameraY - 5, 18, 10), tone: 'ink', as: 'area', weight: 0 },
  ]
}
