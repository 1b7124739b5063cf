import { Fragment } from 'react'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { shotParts } from '../words.ts'

const TONES = { said: '', setup: 'text-draft', missing: 'font-semibold text-glow-ink' }

/** Looks · set · setup, what is missing said in words. */
export function ShotLine({ shot, className }: { shot: PlannedShot; className?: string }) {
  return (
    <span className={cn('block truncate text-xs text-ink-soft', className)}>
      {shotParts(shot).map(({ text, kind }, index) => (
        <Fragment key={index}>
          {index > 0 && ' · '}
          <span className={TONES[kind]}>{text}</span>
        </Fragment>
      ))}
    </span>
  )
}
