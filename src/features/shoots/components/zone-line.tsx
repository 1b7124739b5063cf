import { zones } from '#src/lib/format.ts'
import { Field } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import type { BriefForm } from '../use-brief-form.ts'
import { FieldSign } from './brief-line.tsx'

export type ZoneLineProps = { form: BriefForm; readOnly: boolean }

/** The clock that every time of the shoot is read on. */
export function ZoneLine({ form, readOnly }: ZoneLineProps) {
  const zone = form.form.watch('zone')
  if (readOnly) {
    return (
      <div>
        <div className="label-small">Time zone</div>
        <div className="mt-0.5">{zone.replaceAll('_', ' ')}</div>
      </div>
    )
  }
  const state = form.stateOf('zone')
  return (
    <Field
      label="Time zone"
      aside={<FieldSign state={state} />}
      error={state.kind === 'failed' ? state.why : undefined}
    >
      <Select
        className="!rounded-none !border-0 !border-b !border-edge !bg-transparent !pl-0"
        options={zones(zone).map((name) => ({ value: name, label: name.replaceAll('_', ' ') }))}
        value={zone}
        onChange={(next) => {
          form.form.setValue('zone', next)
          form.save('zone')
        }}
      />
    </Field>
  )
}
