import type { ComponentProps, ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'

export type PrintProps = ComponentProps<'figure'> & {
  caption?: ReactNode
  /** Who hung it: initials at the end of the caption. */
  by?: string
  selected?: boolean
}

/** A picture as a print on the wall: thin white edge, caption below. Children are the picture. */
export function Print({ caption, by, selected = false, className, children, ...rest }: PrintProps) {
  const bare = caption === undefined && by === undefined
  return (
    <figure
      {...rest}
      className={cn(
        'rounded-sm bg-print px-1.5 pt-1.5 shadow-print',
        bare && 'pb-1.5',
        selected && 'outline-2 outline-offset-2 outline-draft',
        className,
      )}
    >
      {children}
      {!bare && (
        <figcaption className="flex justify-between gap-2 px-0.5 pt-[5px] pb-[7px] text-xs leading-[1.3] max-md:text-[0.8125rem]">
          <span className="min-w-0">{caption}</span>
          {by !== undefined && <span className="flex-none text-ink-faint">{by}</span>}
        </figcaption>
      )}
    </figure>
  )
}
