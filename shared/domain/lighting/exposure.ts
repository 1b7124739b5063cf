import type { UnitNumbers } from '#shared/domain/kit/schema.ts'

/**
 * Flash exposure. Guide numbers are in metres at ISO 100. Readings are incident, with the calibration constant below:
 * N² = H·S/C (ISO 2720).
 */

/** Incident meter constant C, lx·s: the one all readings here use. */
export const METER_CONSTANT_C = 250
/** Reflected-light meter constant K, cd·s/m² (ISO 2720). */
const METER_CONSTANT_K = 12.5

/** Guide number at another sensitivity: GN₁₀₀·√(ISO/100). */
export function guideNumberAtIso(guideNumberM: number, iso: number): number {
  return guideNumberM * Math.sqrt(iso / 100)
}

/** Guide number at a power in (0, 1]: GN·√p. */
export function guideNumberAtPower(guideNumberM: number, power: number): number {
  return guideNumberM * Math.sqrt(power)
}

/** Guide number behind a loss of `lossStops`: GN·2^(−s/2). */
export function guideNumberAfterLoss(guideNumberM: number, lossStops: number): number {
  return guideNumberM * 2 ** (-lossStops / 2)
}

/**
 * Full-power guide number at a zoom setting: the maker's table, log GN interpolated over log focal length and held at
 * its ends; without a table or a setting the head's one figure. Never derived from the solid angle.
 */
export function guideNumberAtZoom(unit: Pick<UnitNumbers, 'guideNumberM' | 'zoom'>, zoomMm: number | null): number {
  const table = [...unit.zoom].sort((a, b) => a.focalMm - b.focalMm)
  const first = table[0]
  const last = table.at(-1)
  if (zoomMm === null || !first || !last) return unit.guideNumberM.value
  if (zoomMm <= first.focalMm) return first.guideNumberM
  for (let i = 1; i < table.length; i++) {
    const low = table[i - 1]
    const high = table[i]
    if (!low || !high || zoomMm > high.focalMm) continue
    const share = Math.log(zoomMm / low.focalMm) / Math.log(high.focalMm / low.focalMm)
    return low.guideNumberM * (high.guideNumberM / low.guideNumberM) ** share
  }
  return last.guideNumberM
}

/** f-number of a head on axis: GN/d, d in metres. */
export function fNumberAt(guideNumberM: number, distanceM: number): number {
  return guideNumberM / distanceM
}

/** Luminous exposure on axis, lx·s: 2.5·GN₁₀₀²/d² (from N² = H·S/C with C = 250). */
export function luminousExposure(guideNumberM: number, distanceM: number): number {
  return (METER_CONSTANT_C / 100) * (guideNumberM / distanceM) ** 2
}

/** Reading of a luminous exposure H in lx·s at a sensitivity: N = √(H·S/C). */
export function fNumberOfExposure(exposureLxS: number, iso: number): number {
  return Math.sqrt((exposureLxS * iso) / METER_CONSTANT_C)
}

/** Luminous exposure that a reading stands for, lx·s: H = C·N²/S. */
export function exposureOfFNumber(fNumber: number, iso: number): number {
  return (METER_CONSTANT_C * fNumber ** 2) / iso
}

/** Luminance that a reflected-light meter calls right, cd/m²: L = K·N²/(t·S) (ISO 2720, K = 12.5). */
export function meteredLuminance(fNumber: number, shutterS: number, iso: number): number {
  return (METER_CONSTANT_K * fNumber ** 2) / (shutterS * iso)
}

/** Luminous exposure of a steady light, lx·s: H = E·t. */
export function ambientExposure(lux: number, shutterS: number): number {
  return lux * shutterS
}

/** Reading of several lights together: √(ΣNᵢ²). No lights read 0. */
export function combineFNumbers(fNumbers: readonly number[]): number {
  return Math.sqrt(fNumbers.reduce((sum, fNumber) => sum + fNumber ** 2, 0))
}

/**
 * How much a disc of radius r gives on its axis at distance d against a point of the same intensity: d²/(d² + r²).
 * Within 1 % of 1 from five times the largest dimension (IES definitions 9.1.1).
 */
export function discFactor(distanceM: number, radiusM: number): number {
  return distanceM ** 2 / (distanceM ** 2 + radiusM ** 2)
}
