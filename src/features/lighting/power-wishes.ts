import type { LightId } from '#shared/ids.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import type { Light, LightPurpose } from '#shared/domain/lighting/schema.ts'
import { fNumberOfThirds } from '#shared/domain/lighting/stops.ts'
import type { PowerSuggestion, PowerWish } from '#shared/domain/lighting/suggest-power.ts'
import { fNumberLabel, powerLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'

/** What is wanted of a light, in thirds of a stop: of a main from f/1 up, of any other against the mains. `keep`: as it is. */
export type WishDraft = number | 'keep'

/** Offered for mains: f/1 to f/45; for the others, stops against the main. In thirds. */
const F_THIRDS = [0, 33] as const
const AGAINST_THIRDS = [9, -21] as const

/** Where lights usually lie against the main, in thirds of a stop (common practice, no source). */
const USUAL_THIRDS: Readonly<Record<Exclude<LightPurpose, 'main'>, number>> = {
  fill: -6,
  background: -2,
  rim: -1,
  accent: -3,
}

const within = (value: number, least: number, most: number) => Math.min(most, Math.max(least, value))

/**
 * What is asked of a light to begin with: of the first main the camera's f-number, of another main and of what is off
 * nothing, of the others what they are now, or what is usual where they read nothing.
 */
export function firstWish(light: Light, whole: WholeSetup, reading: SetupReading): WishDraft {
  if (!light.isOn) return 'keep'
  if (light.purpose === 'main') {
    const first = whole.lights.find((one) => one.purpose === 'main' && one.isOn)
    if (first?.id !== light.id) return 'keep'
    return within(Math.round(6 * Math.log2(whole.setup.camera.fNumber)), ...F_THIRDS)
  }
  const under = reading.lights.find(({ lightId }) => lightId === light.id)?.underMainStops ?? null
  const thirds = under === null ? USUAL_THIRDS[light.purpose] : Math.round(-3 * under)
  return within(thirds, AGAINST_THIRDS[1], AGAINST_THIRDS[0])
}

/** What can be asked of a light of this purpose, as a list to choose from; `value` is read by `draftOf`. */
export function wishOptions(purpose: LightPurpose): { value: string; label: string }[] {
  const keep = { value: 'keep', label: 'as it is' }
  if (purpose === 'main') {
    const [least, most] = F_THIRDS
    const all = Array.from({ length: most - least + 1 }, (_, index) => least + index)
    return [keep, ...all.map((thirds) => ({ value: String(thirds), label: fNumberLabel(fNumberOfThirds(thirds)) }))]
  }
  const [most, least] = AGAINST_THIRDS
  const all = Array.from({ length: most - least + 1 }, (_, index) => most - index)
  return [
    keep,
    ...all.map((thirds) => ({
      value: String(thirds),
      label: thirds === 0 ? 'level with the main' : stopsLabel(thirds / 3),
    })),
  ]
}

export function draftOf(value: string): WishDraft {
  return value === 'keep' ? 'keep' : Number(value)
}

/** The wishes behind what was chosen; lights that stay as they are have none. */
export function wishesOf(lights: readonly Light[], draftFor: (light: Light) => WishDraft): PowerWish[] {
  return lights.flatMap((light): PowerWish[] => {
    const draft = draftFor(light)
    if (draft === 'keep') return []
    if (light.purpose === 'main') return [{ lightId: light.id, fNumber: fNumberOfThirds(draft) }]
    return [{ lightId: light.id, againstMainStops: draft / 3 }]
  })
}

/** The lights whose setting would change, with their new power. */
export function changedPowers(
  lights: readonly Light[],
  suggestions: readonly PowerSuggestion[],
): { id: LightId; power: number }[] {
  return lights.flatMap(({ id, power }) => {
    const next = suggestions.find(({ lightId }) => lightId === id)
    return next && next.offStops !== null && powerLabel(next.power) !== powerLabel(power)
      ? [{ id, power: next.power }]
      : []
  })
}
