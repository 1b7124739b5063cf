import type { ComponentProps } from 'react'
import { cn } from '#src/lib/cn.ts'
import { CONTROL } from './control-class.ts'
import { useFieldControl } from './field.tsx'

export type InputProps = ComponentProps<'input'>

export function Input({ className, ...rest }: InputProps) {
  return <input type="text" {...useFieldControl()} {...rest} className={cn(CONTROL, className)} />
}
