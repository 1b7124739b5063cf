import { useId, useState } from 'react'
import type { LightId } from '#shared/ids.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import type { Light } from '#shared/domain/lighting/schema.ts'
import { type PowerSuggestion, suggestPower } from '#shared/domain/lighting/suggest-power.ts'
import { fNumberLabel, lightSummary, powerLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lightNames } from '#shared/domain/recipes/sheet.ts'
import { count } from '#src/lib/format.ts'
import { useLengthUnit } from '#src/lib/length-unit.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import { type WishDraft, changedPowers, draftOf, firstWish, wishOptions, wishesOf } from '../../power-wishes.ts'
import { offWords } from '../../reading-words.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { GroupLetter } from '../group-letter.tsx'

export type SuggestPowerProps = {
  whole: WholeSetup
  writer: Pick<SetupWriter, 'patchLights'>
  open: boolean
  onOpenChange: (open: boolean) => void
}

/** What one wants of each light, and the power settings that come nearest. */
export function SuggestPower(props: SuggestPowerProps) {
  return props.open ? <Wishes {...props} /> : null
}

function Wishes({ whole, writer, onOpenChange }: SuggestPowerProps) {
  const unit = useLengthUnit()
  const [first] = useState(() => {
    const reading = readSetup(whole)
    return new Map(whole.lights.map((light) => [light.id, firstWish(light, whole, reading)]))
  })
  const [chosen, setChosen] = useState<ReadonlyMap<LightId, WishDraft>>(new Map())
  const draftFor = (light: Light) => chosen.get(light.id) ?? first.get(light.id) ?? 'keep'
  const suggestions = suggestPower(whole, wishesOf(whole.lights, draftFor), unit)
  const changed = changedPowers(whole.lights, suggestions)
  const names = lightNames(whole.lights)

  function set() {
    writer.patchLights(changed.map(({ id, power }) => ({ id, patch: { power } })))
    onOpenChange(false)
    toast.say(`${count(changed.length, 'power is', 'powers are')} set; one undo takes it all back.`)
  }

  return (
    <Dialog
      open
      wide
      onOpenChange={onOpenChange}
      title="Suggest power"
      description="Say what each light shall read; beside it stands the nearest setting of its unit. Panels follow their lights."
      footer={
        <>
          <Button onClick={() => onOpenChange(false)}>Leave as it is</Button>
          <Button variant="primary" disabled={changed.length === 0} onClick={set}>
            Set these powers
          </Button>
        </>
      }
    >
      <ul className="flex flex-col divide-y divide-hair">
        {whole.lights.map((light, index) => (
          <WishRow
            key={light.id}
            light={light}
            name={names[index] ?? ''}
            draft={draftFor(light)}
            suggestion={suggestions.find(({ lightId }) => lightId === light.id)}
            onChange={(draft) => setChosen(new Map([...chosen, [light.id, draft]]))}
          />
        ))}
      </ul>
      {changed.length === 0 && (
        <p className="mt-2 text-sm text-ink-soft">Every light is already set to the power that comes nearest.</p>
      )}
    </Dialog>
  )
}

type WishRowProps = {
  light: Light
  name: string
  draft: WishDraft
  suggestion: PowerSuggestion | undefined
  onChange: (draft: WishDraft) => void
}

function WishRow({ light, name, draft, suggestion, onChange }: WishRowProps) {
  const id = useId()
  return (
    <li
      aria-labelledby={id}
      className="grid grid-cols-1 items-end gap-x-4 gap-y-2 py-3 first:pt-0 md:grid-cols-[minmax(0,1fr)_11rem_minmax(0,1.1fr)]"
    >
      <div className="flex items-start gap-2.5 self-center">
        <GroupLetter group={light.group} />
        <div className="min-w-0">
          <h3 id={id} className="font-sans text-base font-semibold">
            {name}
          </h3>
          <p className="text-xs text-ink-soft">{lightSummary(light)}</p>
        </div>
      </div>
      <Field label={light.purpose === 'main' ? 'Shall read' : 'Against the main'}>
        <Select
          options={wishOptions(light.purpose)}
          value={String(draft)}
          onChange={(value) => onChange(draftOf(value))}
        />
      </Field>
      <div role="status" aria-label={`Suggested for the ${name.toLowerCase()}`} className="self-center text-sm">
        {suggestion ? (
          <Suggestion light={light} suggestion={suggestion} />
        ) : (
          <p className="text-ink-soft">{light.isOn ? `stays at ${powerLabel(light.power)}` : 'is off and stays so'}</p>
        )}
      </div>
    </li>
  )
}

function Suggestion({ light, suggestion }: { light: Light; suggestion: PowerSuggestion }) {
  const { power, readsFNumber, readsAgainstMainStops, offStops, words } = suggestion
  const reads = [
    fNumberLabel(readsFNumber),
    ...(light.purpose === 'main' || readsAgainstMainStops === null
      ? []
      : [`${stopsLabel(readsAgainstMainStops)} against the main`]),
  ].join(', ')
  return (
    <>
      {offStops !== null && (
        <p>
          <b className="font-semibold">{powerLabel(power)}</b>
          {powerLabel(power) === powerLabel(light.power) ? ' as it is' : ` instead of ${powerLabel(light.power)}`}
          <span className="block">
            reads {reads}; {offWords(offStops)}
          </span>
        </p>
      )}
      {words !== null && <p className="mt-0.5 text-xs font-semibold text-velvet">{words}</p>}
    </>
  )
}
