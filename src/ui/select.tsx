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

const ARROW =
  "bg-no-repeat bg-[right_9px_center] pr-7 appearance-none bg-[url(\"data:image/svg+xml,%3Csvg%20xmlns='http://www.w3.org/2000/svg'%20width='10'%20height='6'%3E%3Cpath%20d='M1%201l4%204%204-4'%20fill='none'%20stroke='%235F5A54'%20stroke-width='1.5'/%3E%3C/svg%3E\")]"

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
      className={cn(CONTROL, ARROW, className)}
    >
      {options.map((option) => (
        <option key={option.value} value={option.value} disabled={option.disabled}>
          {option.label}
        </option>
      ))}
    </select>
  )
}
