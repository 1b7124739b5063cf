import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { findMetered } from '#shared/domain/kit/meter-reading.ts'
import type { Stated, UnitNumbers } from '#shared/domain/kit/schema.ts'
import {
  type Light,
  type LightGel,
  type LightModifier,
  type LightSupport,
  type LightUnit,
  isLamp,
} from '#shared/domain/lighting/schema.ts'
import type { Kit } from './use-kit.ts'

/** What the kit room says newer of one light: what to write, and in words what changes. */
export type NewerNumbers = {
  light: Light
  patch: Partial<Pick<Light, 'unit' | 'modifier' | 'gels' | 'support'>>
  words: string[]
}

type Copied = { kitId: string; version: number; name: string; numbers: Record<string, unknown> }

/** The newer item when its numbers differ from the copy's. */
function newerOf<Item extends Copied>(own: Item, items: readonly Item[]): Item | null {
  const newest = items.find((item) => item.kitId === own.kitId && item.version > own.version)
  return newest && JSON.stringify(newest.numbers) !== JSON.stringify(own.numbers) ? newest : null
}

/** A reading that was taken on this light and that the kit room does not know stays. */
function withOwnReadings(own: UnitNumbers, newest: UnitNumbers): UnitNumbers {
  const left = own.metered.filter((entry) => !findMetered(newest, entry.modifierKitId, entry.zoomMm))
  return { ...newest, metered: [...newest.metered, ...left].slice(-60) }
}

function newerUnit(own: LightUnit, items: readonly LightUnit[]): LightUnit | null {
  const newest = newerOf(own, items)
  if (!newest) return null
  if (isLamp(own.numbers) || isLamp(newest.numbers)) return newest
  const unit = { ...newest, numbers: withOwnReadings(own.numbers, newest.numbers) }
  return JSON.stringify(unit.numbers) === JSON.stringify(own.numbers) ? null : unit
}

const SHORT: Readonly<Record<string, string>> = {
  guideNumberM: 'GN',
  luxAtMetre: 'lx at a metre',
  watts: 'W',
  flashColourK: 'K',
  colourK: 'K',
  fullPops: 'full pops',
  fullRecycleS: 's to recycle',
  massKg: 'kg',
  lossStops: 'stops',
  beamDeg: '° beam',
  miredShift: 'mired',
  transmission: 'let through',
  maxHeightM: 'm high',
  minHeightM: 'm at its lowest',
  maxLoadKg: 'kg carried',
  reachM: 'm of reach',
  counterReachM: 'm to the counterweight',
  armMassKg: 'kg of arm',
}

function isStated(value: unknown): value is Stated {
  return typeof value === 'object' && value !== null && 'value' in value && 'from' in value
}

const tidy = (value: number) => String(Number(value.toFixed(2))).replace('-', '−')

/** The first number that differs, "GN 58 → 52 measured", "90 cm octa: 2 → 1.7 stops measured"; else that there is more. */
function difference(own: Copied, newest: Copied): string {
  for (const [key, now] of Object.entries(newest.numbers)) {
    const before = own.numbers[key]
    const short = SHORT[key]
    if (!isStated(now) || !isStated(before) || short === undefined || now.value === before.value) continue
    const change = `${tidy(before.value)} → ${tidy(now.value)}`
    return short === 'GN' ? `GN ${change} ${now.from}` : `${newest.name}: ${change} ${short} ${now.from}`
  }
  return `${newest.name}: newer words or sources`
}

function unitWords(own: LightUnit, newest: LightUnit, light: Light): string {
  if (isLamp(own.numbers) || isLamp(newest.numbers)) return difference(own, newest)
  const modifierKitId = light.modifier?.kitId ?? null
  const zoomMm = newest.numbers.zoom.length > 0 ? light.zoomMm : null
  const before = findMetered(own.numbers, modifierKitId, zoomMm)
  const now = findMetered(newest.numbers, modifierKitId, zoomMm)
  if (now && now.guideNumberM !== before?.guideNumberM)
    return `${light.modifier ? `with ${light.modifier.name}` : 'bare'} GN ${before ? `${tidy(before.guideNumberM)} → ` : ''}${tidy(now.guideNumberM)} measured`
  const words = difference(own, newest)
  return own.numbers.metered.length !== newest.numbers.metered.length && words.endsWith('sources')
    ? `${newest.name}: meter readings`
    : words
}

/** Lights whose copies of kit numbers are older than the kit room's, each with what would be taken over. */
export function newerNumbersOf(
  whole: WholeSetup,
  kit: Pick<Kit, 'units' | 'modifiers' | 'gels' | 'supports'>,
): NewerNumbers[] {
  return whole.lights.flatMap((light): NewerNumbers[] => {
    const patch: NewerNumbers['patch'] = {}
    const words: string[] = []
    const unit = newerUnit(light.unit, kit.units)
    if (unit) {
      patch.unit = unit
      words.push(unitWords(light.unit, unit, light))
    }
    const modifier: LightModifier | null = light.modifier && newerOf(light.modifier, kit.modifiers)
    if (modifier && light.modifier) {
      patch.modifier = modifier
      words.push(difference(light.modifier, modifier))
    }
    const gels = light.gels.map((gel): LightGel => newerOf(gel, kit.gels) ?? gel)
    gels.forEach((gel, index) => {
      const own = light.gels[index]
      if (own && gel !== own) words.push(difference(own, gel))
    })
    if (gels.some((gel, index) => gel !== light.gels[index])) patch.gels = gels
    const support: LightSupport | null = light.support && newerOf(light.support, kit.supports)
    if (support && light.support) {
      patch.support = support
      words.push(difference(light.support, support))
    }
    return words.length === 0 ? [] : [{ light, patch, words }]
  })
}
