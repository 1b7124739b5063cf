import type { LightReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import { fNumberLabel, powerLabel } from '#shared/domain/lighting/words.ts'
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

/** Where a light's reading comes from, step by step. */
export function LightWorkings({ light, reading, iso }: { light: Light; reading: LightReading; iso: number }) {
  const { numbers } = light.unit
  const inputs: InputRow[] = [
    isLamp(numbers)
      ? ['Lux at a metre', numbers.luxAtMetre.value, stated(numbers.luxAtMetre)]
      : [
          light.zoomMm !== null && numbers.zoom.length > 0 ? `Guide number at ${light.zoomMm} mm` : 'Guide number',
          `${reading.fullGuideNumberM.toFixed(1)} m`,
          stated(numbers.guideNumberM),
        ],
    ['Power', powerLabel(light.power)],
  ]
  if (light.modifier)
    inputs.push([light.modifier.name, stops(reading.modifierLossStops), stated(light.modifier.numbers.lossStops)])
  for (const gel of light.gels)
    inputs.push([
      gel.name,
      `${Math.round(gel.numbers.transmission.value * 100)} % through`,
      stated(gel.numbers.transmission),
    ])
  inputs.push(
    ['Guide number that is left', `${reading.guideNumberM.toFixed(1)} m`],
    [reading.where === 'wall' ? 'Distance to the wall' : 'Distance to the eyes', `${reading.distanceM.toFixed(2)} m`],
    [`${reading.offAxisDeg.toFixed(0)}° off its axis`, `× ${reading.beamShare.toFixed(2)}`, BEAMS[reading.beamKind]],
    ['Size of its face, near', `× ${reading.discShare.toFixed(2)}`, 'd²/(d² + r²)'],
  )
  return (
    <Workings
      formula={`${fNumberLabel(reading.fNumber)} (exactly ${reading.fNumber.toFixed(2)}) = √(H · ISO / 250)`}
      inputs={[...inputs, ['Light on the spot, H', `${reading.exposureLxS.toPrecision(3)} lx·s`], ['ISO', iso]]}
      note={
        reading.where === 'wall'
          ? 'Incident, at the wall where its axis meets it, with the slant taken off. A meter there decides.'
          : 'Incident, metered towards this light alone. A meter at the face decides.'
      }
    />
  )
}
