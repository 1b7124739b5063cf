import type { LightReading, SetupReading } from '#shared/domain/lighting/readings.ts'
import type { Light } from '#shared/domain/lighting/schema.ts'
import {
  fNumberLabel,
  inSentence,
  metresLabel,
  powerLabel,
  purposeWord,
  stopsLabel,
} from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { GroupLetter } from '../group-letter.tsx'
import { How, Workings } from './how.tsx'
import { LightWorkings } from './light-workings.tsx'

type LightTableProps = {
  whole: WholeSetup
  reading: SetupReading
  chosenKey: string | null
  onChoose: (key: string) => void
}

/** Each light with what it gives, and panels with what they give back. */
export function LightTable({ whole, reading, chosenKey, onChoose }: LightTableProps) {
  const rows = whole.lights.flatMap((light) => {
    const own = reading.lights.find((entry) => entry.lightId === light.id)
    return own ? [{ light, own }] : []
  })
  const atSitter = rows.filter(({ own }) => own.where === 'sitter')
  const onWall = rows.filter(({ own }) => own.where === 'wall')
  const panels = reading.panels.filter((panel) => panel.fNumber > 0)
  return (
    <>
      {(atSitter.length > 0 || panels.length > 0) && (
        <section aria-labelledby="at-the-sitter">
          <h2 id="at-the-sitter" className="mb-1 text-[1.1875rem]">
            At the sitter
          </h2>
          <table className="w-full text-sm">
            <Head />
            <tbody>
              {atSitter.map(({ light, own }) => (
                <LightRow
                  key={light.id}
                  light={light}
                  own={own}
                  iso={reading.iso}
                  chosen={chosenKey === light.id}
                  onChoose={onChoose}
                />
              ))}
              {panels.map((panel) => (
                <tr
                  key={panel.propId}
                  className={cn('border-t border-hair-soft', chosenKey === panel.propId && 'bg-draft-wash/60')}
                >
                  <td className="py-1.5 pr-2">
                    <GroupLetter group={null} />
                  </td>
                  <td className="py-1.5 pr-2">
                    <RowButton
                      onPress={() => onChoose(panel.propId)}
                      title={panel.name}
                      sub={`${metresLabel(panel.distanceM)} off`}
                    />
                  </td>
                  <td className="py-1.5 pr-2 text-right text-ink-faint" title="It has no power of its own">
                    –
                  </td>
                  <td className="py-1.5 pr-2 text-right">
                    <How label={`${panel.name} reads`} value={fNumberLabel(panel.fNumber)}>
                      <Workings
                        formula="E = ρ · E₀ · A · cos φ / (π · d² + A)"
                        inputs={[
                          ['Distance to the eyes, d', `${panel.distanceM.toFixed(2)} m`],
                          ['Reads', `f/${panel.fNumber.toFixed(2)}`],
                        ]}
                        note="One matte patch of its own colour, lit by main and fill; walls and ceiling give nothing back (assumed). A meter decides."
                      />
                    </How>
                  </td>
                  <td className="py-1.5 text-right">
                    {panel.underMainStops === null ? '' : stopsLabel(-panel.underMainStops)}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </section>
      )}
      {onWall.length > 0 && (
        <section aria-labelledby="on-the-wall" className="mt-3">
          <h2 id="on-the-wall" className="mb-1 text-[1.1875rem]">
            On the wall
          </h2>
          <table className="w-full text-sm">
            <Head hidden />
            <tbody>
              {onWall.map(({ light, own }) => (
                <LightRow
                  key={light.id}
                  light={light}
                  own={own}
                  iso={reading.iso}
                  chosen={chosenKey === light.id}
                  onChoose={onChoose}
                />
              ))}
            </tbody>
          </table>
        </section>
      )}
    </>
  )
}

function Head({ hidden = false }: { hidden?: boolean }) {
  return (
    <thead className={hidden ? 'sr-only' : ''}>
      <tr className="text-xs whitespace-nowrap text-ink-soft [&>th]:pb-1.5 [&>th]:font-semibold">
        <th className="w-8">
          <span className="sr-only">Group</span>
        </th>
        <th className="text-left">Light</th>
        <th className="pr-2 text-right">Power</th>
        <th className="pr-2 text-right">Reads</th>
        <th className="text-right">vs main</th>
      </tr>
    </thead>
  )
}

type LightRowProps = { light: Light; own: LightReading; iso: number; chosen: boolean; onChoose: (key: string) => void }

function LightRow({ light, own, iso, chosen, onChoose }: LightRowProps) {
  const made = [light.modifier, ...light.gels].flatMap((part) => (part ? [inSentence(part.name)] : []))
  const sub = [...(made.length === 0 ? ['bare'] : made), metresLabel(own.distanceM)].join(' · ')
  const name = purposeWord(light.purpose)
  return (
    <tr className={cn('border-t border-hair-soft align-middle', chosen && 'bg-draft-wash/60')}>
      <td className="py-1.5 pr-2">
        <GroupLetter group={light.group} />
      </td>
      <td className="min-w-0 py-1.5 pr-2">
        <RowButton onPress={() => onChoose(light.id)} title={name} sub={sub} />
      </td>
      <td className="py-1.5 pr-2 text-right whitespace-nowrap">{powerLabel(light.power)}</td>
      <td className="py-1.5 pr-2 text-right whitespace-nowrap">
        <How label={`${name} reads`} value={fNumberLabel(own.fNumber)}>
          <LightWorkings light={light} reading={own} iso={iso} />
        </How>
      </td>
      <td className="py-1.5 text-right whitespace-nowrap">
        {own.underMainStops === null ? '' : stopsLabel(-own.underMainStops)}
      </td>
    </tr>
  )
}

/** The words of a row; pressing them opens what it stands for. */
export function RowButton({ onPress, title, sub }: { onPress: () => void; title: string; sub: string }) {
  return (
    <button
      type="button"
      onClick={onPress}
      className="block w-full rounded-r text-left hover:text-draft max-md:min-h-11"
    >
      {title} <span className="block text-xs text-ink-soft">{sub}</span>
    </button>
  )
}
