import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'
import { readArrivalOf } from './at-sitter.ts'
import { combineFNumbers, exposureOfFNumber, fNumberOfExposure } from './exposure.ts'
import type { Light } from './schema.ts'
import { powersOf, stopsBetween } from './stops.ts'
import { fNumberLabel, powerLabel, purposeWord } from './words.ts'

/** What a light shall read where it is read (at the sitter, or on the wall): an f-number, or stops against the mains. */
export type PowerWish = { lightId: string } & (
  | { fNumber: number }
  /** Negative is under the mains. */
  | { againstMainStops: number }
)

export type PowerSuggestion = {
  lightId: string
  /** The setting of the unit that comes nearest. */
  power: number
  wantedFNumber: number | null
  /** At that setting. */
  readsFNumber: number
  readsAgainstMainStops: number | null
  /** What it reads over what was wished; null where the wish has no number. */
  offStops: number | null
  /** Set when the wish cannot be met, or met only by switching the light on. */
  words: string | null
}

/** Settings lie a third apart, so the nearest is within a sixth of a stop. */
const WITHIN_STOPS = 1 / 6 + 1e-9

type Ready = { light: Light; name: string; fullLxS: number; distanceM: number }

/** A light as its reading is taken, switched on at full power. */
function readyAt(light: Light, whole: WholeSetup): Ready {
  const { exposureLxS, distanceM } = readArrivalOf({ ...light, isOn: true, power: 1 }, whole)
  return { light, name: purposeWord(light.purpose).toLowerCase(), fullLxS: exposureLxS, distanceM }
}

function nearestPower(light: Light, share: number): number {
  const powers = powersOf(light.unit.numbers.minPowerDenominator)
  return powers.reduce((best, power) =>
    Math.abs(Math.log2(power / share)) < Math.abs(Math.log2(best / share)) ? power : best,
  )
}

/** What is too little or too much, and ways out; the ISO is one only where an f-number is wished for. */
function wordsFor(
  { light, name, distanceM }: Ready,
  offStops: number,
  isAgainstMain: boolean,
  unit: LengthUnit,
): string | null {
  const stops = Math.abs(offStops)
  if (offStops < -WITHIN_STOPS)
    return `At full power the ${name} stays ${stops.toFixed(1)} stops under: move it to about ${lengthLabel(distanceM * 2 ** (-stops / 2), unit)}, or ${isAgainstMain ? 'take the main down' : 'raise the ISO'}.`
  if (offStops > WITHIN_STOPS) {
    const { minPowerDenominator } = light.unit.numbers
    const least =
      minPowerDenominator > 1 ? `At ${powerLabel(1 / minPowerDenominator)}, its least,` : 'It cannot be dimmed:'
    return `${least} the ${name} is ${stops.toFixed(1)} stops over: move it back to about ${lengthLabel(distanceM * 2 ** (stops / 2), unit)}, put a gel or diffuser before it, or ${isAgainstMain ? 'take the main up' : 'lower the ISO'}.`
  }
  return light.isOn ? null : `The ${name} is off: switch it on.`
}

type Target = { fNumber: number | null; words: string | null; isAgainstMain: boolean }

/**
 * Sets a light as near as its unit can to a target; without one it stays as it is and its words say why. Its power is
 * then what the other readings are taken with.
 */
function settled(ready: Ready, target: Target, iso: number, unit: LengthUnit): PowerSuggestion {
  const { light, name, fullLxS } = ready
  const asItIs = (words: string): PowerSuggestion => ({
    lightId: light.id,
    power: light.power,
    wantedFNumber: target.fNumber,
    readsFNumber: fNumberOfExposure(light.isOn ? fullLxS * Math.max(0, light.power) : 0, iso),
    readsAgainstMainStops: null,
    offStops: null,
    words,
  })
  const { fNumber } = target
  if (fNumber === null) return asItIs(target.words ?? `There is no wish for the ${name} to work with.`)
  if (!(fullLxS > 0)) return asItIs(`The ${name} gives no light where it is read: no power can change that.`)
  const power = nearestPower(light, exposureOfFNumber(fNumber, iso) / fullLxS)
  const readsFNumber = fNumberOfExposure(fullLxS * power, iso)
  const offStops = stopsBetween(readsFNumber, fNumber)
  return {
    lightId: light.id,
    power,
    wantedFNumber: fNumber,
    readsFNumber,
    readsAgainstMainStops: null,
    offStops,
    words: wordsFor(ready, offStops, target.isAgainstMain, unit),
  }
}

/**
 * The power settings of the units (thirds down to their least) that come nearest to the wishes, with what each light
 * then reads. Wishes against the mains are measured against what the mains will really read, all together: those with
 * an f-number as they are set here, and those without a wish as they are. Each light stands alone in its wish; panels
 * follow their lights and are not set. Nothing is written: whoever asks takes the settings over. Words say lengths in `unit`.
 */
export function suggestPower(
  whole: WholeSetup,
  wishes: readonly PowerWish[],
  unit: LengthUnit = 'm',
): PowerSuggestion[] {
  const { iso } = whole.setup.camera
  const wishOf = new Map(wishes.map((wish) => [wish.lightId, wish]))
  const lights = whole.lights.map((light) => readyAt(light, whole))
  const settledBy = new Map<string, PowerSuggestion>()
  for (const ready of lights) {
    const wish = wishOf.get(ready.light.id)
    if (!wish || !('fNumber' in wish)) continue
    const isGiven = Number.isFinite(wish.fNumber) && wish.fNumber > 0
    const words = isGiven ? null : `${fNumberLabel(0)} is no f-number to reach: put in one above 0, such as 5.6.`
    settledBy.set(
      ready.light.id,
      settled(ready, { fNumber: isGiven ? wish.fNumber : null, words, isAgainstMain: false }, iso, unit),
    )
  }
  const mains = lights.flatMap(({ light, fullLxS }) => {
    const set = settledBy.get(light.id)
    if (light.purpose !== 'main' || (!set && (wishOf.has(light.id) || !light.isOn))) return []
    return [set?.readsFNumber ?? fNumberOfExposure(fullLxS * Math.max(0, light.power), iso)]
  })
  const main = combineFNumbers(mains)
  for (const ready of lights) {
    const wish = wishOf.get(ready.light.id)
    if (!wish || 'fNumber' in wish) continue
    const words =
      main > 0
        ? 'Put in stops against the main, such as −2.'
        : 'There is no main to measure against: wish for its f-number first.'
    const isGiven = main > 0 && Number.isFinite(wish.againstMainStops)
    settledBy.set(
      ready.light.id,
      settled(
        ready,
        { fNumber: isGiven ? main * 2 ** (wish.againstMainStops / 2) : null, words, isAgainstMain: true },
        iso,
        unit,
      ),
    )
  }
  return lights.flatMap(({ light }) => {
    const set = settledBy.get(light.id)
    if (!set) return []
    const isCompared = main > 0 && set.readsFNumber > 0
    return [{ ...set, readsAgainstMainStops: isCompared ? stopsBetween(set.readsFNumber, main) : null }]
  })
}
