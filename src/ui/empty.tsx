import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'

export type EmptyProps = {
  /** What belongs here. */
  title: string
  children?: ReactNode
  /** The one action that begins it. */
  action?: ReactNode
  /** Over the dark set or the neutral wall instead of the paper. */
  tone?: 'paper' | 'night'
  className?: string
}

/** A place with nothing in it yet: says what belongs there and offers the way to begin. */
export function Empty({ title, children, action, tone = 'paper', className }: EmptyProps) {
  return (
    <div className={cn('mx-auto flex max-w-md flex-col items-center px-6 py-12 text-center', className)}>
      <svg
        width="64"
        height="50"
        viewBox="0 0 64 50"
        aria-hidden
        className={tone === 'night' ? 'text-night-edge' : 'text-edge'}
      >
        <path d="M10 30a22 22 0 0 1 44 0z" fill="none" stroke="currentColor" strokeWidth="1.5" strokeDasharray="4 4" />
        <path d="M25 34h14l-4 8h-6z" fill="currentColor" opacity=".55" />
        <path d="M4 49h56" stroke="currentColor" strokeWidth="1" opacity=".5" />
      </svg>
      <h2 className="mt-4 text-xl">{title}</h2>
      {children !== undefined && (
        <div className={cn('mt-2 text-base', tone === 'night' ? 'text-bone-soft' : 'text-ink-soft')}>{children}</div>
      )}
      {action !== undefined && <div className="mt-5 flex flex-wrap justify-center gap-2">{action}</div>}
    </div>
  )
}
