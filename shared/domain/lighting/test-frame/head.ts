import { capsule, clamp, ease, ellipsoid, hash3, layeredNoise, noise, smoothMax, smoothMin, sphere } from './field.ts'

/**
 * A head, metres: y up from the eye line, z forward from the ears' axis, x to its left hand. Measures are those of a
 * grown-up (from memory); small ones vary with the seed so that two people do not look alike.
 */
export type HairStyle = 'cropped' | 'short' | 'bob' | 'long' | 'knot' | 'curls' | 'bald'

export type HeadShape = {
  skin: (x: number, y: number, z: number) => number
  eyes: (x: number, y: number, z: number) => number
  hair: (x: number, y: number, z: number) => number
  /** Where the eyes are and look: the left one's middle (the right one mirrors it), radius. */
  eye: { x: number; y: number; z: number; r: number }
  /** 0 … 1: how much a point of the skin is lip, brow hair, lash line, flushed. */
  paint: (x: number, y: number, z: number) => { lips: number; brow: number; lash: number; flush: number }
}

const EYE = { x: 0.0315, y: 0, z: 0.0752, r: 0.0122 }
/** Half the width of the opening between the lids, and how high it opens above and below. */
const LID = { half: 0.015, up: 0.005, low: 0.0043 }

/** An even number in [−1, 1] for one trait of a seed. */
function trait(seed: number, which: number): number {
  return hash3(seed, which, 77) * 2 - 1
}

export function makeHead(seed: number, style: HairStyle): HeadShape {
  const wide = 1 + 0.035 * trait(seed, 1)
  const jaw = 0.003 * trait(seed, 2)
  const chin = 0.003 * trait(seed, 3)
  const noseLong = 0.003 * trait(seed, 4)
  const noseWide = 0.0012 * trait(seed, 5)
  const lipFull = 0.0011 * trait(seed, 6)
  const brow = 0.0018 * trait(seed, 7)
  const cheek = 0.003 * trait(seed, 8)
  const lidUp = LID.up + 0.0008 * trait(seed, 9)

  const eyes = (x: number, y: number, z: number) => {
    const ax = Math.abs(x) / wide
    const ball = sphere(ax - EYE.x, y - EYE.y, z - EYE.z, EYE.r)
    // The clear front of the eye stands out a little.
    const front = sphere(ax - EYE.x, y - EYE.y, z - EYE.z - 0.0052, 0.0079)
    return smoothMin(ball, front, 0.0012)
  }

  const skin = (sx: number, y: number, z: number) => {
    const x = Math.abs(sx) / wide
    // Skull and the front of the face.
    let d = ellipsoid(x, y - 0.037, z + 0.008, 0.0735, 0.081, 0.093)
    d = smoothMin(d, ellipsoid(x, y + 0.03, z - 0.036, 0.0565 + cheek * 0.3, 0.078, 0.0545), 0.035)
    // Jaw from below the ear to the chin, chin, cheek bone.
    d = smoothMin(
      d,
      capsule(x, y, z, 0.0475 + jaw, -0.058, 0.012, 0.017, -0.0945 + chin, 0.0715, 0.0175, 0.0145),
      0.022,
    )
    d = smoothMin(d, ellipsoid(x, y + 0.0985 - chin, z - 0.0775, 0.0185, 0.0155, 0.0145), 0.018)
    d = smoothMin(d, ellipsoid(x - 0.0455, y + 0.026, z - 0.0605, 0.0195, 0.015 + cheek * 0.5, 0.0175), 0.022)
    // Soft cheek beside the mouth.
    d = smoothMin(d, ellipsoid(x - 0.033, y + 0.058, z - 0.067, 0.021, 0.024, 0.019), 0.02)
    // Temples in, sockets in, brow out.
    d = smoothMax(d, -ellipsoid(x - 0.0925, y - 0.022, z - 0.052, 0.022, 0.034, 0.036), 0.022)
    d = smoothMin(d, capsule(x, y, z, 0, 0.016, 0.0885, 0.0445, 0.0185, 0.0685, 0.0082 + brow, 0.0066 + brow), 0.014)
    d = smoothMax(d, -ellipsoid(x - 0.0305, y + 0.0015, z - 0.0985, 0.0205, 0.0135, 0.0215), 0.0105)
    // Nose: bridge, tip, wings, nostrils.
    d = smoothMin(d, capsule(x, y, z, 0, 0.007, 0.0855, 0, -0.034 - noseLong, 0.1065, 0.0066, 0.0078 + noseWide), 0.012)
    d = smoothMin(d, sphere(x, y + 0.0385 + noseLong, z - 0.1085, 0.0092 + noseWide), 0.009)
    d = smoothMin(d, ellipsoid(x - 0.0112 - noseWide, y + 0.0428 + noseLong, z - 0.0975, 0.0068, 0.0062, 0.0095), 0.006)
    d = smoothMax(d, -ellipsoid(x - 0.006, y + 0.0487 + noseLong, z - 0.102, 0.003, 0.0034, 0.0056), 0.003)
    // Round of the mouth, lips, the line between them, the hollow under the lower one and under the nose.
    d = smoothMin(d, ellipsoid(x, y + 0.073, z - 0.076, 0.032, 0.022, 0.0178), 0.018)
    d = smoothMax(d, -capsule(x, y, z, 0, -0.054, 0.1045, 0, -0.061, 0.1035, 0.002, 0.0024), 0.006)
    const bow = 0.0012 * (1 - ease(0, 0.007, x))
    d = smoothMin(
      d,
      capsule(x, y + bow, z, 0, -0.0686, 0.0958, 0.0262, -0.0703, 0.0868, 0.0043 + lipFull, 0.0018),
      0.0042,
    )
    d = smoothMin(d, capsule(x, y, z, 0, -0.0783, 0.0943, 0.0222, -0.0731, 0.0868, 0.0054 + lipFull, 0.0022), 0.0042)
    d = smoothMax(d, -capsule(x, y, z, 0, -0.0731, 0.1028, 0.027, -0.0702, 0.0915, 0.0011, 0.001), 0.003)
    d = smoothMax(d, -capsule(x, y, z, 0, -0.0895, 0.0985, 0.012, -0.088, 0.0955, 0.0034, 0.0024), 0.008)
    // Lids: a shell on the eye with an almond opening.
    const u = x - EYE.x
    const v = y - EYE.y
    const w = z - EYE.z
    const ball = sphere(u, v, w, EYE.r + 0.0017)
    const along = u / LID.half
    const arch = 1 - along * along
    // The highest point lies inwards, the outer corner a little higher than the inner.
    const tilt = 0.0011 * along
    const opening = Math.max(v - tilt - lidUp * arch * (1 - 0.08 * along), -(LID.low * arch) - v + tilt)
    const lid = w > 0 ? smoothMax(ball, -opening * 0.85, 0.0012) : ball
    const fold = smoothMin(lid, capsule(u, v, w, -0.011, 0.0075, 0.0095, 0.0135, 0.006, 0.0065, 0.0026, 0.0022), 0.003)
    d = smoothMin(d, fold, 0.0042)
    if (w > 0) d = smoothMax(d, -Math.max(opening * 0.85, -0.012), 0.0012)
    // Ears.
    const ex = x - 0.0745
    const ey = y + 0.012
    const ez = z + 0.006
    const ear = ellipsoid(ex + ez * 0.35, ey - ez * 0.25, ez + ey * 0.2, 0.0065, 0.029, 0.0165)
    const bowl = ellipsoid(ex - 0.0065 + ez * 0.35, ey - 0.003, ez - 0.002 + ey * 0.2, 0.006, 0.021, 0.011)
    const flap = ellipsoid(ex - 0.001, ey + 0.002, ez - 0.013, 0.005, 0.006, 0.005)
    d = smoothMin(d, smoothMin(smoothMax(ear, -bowl, 0.003), flap, 0.004), 0.005)
    // Neck and its two cords.
    const neck = capsule(x, y, z, 0, -0.07, -0.014, 0, -0.215, -0.033, 0.0505, 0.0545)
    d = smoothMin(d, neck, 0.022)
    d = smoothMin(d, capsule(x, y, z, 0.056, -0.045, -0.016, 0.012, -0.192, 0.024, 0.0095, 0.008), 0.024)
    return d
  }

  const hair = makeHair(seed, style, wide)

  const paint = (sx: number, y: number, z: number) => {
    const x = Math.abs(sx) / wide
    const front = ease(0.055, 0.075, z)
    const across = clamp(x / 0.0268, 0, 1)
    const mouth = -0.0731 + 0.0029 * across * across
    const high = 0.0058 * (1 - across * across) - 0.0014 * (1 - ease(0, 0.006, x)) + lipFull
    const low = 0.0078 * (1 - across * across * 1.1) + lipFull
    const lips = across < 1 ? ease(0.0012, -0.0006, Math.max(y - mouth - high, mouth - low - y)) * front : 0
    // Brow hair: an arch that thins outwards.
    const t = clamp((x - 0.0105) / 0.041, 0, 1)
    const ridge = 0.0202 + 0.0056 * Math.sin(Math.PI * (0.12 + 0.68 * t)) - 0.0022 * t
    const thick = 0.0042 * ease(-0.05, 0.22, t) * (1 - 0.72 * ease(0.35, 1, t)) + 0.0003
    const inBrow = ease(thick, thick * 0.2, Math.abs(y - ridge)) * ease(0.0088, 0.013, x) * ease(0.053, 0.046, x)
    const strand = 0.66 + 0.34 * noise((x - y * 0.8) * 1100, y * 300, seed)
    const u = x - EYE.x
    const along = u / LID.half
    const arch = 1 - along * along
    const edge = Math.abs(y - EYE.y - 0.0011 * along - lidUp * arch * (1 - 0.08 * along))
    const lash = Math.abs(along) < 1.04 && z > EYE.z + 0.004 ? ease(0.0013, 0.0004, edge) : 0
    const flush =
      0.55 * ease(0.026, 0.006, Math.hypot(x - 0.041, (y + 0.036) * 1.15)) * front +
      0.5 * ease(0.017, 0.004, Math.hypot(x, (y + 0.042) * 0.9)) * front +
      0.6 * ease(0.02, 0.0, Math.hypot(x - 0.078, y + 0.012))
    return { lips, brow: inBrow * strand * front, lash, flush }
  }
  return { skin, eyes, hair, eye: EYE, paint }
}

/** Far away: no hair here. */
const NONE = 1

function makeHair(seed: number, style: HairStyle, wide: number): HeadShape['hair'] {
  if (style === 'bald') return () => NONE
  const parting = trait(seed, 11) > 0 ? 0.022 : -0.022
  /** Where the face stays free: below the hair line in front, before the ears at the sides. */
  const face = (x: number, y: number, z: number, line: number) => {
    const front = ellipsoid(x, y - line + 0.088, z - 0.095, 0.0665, 0.087, 0.062)
    const cheeks = ellipsoid(x, y + 0.06, z - 0.06, 0.1, 0.078, 0.058)
    return smoothMin(front, cheeks, 0.015)
  }
  const nape = (y: number, low: number) => low - y
  /** Strands fall from the parting: beside it they keep their depth, behind they keep their side. */
  const strands = (x: number, y: number, z: number, size: number) => {
    const back = ease(-0.02, -0.08, z)
    const u = (z * (1 - back) + x * back) * size
    const v = (y * 0.1 + Math.abs(x) * 0.05) * size
    return noise(u, v, back * 3 + seed) * 0.6 + noise(u * 2.3, v * 1.6, back * 3 + seed + 9) * 0.4
  }

  switch (style) {
    case 'cropped':
      return (sx, y, z) => {
        const x = Math.abs(sx) / wide
        const cap =
          ellipsoid(x, y - 0.038, z + 0.009, 0.0775, 0.0855, 0.097) + 0.0006 * noise(sx * 320, y * 320, z * 320)
        return smoothMax(smoothMax(cap, -face(x, y, z, 0.066), 0.008), nape(y, -0.05), 0.02)
      }
    case 'short':
      return (sx, y, z) => {
        const x = Math.abs(sx) / wide
        const sweep = 0.012 * ease(-0.02, 0.1, y) * (1 + 0.5 * noise(sx * 30 + seed, y * 14, z * 22))
        const cap =
          ellipsoid(x, y - 0.041, z + 0.007, 0.079, 0.0885, 0.099) - sweep - 0.0035 * strands(sx - y * 0.3, y, z, 95)
        const fringe = face(x, y + 0.004 * noise(sx * 70, 3, seed), z, 0.068)
        return smoothMax(smoothMax(cap, -fringe, 0.006), nape(y, -0.055 + z * 0.3), 0.016)
      }
    case 'knot': {
      return (sx, y, z) => {
        const x = Math.abs(sx) / wide
        // Combed back and up to the knot: grooves that run towards it.
        const angle = Math.atan2(sx, z + 0.09)
        const comb = 0.0011 * Math.sin(angle * 46 + 4 * noise(sx * 26, y * 26, z * 26)) * ease(0.09, 0.02, z)
        const cap = ellipsoid(x, y - 0.039, z + 0.009, 0.077, 0.0855, 0.0965) - comb
        const scalp = smoothMax(smoothMax(cap, -face(x, y, z, 0.066), 0.007), nape(y, -0.06), 0.02)
        const ky = y - 0.122
        const kz = z + 0.048
        const twist = Math.atan2(ky, sx) * 3 + kz * 90
        const knot =
          ellipsoid(sx, ky, kz, 0.036, 0.032, 0.035) - 0.0026 * Math.sin(twist + 3 * noise(sx * 40, ky * 40, kz * 40))
        return smoothMin(scalp, knot, 0.012)
      }
    }
    case 'bob':
    case 'long': {
      const isLong = style === 'long'
      const low = isLong ? -0.255 : -0.088
      return (sx, y, z) => {
        const x = Math.abs(sx) / wide
        const part = -0.0045 * ease(0.012, 0, Math.abs(sx - parting)) * ease(0.02, 0.1, y)
        const cap = ellipsoid(x, y - 0.039, z + 0.009, 0.0825, 0.089, 0.1) - part
        // A curtain down both sides and the back.
        const hang = clamp(-y, 0, 0.26)
        const bulge = isLong ? 0.012 * hang : 0.05 * hang * (1 - hang * 6)
        // Above the ears it follows the skull, so that it grows out of the cap without an edge.
        const over = clamp(y - 0.02, 0, 0.1) / 0.11
        const drawn = Math.sqrt(1 - over * over)
        const rad = Math.hypot(x / ((0.0868 + bulge) * drawn), (z + 0.01) / ((0.1 + bulge * 0.4) * drawn))
        const shell = (rad - 1) * 0.07
        const curtain = smoothMax(
          smoothMax(shell, y - 0.085, 0.03),
          low - y + (isLong ? 0.02 * noise(sx * 30, 0, z * 30) : 0),
          0.012,
        )
        const open = ellipsoid(x, y + 0.09, z - 0.082, 0.0635 + hang * 0.04, 0.165, 0.075)
        const full = smoothMin(cap, curtain, 0.016) - 0.0016 * strands(sx, y, z, 210) - 0.0028 * strands(sx, y, z, 60)
        return smoothMax(smoothMax(full, -face(x, y, z, 0.064), 0.006), -open, 0.008)
      }
    }
    case 'curls':
      return (sx, y, z) => {
        const x = Math.abs(sx) / wide
        const cap = ellipsoid(x, y - 0.042, z + 0.012, 0.098, 0.103, 0.108)
        const sides = ellipsoid(x, y - 0.002, z + 0.02, 0.103, 0.085, 0.09)
        const curls = 0.009 * noise(sx * 58, y * 58, z * 58) + 0.0035 * noise(sx * 120, y * 120, z * 120)
        const full = smoothMin(cap, sides, 0.03) + curls
        return smoothMax(smoothMax(full, -face(x, y, z, 0.063) - curls * 0.5, 0.008), nape(y, -0.085), 0.02)
      }
  }
}

/** How hair shades from strand to strand, −1 … 1; strands run as those of the shape do. */
export function strandShade(x: number, y: number, z: number): number {
  const back = ease(-0.02, -0.08, z)
  return layeredNoise((z * (1 - back) + x * back) * 420, y * 26 + Math.abs(x) * 12, back * 3, 3)
}
