import type { ComponentProps } from 'react'
import { cn } from '#src/lib/cn.ts'

export type HatchProps = ComponentProps<'div'> & {
  /** Amber: lights and wardrobe change. Blue: the set moves. */
  tone: 'glow' | 'draft'
  /** Darker stripes, for small pieces of a strip. */
  strong?: boolean
}

/** Time between two pictures: hatched, never plain colour. */
export function Hatch({ tone, strong = false, className, ...rest }: HatchProps) {
  return <div {...rest} className={cn(`hatch-${tone}${strong ? '-strong' : ''}`, className)} />
}
