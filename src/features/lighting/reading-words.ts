import type { Provenance } from '#shared/domain/kit/schema.ts'
import type { LightReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import { stopsLabel } from '#shared/domain/lighting/words.ts'
import { type LengthUnit, METRES_PER_INCH, lengthLabel } from '#src/lib/length-unit.ts'

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

/** A difference from what was wished, to a tenth: "+0.1 stop off", "−1.3 stops off", "as wished". */
export function offWords(offStops: number): string {
  const tenths = Math.round(Math.abs(offStops) * 10)
  if (tenths === 0) return 'as wished'
  return `${offStops > 0 ? '+' : '−'}${(tenths / 10).toFixed(1)} ${tenths <= 10 ? 'stop' : 'stops'} off`
}

/** A length shorter than a hand: "30 mm", "1.2″". */
export function smallLabel(metres: number, unit: LengthUnit): string {
  return unit === 'm' ? `${Math.round(metres * 1000)} mm` : `${(metres / METRES_PER_INCH).toFixed(1)}″`
}

/** A length that may be short: "18 cm", "1.4 m", "0′ 7″". */
export function depthLabel(metres: number, unit: LengthUnit): string {
  return unit === 'm' && metres < 1 ? `${Math.round(metres * 100)} cm` : lengthLabel(metres, unit)
}

/** "1.2 × 0.9 m", "3′ 11″ × 2′ 11″". */
export function sizeLabel(widthM: number, heightM: number, unit: LengthUnit): string {
  const [width, height] = [lengthLabel(widthM, unit), lengthLabel(heightM, unit)]
  return `${unit === 'm' ? width.replace(' m', '') : width} × ${height}`
}

/** What a light's reading rests on: a meter, makers' figures alone, or somebody's guess among them. */
export function provenanceOf(light: Light, reading: Pick<LightReading, 'measured'>): Provenance {
  const { numbers } = light.unit
  const own = isLamp(numbers) ? numbers.luxAtMetre : numbers.guideNumberM
  const made = reading.measured === null ? [own, ...(light.modifier ? [light.modifier.numbers.lossStops] : [])] : []
  const all = [...made, ...light.gels.map((gel) => gel.numbers.transmission)].map(({ from }) => from)
  if (all.includes('assumed')) return 'assumed'
  return reading.measured !== null || all.includes('measured') ? 'measured' : 'published'
}

/** "Main", "Main and rim", "Main, fill and rim". */
export function listed(names: readonly string[]): string {
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`
}
