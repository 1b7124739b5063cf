import { PROVENANCES, type Stated } from '#shared/domain/kit/schema.ts'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { PROVENANCE_WORDS } from '../kit-words.ts'

export type StatedInputProps = {
  label: string
  unit?: string
  min?: number
  max?: number
  step?: number
  value: Stated
  onChange: (value: Stated) => void
}

/** A number with where it comes from: typing another number asks for its source again. */
export function StatedInput({ label, unit, min = 0, max, step = 1, value, onChange }: StatedInputProps) {
  return (
    <fieldset className="grid min-w-0 content-start grid-cols-[minmax(0,1fr)_8.5rem] items-start gap-x-2 gap-y-1.5">
      <legend className="label-small mb-1">{label}</legend>
      <NumberInput
        aria-label={label}
        value={value.value}
        onChange={(next) => onChange({ ...value, value: next })}
        min={min}
        step={step}
        {...(max === undefined ? {} : { max })}
        {...(unit === undefined ? {} : { unit })}
      />
      <Select
        aria-label={`${label}: where it comes from`}
        options={PROVENANCES.map((from) => ({ value: from, label: PROVENANCE_WORDS[from] }))}
        value={value.from}
        onChange={(from) => onChange({ ...value, from })}
      />
      {value.from !== 'assumed' && (
        <Input
          aria-label={`${label}: source`}
          placeholder={value.from === 'measured' ? 'With which meter, when' : 'Sheet or page it is printed on'}
          className="col-span-2"
          maxLength={200}
          value={value.source}
          onChange={(event) => onChange({ ...value, source: event.target.value })}
        />
      )}
    </fieldset>
  )
}
