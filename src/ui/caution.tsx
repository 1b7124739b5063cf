import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'

export type CautionProps = {
  /** Amber: mind this. Green: settled. Red: stop. Blue: good to know. */
  tone?: 'glow' | 'bottle' | 'velvet' | 'draft'
  title?: ReactNode
  children?: ReactNode
  className?: string
}

const TONES = {
  glow: 'border-glow bg-glow-wash',
  bottle: 'border-bottle bg-bottle-wash',
  velvet: 'border-velvet bg-velvet-wash',
  draft: 'border-draft bg-draft-wash',
}

/** A remark with a coloured edge: what a person would say first, then the number and the reason. */
export function Caution({ tone = 'glow', title, children, className }: CautionProps) {
  return (
    <div className={cn('border-l-3 px-3 py-2 text-sm leading-snug text-ink', TONES[tone], className)}>
      {title !== undefined && <b className="block font-semibold">{title}</b>}
      {children}
    </div>
  )
}
