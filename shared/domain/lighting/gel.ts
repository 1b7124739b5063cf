import { stopsOfTransmission } from './stops.ts'

const MICRO = 1e6

/** Reciprocal colour temperature, mired: 10⁶/T. */
export function miredOf(kelvin: number): number {
  return MICRO / kelvin
}

/** Shift that turns one colour temperature into another, mired; positive is warmer. */
export function shiftBetween(fromK: number, toK: number): number {
  return miredOf(toK) - miredOf(fromK)
}

/** Colour temperature behind a shift; null when 10⁶/T + shift ≤ 0, where there is none (bluer than any). */
export function shifted(kelvin: number, miredShift: number): number | null {
  const mired = miredOf(kelvin) + miredShift
  return mired > 0 ? MICRO / mired : null
}

type GelNumbersRead = { miredShift: { value: number }; transmission: { value: number } }

/** Several gels on one head: shifts add, transmissions multiply. No gel is no shift and 1. */
export function stackGels(gels: readonly GelNumbersRead[]): {
  miredShift: number
  transmission: number
  lossStops: number
} {
  const miredShift = gels.reduce((sum, gel) => sum + gel.miredShift.value, 0)
  const transmission = gels.reduce((product, gel) => product * gel.transmission.value, 1)
  return { miredShift, transmission, lossStops: stopsOfTransmission(transmission) }
}

/** "3800 K", "19 700 K": to the nearest hundred, parted at the thousands from ten thousand. */
export function kelvinLabel(kelvin: number): string {
  const rounded = Math.round(kelvin / 100) * 100
  return rounded < 10000
    ? `${rounded} K`
    : `${Math.floor(rounded / 1000)}\u00a0${String(rounded % 1000).padStart(3, '0')} K`
}
