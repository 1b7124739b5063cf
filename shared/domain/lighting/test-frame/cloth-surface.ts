import { clamp, noise } from './field.ts'
import type { Figure } from './scene.ts'
import type { Solid } from './solid.ts'
import { blurred, plain, seen, type Spot, tilt } from './spot.ts'

/** Height of knitting: columns of V-shaped stitches, and a cable every few of them. */
function knit(u: number, v: number): number {
  const column = u / 0.0085
  const inColumn = column - Math.floor(column) - 0.5
  const slanted = v / 0.0075 + Math.abs(inColumn) * 1.3
  const stitch = Math.sin(slanted * 2 * Math.PI)
  return 0.45 * stitch * (1 - 2 * Math.abs(inColumn)) + 0.55 * (1 - 4 * inColumn * inColumn)
}

/** Cloth with its weave, by the cut it is made into. */
export function clothSpot(
  spot: Spot,
  figure: Figure,
  solid: Solid,
  lx: number,
  ly: number,
  lz: number,
  blurM: number,
): void {
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
      const share = seen(0.0065, blurM)
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
      const fuzz = 0.22 * seen(0.003, blurM)
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
      const twill = 1 + 0.08 * seen(0.0024, blurM) * Math.sin((u * 0.7 + v) * 1900)
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
      const weave = 0.16 * seen(0.0013, blurM)
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
      const nap = 0.22 * seen(0.0022, blurM)
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
