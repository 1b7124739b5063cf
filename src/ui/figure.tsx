import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import { Popover } from './popover.tsx'

export type FigureProps = {
  label: string
  value: ReactNode
  unit?: string
  tone?: 'ink' | 'bottle' | 'glow' | 'velvet'
  size?: 'normal' | 'large'
  /** Marks a number that rests on somebody's guess. */
  assumed?: boolean
  /** The formula, the inputs and their source, one press away. */
  detail?: ReactNode
  className?: string
}

const TONES = { ink: 'text-ink', bottle: 'text-bottle', glow: 'text-glow-ink', velvet: 'text-velvet' }

/** One of the few large numbers of a screen, with its name above it. */
export function Figure({
  label,
  value,
  unit,
  tone = 'ink',
  size = 'normal',
  assumed = false,
  detail,
  className,
}: FigureProps) {
  const number = (
    <span
      className={cn(
        'font-display font-semibold whitespace-nowrap',
        TONES[tone],
        size === 'large' ? 'text-3xl' : 'text-[1.4375rem] leading-tight',
      )}
    >
      {value}
      {unit !== undefined && <span className="pl-1 font-sans text-sm font-normal text-ink-soft">{unit}</span>}
    </span>
  )
  return (
    <div className={cn('min-w-0', className)}>
      <div className="label-small">
        {label}
        {assumed && <span className="font-normal text-glow-ink"> · assumed</span>}
      </div>
      {detail === undefined ? (
        number
      ) : (
        <Popover
          label={`How ${label} is worked out`}
          trigger={
            <button
              type="button"
              aria-label={`${label}: how it is worked out`}
              className="rounded-r border-b border-dotted border-edge text-left hover:border-ink max-md:min-h-11"
            >
              {number}
            </button>
          }
        >
          {detail}
        </Popover>
      )}
    </div>
  )
}
