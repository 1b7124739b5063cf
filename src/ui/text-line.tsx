import { useDraft } from '#src/lib/use-draft.ts'
import { Field } from './field.tsx'
import { Input } from './input.tsx'
import { Textarea } from './textarea.tsx'

export type TextLineProps = {
  label: string
  value: string
  onChange: (value: string) => void
  maxLength: number
  /** Several lines. */
  prose?: boolean
  /** May not be emptied: the old text comes back. */
  required?: boolean
  readOnly?: boolean
  hint?: string
  placeholder?: string
}

/** A text that others share: taken over twice a second while typing and on leaving, not at every key. */
export function TextLine({
  label,
  value,
  onChange,
  maxLength,
  prose = false,
  required = false,
  readOnly = false,
  hint,
  placeholder,
}: TextLineProps) {
  const draft = useDraft(value, (text) => {
    if (!required || text.trim() !== '') onChange(text)
  })
  const control = {
    value: draft.value,
    maxLength,
    readOnly,
    ...(placeholder === undefined || readOnly ? {} : { placeholder }),
    onChange: (event: { target: { value: string } }) => draft.change(event.target.value),
    onBlur: draft.leave,
  }
  return (
    <Field label={label} {...(hint === undefined ? {} : { hint })}>
      {prose ? (
        <Textarea rows={2} {...control} />
      ) : (
        <Input {...control} onKeyDown={(event) => event.key === 'Enter' && draft.leave()} />
      )}
    </Field>
  )
}
