import { type LengthUnit, METRES_PER_INCH, lengthLabel } from '#shared/units/length.ts'
import type { BoomBalance } from './boom.ts'
import type { Clearance, Orientation } from './frame.ts'
import { shutterLabel } from './stops.ts'
import type { Sync } from './sync.ts'
import { stopsLabel } from './words.ts'

/** Steps by which a colour is called off from the white balance, mired (assumptions). */
const SAME_MIRED = 10
const LITTLE_MIRED = 40
const CLEAR_MIRED = 100

/** How light looks to a camera, by its mired from the white balance: positive is warmer. */
export function whiteWords(miredFromWhite: number): string {
  const off = Math.abs(miredFromWhite)
  if (off < SAME_MIRED) return 'as white as the camera is set'
  const much = off < LITTLE_MIRED ? 'a little' : off < CLEAR_MIRED ? 'clearly' : 'much'
  return `${much} ${miredFromWhite > 0 ? 'warmer' : 'cooler'} than the camera is set`
}

/** "2 stops under the main", "⅓ stop over the flash", "level with the main". Positive is under. */
export function underWords(underStops: number, what: string): string {
  const label = stopsLabel(underStops).slice(1)
  if (label === '') return `level with ${what}`
  const isOne = /^[1⅓⅔]$/.test(label)
  return `${label} ${isOne ? 'stop' : 'stops'} ${underStops > 0 ? 'under' : 'over'} ${what}`
}

/** Whether flash lights the whole frame at the shutter time, against the fastest at which it does. */
export function syncWords({ isTooFast, isAssumed, limitS }: Sync): string {
  const limit = shutterLabel(limitS)
  if (isTooFast) return `faster than ${limit}: a part of the frame stays dark`
  return `flash lights the whole frame up to ${limit}${isAssumed ? ' (assumed)' : ''}`
}

/** Where a thing stands against the edge of the picture it is nearest to. */
export function sightWords({ marginM, edge }: Clearance): string {
  return marginM < 0 ? `in the picture, past the ${edge} edge` : `clears the ${edge} edge`
}

/** How a boom's counterweight is made up. */
export function counterweightWords({ counterweightKg, bags }: Pick<BoomBalance, 'counterweightKg' | 'bags'>): string {
  return counterweightKg > 0 ? `${bags}, slid until it balances` : 'its own arm is enough'
}

/** A length in metres shorter than a hand: "30 mm", "1.2″". */
export function smallLabel(metres: number, unit: LengthUnit): string {
  return unit === 'm' ? `${Math.round(metres * 1000)} mm` : `${(metres / METRES_PER_INCH).toFixed(1)}″`
}

/** A length in metres that may be short: "18 cm", "1.4 m", "0′ 7″". */
export function depthLabel(metres: number, unit: LengthUnit): string {
  return unit === 'm' && metres < 1 ? `${Math.round(metres * 100)} cm` : lengthLabel(metres, unit)
}

/** Two lengths in metres: "1.2 × 0.9 m", "3′ 11″ × 2′ 11″". */
export function sizeLabel(widthM: number, heightM: number, unit: LengthUnit): string {
  const [width, height] = [lengthLabel(widthM, unit), lengthLabel(heightM, unit)]
  return `${unit === 'm' ? width.replace(' m', '') : width} × ${height}`
}

/** Full pops against those of a charge: "12 of 150", or "12" from the mains. */
export function popsWords(pops: number, popsPerCharge: number | null): string {
  return popsPerCharge === null ? `${Math.ceil(pops)}` : `${Math.ceil(pops)} of ${popsPerCharge}`
}

const FRAME_WORDS: Readonly<Record<Orientation, string>> = {
  upright: 'Upright frame',
  across: 'Frame across',
  square: 'Square frame',
}

/** What a frame of this orientation is called: "Upright frame". */
export function frameWords(orientation: Orientation): string {
  return FRAME_WORDS[orientation]
}
