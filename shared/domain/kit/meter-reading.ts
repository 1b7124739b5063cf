import type { KitItemId } from '#shared/ids.ts'
import { fNumberLabel, powerLabel } from '#shared/domain/lighting/words.ts'
import { MOST_GUIDE_NUMBER_M } from './faults.ts'
import type { Metered, UnitNumbers } from './schema.ts'

/** One reading of a light with a flash meter: incident, on its axis unless `beamShare` says otherwise. */
export type MeterReading = {
  fNumber: number
  /** From the emitting face to the meter, metres. */
  distanceM: number
  /** Power as a fraction of full. */
  power: number
  iso: number
  /** Zoom of the head; null when it has none. */
  zoomMm: number | null
  /** What is on the head; null: bare. */
  modifier: { kitId: KitItemId; name: string } | null
  /** Radius of the disc that the emitting face counts as, metres; 0: a point. */
  radiusM?: number
  /** Share of the light on axis that reaches the meter's place, in (0, 1]. */
  beamShare?: number
  /** Stops that gels on the head took while it was read. */
  gelLossStops?: number
}

export type MeterField = 'fNumber' | 'distanceM' | 'power' | 'iso' | 'zoomMm'
export type MeterFault = { field: MeterField; message: string }

type UnitRange = Pick<UnitNumbers, 'minPowerDenominator' | 'zoom'>

const F_LEAST = 0.7
const F_MOST = 128
/** Kept to two decimals: less would be nothing. */
const LEAST_GUIDE_NUMBER_M = 0.01

/**
 * What is wrong with a reading, each with a sentence for its field; none: a guide number can be worked out. Limits of
 * f-number are those of lenses and meters (from memory), of distance those of a room.
 */
export function meterFaults(reading: MeterReading, unit: UnitRange): MeterFault[] {
  const { fNumber, distanceM, power, iso, zoomMm } = reading
  const faults: MeterFault[] = []
  const add = (field: MeterField, message: string) => faults.push({ field, message })
  if (!(fNumber >= F_LEAST && fNumber <= F_MOST))
    add('fNumber', `A meter reads between f/${F_LEAST} and f/${F_MOST}: put in the number it showed, such as 5.6.`)
  if (!(distanceM > 0))
    add('distanceM', 'At no distance nothing can be worked out: measure from the face of the light to the meter.')
  else if (distanceM < 0.1 || distanceM > 50)
    add('distanceM', 'Measure between 0.1 m and 50 m from the face of the light.')
  const least = 1 / unit.minPowerDenominator
  if (!(power > 0)) add('power', 'The power it was read at is a part of full, such as 1/4.')
  else if (power > 1) add('power', 'Nothing gives more than full power.')
  else if (power < least * 0.99)
    add('power', `This unit goes down to ${powerLabel(least)}: put in the power it was really set to.`)
  if (!(iso >= 12 && iso <= 409_600)) add('iso', 'The meter’s ISO lies between 12 and 409 600.')
  if (zoomMm !== null && !(zoomMm >= 10 && zoomMm <= 400)) add('zoomMm', 'A zoom setting lies between 10 and 400 mm.')
  else if (zoomMm === null && unit.zoom.length > 0) add('zoomMm', 'This head zooms: say at which setting it was read.')
  const guideNumberM = guideNumberOfReading(reading)
  if (faults.length === 0 && !(guideNumberM >= LEAST_GUIDE_NUMBER_M && guideNumberM <= MOST_GUIDE_NUMBER_M))
    add(
      'fNumber',
      `That would be a guide number of ${Number(guideNumberM.toPrecision(3))} m, which no head has: check distance, power and ISO.`,
    )
  return faults
}

/**
 * Guide number in metres, at ISO 100 and full power, that a head and what is on it had together:
 * N·d / √(ISO/100 · p · share · d²/(d² + r²)) · 2^(gels/2). The face's size is undone (IES definitions 9.1.1), so
 * that the number holds at other distances. NaN for what `meterFaults` refuses.
 */
export function guideNumberOfReading(reading: MeterReading): number {
  const { fNumber, distanceM, power, iso, radiusM = 0, beamShare = 1, gelLossStops = 0 } = reading
  const disc = distanceM ** 2 / (distanceM ** 2 + radiusM ** 2)
  return (fNumber * distanceM * 2 ** (gelLossStops / 2)) / Math.sqrt((iso / 100) * power * beamShare * disc)
}

/** A reading in words: "f/5.6 at 2 m, 1/4, ISO 100, 50 mm, with 90 cm octa, 1 Dec 2026". `when` as it shall read. */
export function readingWords(reading: MeterReading, when: string): string {
  const { distanceM, power, iso, zoomMm, modifier, gelLossStops = 0 } = reading
  return [
    `${fNumberLabel(reading.fNumber)} at ${Number(distanceM.toFixed(2))} m`,
    powerLabel(power) === 'full' ? 'full power' : powerLabel(power),
    `ISO ${iso}`,
    ...(zoomMm === null ? [] : [`${zoomMm} mm`]),
    modifier === null ? 'bare' : `with ${modifier.name}`,
    ...(gelLossStops > 0 ? [`gels of ${gelLossStops.toFixed(1)} stops undone`] : []),
    ...(when === '' ? [] : [when]),
  ]
    .join(', ')
    .slice(0, 200)
}

/** The entry of the kit for a reading; `when` is the day in words. */
export function meteredOf(reading: MeterReading, when: string): Metered {
  return {
    modifierKitId: reading.modifier?.kitId ?? null,
    zoomMm: reading.zoomMm,
    guideNumberM: Number(guideNumberOfReading(reading).toFixed(2)),
    source: readingWords(reading, when),
  }
}

/** The measured entry for a head with this on it at this zoom; undefined: nobody has measured it. */
export function findMetered(
  numbers: Pick<UnitNumbers, 'metered'>,
  modifierKitId: KitItemId | null,
  zoomMm: number | null,
): Metered | undefined {
  return numbers.metered.find((entry) => entry.modifierKitId === modifierKitId && entry.zoomMm === zoomMm)
}

/** A unit with a measured entry: it takes the place of the one for the same modifier and zoom. The oldest goes beyond 60. */
export function withMetered(numbers: UnitNumbers, entry: Metered): UnitNumbers {
  const others = withoutMetered(numbers, entry).metered
  return { ...numbers, metered: [...others, entry].slice(-60) }
}

/** A unit without the measured entry for this modifier and zoom. */
export function withoutMetered(
  numbers: UnitNumbers,
  { modifierKitId, zoomMm }: Pick<Metered, 'modifierKitId' | 'zoomMm'>,
): UnitNumbers {
  return {
    ...numbers,
    metered: numbers.metered.filter((entry) => entry.modifierKitId !== modifierKitId || entry.zoomMm !== zoomMm),
  }
}
