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
  placeholder?: string
}

/** A text of a shared document: taken over on Enter, on leaving, and when it is closed, not at every key. */
export function TextLine({ label, value, onChange, maxLength, prose = false, required = false, readOnly = false, placeholder }: TextLineProps) {
  const [draft, setDraft] = useState<string | null>(null)
  const waiting = useRef<(() => void) | null>(null)
  useEffect(() => () => waiting.current?.(), [])
  const commit = () => {
    waiting.current?.()
    waiting.current = null
    setDraft(null)
  }
  const control = {
    value: draft ?? value,
    maxLength,
    readOnly,
    ...(placeholder === undefined || readOnly ? {} : { placeholder }),
    onChange: (event: { target: { value: string } }) => {
      const text = event.target.value
      setDraft(text)
      waiting.current = required && text.trim() === '' ? null : () => onChange(text)
    },
    onBlur: commit,
  }
  return <Field label={label}>{prose ? <Textarea rows={2} {...control} /> : <Input {...control} onKeyDown={(event) => event.key === 'Enter' && commit()} />}</Field>
}
