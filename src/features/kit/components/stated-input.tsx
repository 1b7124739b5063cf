import { useId, useState } from 'react'
import { PROVENANCES, type Stated } from '#shared/domain/kit/schema.ts'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { useKitIssue } from '../kit-issues.ts'
import { PROVENANCE_WORDS } from '../kit-words.ts'

export type StatedInputProps = {
  /** Key of the number in its item. */
  name: string
  label: string
  unit?: string
  step?: number
  value: Stated
  onChange: (value: Stated) => void
}

/** A number with where it comes from: another number is no longer what its source said. */
export function StatedInput({ name, label, unit, step = 1, value, onChange }: StatedInputProps) {
  const issue = useKitIssue(`${name}.value`)
  const issueId = useId()
  const [oldSource] = useState(value.source)
  return (
    <fieldset className="grid min-w-0 grid-cols-[minmax(0,1fr)_8.5rem] content-start items-start gap-x-2 gap-y-1.5">
      <legend className="label-small mb-1">{label}</legend>
      <NumberInput
        aria-label={label}
        value={value.value}
        onChange={(next) => onChange({ ...value, value: next, source: value.source === oldSource ? '' : value.source })}
        step={step}
        {...(unit === undefined ? {} : { unit })}
        {...(issue === undefined ? {} : { 'aria-invalid': true, 'aria-describedby': issueId })}
      />
      <Select
        aria-label={`${label}: where it comes from`}
        options={PROVENANCES.map((from) => ({ value: from, label: PROVENANCE_WORDS[from] }))}
        value={value.from}
        onChange={(from) => onChange({ ...value, from, source: value.from === 'assumed' ? '' : value.source })}
      />
      {issue !== undefined && (
        <p id={issueId} className="col-span-2 text-xs font-semibold text-velvet max-md:text-[0.8125rem]">
          {issue}
        </p>
      )}
      {value.from === 'assumed' ? (
        value.source !== '' && (
          <p className="col-span-2 text-xs text-ink-soft max-md:text-[0.8125rem]">{value.source}</p>
        )
      ) : (
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

export type MaybeStatedInputProps = Omit<StatedInputProps, 'value' | 'onChange'> & {
  /** The words that say it is known. */
  known: string
  /** What it begins with. */
  start: number
  value: Stated | null
  onChange: (value: Stated | null) => void
}

/** A number that an item may lack. */
export function MaybeStatedInput({ known, start, value, onChange, ...rest }: MaybeStatedInputProps) {
  return (
    <div className="flex min-w-0 flex-col gap-1">
      <Checkbox
        checked={value !== null}
        onChange={(isKnown) => onChange(isKnown ? { value: start, from: 'assumed', source: '' } : null)}
      >
        {known}
      </Checkbox>
      {value && <StatedInput {...rest} value={value} onChange={onChange} />}
    </div>
  )
}
