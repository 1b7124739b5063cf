import { clamp, ease, hash3, noise } from './field.ts'
import { strandShade } from './head.ts'
import type { Figure, Rgb } from './scene.ts'
import type { Solid } from './solid.ts'
import { blurred, plain, seen, type Spot, tilt } from './spot.ts'
import type { Stage } from './stage.ts'
import { own, turnToOwn, turnToWorld } from './trace.ts'

const IRIS: readonly Rgb[] = [
  [0.065, 0.035, 0.018],
  [0.13, 0.085, 0.035],
  [0.1, 0.12, 0.06],
  [0.12, 0.16, 0.18],
  [0.045, 0.026, 0.014],
]

/** An eye: white, iris, pupil, looking at the lens as far as eyes turn. */
export function eyeSpot(
  stage: Stage,
  spot: Spot,
  figure: Figure,
  solid: Solid,
  lx: number,
  ly: number,
  lz: number,
): void {
  const eye = stage.heads[solid.of.index]?.eye
  if (!eye) return
  const { at } = stage.scene.view
  turnToOwn(solid, at[0] - figure.eyes[0], at[1] - figure.eyes[1], at[2] - figure.eyes[2])
  const flat = Math.max(0.05, own.z)
  const yaw = clamp(own.x / flat, -0.5, 0.5)
  const pitch = clamp(own.y / flat, -0.3, 0.3)
  const gl = Math.sqrt(yaw * yaw + pitch * pitch + 1)
  const side = lx < 0 ? -1 : 1
  let qx = lx - side * eye.x
  let qy = ly - eye.y
  let qz = lz - eye.z
  const ql = Math.sqrt(qx * qx + qy * qy + qz * qz)
  qx /= ql
  qy /= ql
  qz /= ql
  const turn = Math.acos(clamp((qx * yaw + qy * pitch + qz) / gl, -1, 1))
  const spokes = noise(Math.atan2(qy, qx) * 9, figure.seed, 3) * 0.25
  const iris = IRIS[Math.floor(hash3(figure.seed, 31, 1) * (figure.skin[1] < 0.26 ? 2 : 4)) % IRIS.length] ?? [
    0.1, 0.07, 0.04,
  ]
  const pupil = 0.19
  const rim = 0.5
  const isPupil = ease(pupil + 0.025, pupil - 0.01, turn)
  const inIris = ease(rim + 0.03, rim - 0.03, turn)
  const dark = 1 - 0.65 * ease(rim - 0.12, rim, turn)
  const light = (1.1 + spokes) * dark
  const white = 0.5 - 0.16 * ease(0.7, 1.3, turn)
  spot.r = (white * 1.0 * (1 - inIris) + iris[0] * light * inIris) * (1 - isPupil) + 0.004
  spot.g = (white * 0.93 * (1 - inIris) + iris[1] * light * inIris) * (1 - isPupil) + 0.004
  spot.b = (white * 0.88 * (1 - inIris) + iris[2] * light * inIris) * (1 - isPupil) + 0.004
  spot.wrapR = 0.15
  spot.wrapG = 0.08
  spot.wrapB = 0.06
  spot.mirror = 0.035
  spot.rough = 0.05
  spot.liftM = 0.0045
}

/** Skin with what is painted on it by nature: lips, brows, lashes, a flush. */
export function skinSpot(
  stage: Stage,
  spot: Spot,
  figure: Figure,
  solid: Solid,
  lx: number,
  ly: number,
  lz: number,
  blurM: number,
): void {
  const { skin, seed } = figure
  const mottle = 1 + 0.07 * blurred(lx + seed, ly, lz, 0.018, blurM, 4)
  const depth = skin[1]
  plain(spot, skin, mottle)
  // Light skin lets more red through; deep skin shines more.
  spot.wrapR = 0.24
  spot.wrapG = 0.1 + 0.03 * depth
  spot.wrapB = 0.06
  spot.mirror = 0.02
  spot.rough = 0.52 - 0.06 * ease(0.2, 0.05, depth)
  spot.liftM = 0.006
  const pore = 0.09 * seen(0.004, blurM)
  if (pore > 0) {
    tilt(
      spot,
      1,
      0,
      0,
      pore * noise(lx * 900, ly * 900, lz * 900),
      0,
      1,
      0,
      pore * noise(ly * 900 + 40, lz * 900, lx * 900),
    )
  }
  if (solid.of.kind !== 'head') return
  const paint = stage.heads[solid.of.index]?.paint(lx, ly, lz)
  if (!paint) return
  const { lips, brow, lash, flush } = paint
  const warm = 0.2 + 0.5 * ease(0.02, 0.3, depth)
  spot.g *= 1 - 0.24 * flush * warm
  spot.b *= 1 - 0.22 * flush * warm
  if (lips > 0) {
    const lipR = skin[0] * 0.8
    const lipG = skin[1] * 0.46
    const lipB = skin[2] * 0.5
    spot.r += (lipR - spot.r) * lips * 0.85
    spot.g += (lipG - spot.g) * lips * 0.85
    spot.b += (lipB - spot.b) * lips * 0.85
    spot.rough += (0.3 - spot.rough) * lips
    tilt(spot, 1, 0, 0, 0.18 * lips * seen(0.003, blurM) * noise(lx * 1100, ly * 160, 3), 0, 1, 0, 0)
  }
  const hairy = Math.max(brow * 0.88, lash * 0.94)
  if (hairy > 0) {
    const dim = lash > brow ? 0.35 : 0.8
    spot.r += (figure.hairColour[0] * dim + 0.008 - spot.r) * hairy
    spot.g += (figure.hairColour[1] * dim + 0.007 - spot.g) * hairy
    spot.b += (figure.hairColour[2] * dim + 0.006 - spot.b) * hairy
    spot.mirror *= 1 - hairy
  }
  // Scalp and the shade of what grows there.
  spot.rough -= 0.06 * ease(0.02, 0.08, ly) * ease(0.05, 0.0, Math.abs(lx))
}

/** Hair with its strands. */
export function hairSpot(
  spot: Spot,
  figure: Figure,
  solid: Solid,
  lx: number,
  ly: number,
  lz: number,
  blurM: number,
): void {
  const { hairColour } = figure
  const fine = strandShade(lx, ly, lz) * seen(0.006, blurM)
  plain(spot, hairColour, 1 + 0.5 * fine)
  spot.wrapR = spot.wrapG = spot.wrapB = 0.12
  spot.hair = figure.hair === 'cropped' ? 0.25 : figure.hair === 'curls' ? 0.12 : 0.85
  spot.liftM = 0.006
  // Strands fall from the crown, or run to the knot behind.
  turnToOwn(solid, spot.gx, spot.gy, spot.gz)
  const nx = own.x
  const ny = own.y
  const nz = own.z
  let tx = figure.hair === 'knot' ? -lx * 0.4 : lx * 0.6
  let ty = figure.hair === 'knot' ? 0.122 - ly : -1
  let tz = figure.hair === 'knot' ? -0.048 - lz : lz * 0.3
  const inward = tx * nx + ty * ny + tz * nz
  tx -= inward * nx
  ty -= inward * ny
  tz -= inward * nz
  const length = Math.sqrt(tx * tx + ty * ty + tz * tz) || 1
  const bend = 0.25 * fine
  turnToWorld(solid, tx / length + nx * bend, ty / length + ny * bend, tz / length + nz * bend)
  spot.tx = own.x
  spot.ty = own.y
  spot.tz = own.z
  const side = 0.35 * fine
  tilt(
    spot,
    spot.gy * spot.tz - spot.gz * spot.ty,
    spot.gz * spot.tx - spot.gx * spot.tz,
    spot.gx * spot.ty - spot.gy * spot.tx,
    side,
    0,
    1,
    0,
    0,
  )
}
