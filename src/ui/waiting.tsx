import { cn } from '#src/lib/cn.ts'
import { Lamp } from './lamp.tsx'

export type WaitingProps = { label?: string; className?: string }

/** While something is on its way. */
export function Waiting({ label = 'Just a moment', className }: WaitingProps) {
  return (
    <div
      role="status"
      className={cn('flex items-center justify-center gap-2.5 px-6 py-16 text-base text-ink-soft', className)}
    >
      <Lamp state="half" />
      {label}…
    </div>
  )
}
