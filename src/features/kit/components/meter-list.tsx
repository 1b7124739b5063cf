import { X } from 'lucide-react'
import { useState } from 'react'
import type { KitItem } from '#shared/api/kit.ts'
import { discRadiusM } from '#shared/domain/kit/face-form.ts'
import {
  type MeterReading,
  guideNumberOfReading,
  meterFaults,
  meteredOf,
  withMetered,
  withoutMetered,
} from '#shared/domain/kit/meter-reading.ts'
import type { UnitNumbers } from '#shared/domain/kit/schema.ts'
import { powersOf } from '#shared/domain/lighting/stops.ts'
import { powerLabel } from '#shared/domain/lighting/words.ts'
import { civilShort, today } from '#src/lib/format.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { meteredWords } from '../kit-words.ts'

export type MeterListProps = {
  numbers: UnitNumbers
  modifiers: readonly KitItem[]
  onChange: (patch: Partial<UnitNumbers>) => void
}

/** What a meter read of a unit: it takes the place of guide number and loss in setups with the same modifier and zoom. */
export function MeterList({ numbers, modifiers, onChange }: MeterListProps) {
  const [isAdding, setIsAdding] = useState(false)
  const nameOf = (kitId: string) => modifiers.find(({ id }) => id === kitId)?.name
  return (
    <fieldset className="min-w-0">
      <legend className="label-small mb-1">Measured with a meter</legend>
      {numbers.metered.length === 0 && !isAdding && (
        <p className="text-sm text-ink-soft">
          Nothing yet: setups compute with the guide number and what the modifier takes.
        </p>
      )}
      <ul className="flex flex-col">
        {numbers.metered.map((entry) => (
          <li
            key={`${entry.modifierKitId} ${entry.zoomMm}`}
            className="flex items-start gap-2 border-b border-hair-soft py-1 text-sm"
          >
            <span className="min-w-0 flex-1 py-1">
              {meteredWords(entry, nameOf)}
              <span className="block text-xs text-ink-soft max-md:text-[0.8125rem]">measured: {entry.source}</span>
            </span>
            <IconButton
              label={`Remove the reading: ${meteredWords(entry, nameOf)}`}
              onClick={() => onChange({ metered: withoutMetered(numbers, entry).metered })}
            >
              <X size={15} aria-hidden />
            </IconButton>
          </li>
        ))}
      </ul>
      {isAdding ? (
        <MeterEntry
          numbers={numbers}
          modifiers={modifiers}
          onCancel={() => setIsAdding(false)}
          onAdd={(reading) => {
            onChange({ metered: withMetered(numbers, meteredOf(reading, civilShort(today()))).metered })
            setIsAdding(false)
          }}
        />
      ) : (
        <Button size="small" className="mt-1.5" onClick={() => setIsAdding(true)}>
          Add a meter reading
        </Button>
      )}
    </fieldset>
  )
}

type MeterEntryProps = Omit<MeterListProps, 'onChange'> & {
  onAdd: (reading: MeterReading) => void
  onCancel: () => void
}

function MeterEntry({ numbers, modifiers, onAdd, onCancel }: MeterEntryProps) {
  const longest = numbers.zoom.at(-1)?.focalMm ?? null
  const [draft, setDraft] = useState<MeterReading>({
    fNumber: 5.6,
    distanceM: 2,
    power: 1,
    iso: 100,
    zoomMm: longest,
    modifier: null,
  })
  const set = (patch: Partial<MeterReading>) => setDraft({ ...draft, ...patch })
  const faults = meterFaults(draft, numbers)
  const faultOf = (field: string) => faults.find((fault) => fault.field === field)?.message
  const powers = powersOf(numbers.minPowerDenominator)
  return (
    // Enter takes a number over; it does not save the unit while its reading is half typed.
    <div
      className="mt-1 flex flex-col gap-3 rounded-r border border-hair p-3"
      onKeyDown={(event) => {
        if (event.key === 'Enter' && event.target instanceof HTMLInputElement) event.preventDefault()
      }}
    >
      <Field label="What is on the head">
        <Select
          options={[
            { value: '', label: 'Nothing, bare' },
            ...modifiers.map(({ id, name }) => ({ value: String(id), label: name })),
          ]}
          value={draft.modifier?.kitId ?? ''}
          onChange={(kitId) => {
            const item = modifiers.find(({ id }) => id === kitId)
            if (item?.body.kind !== 'modifier') return set({ modifier: null, radiusM: 0 })
            set({ modifier: { kitId: item.id, name: item.name }, radiusM: discRadiusM(item.body.numbers) })
          }}
        />
      </Field>
      <div className="grid grid-cols-2 items-start gap-x-2 gap-y-3">
        <Field label="The meter read f/" error={faultOf('fNumber')}>
          <NumberInput step={0.1} value={draft.fNumber} onChange={(fNumber) => set({ fNumber })} />
        </Field>
        <Field label="At a distance of" error={faultOf('distanceM')}>
          <NumberInput unit="m" step={0.1} value={draft.distanceM} onChange={(distanceM) => set({ distanceM })} />
        </Field>
        <Field label="Power" error={faultOf('power')}>
          <Select
            options={powers.map((power) => ({ value: String(power), label: powerLabel(power) }))}
            value={String(draft.power)}
            onChange={(power) => set({ power: Number(power) })}
          />
        </Field>
        <Field label="The meter’s ISO" error={faultOf('iso')}>
          <NumberInput step={100} value={draft.iso} onChange={(iso) => set({ iso })} />
        </Field>
        {(numbers.zoom.length > 0 || draft.zoomMm !== null) && (
          <Field label="Zoom of the head" error={faultOf('zoomMm')}>
            <NumberInput allowEmpty unit="mm" value={draft.zoomMm} onChange={(zoomMm) => set({ zoomMm })} />
          </Field>
        )}
      </div>
      <p className="text-sm" role="status">
        {faults.length === 0 && (
          <>
            Guide number <b className="font-semibold">{guideNumberOfReading(draft).toFixed(1)} m</b> with what is on the
            head
          </>
        )}
      </p>
      <div className="flex flex-wrap justify-end gap-2">
        <Button size="small" onClick={onCancel}>
          Leave it
        </Button>
        <Button size="small" disabled={faults.length > 0} onClick={() => onAdd(draft)}>
          Take the reading
        </Button>
      </div>
    </div>
  )
}
