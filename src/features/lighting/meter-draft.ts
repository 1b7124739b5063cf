import type { KitItem } from '#shared/api/kit.ts'
import { type MeterReading, meteredOf, withMetered } from '#shared/domain/kit/meter-reading.ts'
import { discFactor, fNumberOfExposure, luminousExposure } from '#shared/domain/lighting/exposure.ts'
import { NEAREST_M, faceRadiusM, outputOf, zoomOf } from '#shared/domain/lighting/light-output.ts'
import type { LightReading } from '#shared/domain/lighting/readings.ts'
import { type Light, type LightUnit, isLamp } from '#shared/domain/lighting/schema.ts'

/** What somebody types of one light: what the meter showed, and how far off and at what power it stood. */
export type MeterDraft = { fNumber: number | null; distanceM: number; power: number }

/** Less than this share of its light reaches the place where it is read: it looks elsewhere (assumption). */
export const SHARE_LEAST = 0.05

/** What the drawing begins a reading with: nothing read yet, its own distance and power. */
export function draftOf(light: Light, at: Pick<LightReading, 'distanceM'>): MeterDraft {
  return { fNumber: null, distanceM: Number(at.distanceM.toFixed(2)), power: light.power }
}

/** f-number that the numbers say for a meter held towards the light there, whether it is on or off. */
export function assumedFNumber(
  light: Light,
  at: Pick<LightReading, 'beamShare'>,
  { distanceM, power }: Pick<MeterDraft, 'distanceM' | 'power'>,
  iso: number,
): number {
  const d = Math.max(NEAREST_M, distanceM)
  const { guideNumberM } = outputOf({ ...light, power })
  return fNumberOfExposure(luminousExposure(guideNumberM, d) * at.beamShare * discFactor(d, faceRadiusM(light)), iso)
}

/** The reading as the kit room keeps it; gels on the head and the way it looks are undone. */
export function readingOf(
  light: Light,
  at: Pick<LightReading, 'beamShare'>,
  draft: MeterDraft,
  iso: number,
): MeterReading {
  return {
    fNumber: draft.fNumber ?? 0,
    distanceM: draft.distanceM,
    power: draft.power,
    iso,
    zoomMm: zoomOf(light),
    modifier: light.modifier && { kitId: light.modifier.kitId, name: light.modifier.name },
    radiusM: faceRadiusM(light),
    beamShare: at.beamShare,
    gelLossStops: outputOf(light).gelLossStops,
  }
}

export type Measured = { light: Light; reading: MeterReading }

/** A kit item with everything that was measured of it; null when it is no flash unit. `when` is the day in words. */
export function measuredItem(item: KitItem, measured: readonly Measured[], when: string): KitItem | null {
  if (item.body.kind !== 'unit') return null
  let { numbers } = item.body
  for (const { light, reading } of measured)
    if (light.unit.kitId === item.id) numbers = withMetered(numbers, meteredOf(reading, when))
  return { ...item, body: { kind: 'unit', numbers } }
}

/**
 * The unit of a light with its reading. `kept` is the version of the kit room that holds the reading; a copy that was
 * up to date before it stays up to date, an older one is still offered what else is newer.
 */
export function measuredUnit(
  { light, reading }: Measured,
  when: string,
  kept: { before: number; now: number } | null,
): LightUnit {
  const { unit } = light
  if (isLamp(unit.numbers)) return unit
  const version = kept && unit.version === kept.before ? kept.now : unit.version
  return { ...unit, version, numbers: withMetered(unit.numbers, meteredOf(reading, when)) }
}
