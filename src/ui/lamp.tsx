import { cn } from '#src/lib/cn.ts'

export type LampState = 'unlit' | 'half' | 'lit'

export type LampProps = {
  state: LampState
  /** The lamp's name where no text stands beside it. */
  label?: string
  className?: string
}

/** The one status sign: outline is not begun, half is under way, lit is ready. */
export function Lamp({ state, label, className }: LampProps) {
  return label === undefined ? (
    <span aria-hidden className={cn('lamp', className)} data-state={state} />
  ) : (
    <span role="img" aria-label={label} title={label} className={cn('lamp', className)} data-state={state} />
  )
}

export type LampRowProps = { states: readonly LampState[]; className?: string }

/** A row of lamps with its sum in words. */
export function LampRow({ states, className }: LampRowProps) {
  const lit = states.filter((state) => state === 'lit').length
  return (
    <span className={cn('flex items-center gap-[5px] text-[0.78125rem] text-ink-soft', className)}>
      {states.map((state, index) => (
        <Lamp key={index} state={state} />
      ))}
      <span className="pl-1 whitespace-nowrap">
        {lit} of {states.length} ready
      </span>
    </span>
  )
}
