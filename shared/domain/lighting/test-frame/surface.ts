import { clamp, ease, hash3, layeredNoise, noise } from './field.ts'
import { strandShade } from './head.ts'
import type { Figure, Rgb } from './scene.ts'
import { partAt, type Solid } from './solid.ts'
import type { Stage } from './stage.ts'
import { type Hit, own, toOwn, turnToOwn, turnToWorld } from './trace.ts'

/** A point of the picture's surface, ready for shading; filled in place. Reflectances are linear sRGB. */
export type Spot = {
  x: number
  y: number
  z: number
  /** Normal with the small structure of the stuff, and that of the shape alone. */
  nx: number
  ny: number
  nz: number
  gx: number
  gy: number
  gz: number
  r: number
  g: number
  b: number
  /** How far red, green and blue reach round the edge of the light (skin lets light through). */
  wrapR: number
  wrapG: number
  wrapB: number
  /** Mirror share straight on, and roughness; 0 share: matt. `tinted`: the reflection has the stuff's colour. */
  mirror: number
  rough: number
  isTinted: boolean
  /** Strength of the soft bloom of cloth at grazing angles. */
  bloom: number
  /** Strand direction of hair; 0: none. */
  hair: number
  tx: number
  ty: number
  tz: number
  /** Moves shadow rays off the surface, metres. */
  liftM: number
}

export function emptySpot(): Spot {
  return {
    x: 0,
    y: 0,
    z: 0,
    nx: 0,
    ny: 0,
    nz: 1,
    gx: 0,
    gy: 0,
    gz: 1,
    r: 0,
    g: 0,
    b: 0,
    wrapR: 0,
    wrapG: 0,
    wrapB: 0,
    mirror: 0,
    rough: 1,
    isTinted: false,
    bloom: 0,
    hair: 0,
    tx: 0,
    ty: 1,
    tz: 0,
    liftM: 0.002,
  }
}

function plain(spot: Spot, colour: Rgb, share: number): void {
  spot.r = colour[0] * share
  spot.g = colour[1] * share
  spot.b = colour[2] * share
  spot.wrapR = spot.wrapG = spot.wrapB = 0
  spot.mirror = 0
  spot.rough = 1
  spot.isTinted = false
  spot.bloom = 0
  spot.hair = 0
  spot.liftM = 0.002
}

function face(spot: Spot, nx: number, ny: number, nz: number): void {
  spot.nx = spot.gx = nx
  spot.ny = spot.gy = ny
  spot.nz = spot.gz = nz
}

/** Tilts the shading normal by the slope of a height map, metres per metre along two directions of the surface. */
function tilt(
  spot: Spot,
  ax: number,
  ay: number,
  az: number,
  slopeA: number,
  bx: number,
  by: number,
  bz: number,
  slopeB: number,
): void {
  let x = spot.nx - ax * slopeA - bx * slopeB
  let y = spot.ny - ay * slopeA - by * slopeB
  let z = spot.nz - az * slopeA - bz * slopeB
  const length = Math.sqrt(x * x + y * y + z * z)
  x /= length
  y /= length
  z /= length
  spot.nx = x
  spot.ny = y
  spot.nz = z
}

/**
 * Share of a pattern of this size that is still seen: what is smaller than a pixel, or than the blur of a lens that is
 * focused elsewhere, is seen as its mean.
 */
function seen(sizeM: number, blurM: number): number {
  return clamp((sizeM - blurM * 0.9) / Math.max(1e-6, sizeM), 0, 1)
}

/** Noise of which only what the blur leaves is seen. */
function blurred(x: number, y: number, z: number, sizeM: number, blurM: number, layers: number): number {
  let sum = 0
  let weight = 0.5
  let size = sizeM
  for (let i = 0; i < layers; i++) {
    const share = seen(size, blurM)
    if (share <= 0) break
    sum += weight * share * noise(x / size + i * 17.3, y / size - i * 9.1, z / size + i * 4.7)
    weight *= 0.55
    size *= 0.48
  }
  return sum
}

/** The wall behind the sitter, and the room beyond its edges. */
export function wallSpot(stage: Stage, spot: Spot, blurM: number, isBeyond: boolean): void {
  const { background, seed } = stage.scene
  face(spot, 0, 0, 1)
  if (isBeyond) {
    plain(spot, [0.1, 0.097, 0.094], 1)
    return
  }
  const { x, y } = spot
  const { colour, surface } = background
  switch (surface) {
    case 'paper':
      plain(spot, colour, 1)
      return
    case 'cloth': {
      const drift = 0.6 * noise(x * 1.1, y * 0.6, seed) + 0.25 * noise(x * 3.1, y * 0.9, seed)
      const wave = Math.sin((x + drift * 0.22) * 17) + 0.4 * Math.sin((x + drift * 0.3) * 41)
      plain(spot, colour, 1 + 0.05 * wave + 0.04 * blurred(x, y, seed, 0.03, blurM, 2))
      tilt(spot, 1, 0, 0, 0.42 * Math.cos((x + drift * 0.22) * 17), 0, 1, 0, 0.05 * drift)
      spot.bloom = 0.05
      return
    }
    case 'brick': {
      const high = 0.075
      const long = 0.225
      const row = Math.floor(y / high)
      const shift = (row & 1) * 0.5
      const column = Math.floor(x / long + shift)
      const u = (x / long + shift - column) * long
      const v = y - row * high
      const gap = Math.min(Math.min(u, long - u), Math.min(v, high - v))
      const joint = ease(0.008, 0.004, gap) * seen(0.02, blurM)
      const shade = 0.82 + 0.36 * hash3(row, column, seed)
      const grain = 1 + 0.28 * blurred(x, y, seed, 0.05, blurM, 4)
      plain(spot, colour, (shade * (1 - joint) + 0.75 * joint) * grain)
      if (joint < 0.5)
        tilt(
          spot,
          1,
          0,
          0,
          0.12 * blurred(x + 5, y, seed, 0.02, blurM, 2),
          0,
          1,
          0,
          0.12 * blurred(x, y + 7, seed, 0.02, blurM, 2),
        )
      return
    }
    case 'panelling': {
      const wide = 0.72
      const rail = 0.92
      const column = Math.floor(x / wide + 0.5)
      const u = Math.abs(x - column * wide)
      const upper = y > rail
      const v = upper ? Math.abs(y - rail - 0.86) : Math.abs(y - rail / 2)
      const edge = Math.max(u - wide / 2 + 0.09, v - (upper ? 0.74 : rail / 2 - 0.1))
      const mould = ease(0.022, 0.004, Math.abs(edge)) * seen(0.05, blurM)
      const dado = ease(0.03, 0.01, Math.abs(y - rail)) * seen(0.05, blurM)
      plain(spot, colour, 1 - 0.16 * mould + 0.04 * blurred(x, y, seed, 0.4, blurM, 4))
      const slope = 0.75 * mould * Math.sign(edge)
      const isSide = u - wide / 2 + 0.09 > v - (upper ? 0.74 : rail / 2 - 0.1)
      if (isSide) tilt(spot, Math.sign(x - column * wide), 0, 0, slope, 0, 1, 0, 0)
      else tilt(spot, 1, 0, 0, 0, 0, 1, 0, slope * Math.sign(upper ? y - rail - 0.86 : y - rail / 2))
      if (dado > 0) tilt(spot, 1, 0, 0, 0, 0, 1, 0, 0.6 * dado * Math.sign(rail - y))
      return
    }
    case 'plaster': {
      const cloud = blurred(x, y, seed, 0.9, blurM, 5)
      const trowel = blurred(x * 1 + y * 0.3, y, seed + 9, 0.22, blurM, 4)
      plain(spot, colour, 1 + 0.22 * cloud + 0.1 * trowel)
      tilt(
        spot,
        1,
        0,
        0,
        0.06 * blurred(x + 3, y, seed, 0.12, blurM, 3),
        0,
        1,
        0,
        0.06 * blurred(x, y + 3, seed, 0.12, blurM, 3),
      )
      return
    }
  }
}

export function floorSpot(stage: Stage, spot: Spot, blurM: number): void {
  const { background, floor, seed } = stage.scene
  face(spot, 0, 1, 0)
  const { x, z } = spot
  // Paper is rolled out on the floor as well.
  if (background.surface === 'paper' && Math.abs(x) < background.widthM / 2 && z < background.zM + 1.6) {
    plain(spot, background.colour, 1)
    return
  }
  const board = Math.floor(x / 0.14)
  const shade = 0.85 + 0.3 * hash3(board, Math.floor(z / 1.7 + hash3(board, 2, 8)), seed)
  const grain = 1 + 0.3 * blurred(x * 7, z, seed + board, 0.2, blurM, 4)
  const joint = ease(0.006, 0.002, Math.abs(x / 0.14 - board) * 0.14) * seen(0.03, blurM)
  plain(spot, floor, shade * grain * (1 - 0.6 * joint))
  spot.mirror = 0.03
  spot.rough = 0.5
}

const IRIS: readonly Rgb[] = [
  [0.065, 0.035, 0.018],
  [0.13, 0.085, 0.035],
  [0.1, 0.12, 0.06],
  [0.12, 0.16, 0.18],
  [0.045, 0.026, 0.014],
]

function eyeSpot(stage: Stage, spot: Spot, figure: Figure, solid: Solid, lx: number, ly: number, lz: number): void {
  const eye = stage.heads[solid.of.index]?.eye
  if (!eye) return
  // They look at the lens as far as eyes turn.
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
  const iris = IRIS[Math.floor(hash3(figure.seed, 31, 1) * (figure.skin[1] < 0.16 ? 2 : 4)) % IRIS.length] ?? [
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

function skinSpot(
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

function hairSpot(spot: Spot, figure: Figure, solid: Solid, lx: number, ly: number, lz: number, blurM: number): void {
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

/** Height of knitting: columns of V-shaped stitches, and a cable every few of them. */
function knit(u: number, v: number): number {
  const column = u / 0.0085
  const inColumn = column - Math.floor(column) - 0.5
  const slanted = v / 0.0075 + Math.abs(inColumn) * 1.3
  const stitch = Math.sin(slanted * 2 * Math.PI)
  return 0.45 * stitch * (1 - 2 * Math.abs(inColumn)) + 0.55 * (1 - 4 * inColumn * inColumn)
}

function clothSpot(spot: Spot, figure: Figure, solid: Solid, lx: number, ly: number, lz: number, blurM: number): void {
  const { garment, cut, seed } = figure
  // Round the trunk, and round the arm where the point lies outside it.
  const ax = Math.abs(lx)
  const onArm = ax > 0.17 && ly > -0.75 && ly < -0.3
  const u = onArm ? Math.atan2(lz + 0.03, ax - 0.21) * 0.05 : Math.atan2(lx, lz + 0.02) * 0.15
  const v = onArm ? ly * 1.02 : ly
  const worn = 1 + 0.07 * blurred(lx, ly, lz + seed, 0.05, blurM, 3)
  plain(spot, garment, worn)
  spot.liftM = 0.009
  // Two directions along the surface, in the world.
  let bx = -spot.gx * spot.gy
  let by = 1 - spot.gy * spot.gy
  let bz = -spot.gz * spot.gy
  const bl = Math.sqrt(bx * bx + by * by + bz * bz) || 1
  bx /= bl
  by /= bl
  bz /= bl
  const cx = by * spot.gz - bz * spot.gy
  const cy = bz * spot.gx - bx * spot.gz
  const cz = bx * spot.gy - by * spot.gx
  switch (cut) {
    case 'jumper': {
      const share = seen(0.011, blurM)
      if (share > 0) {
        const e = 0.0006
        const here = knit(u, v)
        const slopeU = ((knit(u + e, v) - here) / e) * 0.0007 * share
        const slopeV = ((knit(u, v + e) - here) / e) * 0.0007 * share
        tilt(spot, cx, cy, cz, clamp(slopeU, -0.8, 0.8), bx, by, bz, clamp(slopeV, -0.8, 0.8))
        const deep = 0.78 + 0.22 * here
        const dim = 1 + (deep - 1) * share
        spot.r *= dim
        spot.g *= dim
        spot.b *= dim
      }
      spot.bloom = 0.16
      spot.wrapR = spot.wrapG = spot.wrapB = 0.12
      return
    }
    case 'coat': {
      const fuzz = 0.4 * seen(0.006, blurM)
      tilt(
        spot,
        cx,
        cy,
        cz,
        fuzz * noise(lx * 420, ly * 420, lz * 420),
        bx,
        by,
        bz,
        fuzz * noise(lx * 420 + 31, ly * 420, lz * 420),
      )
      const twill = 1 + 0.08 * seen(0.008, blurM) * Math.sin((u * 0.7 + v) * 1900)
      spot.r *= twill
      spot.g *= twill
      spot.b *= twill
      spot.bloom = 0.2
      spot.wrapR = spot.wrapG = spot.wrapB = 0.1
      return
    }
    case 'shirt': {
      const crease =
        0.16 * noise(lx * 38 + ly * 20, ly * 46 - lx * 18, lz * 38) + 0.08 * noise(lx * 95, ly * 110, lz * 95)
      tilt(spot, cx, cy, cz, crease, bx, by, bz, crease * 0.8)
      const weave = 0.16 * seen(0.0035, blurM)
      tilt(spot, cx, cy, cz, weave * Math.sin(u * 3600), bx, by, bz, weave * Math.sin(v * 3600))
      spot.bloom = 0.05
      spot.mirror = 0.012
      spot.rough = 0.6
      return
    }
    case 'dress': {
      const crush = 0.1 * noise(lx * 50, ly * 22, lz * 50)
      tilt(spot, cx, cy, cz, crush, bx, by, bz, crush * 0.4)
      spot.bloom = 0.1
      spot.mirror = 0.03
      spot.rough = 0.48
      return
    }
    case 'cape': {
      const nap = 0.22 * seen(0.004, blurM)
      tilt(
        spot,
        cx,
        cy,
        cz,
        nap * noise(lx * 600, ly * 380, lz * 600),
        bx,
        by,
        bz,
        nap * noise(lx * 600 + 9, ly * 380, lz * 600),
      )
      spot.bloom = 0.45
      spot.r *= 0.8
      spot.g *= 0.8
      spot.b *= 0.8
      return
    }
  }
}

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
