import type { ReactNode } from 'react'
import { kelvinLabel } from '#shared/domain/lighting/gel.ts'
import { ratioLabel } from '#shared/domain/lighting/ratio.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { isLamp } from '#shared/domain/lighting/schema.ts'
import { fNumberLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { Figure } from '#src/ui/figure.tsx'
import { type InputRow, Workings, stated } from './how.tsx'

type ReadingProps = { whole: WholeSetup; reading: SetupReading }

/** The few figures that say how a setup looks. */
export function Figures({ whole, reading }: ReadingProps) {
  const { ratio, wall } = reading
  return (
    <div className="mt-4 flex flex-wrap gap-x-5 gap-y-3 empty:hidden">
      {ratio && (
        <Figure
          label="Main + fill : fill"
          value={ratioLabel(ratio.value)}
          detail={<RatioWorkings reading={reading} ratio={ratio} />}
        />
      )}
      {wall.mainUnderStops !== null && (
        <Figure
          label="Main on the wall"
          value={stopsLabel(-wall.mainUnderStops)}
          detail={<SpillWorkings reading={reading} underStops={wall.mainUnderStops} />}
        />
      )}
      {(wall.colourK !== null || wall.beyondBlue) && (
        <Figure
          label="Wall light"
          value={wall.colourK === null ? 'deep blue' : kelvinLabel(wall.colourK)}
          detail={<ColourWorkings whole={whole} reading={reading} />}
        />
      )}
    </div>
  )
}

/** Colour of the brightest background light: its own, and what its gels shift. */
function ColourWorkings({ whole, reading }: ReadingProps) {
  const [brightest] = reading.lights
    .filter((own) => own.where === 'wall' && own.fNumber > 0)
    .sort((a, b) => b.fNumber - a.fNumber)
  const light = whole.lights.find(({ id }) => id === brightest?.lightId)
  const inputs: InputRow[] = []
  if (light) {
    const { numbers } = light.unit
    const own = isLamp(numbers) ? numbers.colourK : numbers.flashColourK
    inputs.push([`${light.unit.name}, T`, `${own.value} K`, stated(own)])
    for (const { name, numbers: gel } of light.gels) {
      const printed = gel.printedMired === null ? '' : ` (printed ${signed(gel.printedMired)})`
      inputs.push([name, `${signed(gel.miredShift.value)} mired${printed}`, stated(gel.miredShift)])
    }
  }
  return (
    <Workings
      formula="10⁶ / (10⁶ / T + shifts)"
      inputs={[...inputs, ['White balance', `${whole.setup.camera.whiteBalanceK} K`]]}
      note={
        reading.wall.colourK === null
          ? 'Bluer than any colour temperature.'
          : 'Colour of the brightest background light behind its gels; the wall’s own colour comes on top.'
      }
    />
  )
}

const signed = (value: number) => `${value < 0 ? '−' : '+'}${Math.abs(value)}`

export function RatioWorkings({
  reading,
  ratio,
}: {
  reading: SetupReading
  ratio: NonNullable<SetupReading['ratio']>
}): ReactNode {
  return (
    <Workings
      formula="R = 2ˢ + 1"
      inputs={[
        ['Main alone', fNumberLabel(reading.mainFNumber ?? 0)],
        ['All fill together', fNumberLabel(ratio.fillFNumber)],
        ['Main over fill, s', `${ratio.stops.toFixed(2).replace('-', '−')} stops`],
        ['main : fill', ratioLabel(ratio.mainToFill)],
      ]}
      note="The convention here is (main + fill) : fill, as in US Army subcourse SS0510. Panels and ambient count as fill."
    />
  )
}

function SpillWorkings({ reading, underStops }: { reading: SetupReading; underStops: number }) {
  const unit = useLengthUnit()
  const { main } = reading.wall
  const inputs: InputRow[] = [
    ['Under the main at the sitter', `${underStops.toFixed(2).replace('-', '−')} stops`],
    ['Sitter to wall', lengthLabel(reading.sitterToWallM, unit, true)],
  ]
  if (main)
    inputs.push(
      ['Main to that spot, d', lengthLabel(main.distanceM, unit, true)],
      ['Off its axis', `${main.offAxisDeg.toFixed(0)}°`],
      ['Slant of the wall, cos φ', main.cosine.toFixed(2)],
    )
  return (
    <Workings
      formula="E = I(θ) · cos φ / d²"
      inputs={inputs}
      note="The main’s own spill behind the sitter’s head. The sitter’s shadow is not taken off."
    />
  )
}
