import {
  capsule,
  clamp,
  cylinder,
  ease,
  ellipsoid,
  hash3,
  layeredNoise,
  noise,
  ring,
  roundBox,
  smoothMax,
  smoothMin,
} from './field.ts'

/**
 * A clothed body, metres: origin between the eyes as for the head, x to its left hand, z forward, the ground at
 * −eyeHeight. Measures are those of a grown-up (from memory), scaled by the eye height for a standing figure.
 */
export type Pose = 'standing' | 'seated'
export type Cut = 'jumper' | 'shirt' | 'coat' | 'dress' | 'cape'

export type BodyShape = {
  cloth: (x: number, y: number, z: number) => number
  /** Hands, and what an open neck shows. */
  skin: (x: number, y: number, z: number) => number
  /** Trousers, shoes, the stool of somebody seated. */
  under: (x: number, y: number, z: number) => number
  /** Linen under an open coat. */
  linen: (x: number, y: number, z: number) => number
  /** Buttons and clasps of metal. */
  metal: (x: number, y: number, z: number) => number
}

const NONE = 1
/** The trunk was shaped this much too low under its head, metres. */
const RISE_M = 0.024

type Limb = { elbow: readonly [number, number, number]; wrist: readonly [number, number, number] }

/** Arms behind the back when standing, hands in the lap when seated. */
function armOf(pose: Pose): Limb {
  return pose === 'standing'
    ? { elbow: [0.212, -0.54, -0.055], wrist: [0.095, -0.75, -0.12] }
    : { elbow: [0.238, -0.52, 0.01], wrist: [0.085, -0.655, 0.235] }
}

/** A band about the neck: radius R, thickness r, half height h. */
function capsuleRing(x: number, y: number, z: number, R: number, r: number, h: number): number {
  const u = Math.sqrt(x * x + z * z) - R
  const v = Math.max(0, Math.abs(y) - h)
  return Math.sqrt(u * u + v * v) - r
}

export function makeBody(seed: number, cut: Cut, pose: Pose, eyeHeightM: number): BodyShape {
  const scale = pose === 'standing' ? clamp(eyeHeightM / 1.55, 0.55, 1.2) : 1
  const ground = -eyeHeightM / scale - RISE_M
  const { elbow, wrist } = armOf(pose)
  const slim = 0.006 * (hash3(seed, 21, 5) * 2 - 1)
  const phase = hash3(seed, 22, 5) * 40

  const trunk = (x: number, y: number, z: number, grow: number) => {
    const ax = Math.abs(x)
    let d = ellipsoid(x, y + 0.41, z + 0.005, 0.15 + grow - slim, 0.185 + grow, 0.112 + grow)
    d = smoothMin(d, capsule(ax, y, z, 0, -0.28, -0.024, 0.14, -0.296, -0.026, 0.056 + grow, 0.05 + grow), 0.06)
    d = smoothMin(d, capsule(ax, y, z, 0, -0.185, -0.03, 0.095, -0.272, -0.028, 0.047 + grow, 0.044 + grow), 0.06)
    d = smoothMin(d, ellipsoid(x, y + 0.61, z, 0.133 + grow - slim, 0.19 + grow, 0.098 + grow), 0.07)
    d = smoothMin(d, ellipsoid(x, y + 0.77, z + 0.005, 0.158 + grow, 0.14 + grow, 0.112 + grow), 0.07)
    return d
  }
  const arms = (x: number, y: number, z: number, grow: number) => {
    const ax = Math.abs(x)
    const upper = capsule(ax, y, z, 0.163, -0.3, -0.024, elbow[0], elbow[1], elbow[2], 0.051 + grow, 0.042 + grow)
    const lower = capsule(
      ax,
      y,
      z,
      elbow[0],
      elbow[1],
      elbow[2],
      wrist[0],
      wrist[1],
      wrist[2],
      0.042 + grow,
      0.031 + grow,
    )
    return smoothMin(upper, lower, 0.02)
  }
  const legs = (x: number, y: number, z: number, grow: number) => {
    const ax = Math.abs(x)
    if (pose === 'seated') {
      const thigh = capsule(ax, y, z, 0.09, -0.8, 0, 0.105, -0.75, 0.4, 0.085 + grow, 0.062 + grow)
      const shin = capsule(ax, y, z, 0.105, -0.75, 0.4, 0.1, ground + 0.07, 0.38, 0.06 + grow, 0.045 + grow)
      return smoothMin(thigh, shin, 0.03)
    }
    const knee = (-0.83 + ground) / 2 + 0.02
    const thigh = capsule(ax, y, z, 0.088, -0.82, 0, 0.092, knee, 0.012, 0.086 + grow, 0.06 + grow)
    const shin = capsule(ax, y, z, 0.092, knee, 0.012, 0.095, ground + 0.07, -0.01, 0.06 + grow, 0.043 + grow)
    return smoothMin(thigh, shin, 0.03)
  }
  /** Folds that run round bent limbs and fall from where cloth hangs. */
  const folds = (x: number, y: number, z: number, size: number) =>
    size *
    (layeredNoise(x * 9 + phase, y * 22 + x * 6, z * 9, 2) +
      0.6 * Math.abs(noise(x * 16 + phase, y * 34 - x * 22, z * 14)) -
      0.25)

  const collar = (x: number, y: number, z: number) => {
    // A tube of knitting, turned over: two soft rings about the neck.
    const cy = y + 0.158 - z * 0.16
    const cz = z + 0.022
    const inner = Math.sqrt(x * x + cz * cz) - 0.0655
    const tube = smoothMax(Math.abs(inner) - 0.0075, Math.abs(cy) - 0.034, 0.012)
    return smoothMin(tube, ring(x, cy + 0.026, cz, 0.0725, 0.0125), 0.012)
  }

  /** The foot of the neck, where it meets the trunk. */
  const throat = (x: number, y: number, z: number, grow: number) =>
    capsule(x, y, z, 0, -0.15, -0.022, 0, -0.25, -0.03, 0.049 + grow, 0.06 + grow)
  const skin = (x: number, y: number, z: number) => {
    const bare =
      cut === 'jumper' || cut === 'cape' || y < -0.62
        ? NONE
        : smoothMin(smoothMin(trunk(x, y, z, -0.004), arms(x, y, z, -0.006), 0.03), throat(x, y, z, 0), 0.05)
    if (pose === 'standing') return bare
    return Math.min(bare, foldedHands(x, y, z))
  }
  const foldedHands = (x: number, y: number, z: number) => {
    const ax = Math.abs(x)
    // One on the other: palms and slightly bent fingers.
    let d = ellipsoid(ax - 0.052, y + 0.672, z - 0.272, 0.036, 0.017, 0.042)
    for (let i = 0; i < 4; i++) {
      const fx = 0.028 + i * 0.016
      d = smoothMin(
        d,
        capsule(ax, y, z, fx + 0.01, -0.67, 0.3, fx - 0.006, -0.684, 0.345 - i * 0.006, 0.0088, 0.0068),
        0.006,
      )
    }
    d = smoothMin(d, capsule(ax, y, z, 0.03, -0.662, 0.268, 0.008, -0.66, 0.305, 0.0105, 0.008), 0.01)
    return smoothMin(d, capsule(ax, y, z, wrist[0], wrist[1], wrist[2], 0.06, -0.668, 0.262, 0.025, 0.022), 0.014)
  }

  const under = (x: number, y: number, z: number) => {
    const ax = Math.abs(x)
    let d = NONE
    if (cut !== 'dress') d = legs(x, y, z, 0.008) - 0.3 * folds(x, y, z, 0.008)
    const toe = pose === 'seated' ? 0.46 : 0.07
    const heel = pose === 'seated' ? 0.36 : -0.04
    d = Math.min(
      d,
      smoothMax(
        capsule(ax, y, z, 0.1, ground + 0.05, heel, 0.115, ground + 0.03, toe + 0.06, 0.045, 0.034),
        ground + 0.004 - y,
        0.01,
      ),
    )
    if (pose === 'seated') d = Math.min(d, roundBox(x, y + 0.885, z - 0.06, 0.2, 0.022, 0.2, 0.015))
    return d
  }

  const plainTop = (x: number, y: number, z: number, grow: number, hem: number, fold: number) => {
    const base = smoothMin(trunk(x, y, z, grow), arms(x, y, z, grow), 0.028)
    return smoothMax(base - folds(x, y, z, fold), hem - y, 0.012)
  }

  const openNeck = (d: number, x: number, y: number, z: number, r: number, low: number) =>
    smoothMax(d, -ellipsoid(x, y + low, z - 0.0, r, 0.075, r * 1.15), 0.008)

  let cloth: BodyShape['cloth']
  let metal: BodyShape['metal'] = () => NONE
  let linen: BodyShape['linen'] = () => NONE
  switch (cut) {
    case 'jumper':
      cloth = (x, y, z) => {
        const top = plainTop(x, y, z, 0.016, pose === 'seated' ? -0.86 : -0.815, 0.006)
        const band = smoothMax(trunk(x, y, z, 0.017), Math.abs(y + 0.8) - 0.03, 0.012)
        return smoothMin(smoothMin(top, band, 0.012), collar(x, y, z), 0.014)
      }
      break
    case 'shirt':
      cloth = (x, y, z) => {
        const top = openNeck(plainTop(x, y, z, 0.011, -0.83, 0.0065), x, y, z, 0.06, 0.165)
        // A stand about the neck and two points that fall on the chest.
        const cy = y + 0.19 - z * 0.22
        const stand = smoothMax(
          Math.abs(Math.sqrt(x * x + (z + 0.022) ** 2) - 0.0635) - 0.0035,
          Math.abs(cy) - 0.02,
          0.006,
        )
        const ax = Math.abs(x)
        const wing = smoothMax(
          Math.abs(Math.sqrt(x * x + (z + 0.022) ** 2) - 0.0665 - clamp(-cy, -0.01, 0.08) * 0.42) - 0.003,
          Math.max(cy - 0.02, -cy - 0.05 * ease(0.085, 0.03, ax) * ease(0, 0.05, z) - 0.012),
          0.006,
        )
        const slit = z > 0 ? ax - 0.006 - clamp(-y - 0.18, 0, 0.03) * 0.2 : 1
        const parts = smoothMax(smoothMin(stand, wing, 0.004), -slit, 0.004)
        const placket = smoothMax(top - 0.0025, Math.max(ax - 0.016, -z), 0.004)
        return Math.min(smoothMin(top, parts, 0.006), z > 0.02 ? placket : 1)
      }
      break
    case 'coat': {
      const low = pose === 'seated' ? -0.95 : Math.max(-1.14, ground + 0.25)
      cloth = (x, y, z) => {
        const ax = Math.abs(x)
        let base = smoothMin(trunk(x, y, z, 0.026), arms(x, y, z, 0.02), 0.03)
        // Skirts of the coat.
        const t = clamp((-0.72 - y) / 0.45, 0, 1)
        const angle = Math.atan2(x, z)
        const wave = 0.012 * t * Math.sin(angle * 7 + phase + 2 * noise(x * 4, y * 3, z * 4))
        const skirt = (Math.hypot(x / (0.186 + 0.075 * t), z / (0.138 + 0.07 * t)) - 1) * 0.15 - wave
        base = smoothMin(base, smoothMax(skirt, y + 0.66, 0.1), 0.03)
        base = smoothMax(base - folds(x, y, z, 0.007), low - y, 0.012)
        // Open at the breast, with lapels that turn back along the opening.
        const edge = 0.008 + clamp(y + 0.5, 0, 0.4) * 0.3
        const opening = z > 0 ? Math.max(ax - edge, -0.48 - y) : 1
        const open = smoothMax(base, -opening, 0.005)
        const lapelOut = edge + 0.05 * ease(-0.5, -0.34, y) * (1 - ease(-0.24, -0.19, y) * 0.4)
        const lapel = z > 0 ? Math.max(base - 0.011, Math.max(edge - ax, ax - lapelOut), -0.49 - y) * 0.9 : 1
        // The collar stands behind and beside the neck, rising to the back.
        const turned = capsuleRing(x, y + 0.212 + (z + 0.03) * 0.42, z + 0.03, 0.079, 0.011, 0.024)
        const collar = smoothMax(turned, z - 0.03 - 0.35 * clamp(-y - 0.2, 0, 0.1), 0.012)
        return smoothMin(smoothMin(open, lapel, 0.004), collar, 0.014)
      }
      linen = (x, y, z) => {
        // A shirt with a stand, and a stock wound twice and tied.
        const shirt = smoothMin(trunk(x, y, z, 0.004), throat(x, y, z, 0.006), 0.05)
        const cy = y + 0.172 - z * 0.2
        const wound = smoothMin(
          ring(x, cy, z + 0.022, 0.058, 0.013),
          ring(x, cy + 0.022, z + 0.022, 0.062, 0.013),
          0.006,
        )
        const knot = ellipsoid(x, cy + 0.012, z - 0.05, 0.024, 0.017, 0.014)
        const front = z > 0 ? Math.max(shirt - 0.0022, Math.abs(x) - 0.016) : NONE
        return smoothMin(smoothMin(Math.min(shirt, front), wound, 0.012), knot, 0.005)
      }
      metal = (x, y, z) => {
        let d = NONE
        for (let i = 0; i < 4; i++) {
          const by = -0.5 - i * 0.085
          d = Math.min(
            d,
            ellipsoid(Math.abs(x) - 0.062, y - by, z - 0.135 + 0.012 * i * (i < 2 ? 1 : 0.6), 0.0115, 0.0115, 0.006),
          )
        }
        return d
      }
      break
    }
    case 'dress': {
      const hem = ground + 0.035
      cloth = (x, y, z) => {
        const top = openNeck(plainTop(x, y, z, 0.008, -0.62, 0.004), x, y, z, 0.085, 0.205)
        const t = clamp((-0.56 - y) / (-0.56 - hem), 0, 1)
        const angle = Math.atan2(x, z)
        const drift = 1.6 * noise(x * 3 + phase, y * 2.2, z * 3)
        const pleat =
          (0.004 + 0.034 * t) * (Math.sin(angle * 11 + phase + drift) + 0.45 * Math.sin(angle * 23 + 2 * drift))
        const front = pose === 'seated' ? 0.24 * ease(0.05, 0.5, t) : 0
        const rx = 0.142 + 0.26 * Math.pow(t, 0.8)
        const rz = 0.104 + 0.24 * Math.pow(t, 0.8) + front
        const skirt = (Math.hypot(x / rx, (z - front * 0.7) / rz) - 1) * (0.11 + 0.16 * t) - pleat * 0.8
        const closed = smoothMax(smoothMax(skirt, y + 0.55, 0.02), hem - y, 0.015)
        const sash = smoothMax(trunk(x, y, z, 0.016), Math.abs(y + 0.565) - 0.026, 0.01)
        return smoothMin(smoothMin(top, closed, 0.02), sash, 0.006) * 0.85
      }
      break
    }
    case 'cape': {
      const hem = pose === 'seated' ? -0.9 : -1.02
      cloth = (x, y, z) => {
        const t = clamp((-0.24 - y) / (-0.24 - hem), 0, 1)
        const angle = Math.atan2(x, z + 0.02)
        const drift = 1.8 * noise(x * 3 + phase, y * 2, z * 3)
        const pleat =
          (0.003 + 0.022 * t) * (Math.sin(angle * 9 + phase + drift) + 0.4 * Math.sin(angle * 19 + 2 * drift))
        const rx = 0.205 + 0.12 * Math.pow(t, 0.7)
        const rz = 0.13 + 0.13 * Math.pow(t, 0.7)
        const wall = (Math.hypot(x / rx, (z + 0.02) / rz) - 1) * 0.15 - pleat
        const shoulders = smoothMin(trunk(x, y, z, 0.022), arms(x, y, z, 0.018), 0.05)
        let d = smoothMin(shoulders, smoothMax(wall, y + 0.27, 0.06), 0.06)
        d = smoothMax(d, hem - y, 0.012)
        const slit = z > 0 ? Math.abs(x - 0.012 * noise(4, y * 6, phase)) - 0.002 - 0.06 * t * t : 1
        d = smoothMax(d, -Math.max(slit, y + 0.235, 0.05 - z), 0.012)
        return smoothMin(d, collar(x, y + 0.012, z), 0.016) * 0.9
      }
      metal = (x, y, z) => cylinder(x, z - 0.105, y + 0.232, 0.021, 0.006, 0.003)
      break
    }
  }
  const placed = (field: BodyShape['cloth']) => (x: number, y: number, z: number) =>
    field(x / scale, y / scale - RISE_M, z / scale) * scale
  return { cloth: placed(cloth), skin: placed(skin), under: placed(under), linen: placed(linen), metal: placed(metal) }
}
