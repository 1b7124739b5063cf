import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { kelvinLabel } from '#shared/domain/lighting/gel.ts'
import { type Depth, FRAME_LONG_MM, FRAME_SHORT_MM, fieldM } from '#shared/domain/lighting/lens.ts'
import { ratioLabel } from '#shared/domain/lighting/ratio.ts'
import { fNumberLabel, metresLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Figure } from '#src/ui/figure.tsx'
import { Workings } from './how.tsx'

/** The few figures that say how a setup looks. */
export function Figures({ whole, reading }: { whole: WholeSetup; reading: SetupReading }) {
  const { camera } = whole.setup
  const { ratio, wall, depth, main } = reading
  return (
    <div className="mt-4 flex flex-wrap gap-x-5 gap-y-3">
      {ratio && (
        <Figure
          label="Main + fill : fill"
          value={ratioLabel(ratio.value)}
          detail={
            <Workings
              formula="R = 2ˢ + 1"
              inputs={[
                ['Main alone', fNumberLabel(reading.mainFNumber ?? 0)],
                ['All fill together', fNumberLabel(ratio.fillFNumber)],
                ['Main over fill, s', `${ratio.stops.toFixed(2)} stops`],
                ['main : fill', ratioLabel(ratio.mainToFill)],
              ]}
              note="The convention here is (main + fill) : fill, as in US Army subcourse SS0510. Panels and ambient count as fill."
            />
          }
        />
      )}
      {reading.totalFNumber > 0 && (
        <Figure
          label="At the face"
          value={fNumberLabel(reading.totalFNumber)}
          detail={
            <Workings
              formula="N = √(Σ N²)"
              inputs={[
                ['Main', reading.mainFNumber === null ? 'none' : fNumberLabel(reading.mainFNumber)],
                ['Fill, panels, ambient', ratio ? fNumberLabel(ratio.fillFNumber) : 'none'],
                [
                  'Ambient alone',
                  reading.ambientFNumber === null ? 'not measured' : fNumberLabel(reading.ambientFNumber),
                ],
                ['Camera', `${fNumberLabel(camera.fNumber)}, ISO ${camera.iso}`],
              ]}
              note="Lights add linearly. Rim, accent and background lights are left out. Incident, C = 250."
            />
          }
        />
      )}
      {wall.mainUnderStops !== null && (
        <Figure
          label="Main on the wall"
          value={stopsLabel(-wall.mainUnderStops)}
          detail={
            <Workings
              formula="E = I · cos φ / d²"
              inputs={[
                ['Under the main at the sitter', `${wall.mainUnderStops.toFixed(2)} stops`],
                ['Sitter to wall', metresLabel(reading.sitterToWallM)],
              ]}
              note="The main’s own spill behind the sitter’s head, with its angle off axis and the slant of the wall. The sitter’s shadow is not taken off."
            />
          }
        />
      )}
      {(wall.colourK !== null || wall.beyondBlue) && (
        <Figure
          label="Wall light"
          value={wall.colourK === null ? 'deep blue' : kelvinLabel(wall.colourK)}
          detail={
            <Workings
              formula="10⁶ / (10⁶ / T + shifts)"
              inputs={[['White balance', `${camera.whiteBalanceK} K`]]}
              note={
                wall.colourK === null
                  ? 'Bluer than any colour temperature.'
                  : 'Colour of the brightest background light behind its gels; the wall’s own colour comes on top.'
              }
            />
          }
        />
      )}
      <Figure
        label="In focus"
        value={depthLabel(depth)}
        detail={
          <Workings
            formula="H = f²/(N·c) + f"
            inputs={[
              ['Lens', `${camera.focalMm} mm, ${fNumberLabel(camera.fNumber)}`],
              ['Camera to the eyes', `${reading.cameraToSitterM.toFixed(2)} m`],
              ['Near', `${depth.nearM.toFixed(2)} m`],
              ['Far', depth.farM === null ? 'to infinity' : `${depth.farM.toFixed(2)} m`],
              ['Hyperfocal, H', `${depth.hyperfocalM.toFixed(1)} m`],
              [
                'The lens sees there',
                `${fieldM(camera.focalMm, FRAME_SHORT_MM, reading.cameraToSitterM).toFixed(2)} × ${fieldM(camera.focalMm, FRAME_LONG_MM, reading.cameraToSitterM).toFixed(2)} m`,
              ],
            ]}
            note="Circle of confusion 0.030 mm on 36 × 24 mm."
          />
        }
      />
      {main && (
        <Figure
          label="Softness"
          value={`${Math.round(main.apparentSizeDeg)}°`}
          detail={
            <Workings
              formula="2 · atan(D / 2d); edge D · b / a"
              inputs={[
                ['The main covers, seen from the skin', `${main.apparentSizeDeg.toFixed(1)}°`],
                ['Soft edge of a shadow thrown from 5 cm', `${Math.round(main.penumbraM * 1000)} mm`],
                ['Main above the eye line', `${main.elevationDeg.toFixed(0)}°`],
              ]}
            />
          }
        />
      )}
    </div>
  )
}

function depthLabel({ nearM, farM }: Depth): string {
  if (farM === null) return `${nearM.toFixed(1)} m on`
  const sharpM = farM - nearM
  return sharpM < 1 ? `${Math.round(sharpM * 100)} cm` : metresLabel(sharpM)
}
