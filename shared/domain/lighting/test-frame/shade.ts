import { clamp, ease } from './field.ts'
import { floorSpot, wallSpot } from './room-surface.ts'
import { emptySpot, type Spot } from './spot.ts'
import type { Stage, StagedEmitter } from './stage.ts'

/** What a spot sends to the lens, as reflectance × exposure: filled in place. */
export const sent = { r: 0, g: 0, b: 0 }

const DEG = 180 / Math.PI
/** Two directions across the way to a ball of light, so that it shows the same face everywhere. */
export const across = { ux: 0, uy: 0, uz: 0, vx: 0, vy: 0, vz: 0 }
export function facing(emitter: StagedEmitter, dx: number, dy: number, dz: number): void {
  if (emitter.shape !== 'ball') {
    across.ux = emitter.side[0]
    across.uy = emitter.side[1]
    across.uz = emitter.side[2]
    across.vx = emitter.up[0]
    across.vy = emitter.up[1]
    across.vz = emitter.up[2]
    return
  }
  const flat = Math.sqrt(dx * dx + dz * dz) || 1e-9
  across.ux = -dz / flat
  across.uy = 0
  across.uz = dx / flat
  across.vx = across.uy * dz - across.uz * dy
  across.vy = across.uz * dx - across.ux * dz
  across.vz = across.ux * dy - across.uy * dx
}

/**
 * Adds one light's exposure of a spot, sent towards the eye at v (unit, from the spot). The face is taken point by
 * point: H = I(θ)·cos φ/d² from each, which on the axis of a disc gives d²/(d² + r²), and of a ball as much as from its
 * middle. `visible`: share of its face that the spot sees.
 */
export function addEmitter(
  emitter: StagedEmitter,
  spot: Spot,
  vx: number,
  vy: number,
  vz: number,
  visible: number,
): void {
  if (visible <= 0) return
  const cx = emitter.at[0] - spot.x
  const cy = emitter.at[1] - spot.y
  const cz = emitter.at[2] - spot.z
  const distance = Math.sqrt(cx * cx + cy * cy + cz * cz)
  if (distance < 1e-4) return
  const ball = emitter.shape === 'ball'
  const [ax, ay, az] = emitter.axis
  const onAxis = -(ax * cx + ay * cy + az * cz) / distance
  if (onAxis <= 0 && !ball) return
  const share = emitter.profile.shareAt(Math.acos(clamp(onAxis, -1, 1)) * DEG)
  if (share < 1e-6) return
  facing(emitter, cx / distance, cy / distance, cz / distance)
  const normal = Math.max(0.05, onAxis)
  const ballShare = 1 / distance ** 3
  const halfW = emitter.widthM / 2
  const halfH = emitter.heightM / 2
  const { nx, ny, nz, wrapR, wrapG, wrapB } = spot
  const isWrapped = wrapR > 0
  const viewing = Math.max(0.02, nx * vx + ny * vy + nz * vz)
  const alpha = Math.max(0.02, spot.rough * spot.rough)
  const alpha2 = alpha * alpha
  const isGlossy = spot.mirror > 0 && spot.rough >= 0.12
  let dr = 0
  let dg = 0
  let db = 0
  let gloss = 0
  let strands = 0
  let strandsDeep = 0
  let lambert = 0
  for (const [pu, pv] of emitter.points) {
    const ou = pu * halfW
    const ov = pv * halfH
    const lx0 = cx + across.ux * ou + across.vx * ov
    const ly0 = cy + across.uy * ou + across.vy * ov
    const lz0 = cz + across.uz * ou + across.vz * ov
    const s2 = lx0 * lx0 + ly0 * ly0 + lz0 * lz0
    const inverse = 1 / Math.sqrt(s2)
    const lx = lx0 * inverse
    const ly = ly0 * inverse
    const lz = lz0 * inverse
    const leaving = ball ? 1 : -(ax * lx + ay * ly + az * lz)
    if (leaving <= 0) continue
    const weight = ball ? s2 * inverse * ballShare : leaving / normal / s2
    const facingLight = nx * lx + ny * ly + nz * lz
    if (isWrapped) {
      const wr = (facingLight + wrapR) / (1 + wrapR)
      const wg = (facingLight + wrapG) / (1 + wrapG)
      const wb = (facingLight + wrapB) / (1 + wrapB)
      if (wr > 0) dr += weight * wr
      if (wg > 0) dg += weight * wg
      if (wb > 0) db += weight * wb
    } else if (facingLight > 0) dr += weight * facingLight
    if (facingLight <= 0) continue
    lambert += weight * facingLight
    if (isGlossy || spot.hair > 0) {
      let hx = lx + vx
      let hy = ly + vy
      let hz = lz + vz
      const hl = 1 / Math.sqrt(hx * hx + hy * hy + hz * hz)
      hx *= hl
      hy *= hl
      hz *= hl
      if (spot.hair > 0) {
        const th = spot.tx * hx + spot.ty * hy + spot.tz * hz
        const first = Math.sqrt(Math.max(0, 1 - (th - 0.06) * (th - 0.06)))
        const second = Math.sqrt(Math.max(0, 1 - (th + 0.1) * (th + 0.1)))
        const lit = weight * Math.sqrt(facingLight)
        strands += lit * first ** 90
        strandsDeep += lit * second ** 18
      } else {
        const nh = nx * hx + ny * hy + nz * hz
        const vh = vx * hx + vy * hy + vz * hz
        const base = nh * nh * (alpha2 - 1) + 1
        const spread = alpha2 / (Math.PI * base * base)
        const k = alpha / 2
        const hiding = 1 / ((facingLight * (1 - k) + k) * (viewing * (1 - k) + k) * 4)
        const fresnel = spot.mirror + (1 - spot.mirror) * (1 - vh) ** 5
        gloss += weight * facingLight * Math.PI * spread * hiding * fresnel
      }
    }
  }
  const k = (emitter.axisIntensity * share * visible) / emitter.points.length
  if (isWrapped) {
    sent.r += spot.r * dr * k
    sent.g += spot.g * dg * k
    sent.b += spot.b * db * k
  } else {
    sent.r += spot.r * dr * k
    sent.g += spot.g * dr * k
    sent.b += spot.b * dr * k
  }
  if (spot.bloom > 0) {
    const rim = spot.bloom * (1 - viewing) ** 2.5 * lambert * k
    sent.r += rim * (0.5 * spot.r + 0.12)
    sent.g += rim * (0.5 * spot.g + 0.12)
    sent.b += rim * (0.5 * spot.b + 0.12)
  }
  if (strandsDeep > 0) {
    const white = strands * k * spot.hair * 0.11
    const deep = strandsDeep * k * spot.hair * 0.55
    sent.r += white + deep * (spot.r + 0.01)
    sent.g += white + deep * (spot.g + 0.008)
    sent.b += white + deep * (spot.b + 0.006)
  }
  if (gloss > 0) {
    const shine = gloss * k
    if (spot.isTinted) {
      sent.r += shine * Math.min(1, spot.r * 4)
      sent.g += shine * Math.min(1, spot.g * 4)
      sent.b += shine * Math.min(1, spot.b * 4)
    } else {
      sent.r += shine
      sent.g += shine
      sent.b += shine
    }
  }
  if (spot.mirror > 0 && !isGlossy) addFaceMirrored(emitter, spot, vx, vy, vz, share * visible)
}

/** The face itself, seen in something smooth such as an eye: the catchlight, in its true shape. */
function addFaceMirrored(emitter: StagedEmitter, spot: Spot, vx: number, vy: number, vz: number, share: number): void {
  const nv = spot.nx * vx + spot.ny * vy + spot.nz * vz
  if (nv <= 0) return
  const rx = 2 * nv * spot.nx - vx
  const ry = 2 * nv * spot.ny - vy
  const rz = 2 * nv * spot.nz - vz
  const cx = emitter.at[0] - spot.x
  const cy = emitter.at[1] - spot.y
  const cz = emitter.at[2] - spot.z
  const ball = emitter.shape === 'ball'
  const distance = Math.sqrt(cx * cx + cy * cy + cz * cz)
  const px = ball ? cx / distance : -emitter.axis[0]
  const py = ball ? cy / distance : -emitter.axis[1]
  const pz = ball ? cz / distance : -emitter.axis[2]
  const towards = rx * px + ry * py + rz * pz
  if (towards <= 0.02) return
  const t = (cx * px + cy * py + cz * pz) / towards
  if (t <= 0) return
  const qx = rx * t - cx
  const qy = ry * t - cy
  const qz = rz * t - cz
  facing(emitter, cx / distance, cy / distance, cz / distance)
  // A bare head is too small to be seen mirrored in a tiny eye: it shows at least as a point.
  const least = distance * 0.03
  const halfW = Math.max(least, emitter.widthM / 2)
  const halfH = Math.max(least, emitter.heightM / 2)
  const u = (qx * across.ux + qy * across.uy + qz * across.uz) / halfW
  const v = (qx * across.vx + qy * across.vy + qz * across.vz) / halfH
  const out = emitter.shape === 'rectangle' ? Math.max(Math.abs(u), Math.abs(v)) : Math.sqrt(u * u + v * v)
  const inside = ease(1.06, 0.94, out)
  if (inside <= 0) return
  const fresnel = spot.mirror + (1 - spot.mirror) * (1 - nv) ** 5
  const luminance = (emitter.axisIntensity * share) / Math.max(emitter.areaM2, halfW * halfH * Math.PI)
  const shine = Math.PI * luminance * fresnel * inside
  sent.r += shine
  sent.g += shine
  sent.b += shine
}

/** What a light gives to a spot facing the normal (unit), without anything in between: lx·s at full power. */
export function plainExposure(
  emitter: StagedEmitter,
  x: number,
  y: number,
  z: number,
  nx: number,
  ny: number,
  nz: number,
): number {
  const cx = emitter.at[0] - x
  const cy = emitter.at[1] - y
  const cz = emitter.at[2] - z
  const s2 = cx * cx + cy * cy + cz * cz
  const distance = Math.sqrt(s2)
  if (distance < 1e-4) return 0
  const facingLight = (nx * cx + ny * cy + nz * cz) / distance
  if (facingLight <= 0) return 0
  const onAxis = -(emitter.axis[0] * cx + emitter.axis[1] * cy + emitter.axis[2] * cz) / distance
  if (onAxis <= 0 && emitter.shape !== 'ball') return 0
  const r2 = emitter.shape === 'ball' ? 0 : emitter.areaM2 / Math.PI
  return (
    (emitter.axisIntensity * emitter.profile.shareAt(Math.acos(clamp(onAxis, -1, 1)) * DEG) * facingLight) / (s2 + r2)
  )
}

const mirrored = emptySpot()

/** What metal mirrors of the wall, the floor and the room, lit by one light. */
export function addMirroredRoom(
  stage: Stage,
  emitter: StagedEmitter,
  spot: Spot,
  vx: number,
  vy: number,
  vz: number,
): void {
  const nv = spot.nx * vx + spot.ny * vy + spot.nz * vz
  if (nv <= 0) return
  const rx = 2 * nv * spot.nx - vx
  const ry = 2 * nv * spot.ny - vy
  const rz = 2 * nv * spot.nz - vz
  const { background } = stage.scene
  let light = roomExposure(stage, emitter) * 0.35
  let r = 1
  let g = 1
  let b = 1
  const toFloor = ry < -1e-3 ? -spot.y / ry : Infinity
  const toWall = rz < -1e-3 ? (background.zM - spot.z) / rz : Infinity
  const t = Math.min(toFloor, toWall)
  if (t < 30 && t > 0) {
    mirrored.x = spot.x + rx * t
    mirrored.y = spot.y + ry * t
    mirrored.z = spot.z + rz * t
    const isFloor = toFloor < toWall
    if (isFloor) floorSpot(stage, mirrored, 0.5)
    else wallSpot(stage, mirrored, 0.5, Math.abs(mirrored.x) > background.widthM / 2 || mirrored.y > background.heightM)
    light += plainExposure(emitter, mirrored.x, mirrored.y, mirrored.z, 0, isFloor ? 1 : 0, isFloor ? 0 : 1)
    r = mirrored.r
    g = mirrored.g
    b = mirrored.b
  }
  const fresnel = spot.mirror + (1 - spot.mirror) * (1 - nv) ** 5
  sent.r += light * r * fresnel * Math.min(1, spot.r * 4)
  sent.g += light * g * fresnel * Math.min(1, spot.g * 4)
  sent.b += light * b * fresnel * Math.min(1, spot.b * 4)
}

/** What the whole room gives back of a light, everywhere alike: flux·ρ/(surface·(1 − ρ)), the law of the sphere. */
export function roomExposure(stage: Stage, emitter: StagedEmitter): number {
  const { areaM2, reflectance } = stage.scene.room
  return (emitter.flux * reflectance) / (areaM2 * (1 - reflectance))
}
