import type { ComponentProps } from 'react'
import { cn } from '#src/lib/cn.ts'
import { CONTROL } from './control-class.ts'
import { useFieldControl } from './field.tsx'

export type SelectOption<Value extends string> = { value: Value; label: string; disabled?: boolean }

export type SelectProps<Value extends string> = Omit<ComponentProps<'select'>, 'value' | 'onChange' | 'children'> & {
  options: readonly SelectOption<Value>[]
  value: Value
  onChange: (value: Value) => void
}

export function Select<Value extends string>({ options, value, onChange, className, ...rest }: SelectProps<Value>) {
  return (
    <select
      {...useFieldControl()}
      {...rest}
      value={value}
      onChange={(event) => {
        const chosen = options.find((option) => option.value === event.target.value)
        if (chosen) onChange(chosen.value)
      }}
      className={cn(CONTROL, 'select-arrow', className)}
    >
      {options.map((option) => (
        <option key={option.value} value={option.value} disabled={option.disabled}>
          {option.label}
        </option>
      ))}
    </select>
  )
}
