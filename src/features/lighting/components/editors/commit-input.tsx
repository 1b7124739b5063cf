import { useDraft } from '#src/lib/use-draft.ts'
import { Input } from '#src/ui/input.tsx'
import { Textarea } from '#src/ui/textarea.tsx'

type CommitProps = { value: string; onCommit: (value: string) => void; maxLength: number; placeholder?: string }

/** A line of text that is taken over while typing, on Enter and on leaving; where nothing may be empty the old one comes back. */
export function CommitInput({ value, onCommit, required = false, ...rest }: CommitProps & { required?: boolean }) {
  const draft = useDraft(value, (text) => {
    if (text.trim() !== value && (text.trim() !== '' || !required)) onCommit(text.trim())
  })
  return (
    <Input
      {...rest}
      value={draft.value}
      onChange={(event) => draft.change(event.target.value)}
      onBlur={draft.leave}
      onKeyDown={(event) => {
        if (event.key === 'Enter') draft.leave()
        if (event.key === 'Escape') draft.drop()
      }}
    />
  )
}

/** Several lines, taken over while typing and on leaving. */
export function CommitTextarea({ value, onCommit, ...rest }: CommitProps) {
  const draft = useDraft(value, (text) => {
    if (text !== value) onCommit(text)
  })
  return (
    <Textarea
      {...rest}
      rows={2}
      value={draft.value}
      onChange={(event) => draft.change(event.target.value)}
      onBlur={draft.leave}
    />
  )
}
