import type { ComponentProps } from 'react'
import { cn } from '#src/lib/cn.ts'
import { CONTROL } from './control-class.ts'
import { useFieldControl } from './field.tsx'

export type TextareaProps = ComponentProps<'textarea'>

/** Grows with what is written, where the browser can. */
export function Textarea({ className, rows = 3, ...rest }: TextareaProps) {
  return (
    <textarea
      {...useFieldControl()}
      rows={rows}
      {...rest}
      className={cn(CONTROL, 'block field-sizing-content leading-normal', className)}
    />
  )
}
