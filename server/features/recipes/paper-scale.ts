import { type LengthUnit, METRES_PER_FOOT } from '#shared/units/length.ts'

/** Points (1/72 inch) of a metre at 1 : 1. */
const PT_PER_M = 72 / 0.0254

/** Scales that rulers have, by what the paper is read in. */
const SCALES: Readonly<Record<LengthUnit, readonly number[]>> = {
  m: [10, 15, 20, 25, 30, 35, 40, 50, 60, 75, 100, 125, 150, 200, 250, 300, 400, 500, 750, 1000, 1500, 2000],
  ft: [8, 12, 16, 24, 32, 40, 48, 64, 96, 128, 192, 240, 360, 480, 600, 720, 960, 1200, 2400],
}

/** Inches on paper for a foot, where an architect's scale has it. */
const FOOT_SCALES: Readonly<Record<number, string>> = {
  12: '1″ = 1′',
  16: '¾″ = 1′',
  24: '½″ = 1′',
  48: '¼″ = 1′',
  96: '⅛″ = 1′',
  240: '1″ = 20′',
  480: '1″ = 40′',
  600: '1″ = 50′',
  1200: '1″ = 100′',
}

/** The largest scale of a ruler, in points per metre, at or under the largest that fits. */
export function onRuler(unit: LengthUnit): (perM: number) => number {
  return (perM) => {
    const scale = SCALES[unit].find((denominator) => PT_PER_M / denominator <= perM)
    return scale === undefined ? perM : PT_PER_M / scale
  }
}

/** "1 : 48 (¼″ = 1′)". */
export function scaleWords(perM: number, unit: LengthUnit): string {
  const denominator = Math.round(PT_PER_M / perM)
  const foot = unit === 'ft' ? FOOT_SCALES[denominator] : undefined
  return foot === undefined ? `1 : ${denominator}` : `1 : ${denominator} (${foot})`
}

/** A round length whose bar on paper is no longer than `mostPt`. */
export function barM(perM: number, unit: LengthUnit, mostPt = 96): number {
  const steps =
    unit === 'm' ? [0.5, 1, 2, 5, 10, 20, 50] : [1, 2, 5, 10, 20, 50, 100].map((feet) => feet * METRES_PER_FOOT)
  return steps.filter((step) => step * perM <= mostPt).at(-1) ?? steps[0] ?? 1
}

/** How far apart the lines of the grid are, metres. */
export function gridM(perM: number, unit: LengthUnit): number {
  const steps = unit === 'm' ? [0.5, 1, 5, 10] : [1, 2, 5, 10, 50].map((feet) => feet * METRES_PER_FOOT)
  return steps.find((step) => step * perM >= 9) ?? 50
}
