/**
 * Building blocks of signed-distance fields, metres: negative inside. Plain numbers in and out, since a picture asks
 * millions of times. Ellipsoids and tapered capsules are close bounds, not exact distances; tracing allows for it.
 */

/** A solid by its distance function. */
export type Field = (x: number, y: number, z: number) => number

export function sphere(x: number, y: number, z: number, r: number): number {
  return Math.sqrt(x * x + y * y + z * z) - r
}

/** Ellipsoid about the origin with half axes a, b, c. */
export function ellipsoid(x: number, y: number, z: number, a: number, b: number, c: number): number {
  const u = x / a
  const v = y / b
  const w = z / c
  const k0 = Math.sqrt(u * u + v * v + w * w)
  const p = u / a
  const q = v / b
  const r = w / c
  const k1 = Math.sqrt(p * p + q * q + r * r)
  return k1 < 1e-9 ? -Math.min(a, b, c) : (k0 * (k0 - 1)) / k1
}

/** Capsule from a to b with radii ra and rb. */
export function capsule(
  x: number,
  y: number,
  z: number,
  ax: number,
  ay: number,
  az: number,
  bx: number,
  by: number,
  bz: number,
  ra: number,
  rb: number,
): number {
  const px = x - ax
  const py = y - ay
  const pz = z - az
  const dx = bx - ax
  const dy = by - ay
  const dz = bz - az
  let t = (px * dx + py * dy + pz * dz) / (dx * dx + dy * dy + dz * dz)
  t = t < 0 ? 0 : t > 1 ? 1 : t
  const qx = px - dx * t
  const qy = py - dy * t
  const qz = pz - dz * t
  return Math.sqrt(qx * qx + qy * qy + qz * qz) - (ra + (rb - ra) * t)
}

/** Box about the origin with half sides a, b, c and rounded edges. */
export function roundBox(x: number, y: number, z: number, a: number, b: number, c: number, round: number): number {
  const u = Math.abs(x) - a + round
  const v = Math.abs(y) - b + round
  const w = Math.abs(z) - c + round
  const mu = u > 0 ? u : 0
  const mv = v > 0 ? v : 0
  const mw = w > 0 ? w : 0
  return Math.sqrt(mu * mu + mv * mv + mw * mw) + Math.min(Math.max(u, v, w), 0) - round
}

/** Upright cylinder about the origin, half height h, with rounded edges. */
export function cylinder(x: number, y: number, z: number, r: number, h: number, round: number): number {
  const u = Math.sqrt(x * x + z * z) - r + round
  const v = Math.abs(y) - h + round
  const mu = u > 0 ? u : 0
  const mv = v > 0 ? v : 0
  return Math.sqrt(mu * mu + mv * mv) + Math.min(Math.max(u, v), 0) - round
}

/** Ring about the upright axis, of radius R and thickness r. */
export function ring(x: number, y: number, z: number, R: number, r: number): number {
  const u = Math.sqrt(x * x + z * z) - R
  return Math.sqrt(u * u + y * y) - r
}

/** Union whose seam is rounded over k. */
export function smoothMin(a: number, b: number, k: number): number {
  const d = a - b
  const h = k - (d < 0 ? -d : d)
  const m = a < b ? a : b
  return h > 0 ? m - (h * h) / (4 * k) : m
}

/** Intersection whose edge is rounded over k. */
export function smoothMax(a: number, b: number, k: number): number {
  return -smoothMin(-a, -b, k)
}

export function clamp(value: number, low: number, high: number): number {
  return value < low ? low : value > high ? high : value
}

/** 0 below `from`, 1 above `to`, a smooth step between. */
export function ease(from: number, to: number, value: number): number {
  const t = clamp((value - from) / (to - from), 0, 1)
  return t * t * (3 - 2 * t)
}

/** An even number in [0, 1) from three whole ones: the same for ever. */
export function hash3(x: number, y: number, z: number): number {
  let h = Math.imul(x, 0x27d4eb2d) ^ Math.imul(y, 0x165667b1) ^ Math.imul(z, 0x9e3779b1)
  h = Math.imul(h ^ (h >>> 15), 0x85ebca6b)
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35)
  return ((h ^ (h >>> 16)) >>> 0) / 4294967296
}

/** Smooth noise in [−1, 1] with features of size 1. */
export function noise(x: number, y: number, z: number): number {
  const ix = Math.floor(x)
  const iy = Math.floor(y)
  const iz = Math.floor(z)
  const fx = x - ix
  const fy = y - iy
  const fz = z - iz
  const ux = fx * fx * (3 - 2 * fx)
  const uy = fy * fy * (3 - 2 * fy)
  const uz = fz * fz * (3 - 2 * fz)
  const x00 = hash3(ix, iy, iz) + (hash3(ix + 1, iy, iz) - hash3(ix, iy, iz)) * ux
  const x10 = hash3(ix, iy + 1, iz) + (hash3(ix + 1, iy + 1, iz) - hash3(ix, iy + 1, iz)) * ux
  const x01 = hash3(ix, iy, iz + 1) + (hash3(ix + 1, iy, iz + 1) - hash3(ix, iy, iz + 1)) * ux
  const x11 = hash3(ix, iy + 1, iz + 1) + (hash3(ix + 1, iy + 1, iz + 1) - hash3(ix, iy + 1, iz + 1)) * ux
  const y0 = x00 + (x10 - x00) * uy
  const y1 = x01 + (x11 - x01) * uy
  return (y0 + (y1 - y0) * uz) * 2 - 1
}

/** Noise of several sizes, each half the last and half as strong. About in [−1, 1]. */
export function layeredNoise(x: number, y: number, z: number, layers: number): number {
  let sum = 0
  let weight = 0.5
  let scale = 1
  for (let i = 0; i < layers; i++) {
    sum += weight * noise(x * scale + i * 17.3, y * scale - i * 9.1, z * scale + i * 4.7)
    weight *= 0.5
    scale *= 2.03
  }
  return sum
}
