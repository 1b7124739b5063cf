import { type Lab65, converter, differenceCiede2000, modeLab65, modeRgb, useMode } from 'culori/fn'

useMode(modeRgb)
useMode(modeLab65)
const toLab65 = converter('lab65')
const ciede2000 = differenceCiede2000()

/** CIELAB under D65, 2° observer: lightness 0–100, a and b. */
export type Lab = { l: number; a: number; b: number }

/** CIELAB (D65) of an sRGB colour `#rrggbb`, or null when it is none. */
export function labOf(hex: string): Lab | null {
  if (!/^#[0-9a-f]{6}$/i.test(hex)) return null
  const channel = (at: number) => Number.parseInt(hex.slice(at, at + 2), 16) / 255
  const lab = toLab65({ mode: 'rgb', r: channel(1), g: channel(3), b: channel(5) })
  return { l: lab.l, a: lab.a, b: lab.b }
}

/** Colour difference ΔE 2000 with kL = kC = kH = 1. Sharma, Wu, Dalal 2005, doi:10.1002/col.20070. */
export function deltaE2000(a: Lab, b: Lab): number {
  const lab = (colour: Lab): Lab65 => ({ mode: 'lab65', ...colour })
  return ciede2000(lab(a), lab(b))
}

export type Nearest = { hex: string; deltaE: number }

/** The colour of a palette nearest to this one and how far it is, ΔE 2000; null when there is nothing to compare. */
export function nearestIn(palette: readonly string[], hex: string): Nearest | null {
  const lab = labOf(hex)
  if (!lab) return null
  let best: Nearest | null = null
  for (const candidate of palette) {
    const other = labOf(candidate)
    if (!other) continue
    const deltaE = deltaE2000(lab, other)
    if (!best || deltaE < best.deltaE) best = { hex: candidate, deltaE }
  }
  return best
}

/**
 * How far apart two colours are, as a person would say it. The steps are common practice, no source: about 1 is the
 * smallest difference an eye finds side by side, about 2 shows at a close look, 10 is plain to everybody.
 */
export function deltaEWords(deltaE: number): string {
  if (deltaE < 1) return 'cannot be told apart'
  if (deltaE < 2) return 'told apart only side by side'
  if (deltaE < 5) return 'close'
  if (deltaE < 10) return 'related'
  return 'another colour'
}
