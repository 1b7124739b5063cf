/**
 * Stops, f-numbers, shutter times and sensitivities. A nominal figure (f/11, 1/60 s) is a label; what is computed with
 * is the exact value behind it: N = 2^(Av/2), t = 2^(−Tv).
 */

/** Stops from one f-number to another: positive when `fNumber` is the higher reading. 2·log₂(N/N₀). */
export function stopsBetween(fNumber: number, reference: number): number {
  return 2 * Math.log2(fNumber / reference)
}

/** Stops gained by moving a small source from one distance to another, metres: negative further off. */
export function inverseSquareStops(fromM: number, toM: number): number {
  return 2 * Math.log2(fromM / toM)
}

/** Stops lost to a transmission in (0, 1]. */
export function stopsOfTransmission(transmission: number): number {
  return transmission >= 1 ? 0 : -Math.log2(transmission)
}

/** Aperture value of an f-number: f/1 is 0. */
export function apertureValue(fNumber: number): number {
  return 2 * Math.log2(fNumber)
}

/** Time value of a shutter time in seconds: 1 s is 0, 1/2 s is 1. */
export function timeValue(shutterS: number): number {
  return -Math.log2(shutterS)
}

/** Exposure value, log₂(N²/t). */
export function exposureValue(fNumber: number, shutterS: number): number {
  return apertureValue(fNumber) + timeValue(shutterS)
}

/** Exact f-number of the third-stop series, `thirds` from f/1: 2^(thirds/6). */
export function fNumberOfThirds(thirds: number): number {
  return 2 ** (thirds / 6)
}

/** Nearest f-number of the third-stop series, exact. */
export function roundToThird(fNumber: number): number {
  return fNumberOfThirds(Math.round(6 * Math.log2(fNumber)))
}

/** Slack for least powers that are printed rounded, in thirds of a stop: 1/10 stands for 1/10.08. */
const PRINTED_THIRDS = 0.04

/** Powers a head can be set to, full first, in thirds of a stop down to 1/`minPowerDenominator` and never below. */
export function powersOf(minPowerDenominator: number): number[] {
  const thirds = Math.floor(3 * Math.log2(Math.max(1, minPowerDenominator)) + PRINTED_THIRDS)
  return Array.from({ length: thirds + 1 }, (_, index) => 2 ** (-index / 3))
}

/** A shutter time as printed on cameras: "1/160", "0.5 s". */
export function shutterLabel(shutterS: number): string {
  if (shutterS >= 0.4) return `${Number(shutterS.toFixed(1))} s`
  return `1/${Math.round(1 / shutterS)}`
}
