import type { Rgb } from './scene.ts'

/** Second radiation constant, nm·K (CODATA 2018: 1.438776877e−2 m·K). */
const C2_NM_K = 1.438776877e7
const FROM_NM = 380
const TO_NM = 780
const STEP_NM = 5

/** One lobe of the fits below: a bell with two widths. */
function lobe(nm: number, middle: number, left: number, right: number): number {
  const t = (nm - middle) * (nm < middle ? left : right)
  return Math.exp(-0.5 * t * t)
}

/**
 * CIE 1931 2° colour matching functions by the multi-lobe fit of Wyman, Sloan and Shirley (2013), Journal of Computer
 * Graphics Techniques 2(2).
 */
function matching(nm: number): [number, number, number] {
  return [
    1.056 * lobe(nm, 599.8, 0.0264, 0.0323) +
      0.362 * lobe(nm, 442.0, 0.0624, 0.0374) -
      0.065 * lobe(nm, 501.1, 0.049, 0.0382),
    0.821 * lobe(nm, 568.8, 0.0213, 0.0247) + 0.286 * lobe(nm, 530.9, 0.0613, 0.0322),
    1.217 * lobe(nm, 437.0, 0.0845, 0.0278) + 0.681 * lobe(nm, 459.0, 0.0385, 0.0725),
  ]
}

/** Up to here, 200 K, there are numbers for how little of it is seen; nothing glows visibly below. */
const MOST_MIRED = 5000

/** XYZ with Y = 1 of a full radiator; `mired` from 1, where its colour hardly changes any more, to 5000. */
export function radiatorXyz(mired: number): [number, number, number] {
  const perMired = C2_NM_K * (Math.min(MOST_MIRED, Math.max(1, mired)) / 1e6)
  let x = 0
  let y = 0
  let z = 0
  for (let nm = FROM_NM; nm <= TO_NM; nm += STEP_NM) {
    const power = (nm / 560) ** -5 / Math.expm1(perMired / nm)
    const [mx, my, mz] = matching(nm)
    x += power * mx
    y += power * my
    z += power * mz
  }
  return [x / y, 1, z / y]
}

/** Linear Bradford cone responses and back (CIE 159:2004 uses the same matrix). */
function bradford([x, y, z]: readonly [number, number, number]): [number, number, number] {
  return [
    0.8951 * x + 0.2664 * y - 0.1614 * z,
    -0.7502 * x + 1.7135 * y + 0.0367 * z,
    0.0389 * x - 0.0685 * y + 1.0296 * z,
  ]
}
function unBradford([l, m, s]: readonly [number, number, number]): [number, number, number] {
  return [
    0.9869929 * l - 0.1470543 * m + 0.1599627 * s,
    0.4323053 * l + 0.5183603 * m + 0.0492912 * s,
    -0.0085287 * l + 0.0400428 * m + 0.9684867 * s,
  ]
}

const D65: readonly [number, number, number] = [0.95047, 1, 1.08883]

/**
 * How light of `mired` weighs red, green and blue (linear sRGB, luminance kept) for a camera balanced to
 * `whiteBalanceK`. Light of that colour itself is [1, 1, 1]. Colours outside sRGB are cut at 0.
 */
export function lightColour(mired: number, whiteBalanceK: number): Rgb {
  const own = bradford(radiatorXyz(mired))
  const white = bradford(radiatorXyz(1e6 / whiteBalanceK))
  const target = bradford(D65)
  const [x, y, z] = unBradford([
    (own[0] / white[0]) * target[0],
    (own[1] / white[1]) * target[1],
    (own[2] / white[2]) * target[2],
  ])
  const rgb: [number, number, number] = [
    3.2404542 * x - 1.5371385 * y - 0.4985314 * z,
    -0.969266 * x + 1.8760108 * y + 0.041556 * z,
    0.0556434 * x - 0.2040259 * y + 1.0572252 * z,
  ]
  const cut = rgb.map((value) => Math.max(0, value))
  const luminance = 0.2126729 * (cut[0] ?? 0) + 0.7151522 * (cut[1] ?? 0) + 0.072175 * (cut[2] ?? 0)
  return [(cut[0] ?? 0) / luminance, (cut[1] ?? 0) / luminance, (cut[2] ?? 0) / luminance]
}
