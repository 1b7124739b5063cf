import type { KeyboardEvent } from 'react'
import { cn } from '#src/lib/cn.ts'
import { useDraft } from '#src/lib/use-draft.ts'
import { useWall } from '../../wall-control.ts'

type EditInPlaceProps = {
  label: string
  value: string
  maxLength: number
  onWrite: (text: string) => void
  /** One line: Enter ends it. Otherwise Ctrl+Enter does. */
  line?: boolean
  className?: string
}

/** A field in the place of the words it edits. Leaving it, Escape and Enter keep what was typed; undo takes it back. */
export function EditInPlace({ label, value, maxLength, onWrite, line = false, className }: EditInPlaceProps) {
  const control = useWall()
  const { state } = control
  const draft = useDraft(value, onWrite)
  const end = () => {
    draft.leave()
    control.stopUndo()
    const id = state.editing.get()
    state.editing.set(null)
    state.focused.set(id)
  }
  const handleKey = (event: KeyboardEvent) => {
    event.stopPropagation()
    if (event.key === 'Escape' || (event.key === 'Enter' && (line || event.ctrlKey || event.metaKey))) {
      event.preventDefault()
      end()
    }
  }
  return (
    <textarea
      data-wall-ignore
      autoFocus
      aria-label={label}
      rows={1}
      maxLength={maxLength}
      value={draft.value}
      onFocus={(event) =>
        event.currentTarget.setSelectionRange(event.currentTarget.value.length, event.currentTarget.value.length)
      }
      onChange={(event) => draft.change(event.target.value)}
      onBlur={end}
      onKeyDown={handleKey}
      className={cn(
        'block w-full resize-none rounded-sm bg-white field-sizing-content outline-2 outline-draft select-text',
        className,
      )}
    />
  )
}
