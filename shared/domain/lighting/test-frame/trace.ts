import { sampleGrid, type Solid } from './solid.ts'
import type { Stage } from './stage.ts'

/** What a ray meets: filled in place, since a picture asks hundreds of thousands of times. */
export type Hit = {
  /** Along the ray, metres; Infinity: nothing. */
  t: number
  what: 'solid' | 'wall' | 'beyond' | 'floor' | 'sheet' | 'nothing'
  /** Index of the solid or sheet. */
  index: number
}

export function emptyHit(): Hit {
  return { t: Infinity, what: 'nothing', index: -1 }
}

/** How far behind the edges of a background the room goes on, metres. */
const BEYOND_M = 0.6
const MOST_STEPS = 140

/** Where a ray in own coordinates enters and leaves a solid's box, as far as `crossBox` last found. */
let enters = 0
let leaves = 0
/** Narrows [enters, leaves] to where p + d·t lies between a and b. No closures here: this runs for every ray. */
function crossSlab(p: number, d: number, a: number, b: number): boolean {
  if (d > -1e-12 && d < 1e-12) return p >= a && p <= b
  const inverse = 1 / d
  const first = (a - p) * inverse
  const second = (b - p) * inverse
  const near = first < second ? first : second
  const far = first < second ? second : first
  if (near > enters) enters = near
  if (far < leaves) leaves = far
  return enters <= leaves
}
function crossBox(solid: Solid, x: number, y: number, z: number, dx: number, dy: number, dz: number): boolean {
  enters = 0
  leaves = Infinity
  const { low, high } = solid
  return crossSlab(x, dx, low[0], high[0]) && crossSlab(y, dy, low[1], high[1]) && crossSlab(z, dz, low[2], high[2])
}

/** A point or direction of the world in a solid's own coordinates, into `own`. */
export const own = { x: 0, y: 0, z: 0 }
export function toOwn(solid: Solid, x: number, y: number, z: number): void {
  const r = solid.rows
  const px = x - solid.at[0]
  const py = y - solid.at[1]
  const pz = z - solid.at[2]
  own.x = r[0] * px + r[1] * py + r[2] * pz
  own.y = r[3] * px + r[4] * py + r[5] * pz
  own.z = r[6] * px + r[7] * py + r[8] * pz
}
export function turnToOwn(solid: Solid, x: number, y: number, z: number): void {
  const r = solid.rows
  own.x = r[0] * x + r[1] * y + r[2] * z
  own.y = r[3] * x + r[4] * y + r[5] * z
  own.z = r[6] * x + r[7] * y + r[8] * z
}
export function turnToWorld(solid: Solid, x: number, y: number, z: number): void {
  const r = solid.rows
  own.x = r[0] * x + r[3] * y + r[6] * z
  own.y = r[1] * x + r[4] * y + r[7] * z
  own.z = r[2] * x + r[5] * y + r[8] * z
}

/** Strides along the grid, then feels its way on the surface itself. Distance along the ray, or Infinity. */
function traceSolid(
  solid: Solid,
  ox: number,
  oy: number,
  oz: number,
  wx: number,
  wy: number,
  wz: number,
  most: number,
): number {
  toOwn(solid, ox, oy, oz)
  const x = own.x
  const y = own.y
  const z = own.z
  turnToOwn(solid, wx, wy, wz)
  const dx = own.x
  const dy = own.y
  const dz = own.z
  if (!crossBox(solid, x, y, z, dx, dy, dz)) return Infinity
  let t = enters
  const end = Math.min(leaves, most)
  const { grid, cellM, distance } = solid
  const near = cellM * 1.3
  for (let step = 0; step < MOST_STEPS && t < end; step++) {
    const px = x + dx * t
    const py = y + dy * t
    const pz = z + dz * t
    let d = sampleGrid(grid, px, py, pz)
    if (d < near) {
      d = distance(px, py, pz)
      if (d < 0.00025 + t * 0.00004) return t
      t += Math.max(d * 0.8, 0.0003)
    } else t += (d - cellM * 0.5) * 0.95
  }
  return Infinity
}

/** The first thing along a ray from o in the unit direction d. */
export function trace(
  stage: Stage,
  ox: number,
  oy: number,
  oz: number,
  dx: number,
  dy: number,
  dz: number,
  hit: Hit,
): void {
  hit.t = Infinity
  hit.what = 'nothing'
  hit.index = -1
  const { background } = stage.scene
  if (dz < -1e-9) {
    const t = (background.zM - oz) / dz
    const x = ox + dx * t
    const y = oy + dy * t
    if (t > 0 && Math.abs(x) <= background.widthM / 2 && y <= background.heightM) {
      hit.t = t
      hit.what = 'wall'
    } else {
      const far = (background.zM - BEYOND_M - oz) / dz
      if (far > 0) {
        hit.t = far
        hit.what = 'beyond'
      }
    }
  }
  if (dy < -1e-9) {
    const t = -oy / dy
    if (t > 0 && t < hit.t) {
      hit.t = t
      hit.what = 'floor'
    }
  }
  for (let index = 0; index < stage.sheets.length; index++) {
    const t = crossSheet(stage, index, ox, oy, oz, dx, dy, dz)
    if (t < hit.t) {
      hit.t = t
      hit.what = 'sheet'
      hit.index = index
    }
  }
  for (let index = 0; index < stage.solids.length; index++) {
    const solid = stage.solids[index]
    if (!solid) continue
    const t = traceSolid(solid, ox, oy, oz, dx, dy, dz, hit.t)
    if (t < hit.t) {
      hit.t = t
      hit.what = 'solid'
      hit.index = index
    }
  }
}

function crossSheet(
  stage: Stage,
  index: number,
  ox: number,
  oy: number,
  oz: number,
  dx: number,
  dy: number,
  dz: number,
): number {
  const sheet = stage.sheets[index]
  if (!sheet) return Infinity
  const towards = dx * sheet.normal[0] + dz * sheet.normal[2]
  if (towards > -1e-9 && towards < 1e-9) return Infinity
  const t = ((sheet.at[0] - ox) * sheet.normal[0] + (sheet.at[2] - oz) * sheet.normal[2]) / towards
  if (t < 1e-4) return Infinity
  const y = oy + dy * t - sheet.at[1]
  if (Math.abs(y) > sheet.heightM / 2) return Infinity
  const along = (ox + dx * t - sheet.at[0]) * sheet.along[0] + (oz + dz * t - sheet.at[2]) * sheet.along[2]
  return Math.abs(along) > sheet.widthM / 2 ? Infinity : t
}

/**
 * Whether something stands between a point and another one. Solids are felt on their grids only: as fine as the grid
 * is. `skipSheet` is the sheet that the second point lies on, or −1.
 */
export function isShaded(
  stage: Stage,
  px: number,
  py: number,
  pz: number,
  qx: number,
  qy: number,
  qz: number,
  skipSheet: number,
): boolean {
  let dx = qx - px
  let dy = qy - py
  let dz = qz - pz
  const length = Math.sqrt(dx * dx + dy * dy + dz * dz)
  if (length < 1e-6) return false
  dx /= length
  dy /= length
  dz /= length
  // Behind the background nothing lights what is before it.
  const { background } = stage.scene
  if (qz < background.zM && pz > background.zM) {
    const x = px + (dx / dz) * (background.zM - pz)
    const y = py + (dy / dz) * (background.zM - pz)
    if (Math.abs(x) <= background.widthM / 2 && y <= background.heightM) return true
  }
  for (let index = 0; index < stage.sheets.length; index++) {
    if (index !== skipSheet && crossSheet(stage, index, px, py, pz, dx, dy, dz) < length) return true
  }
  for (const solid of stage.solids) {
    toOwn(solid, px, py, pz)
    const x = own.x
    const y = own.y
    const z = own.z
    turnToOwn(solid, dx, dy, dz)
    const ux = own.x
    const uy = own.y
    const uz = own.z
    if (!crossBox(solid, x, y, z, ux, uy, uz)) continue
    const end = Math.min(leaves, length)
    const { grid, cellM } = solid
    const least = cellM * 0.4
    for (let t = enters, step = 0; t < end && step < 90; step++) {
      const d = sampleGrid(grid, x + ux * t, y + uy * t, z + uz * t)
      if (d < 0) return true
      t += d > least ? d : least
    }
  }
  return false
}

/** How open a point is to its surroundings, 0 … 1: distances felt along the normal (a common approximation). */
export function openness(stage: Stage, px: number, py: number, pz: number, nx: number, ny: number, nz: number): number {
  let closed = 0
  let weight = 0.55
  for (let i = 1; i <= 4; i++) {
    const reach = 0.018 * i * i
    const x = px + nx * reach
    const y = py + ny * reach
    const z = pz + nz * reach
    let d = Math.max(0, y)
    for (const solid of stage.solids) {
      toOwn(solid, x, y, z)
      const { low, high } = solid
      if (own.x < low[0] || own.y < low[1] || own.z < low[2] || own.x > high[0] || own.y > high[1] || own.z > high[2])
        continue
      const here = sampleGrid(solid.grid, own.x, own.y, own.z)
      if (here < d) d = here
    }
    const back = Math.max(0, z - stage.scene.background.zM)
    if (back < d) d = back
    if (d < reach) closed += (weight * (reach - d)) / reach
    weight *= 0.62
  }
  return Math.max(0.08, 1 - closed * 0.95)
}
