import { clamp, noise } from './field.ts'
import type { Rgb } from './scene.ts'

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

/** A spot to be filled. */
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

/** A matt surface of this colour; every other trait as for nothing special. */
export function plain(spot: Spot, colour: Rgb, share: number): void {
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

/** Turns the spot to this normal (unit). */
export function face(spot: Spot, nx: number, ny: number, nz: number): void {
  spot.nx = spot.gx = nx
  spot.ny = spot.gy = ny
  spot.nz = spot.gz = nz
}

/** Tilts the shading normal by the slope of a height map, metres per metre along two directions of the surface. */
export function tilt(
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
export function seen(sizeM: number, blurM: number): number {
  return clamp((sizeM - blurM * 0.9) / Math.max(1e-6, sizeM), 0, 1)
}

/** Noise of which only what the blur leaves is seen. */
export function blurred(x: number, y: number, z: number, sizeM: number, blurM: number, layers: number): number {
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
