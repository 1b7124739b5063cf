import { type ComponentProps, useState } from 'react'
import { cn } from '#src/lib/cn.ts'
import { CONTROL } from './control-class.ts'
import { useFieldControl } from './field.tsx'

type Common = Omit<ComponentProps<'input'>, 'value' | 'onChange' | 'min' | 'max' | 'step' | 'type'> & {
  unit?: string
  min?: number
  max?: number
  /** One press of an arrow key; ten with Shift. */
  step?: number
  /** Digits after the point that are shown; what was typed is kept as it is. */
  decimals?: number
  /** Reads and writes the number another way than as a plain one: a length in feet and inches. */
  read?: (text: string) => number | undefined
  write?: (value: number) => string
}
export type NumberInputProps = Common &
  (
    | { value: number; onChange: (value: number) => void; allowEmpty?: false }
    | { value: number | null; onChange: (value: number | null) => void; allowEmpty: true }
  )

/** Reads what people type: `1,5`, `1.5`, `−2`. Undefined when it is no number. */
export function parseTypedNumber(text: string): number | undefined {
  const plain = text.trim().replace(/[−–]/g, '-').replace(/\s/g, '').replace(',', '.')
  if (!/^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain)) return undefined
  return Number(plain)
}

/** A number that is taken over on Enter, on leaving, and by the arrow keys. Escape brings the old one back. */
export function NumberInput(props: NumberInputProps) {
  const {
    value,
    onChange,
    allowEmpty,
    unit,
    min = -Infinity,
    max = Infinity,
    step = 1,
    decimals = 3,
    read = parseTypedNumber,
    write = (number) => String(Number(number.toFixed(decimals))),
    className,
    onBlur,
    onKeyDown,
    ...rest
  } = props
  const [draft, setDraft] = useState<string | null>(null)
  const [remark, setRemark] = useState('')

  function give(next: number | null) {
    if (next === value) return
    if (next !== null) onChange(next)
    else if (allowEmpty) onChange(null)
  }
  function commit(text: string) {
    setDraft(null)
    if (text.trim() === '') {
      if (allowEmpty) give(null)
      setRemark(allowEmpty ? '' : 'A number belongs here; the old one is back.')
      return
    }
    const typed = read(text)
    if (typed === undefined) {
      setRemark('That is not a number; the old one is back.')
      return
    }
    const kept = Math.min(max, Math.max(min, typed))
    setRemark(kept === typed ? '' : kept === max ? `${write(max)} is the most.` : `${write(min)} is the least.`)
    give(kept)
  }
  function nudge(by: number) {
    const from = (draft === null ? value : read(draft)) ?? 0
    const next = Math.min(max, Math.max(min, Number((from + by).toFixed(6))))
    setDraft(null)
    setRemark('')
    give(next)
  }

  return (
    <span className={cn('relative block min-w-0', className)}>
      <input
        inputMode={min < 0 ? 'text' : 'decimal'}
        autoComplete="off"
        {...useFieldControl()}
        {...rest}
        type="text"
        value={draft ?? (value === null ? '' : write(value))}
        onFocus={(event) => {
          event.currentTarget.select()
          rest.onFocus?.(event)
        }}
        onChange={(event) => {
          setDraft(event.target.value)
          setRemark('')
        }}
        onBlur={(event) => {
          if (draft !== null) commit(draft)
          onBlur?.(event)
        }}
        onKeyDown={(event) => {
          if (event.key === 'Enter' && draft !== null) commit(draft)
          else if (event.key === 'Escape' && draft !== null) {
            setDraft(null)
            setRemark('')
            event.stopPropagation()
          } else if (event.key === 'ArrowUp' || event.key === 'ArrowDown') {
            event.preventDefault()
            if (!rest.readOnly && !rest.disabled)
              nudge((event.key === 'ArrowUp' ? step : -step) * (event.shiftKey ? 10 : 1))
          }
          onKeyDown?.(event)
        }}
        className={cn(CONTROL, unit !== undefined && (unit.length > 3 ? 'pr-14' : 'pr-9'))}
      />
      {unit !== undefined && (
        <span className="pointer-events-none absolute top-[8px] right-2.5 text-sm text-ink-faint max-md:top-[11px]">
          {unit}
        </span>
      )}
      <span role="status" className={cn('block text-xs text-glow-ink', remark && 'mt-1')}>
        {remark}
      </span>
    </span>
  )
}
