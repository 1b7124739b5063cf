import { clothSpot } from './cloth-surface.ts'
import { hash3, layeredNoise, noise } from './field.ts'
import { eyeSpot, hairSpot, skinSpot } from './person-surface.ts'
import { floorSpot, wallSpot } from './room-surface.ts'
import type { Rgb } from './scene.ts'
import { partAt, type Solid } from './solid.ts'
import { blurred, face, plain, seen, type Spot, tilt } from './spot.ts'
import type { Stage } from './stage.ts'
import { type Hit, own, toOwn, turnToWorld } from './trace.ts'

const BRASS: Rgb = [0.78, 0.56, 0.25]

function metalSpot(spot: Spot, colour: Rgb, lx: number, ly: number, lz: number, seed: number, blurM: number): void {
  const worn = 0.5 + 0.5 * layeredNoise(lx * 22, ly * 22, lz * 22 + seed, 3)
  plain(spot, colour, 0.3 - 0.1 * worn)
  const deep = 0.86 + 0.2 * worn
  spot.isTinted = true
  spot.mirror = 0.72 * deep
  spot.rough = 0.24 + 0.16 * worn
  const ding = 0.1 * seen(0.01, blurM)
  tilt(
    spot,
    1,
    0,
    0,
    ding * noise(lx * 160, ly * 160, lz * 160),
    0,
    1,
    0,
    ding * noise(lx * 160 + 8, ly * 160, lz * 160),
  )
  spot.liftM = 0.004
}

/** Fills the spot of a solid: normal, colour and how it shades. */
function solidSpot(stage: Stage, spot: Spot, solid: Solid, blurM: number): void {
  toOwn(solid, spot.x, spot.y, spot.z)
  const lx = own.x
  const ly = own.y
  const lz = own.z
  const { distance, of } = solid
  const e = of.kind === 'head' ? 0.0005 + blurM * 0.2 : 0.0011 + blurM * 0.25
  const a = distance(lx + e, ly - e, lz - e)
  const b = distance(lx - e, ly - e, lz + e)
  const c = distance(lx - e, ly + e, lz - e)
  const d = distance(lx + e, ly + e, lz + e)
  let nx = a - b - c + d
  let ny = -a - b + c + d
  let nz = -a + b - c + d
  const length = Math.sqrt(nx * nx + ny * ny + nz * nz) || 1
  nx /= length
  ny /= length
  nz /= length
  turnToWorld(solid, nx, ny, nz)
  face(spot, own.x, own.y, own.z)
  const { stuff } = partAt(solid, lx, ly, lz)
  const figure = stage.scene.figures[of.index]
  if (of.kind === 'prop' || !figure) {
    const prop = stage.scene.props[of.index]
    const colour: Rgb = prop?.colour ?? [0.3, 0.3, 0.3]
    const seed = prop?.seed ?? 0
    if (stuff === 'metal') metalSpot(spot, colour, lx, ly, lz, seed, blurM)
    else if (stuff === 'leaf') {
      plain(spot, [0.055, 0.13, 0.045], 1 + 0.3 * noise(lx * 40, ly * 40, lz * 40))
      spot.wrapR = spot.wrapG = spot.wrapB = 0.25
      spot.mirror = 0.03
      spot.rough = 0.45
    } else if (stuff === 'paint' && prop?.shape === 'books') {
      plain(spot, [0.62, 0.56, 0.44], 1 + 0.12 * Math.sin(ly * 2600) * seen(0.004, blurM))
    } else if (stuff === 'paint') {
      plain(spot, colour, 1)
      spot.mirror = 0.045
      spot.rough = 0.16
    } else if (prop?.shape === 'cup') {
      plain(spot, [0.11, 0.035, 0.012], 1)
      spot.mirror = 0.04
      spot.rough = 0.08
    } else {
      const grain =
        prop?.shape === 'books'
          ? 1 + 0.5 * (hash3(Math.round(ly / 0.045), seed, 6) - 0.5)
          : 1 + 0.24 * blurred(lx * 1.2, ly * 6, lz * 6, 0.09, blurM, 4)
      plain(spot, colour, grain)
      spot.mirror = 0.035
      spot.rough = 0.42
    }
    spot.liftM = Math.max(0.002, solid.cellM * 0.6)
    return
  }
  switch (stuff) {
    case 'skin':
      skinSpot(stage, spot, figure, solid, lx, ly, lz, blurM)
      break
    case 'eye':
      plain(spot, figure.skin, 1)
      eyeSpot(stage, spot, figure, solid, lx, ly, lz)
      break
    case 'hair':
      hairSpot(spot, figure, solid, lx, ly, lz, blurM)
      break
    case 'metal':
      metalSpot(spot, BRASS, lx, ly, lz, figure.seed, blurM)
      break
    case 'linen':
      plain(spot, [0.66, 0.63, 0.57], 1)
      spot.wrapR = spot.wrapG = spot.wrapB = 0.15
      spot.liftM = 0.009
      break
    case 'cloth':
      clothSpot(spot, figure, solid, lx, ly, lz, blurM)
      break
    default:
      plain(spot, [0.045, 0.043, 0.042], 1 + 0.2 * noise(lx * 90, ly * 90, lz * 90))
      spot.bloom = 0.08
      spot.liftM = 0.009
  }
  spot.liftM = Math.max(spot.liftM, solid.cellM * 0.55)
}

/** Fills the spot where a ray has met something. `blurM`: what is smaller is not seen. */
export function surfaceAt(stage: Stage, hit: Hit, spot: Spot, blurM: number): void {
  switch (hit.what) {
    case 'wall':
      wallSpot(stage, spot, blurM, false)
      return
    case 'beyond':
      wallSpot(stage, spot, blurM, true)
      return
    case 'floor':
      floorSpot(stage, spot, blurM)
      return
    case 'sheet': {
      const sheet = stage.sheets[hit.index]
      if (!sheet) return
      const { view } = stage.scene
      const towards =
        (view.at[0] - sheet.at[0]) * sheet.normal[0] + (view.at[2] - sheet.at[2]) * sheet.normal[2] < 0 ? -1 : 1
      face(spot, sheet.normal[0] * towards, 0, sheet.normal[2] * towards)
      plain(spot, sheet.colour, 1)
      return
    }
    case 'solid': {
      const solid = stage.solids[hit.index]
      if (solid) solidSpot(stage, spot, solid, blurM)
      return
    }
    case 'nothing':
      return
  }
}
