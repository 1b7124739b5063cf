import { kelvinLabel } from '#shared/domain/lighting/gel.ts'
import { floorDistance } from '#shared/domain/lighting/geometry.ts'
import { faceOf } from '#shared/domain/lighting/light-output.ts'
import { ratioLabel } from '#shared/domain/lighting/ratio.ts'
import { sizeLabel, smallLabel, underWords, whiteWords } from '#shared/domain/lighting/reading-words.ts'
import type { AmbientReading, MainReading, SetupReading } from '#shared/domain/lighting/readings.ts'
import { SOCKET_LIMIT_DEG } from '#shared/domain/lighting/softness.ts'
import { shutterLabel } from '#shared/domain/lighting/stops.ts'
import { type Glow, type Patch, SHOULDERS_BELOW_EYES_M } from '#shared/domain/lighting/wall.ts'
import { fNumberLabel, inSentence, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lightNames } from '#shared/domain/recipes/sheet.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { eyeLineWords } from '../../measures.ts'
import { RatioWorkings } from './figures.tsx'
import { type InputRow, Workings } from './how.tsx'
import { Group, Line, type OpenGroups } from './lines.tsx'

type LightGroupsProps = { whole: WholeSetup; reading: SetupReading; groups: OpenGroups }

/** What there is to know of the light beyond the table: ambient, the glow, the main. */
export function LightGroups({ whole, reading, groups }: LightGroupsProps) {
  const unit = useLengthUnit()
  const { ambient, glow, main } = reading
  const glowSum = glow && [
    ...(glow.underMainStops === null ? [] : [stopsLabel(-glow.underMainStops)]),
    sizeLabel(glow.withinOneStop.widthM, glow.withinOneStop.heightM, unit),
  ]
  return (
    <>
      <Group
        title="Ambient against flash"
        sum={
          ambient === null
            ? 'not measured'
            : ambient.underFlashStops === null
              ? fNumberLabel(ambient.fNumber)
              : stopsLabel(-ambient.underFlashStops)
        }
        groups={groups}
      >
        <RatioLine reading={reading} />
        {ambient === null ? (
          <Line
            label="Ambient"
            value={null}
            words="Not measured, so it is left out. Read the lux at the sitter without flash and put it in at the camera."
          />
        ) : (
          <AmbientLines whole={whole} ambient={ambient} />
        )}
      </Group>
      <Group title="Glow on the wall" sum={glowSum ? glowSum.join(' · ') : 'none'} groups={groups}>
        {glow ? (
          <GlowLines whole={whole} reading={reading} glow={glow} />
        ) : (
          <Line label="Glow" value={null} words="The camera sees no lit wall." />
        )}
      </Group>
      {main && (
        <Group title="Height and softness of the main" sum={`${Math.round(main.elevationDeg)}°`} groups={groups}>
          <MainLines whole={whole} reading={reading} main={main} />
        </Group>
      )}
    </>
  )
}

function RatioLine({ reading }: { reading: SetupReading }) {
  const { ratio } = reading
  if (!ratio) return <Line label="Main and fill" value={null} words="There is no fill, panel or ambient to compare." />
  return (
    <Line
      label="Main : fill"
      value={ratioLabel(ratio.mainToFill)}
      words={`All fill together is ${underWords(ratio.stops, 'the main')}. Elsewhere also called ${ratioLabel(ratio.value)}, (main + fill) : fill.`}
    >
      <RatioWorkings reading={reading} ratio={ratio} />
    </Line>
  )
}

function AmbientLines({ whole, ambient }: { whole: WholeSetup; ambient: AmbientReading }) {
  const { ambientLux, camera } = whole.setup
  return (
    <>
      <Line
        label="Ambient"
        value={fNumberLabel(ambient.fNumber)}
        words={
          ambient.underFlashStops === null
            ? 'No flash reaches the sitter.'
            : `${underWords(ambient.underFlashStops, 'the flash')} at ${shutterLabel(camera.shutterS)}`
        }
      >
        <Workings
          formula={`f/${ambient.fNumber.toFixed(2)} = √(E · t · ISO / 250)`}
          inputs={[
            ['Light at the sitter, E', `${Math.round(ambientLux ?? 0)} lux`, 'put in at the camera'],
            ['Shutter, t', shutterLabel(camera.shutterS)],
            ['ISO', camera.iso],
          ]}
          note="Incident, C = 250. Compared with mains, fills and panels that flash, together."
        />
      </Line>
      <Line label="Its colour" value={kelvinLabel(ambient.kelvin)} words={whiteWords(ambient.miredFromWhite)}>
        <Workings
          formula="10⁶ / T − 10⁶ / white balance"
          inputs={[
            [
              'Ambient, T',
              `${Math.round(ambient.kelvin)} K`,
              ambient.isKelvinAssumed ? 'assumed: the camera’s white balance' : 'put in at the camera',
            ],
            ['White balance', `${camera.whiteBalanceK} K`],
            ['Apart', `${Math.round(ambient.miredFromWhite).toString().replace('-', '−')} mired`],
          ]}
        />
      </Line>
    </>
  )
}

function GlowLines({ whole, reading, glow }: { whole: WholeSetup; reading: SetupReading; glow: Glow }) {
  const unit = useLengthUnit()
  const { camera } = whole.setup
  const [x, y] = glow.point
  const exact = (metres: number) => lengthLabel(metres, unit, true)
  const side = Math.abs(x) < 0.05 ? 'in the middle' : `${lengthLabel(Math.abs(x), unit)} ${x < 0 ? 'left' : 'right'}`
  const names = lightNames(whole.lights)
  const shares = glow.shares
    .filter(({ share }) => share >= 0.005)
    .map(({ lightId, share }) => {
      const name = names[whole.lights.findIndex((light) => light.id === lightId)] ?? 'Light'
      return [name, `${Math.round(share * 100)} %`] as const
    })
  const patch = (label: string, stops: number, { widthM, heightM, bottomM, topM, leftM, rightM, isCut }: Patch) => (
    <Line
      label={label}
      value={sizeLabel(widthM, heightM, unit)}
      words={`${lengthLabel(bottomM, unit)} to ${lengthLabel(topM, unit)} up${isCut ? '; goes on past the picture or the wall' : ''}`}
    >
      <Workings
        formula={`E ≥ E peak / ${2 ** stops}`}
        inputs={[
          ['From the left', `${exact(leftM)} to ${exact(rightM)}`],
          ['From the floor', `${exact(bottomM)} to ${exact(topM)}`],
        ]}
        note="Measured through its brightest point, across and down, as far as the camera sees the wall. From the left counts from the middle of the wall."
      />
    </Line>
  )
  return (
    <>
      <Line
        label="Its brightest point"
        value={glow.underMainStops === null ? fNumberLabel(glow.fNumber) : stopsLabel(-glow.underMainStops)}
        words={`${lengthLabel(y, unit)} up, ${side}${glow.underMainStops === null ? '' : `; ${underWords(glow.underMainStops, 'the main')}`}`}
      >
        <Workings
          formula="E = Σ I(θ) · cos φ / d²"
          inputs={[
            ['Reads', `f/${glow.fNumber.toFixed(2)}`],
            ['Mains at the sitter', reading.mainFNumber === null ? 'no main' : `f/${reading.mainFNumber.toFixed(2)}`],
            ...shares.map(([name, share]): [string, string, string] => [name, share, 'of the light there']),
          ]}
          note="All lights that are on, incident on the wall. Shadows, ambient and light from other walls are left out."
        />
      </Line>
      {patch('Within one stop of it', 1, glow.withinOneStop)}
      {patch('Within two stops of it', 2, glow.withinTwoStops)}
      {glow.shoulders && (
        <Line
          label="At the shoulders"
          value={lengthLabel(glow.shoulders.heightOnWallM, unit)}
          words={glow.shoulders.words}
        >
          <Workings
            formula="camera → shoulders → wall"
            inputs={[
              ['Camera up', exact(camera.at[1])],
              ['Shoulders below the eyes', smallLabel(SHOULDERS_BELOW_EYES_M, unit), 'assumed: common body measure'],
              ['On the wall behind them', `${exact(glow.shoulders.heightOnWallM)} up`],
            ]}
          />
        </Line>
      )}
      <Line
        label="Its colour"
        value={glow.kelvin === null ? 'deep blue' : kelvinLabel(glow.kelvin)}
        words={whiteWords(glow.miredFromWhite)}
      >
        <Workings
          formula="10⁶ / T = Σ share · (10⁶ / T light + shifts)"
          inputs={[
            ...shares.map(([name, share]): [string, string] => [name, share]),
            ['Together', `${Math.round(glow.mired)} mired`],
            ['White balance', `${camera.whiteBalanceK} K`],
            ['Apart', `${Math.round(glow.miredFromWhite).toString().replace('-', '−')} mired`],
          ]}
          note="Mixed by mired (assumption); the wall’s own colour comes on top. Words: under 10, 40 and 100 mired (assumptions)."
        />
      </Line>
    </>
  )
}

function MainLines({ whole, reading, main }: { whole: WholeSetup; reading: SetupReading; main: MainReading }) {
  const unit = useLengthUnit()
  const own = reading.lights.find(({ lightId }) => lightId === main.lightId)
  const light = whole.lights.find(({ id }) => id === main.lightId)
  const modifier = light?.modifier
  const face = light ? faceOf(light) : { widthM: 0, heightM: 0 }
  const exact = (metres: number) => lengthLabel(metres, unit, true)
  const smallSize = (metres: number) => (metres < 0.2 ? smallLabel(metres, unit) : exact(metres))
  const made = modifier ? inSentence(modifier.name) : 'a bare head'
  return (
    <>
      <Line
        label="Against the eye line"
        value={`${Math.round(Math.abs(main.elevationDeg))}°`}
        words={`${eyeLineWords(main.elevationDeg).replace(/^\d+° /, '')}; its middle is ${exact(Math.abs(main.aboveEyesM))} ${main.aboveEyesM < 0 ? 'lower' : 'higher'} than the eyes`}
      >
        <Workings
          formula="atan(rise / distance on the floor)"
          inputs={[
            ['Rise', exact(main.aboveEyesM)],
            ...(light
              ? [['Distance on the floor', exact(floorDistance(light.at, reading.face))] satisfies InputRow]
              : []),
            ['Pupils in shadow from about', `${Math.round(SOCKET_LIMIT_DEG)}°`, 'assumed: a rule of thumb'],
          ]}
          note="A start in the manuals: 26.6° (NAVEDTRA 14209). The test frame is the evidence."
        />
      </Line>
      <Line
        label="Seen from the skin"
        value={`${main.apparentSizeDeg.toFixed(0)}°`}
        words={`how wide ${made} looks; wider is softer`}
      >
        <Workings
          formula="2 · atan(D / 2d)"
          inputs={[
            [
              'Longer side of its face, D',
              smallSize(Math.max(face.widthM, face.heightM)),
              modifier ? 'of the modifier' : 'assumed',
            ],
            ['Distance, d', own ? exact(own.distanceM) : ''],
            ['It covers', `${main.apparentSizeDeg.toFixed(1)}°`],
          ]}
        />
      </Line>
      <Line
        label="Soft edge of a shadow"
        value={smallLabel(main.penumbraM, unit)}
        words={`thrown from ${smallLabel(0.05, unit)} off the skin`}
      >
        <Workings
          formula="D · b / a"
          inputs={[
            ['Longer side of its face, D', smallSize(Math.max(face.widthM, face.heightM))],
            ['From the edge to the skin, b', smallLabel(0.05, unit), 'assumed: nose or brim'],
            ['From the light to the edge, a', own ? exact(own.distanceM) : ''],
          ]}
        />
      </Line>
    </>
  )
}
