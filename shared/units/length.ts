/** What lengths are read and typed in by people. Inside, everything stays in metres. */
export const LENGTH_UNITS = ['m', 'ft'] as const
export type LengthUnit = (typeof LENGTH_UNITS)[number]

/** Exact since the agreement of 1959 (NIST Special Publication 811, B.8). */
export const METRES_PER_FOOT = 0.3048
export const METRES_PER_INCH = METRES_PER_FOOT / 12

type FeetAndInches = { isNegative: boolean; feet: number; inches: number }

/** Feet and inches of a length, inches rounded to `1 / perInch`. */
export function feetAndInches(metres: number, perInch: number): FeetAndInches {
  const parts = Math.round((Math.abs(metres) / METRES_PER_INCH) * perInch)
  const feet = Math.floor(parts / (12 * perInch))
  return { isNegative: metres < 0 && parts > 0, feet, inches: (parts - feet * 12 * perInch) / perInch }
}

/** For reading: "1.6 m", "5′ 3″"; with `fine` to the centimetre or the half inch: "1.95 m", "6′ 5″". */
export function lengthLabel(metres: number, own: LengthUnit, fine = false): string {
  if (own === 'm')
    return fine ? `${metres.toFixed(2).replace(/0$/, '')} m` : `${(Math.round(metres * 10) / 10).toFixed(1)} m`
  const { isNegative, feet, inches } = feetAndInches(metres, fine ? 2 : 1)
  const whole = Math.floor(inches)
  return `${isNegative ? '−' : ''}${feet}′ ${whole === 0 && inches > 0 ? '' : whole}${inches > whole ? '½' : ''}″`
}
