import { type ReactNode, useId } from 'react'
import type { LightId } from '#shared/ids.ts'
import { reflectanceOf } from '#shared/domain/lighting/panel.ts'
import { sizeLabel } from '#shared/domain/lighting/reading-words.ts'
import type { LightReading, PanelReading, SetupReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import { fNumberLabel, inSentence, powerLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { GroupLetter } from '../group-letter.tsx'
import { How, type InputRow, Workings } from './how.tsx'
import { LightSwitch } from './light-switch.tsx'
import { LightWorkings } from './light-workings.tsx'

/** A light with what it gives and the name it has among the others. */
export type LightOfTable = { light: Light; own: LightReading; name: string }

/** Columns: group, light, power, reads, vs main, switch. What a light is made of runs under its numbers. */
export const ROW =
  'relative grid grid-cols-[1.75rem_minmax(0,1fr)_auto_3.1rem_2.9rem_2.25rem] items-center gap-x-2 max-md:grid-cols-[1.75rem_minmax(0,1fr)_auto_3.1rem_2.6rem_2.75rem]'
const NUMBER = 'relative z-[1] justify-self-end text-right whitespace-nowrap max-md:-my-2.5'

type OfSetup = { whole: WholeSetup; reading: SetupReading; onChoose: (key: string) => void }

type LightRowProps = LightOfTable &
  OfSetup & {
    chosen: boolean
    /** Left out for those who only read. */
    onSwitch?: ((id: LightId, isOn: boolean) => void) | undefined
  }

export function LightRow({ light, own, name, whole, reading, chosen, onChoose, onSwitch }: LightRowProps) {
  const unit = useLengthUnit()
  const { camera } = whole.setup
  const made = [light.modifier, ...light.gels].flatMap((part) => (part ? [inSentence(part.name)] : []))
  const sub = [
    ...(made.length === 0 ? ['bare'] : made),
    lengthLabel(own.distanceM, unit),
    ...(own.measured === null || isLamp(light.unit.numbers) ? [] : ['measured']),
  ].join(' · ')
  const problems = reading.problems.filter((problem) => problem.lightId === light.id)
  return (
    <div
      role="row"
      className={cn(
        ROW,
        'border-t border-hair-soft py-1.5',
        chosen && 'bg-draft-wash/60',
        !own.isOn && 'text-ink-faint',
      )}
    >
      <span role="cell" className="row-span-2">
        <GroupLetter group={light.group} />
      </span>
      <RowHead title={name} sub={sub} onPress={() => onChoose(light.id)}>
        {problems.map((problem) => (
          <span
            key={problem.key}
            className="col-start-2 col-end-7 border-l-2 border-velvet pl-2 text-xs leading-snug text-velvet"
          >
            {problem.words}
          </span>
        ))}
      </RowHead>
      <span role="cell" className={cn(NUMBER, 'col-start-3 row-start-1')}>
        {powerLabel(light.power)}
      </span>
      <span role="cell" className={cn(NUMBER, 'col-start-4 row-start-1')}>
        {own.isOn ? (
          <How label={`${name} reads`} value={fNumberLabel(own.fNumber)}>
            <LightWorkings light={light} reading={own} iso={camera.iso} shutterS={camera.shutterS} />
          </How>
        ) : (
          'off'
        )}
      </span>
      <span role="cell" className={cn(NUMBER, 'col-start-5 row-start-1')}>
        {own.underMainStops !== null && reading.mainFNumber !== null && (
          <AgainstMain
            label={name}
            underStops={own.underMainStops}
            fNumber={own.fNumber}
            mainFNumber={reading.mainFNumber}
          />
        )}
      </span>
      <span
        role="cell"
        className="relative z-[1] col-start-6 row-span-2 row-start-1 -mr-1 justify-self-end max-md:-mr-2"
      >
        {onSwitch && <LightSwitch name={name} isOn={own.isOn} onChange={(isOn) => onSwitch(light.id, isOn)} />}
      </span>
    </div>
  )
}

function AgainstMain(props: { label: string; underStops: number; fNumber: number; mainFNumber: number }) {
  const { label, underStops, fNumber, mainFNumber } = props
  return (
    <How label={`${label} vs main`} value={stopsLabel(-underStops)}>
      <Workings
        formula={`${(-underStops).toFixed(2).replace('-', '−')} stops = 2 · log₂(N / N main)`}
        inputs={[
          ['It reads, N', `f/${fNumber.toFixed(2)}`],
          ['All mains at the sitter, N main', `f/${mainFNumber.toFixed(2)}`],
        ]}
        note="Shown on thirds of a stop."
      />
    </How>
  )
}

type PanelRowProps = OfSetup & { panel: PanelReading; chosen: boolean }

export function PanelRow({ panel, whole, reading, chosen, onChoose }: PanelRowProps) {
  const unit = useLengthUnit()
  const prop = whole.props.find(({ id }) => id === panel.propId)
  const main = whole.lights.find((light) => light.purpose === 'main' && light.isOn)
  return (
    <div role="row" className={cn(ROW, 'border-t border-hair-soft py-1.5', chosen && 'bg-draft-wash/60')}>
      <span role="cell" className="row-span-2">
        <GroupLetter group={null} />
      </span>
      <RowHead
        title={panel.name}
        sub={`gives light back · ${lengthLabel(panel.distanceM, unit)}`}
        onPress={() => onChoose(panel.propId)}
      />
      <span role="cell" className={cn(NUMBER, 'col-start-3 row-start-1 text-ink-faint')}>
        from {main?.group ?? 'main'}
      </span>
      <span role="cell" className={cn(NUMBER, 'col-start-4 row-start-1')}>
        <How label={`${panel.name} reads`} value={fNumberLabel(panel.fNumber)}>
          <Workings
            formula="E = ρ · E₀ · A · cos φ / (π · d² + A)"
            inputs={[
              ['Distance to the eyes, d', lengthLabel(panel.distanceM, unit, true)],
              ...(prop
                ? ([
                    ['Size, A', sizeLabel(prop.widthM, prop.heightM, unit)],
                    ['Gives back, ρ', `${Math.round(reflectanceOf(prop.colour) * 100)} %`, 'by its colour'],
                  ] satisfies InputRow[])
                : []),
              ['Reads', `f/${panel.fNumber.toFixed(2)}`],
            ]}
            note="One matte patch of its own colour, lit by main and fill; walls and ceiling give nothing back (assumed). A meter decides."
          />
        </How>
      </span>
      <span role="cell" className={cn(NUMBER, 'col-start-5 row-start-1')}>
        {panel.underMainStops !== null && reading.mainFNumber !== null && (
          <AgainstMain
            label={panel.name}
            underStops={panel.underMainStops}
            fNumber={panel.fNumber}
            mainFNumber={reading.mainFNumber}
          />
        )}
      </span>
    </div>
  )
}

export function TotalRow({ whole, reading }: Pick<OfSetup, 'whole' | 'reading'>) {
  const { camera } = whole.setup
  if (reading.totalFNumber <= 0) return null
  return (
    <div role="row" className={cn(ROW, 'border-t border-hair py-1.5')}>
      <span role="rowheader" className="col-start-2 col-end-4 font-semibold">
        All together
      </span>
      <span role="cell" className={cn(NUMBER, 'col-start-4 font-semibold')}>
        <How label="All together" value={fNumberLabel(reading.totalFNumber)}>
          <Workings
            formula={`f/${reading.totalFNumber.toFixed(2)} = √(Σ N²)`}
            inputs={[
              ['Main', reading.mainFNumber === null ? 'none' : fNumberLabel(reading.mainFNumber)],
              ['Fill, panels, ambient', reading.ratio ? fNumberLabel(reading.ratio.fillFNumber) : 'none'],
              [
                'Ambient alone',
                reading.ambientFNumber === null ? 'not measured' : fNumberLabel(reading.ambientFNumber),
              ],
              ['Camera', `${fNumberLabel(camera.fNumber)}, ISO ${camera.iso}`],
            ]}
            note="Lights add linearly. Rim, accent and background lights are left out. Incident, C = 250."
          />
        </How>
      </span>
    </div>
  )
}

/** The words of a row of numbers; pressing anywhere on the row that is not a number opens what it stands for. */
function RowHead(props: { title: string; sub: string; onPress: () => void; children?: ReactNode }) {
  const id = useId()
  return (
    <span role="rowheader" className="contents">
      <button
        type="button"
        aria-labelledby={`${id}-title ${id}-sub`}
        onClick={props.onPress}
        className="col-start-2 row-start-1 rounded-r text-left after:absolute after:inset-0 hover:text-draft"
      >
        <span id={`${id}-title`}>{props.title}</span>
      </button>
      <span id={`${id}-sub`} className="col-start-2 col-end-6 row-start-2 text-xs text-ink-soft">
        {props.sub}
      </span>
      {props.children}
    </span>
  )
}
