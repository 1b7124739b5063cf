import type { LightReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import { shutterLabel } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel, powerLabel } from '#shared/domain/lighting/words.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { type InputRow, Workings, stated } from './how.tsx'

const BEAMS: Record<LightReading['beamKind'], string> = {
  gaussian: 'beam angle, bell-shaped profile',
  cosine: 'beam angle, cosine profile',
  'zoom head': 'what the zoom covers, soft edge (assumed)',
  unknown: 'beam not known: nothing taken off',
}

function stops(value: number): string {
  return value === 0 ? '0' : `−${value.toFixed(2)} stops`
}

/** What the unit gives: a lamp's lux, what a meter read of head and modifier together, or the guide number by the kit. */
function sourceRows(light: Light, reading: LightReading, guideNumber: (metres: number) => string): InputRow[] {
  const { numbers } = light.unit
  const loss: InputRow[] = light.modifier
    ? [[light.modifier.name, stops(reading.modifierLossStops), stated(light.modifier.numbers.lossStops)]]
    : []
  if (isLamp(numbers)) return [['Lux at a metre', numbers.luxAtMetre.value, stated(numbers.luxAtMetre)], ...loss]
  const full = guideNumber(reading.fullGuideNumberM)
  if (reading.measured !== null)
    return [[light.modifier ? 'Guide number with the modifier' : 'Guide number', full, `measured: ${reading.measured}`]]
  const name = light.zoomMm !== null && numbers.zoom.length > 0 ? `Guide number at ${light.zoomMm} mm` : 'Guide number'
  return [[name, full, stated(numbers.guideNumberM)], ...loss]
}

/** The beam angle where it is known, with its source. */
function beamRows({ unit: { numbers }, modifier }: Light): InputRow[] {
  const beam = modifier ? modifier.numbers.beamDeg : isLamp(numbers) ? numbers.beamDeg : null
  return beam ? [['Beam angle', `${beam.value}°`, stated(beam)]] : []
}

type LightWorkingsProps = { light: Light; reading: LightReading; iso: number; shutterS: number }

/** Where a light's reading comes from, step by step. */
export function LightWorkings({ light, reading, iso, shutterS }: LightWorkingsProps) {
  const unit = useLengthUnit()
  const exact = (metres: number) => lengthLabel(metres, unit, true)
  const guideNumber = (metres: number) => (unit === 'm' ? `${metres.toFixed(1)} m` : exact(metres))
  const inputs: InputRow[] = [
    ...sourceRows(light, reading, guideNumber),
    ['Power', powerLabel(light.power)],
    ...light.gels.map(({ name, numbers }): InputRow => [
      name,
      `${Math.round(numbers.transmission.value * 100)} % through`,
      stated(numbers.transmission),
    ]),
    reading.luxAtMetre === null
      ? ['Guide number that is left', guideNumber(reading.guideNumberM)]
      : [`Lux at a metre that is left, for ${shutterLabel(shutterS)}`, Math.round(reading.luxAtMetre)],
    [reading.where === 'wall' ? 'Distance to the wall' : 'Distance to the eyes', exact(reading.distanceM)],
    ...beamRows(light),
    [`${reading.offAxisDeg.toFixed(0)}° off its axis`, `× ${reading.beamShare.toFixed(2)}`, BEAMS[reading.beamKind]],
    ['Size of its face, near', `× ${reading.discShare.toFixed(2)}`, 'd²/(d² + r²)'],
  ]
  return (
    <Workings
      formula={
        reading.isOn
          ? `${fNumberLabel(reading.fNumber)} (exactly ${reading.fNumber.toFixed(2)}) = √(H · ISO / 250)`
          : 'It is off: it gives nothing.'
      }
      inputs={[...inputs, ['Light on the spot, H', `${reading.exposureLxS.toPrecision(3)} lx·s`], ['ISO', iso]]}
      note={
        reading.where === 'wall'
          ? 'Incident, at the wall where its axis meets it, with the slant taken off. A meter there decides.'
          : 'Incident, metered towards this light alone. A meter at the face decides.'
      }
    />
  )
}
