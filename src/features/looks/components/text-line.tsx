import { useEffect, useRef, useState } from 'react'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Textarea } from '#src/ui/textarea.tsx'

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

const PAUSE_MS = 700

type Pending = { give: () => void; timer: ReturnType<typeof setTimeout> }

/** Takes over what waits for a pause in typing, now. */
function take(pending: { current: Pending | null }) {
  const last = pending.current
  pending.current = null
  if (!last) return
  clearTimeout(last.timer)
  last.give()
}

/** A text of a shared document: taken over at a pause in typing and on leaving, not at every key. */
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
  const [draft, setDraft] = useState<string | null>(null)
  const pending = useRef<Pending | null>(null)
  // What was typed last is not lost when the panel closes or shows something else.
  useEffect(() => () => take(pending), [])

  const control = {
    value: draft ?? value,
    maxLength,
    readOnly,
    ...(placeholder === undefined || readOnly ? {} : { placeholder }),
    onChange: (event: { target: { value: string } }) => {
      const text = event.target.value
      setDraft(text)
      if (pending.current) clearTimeout(pending.current.timer)
      const give = () => {
        if (!required || text.trim() !== '') onChange(text)
      }
      pending.current = { give, timer: setTimeout(() => take(pending), PAUSE_MS) }
    },
    onBlur: () => {
      take(pending)
      setDraft(null)
    },
  }
  return (
    <Field label={label} {...(hint === undefined ? {} : { hint })}>
      {prose ? <Textarea rows={2} {...control} /> : <Input {...control} />}
    </Field>
  )
}
