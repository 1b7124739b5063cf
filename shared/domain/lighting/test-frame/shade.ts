import { clamp, ease } from './field.ts'
import { emptySpot, floorSpot, type Spot, wallSpot } from './surface.ts'
import { beamShare, type Stage, type StagedEmitter } from './stage.ts'
import { isShaded } from './trace.ts'

/** What a spot sends to the lens, as reflectance × exposure: filled in place. */
export const sent = { r: 0, g: 0, b: 0 }

const DEG = 180 / Math.PI
/** Emitters that look smaller than this are sampled once. */
const POINT_SIZE = 0.02

/** Two directions across the way to a ball of light, so that it shows the same face everywhere. */
const across = { ux: 0, uy: 0, uz: 0, vx: 0, vy: 0, vz: 0 }
function facing(emitter: StagedEmitter, dx: number, dy: number, dz: number): void {
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
 * point: H = I(θ)·cos φ/d² from each, which on the axis of a disc gives d²/(d² + r²). `visible`: share of its face
 * that the spot sees.
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
  const share = beamShare(emitter, Math.acos(clamp(onAxis, -1, 1)) * DEG)
  if (share < 1e-6) return
  facing(emitter, cx / distance, cy / distance, cz / distance)
  const normal = ball ? 1 : Math.max(0.05, onAxis)
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
    const weight = leaving / normal / s2
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
  const r2 = emitter.areaM2 / Math.PI
  return (emitter.axisIntensity * beamShare(emitter, Math.acos(clamp(onAxis, -1, 1)) * DEG) * facingLight) / (s2 + r2)
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

/** Point `index` of an even sequence on a face, half sides (Roberts' R2). */
const onFace = { u: 0, v: 0 }
function facePoint(index: number, isRound: boolean): void {
  const a = (index * 0.7548776662466927 + 0.5) % 1
  const b = (index * 0.5698402909980532 + 0.5) % 1
  if (!isRound) {
    onFace.u = a * 2 - 1
    onFace.v = b * 2 - 1
    return
  }
  const r = Math.sqrt(a)
  const turn = b * 2 * Math.PI
  onFace.u = r * Math.cos(turn)
  onFace.v = r * Math.sin(turn)
}

/**
 * Share of an emitter's face that a spot sees, by `rays` rays beginning with number `first` of the sequence, every
 * `stride`th: neighbours take different ones, which are put together afterwards.
 */
export function visibleShare(
  stage: Stage,
  emitter: StagedEmitter,
  spot: Spot,
  rays: number,
  first: number,
  stride: number,
): number {
  const cx = emitter.at[0] - spot.x
  const cy = emitter.at[1] - spot.y
  const cz = emitter.at[2] - spot.z
  const distance = Math.sqrt(cx * cx + cy * cy + cz * cz)
  if (distance < 1e-4) return 0
  const size = Math.max(emitter.widthM, emitter.heightM)
  const slack = size / distance + Math.max(0.05, spot.wrapR)
  if ((spot.gx * cx + spot.gy * cy + spot.gz * cz) / distance < -slack) return 0
  if (emitter.shape !== 'ball' && emitter.axis[0] * cx + emitter.axis[1] * cy + emitter.axis[2] * cz >= 0) return 0
  const px = spot.x + spot.gx * spot.liftM
  const py = spot.y + spot.gy * spot.liftM
  const pz = spot.z + spot.gz * spot.liftM
  facing(emitter, cx / distance, cy / distance, cz / distance)
  const { ux, uy, uz, vx, vy, vz } = across
  const halfW = emitter.widthM / 2
  const halfH = emitter.heightM / 2
  const many = size / distance < POINT_SIZE ? 1 : rays
  let open = 0
  for (let ray = 0; ray < many; ray++) {
    facePoint(many === 1 ? 0 : first + ray * stride, emitter.shape !== 'rectangle')
    const u = many === 1 ? 0 : onFace.u * halfW
    const v = many === 1 ? 0 : onFace.v * halfH
    const qx = emitter.at[0] + ux * u + vx * v
    const qy = emitter.at[1] + uy * u + vy * v
    const qz = emitter.at[2] + uz * u + vz * v
    if (!isShaded(stage, px, py, pz, qx, qy, qz, -1)) open++
  }
  return open / many
}

/** What each sheet gives back of each light on its two sides, for every sheet: [front, back] exposures, lx·s. */
export function sheetExposures(stage: Stage): (readonly [number, number])[][] {
  return stage.sheets.map((sheet, index) =>
    stage.emitters.map((emitter): readonly [number, number] => {
      const [nx, , nz] = sheet.normal
      const side = (emitter.at[0] - sheet.at[0]) * nx + (emitter.at[2] - sheet.at[2]) * nz > 0 ? 1 : -1
      let sum = 0
      for (let i = 0; i < 9; i++) {
        const u = (((i % 3) - 1) / 3) * sheet.widthM
        const x = sheet.at[0] + sheet.along[0] * u
        const y = sheet.at[1] + ((Math.floor(i / 3) - 1) / 3) * sheet.heightM
        const z = sheet.at[2] + sheet.along[2] * u
        if (isShaded(stage, x, y, z, emitter.at[0], emitter.at[1], emitter.at[2], index)) continue
        sum += plainExposure(emitter, x, y, z, nx * side, 0, nz * side) / 9
      }
      return side > 0 ? [sum, 0] : [0, sum]
    }),
  )
}

/** How much of a matt sheet's light a spot gets: Σ cos·cos·dA/(π·s²) over its face; the sign tells the side. */
export function sheetFactor(stage: Stage, index: number, spot: Spot): number {
  const sheet = stage.sheets[index]
  if (!sheet) return 0
  const [nx, , nz] = sheet.normal
  const cells = 4
  const area = (sheet.widthM * sheet.heightM) / (cells * cells)
  let sum = 0
  for (let i = 0; i < cells * cells; i++) {
    const u = (((i % cells) + 0.5) / cells - 0.5) * sheet.widthM
    const v = ((Math.floor(i / cells) + 0.5) / cells - 0.5) * sheet.heightM
    const lx = sheet.at[0] + sheet.along[0] * u - spot.x
    const ly = sheet.at[1] + v - spot.y
    const lz = sheet.at[2] + sheet.along[2] * u - spot.z
    const s2 = lx * lx + ly * ly + lz * lz
    const facingSheet = spot.nx * lx + spot.ny * ly + spot.nz * lz
    if (facingSheet <= 0) continue
    const leaving = -(nx * lx + nz * lz)
    sum += (facingSheet * leaving * area) / (Math.PI * s2 * s2 + area * s2)
  }
  return sum
}

/** Share of a sheet that a spot sees. */
export function sheetVisible(
  stage: Stage,
  index: number,
  spot: Spot,
  rays: number,
  first: number,
  stride: number,
): number {
  const sheet = stage.sheets[index]
  if (!sheet) return 0
  const px = spot.x + spot.gx * spot.liftM
  const py = spot.y + spot.gy * spot.liftM
  const pz = spot.z + spot.gz * spot.liftM
  let open = 0
  for (let ray = 0; ray < rays; ray++) {
    facePoint(first + ray * stride, false)
    const u = (onFace.u * sheet.widthM) / 2
    const qx = sheet.at[0] + sheet.along[0] * u
    const qy = sheet.at[1] + (onFace.v * sheet.heightM) / 2
    const qz = sheet.at[2] + sheet.along[2] * u
    if (!isShaded(stage, px, py, pz, qx, qy, qz, index)) open++
  }
  return open / rays
}
