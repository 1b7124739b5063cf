import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import type { BriefField } from '../brief-fields.ts'
import type { BriefForm, FieldState } from '../use-brief-form.ts'

export type BriefLineProps = {
  form: BriefForm
  field: BriefField
  label: string
  hint?: ReactNode
  /** What a reader sees while nothing is written. */
  none?: string
  kind?: 'line' | 'lines' | 'date' | 'moment'
  readOnly: boolean
  /** How a reader sees the value, where it differs from what is typed. */
  shown?: ReactNode
  placeholder?: string
  autoComplete?: string
  className?: string
  /** Looks of the words themselves, written and read. */
  textClass?: string
}

/** On paper a control is a line to write on. */
const PAPER =
  '!rounded-none !border-0 !border-b !border-edge !bg-transparent !px-0 hover:!border-ink focus:!border-draft'

/** One thing the brief says: a line to write on, or the words for those who only read. */
export function BriefLine({
  form,
  field,
  label,
  hint,
  none = 'Not said yet',
  kind = 'line',
  readOnly,
  shown,
  placeholder,
  autoComplete = 'off',
  className,
  textClass,
}: BriefLineProps) {
  const value = form.form.watch(field)
  if (readOnly) {
    return (
      <div className={className}>
        <div className="label-small">{label}</div>
        <div
          className={cn(
            'mt-0.5 min-h-6 break-words whitespace-pre-wrap',
            textClass,
            value === '' && '!font-sans !text-base !not-italic text-ink-faint',
          )}
        >
          {value === '' ? none : (shown ?? value)}
        </div>
      </div>
    )
  }
  const state = form.stateOf(field)
  const registered = form.form.register(field, {
    onBlur: () => form.save(field),
    // A chosen day is final; a moment is typed in parts and taken on leaving.
    ...(kind === 'date' ? { onChange: () => form.save(field) } : {}),
  })
  return (
    <Field
      label={label}
      hint={hint}
      error={state.kind === 'failed' ? <Failure why={state.why} onAgain={() => form.save(field)} /> : undefined}
      aside={<FieldSign state={state} />}
      className={className ?? ''}
    >
      {kind === 'lines' ? (
        <Textarea rows={2} placeholder={placeholder} className={cn(PAPER, 'resize-none', textClass)} {...registered} />
      ) : (
        <Input
          type={kind === 'date' ? 'date' : kind === 'moment' ? 'datetime-local' : 'text'}
          autoComplete={autoComplete}
          placeholder={placeholder}
          className={cn(PAPER, textClass)}
          onKeyDown={(event) => {
            if (event.key === 'Enter') form.save(field)
          }}
          {...registered}
        />
      )}
    </Field>
  )
}

function Failure({ why, onAgain }: { why: string; onAgain: () => void }) {
  return (
    <>
      {why}{' '}
      <button type="button" className="underline underline-offset-2" onClick={onAgain}>
        Try again
      </button>
    </>
  )
}

/** "Saved" beside the label, said once. */
export function FieldSign({ state }: { state: FieldState }) {
  return (
    <span role="status" className="text-xs text-bottle">
      {state.kind === 'saved' ? (
        <span className="fade-in">Saved</span>
      ) : state.kind === 'saving' ? (
        <span className="text-ink-soft">Saving…</span>
      ) : null}
    </span>
  )
}
