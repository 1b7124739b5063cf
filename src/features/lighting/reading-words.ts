import type { Provenance } from '#shared/domain/kit/schema.ts'
import type { LightReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'

/** A difference from what was wished, to a tenth: "+0.1 stop off", "−1.3 stops off", "as wished". */
export function offWords(offStops: number): string {
  const tenths = Math.round(Math.abs(offStops) * 10)
  if (tenths === 0) return 'as wished'
  return `${offStops > 0 ? '+' : '−'}${(tenths / 10).toFixed(1)} ${tenths <= 10 ? 'stop' : 'stops'} off`
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
