import { type ReactNode, createContext, use, useId, useMemo } from 'react'
import { cn } from '#src/lib/cn.ts'

type FieldControl = { id: string; 'aria-describedby'?: string; 'aria-invalid'?: true }

const FieldContext = createContext<FieldControl | null>(null)

/** What a control inside a field carries: its id, and what describes it. */
export function useFieldControl(): FieldControl | null {
  return use(FieldContext)
}

export type FieldProps = {
  label: ReactNode
  hint?: ReactNode
  error?: ReactNode
  /** The label is there for screen readers only. */
  hideLabel?: boolean
  /** At the end of the label's line: a saved sign, a unit. */
  aside?: ReactNode
  className?: string
  children: ReactNode
}

/** A label, one control, a hint and what is wrong with it. */
export function Field({ label, hint, error, hideLabel = false, aside, className, children }: FieldProps) {
  const id = useId()
  const hintId = `${id}-hint`
  const errorId = `${id}-error`
  const hasHint = hint !== undefined && hint !== null && hint !== ''
  const hasError = error !== undefined && error !== null && error !== ''
  const control = useMemo<FieldControl>(() => {
    const described = [hasError && errorId, hasHint && hintId].filter(Boolean).join(' ')
    return {
      id,
      ...(described ? { 'aria-describedby': described } : {}),
      ...(hasError ? { 'aria-invalid': true as const } : {}),
    }
  }, [id, hintId, errorId, hasHint, hasError])
  return (
    <div className={cn('flex min-w-0 flex-col', className)}>
      <div className={cn('mb-1 flex items-baseline justify-between gap-2', hideLabel && 'sr-only')}>
        <label htmlFor={id} className="label-small">
          {label}
        </label>
        {aside}
      </div>
      <FieldContext value={control}>{children}</FieldContext>
      {hasError && (
        <p id={errorId} className="mt-1 text-xs font-semibold text-velvet">
          {error}
        </p>
      )}
      {hasHint && (
        <p id={hintId} className="mt-1 text-xs text-ink-soft">
          {hint}
        </p>
      )}
    </div>
  )
}
