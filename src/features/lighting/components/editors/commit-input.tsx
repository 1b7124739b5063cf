import { useState } from 'react'
import { Input } from '#src/ui/input.tsx'
import { Textarea } from '#src/ui/textarea.tsx'

type CommitProps = { value: string; onCommit: (value: string) => void; maxLength: number; placeholder?: string }

/** A line of text that is taken over on Enter and on leaving; where nothing may be empty the old one comes back. */
export function CommitInput({ value, onCommit, required = false, ...rest }: CommitProps & { required?: boolean }) {
  const [draft, setDraft] = useState<string | null>(null)
  function commit() {
    if (draft !== null && draft.trim() !== value && (draft.trim() !== '' || !required)) onCommit(draft.trim())
    setDraft(null)
  }
  return (
    <Input
      {...rest}
      value={draft ?? value}
      onChange={(event) => setDraft(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === 'Enter') commit()
        if (event.key === 'Escape') setDraft(null)
      }}
    />
  )
}

/** Several lines, taken over on leaving. */
export function CommitTextarea({ value, onCommit, ...rest }: CommitProps) {
  const [draft, setDraft] = useState<string | null>(null)
  return (
    <Textarea
      {...rest}
      rows={2}
      value={draft ?? value}
      onChange={(event) => setDraft(event.target.value)}
      onBlur={() => {
        if (draft !== null && draft !== value) onCommit(draft)
        setDraft(null)
      }}
    />
  )
}
