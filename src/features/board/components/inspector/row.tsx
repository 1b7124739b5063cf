import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import { useDraft } from '#src/lib/use-draft.ts'

/** A control that looks like what it says until the hand is on it. */
export const QUIET =
  'rounded-r border border-transparent bg-transparent px-1.5 py-[3px] text-[0.78125rem] hover:border-edge focus:border-edge max-md:min-h-11 max-md:border-edge max-md:bg-white max-md:py-2.5 max-md:text-[1rem]'

/** A label at the left and its control or words at the right. */
export function Row({ label, children, block = false }: { label: string; children: ReactNode; block?: boolean }) {
  return (
    <label className={cn('grid items-baseline gap-x-1', block ? 'grid-cols-1' : 'grid-cols-[64px_minmax(0,1fr)]')}>
      <span className="text-[0.78125rem] text-ink-faint">{label}</span>
      {children}
    </label>
  )
}

type TextRowProps = {
  label: string
  value: string
  maxLength: number
  mayWrite: boolean
  onWrite: (text: string) => void
  placeholder?: string
  rows?: number
  block?: boolean
}

/** Words written into the document as they are typed; plain text for who may not write. */
export function TextRow({
  label,
  value,
  maxLength,
  mayWrite,
  onWrite,
  placeholder,
  rows = 1,
  block = false,
}: TextRowProps) {
  const draft = useDraft(value, onWrite)
  if (!mayWrite) {
    return (
      <Row label={label} block={block}>
        <span className="px-1.5 py-[3px] text-[0.78125rem] break-words whitespace-pre-wrap">{value || '–'}</span>
      </Row>
    )
  }
  return (
    <Row label={label} block={block}>
      <textarea
        rows={rows}
        maxLength={maxLength}
        value={draft.value}
        placeholder={placeholder}
        onChange={(event) => draft.change(event.target.value)}
        onBlur={draft.leave}
        className={cn(
          QUIET,
          'block w-full min-w-0 resize-none field-sizing-content',
          block && 'mt-0.5 border-edge bg-white',
        )}
      />
    </Row>
  )
}

type ChoiceRowProps<Value extends string> = {
  label: string
  value: Value
  options: readonly { value: Value; label: string }[]
  mayWrite: boolean
  onWrite: (value: Value) => void
}

export function ChoiceRow<Value extends string>({ label, value, options, mayWrite, onWrite }: ChoiceRowProps<Value>) {
  if (!mayWrite) {
    return (
      <Row label={label}>
        <span className="px-1.5 py-[3px] text-[0.78125rem]">
          {options.find((option) => option.value === value)?.label ?? '–'}
        </span>
      </Row>
    )
  }
  return (
    <Row label={label}>
      <select
        value={value}
        onChange={(event) => {
          const chosen = options.find((option) => option.value === event.target.value)
          if (chosen) onWrite(chosen.value)
        }}
        className={cn(QUIET, 'w-full min-w-0 pl-0.5 text-ellipsis max-md:pl-2')}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </Row>
  )
}
