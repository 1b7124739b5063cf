import type { ComponentProps, ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'

export type CheckboxProps = Omit<ComponentProps<'input'>, 'type' | 'checked' | 'onChange' | 'children'> & {
  checked: boolean
  onChange: (checked: boolean) => void
  /** The words beside it; the whole row is the target. */
  children: ReactNode
}

export function Checkbox({ checked, onChange, children, className, ...rest }: CheckboxProps) {
  return (
    <label
      className={cn(
        'flex cursor-pointer items-start gap-2.5 py-1 text-base max-md:min-h-11 max-md:items-center',
        className,
      )}
    >
      <input
        {...rest}
        type="checkbox"
        checked={checked}
        onChange={(event) => onChange(event.target.checked)}
        className="mt-0.5 size-4 flex-none rounded-r accent-velvet max-md:mt-0 max-md:size-6"
      />
      <span className="min-w-0">{children}</span>
    </label>
  )
}
