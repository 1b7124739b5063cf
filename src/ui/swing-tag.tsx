import type { ComponentProps, ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'

export type SwingTagProps = Omit<ComponentProps<'div'>, 'title'> & { title?: ReactNode }

/** A wardrobe tag: cut corners and an eyelet. Lists in it get hairlines. */
export function SwingTag({ title, className, children, ...rest }: SwingTagProps) {
  return (
    <div {...rest} className={cn('swing-tag', className)}>
      <div>
        {title !== undefined && (
          <p className="font-display text-[1rem] leading-snug font-semibold tracking-[-0.005em]">{title}</p>
        )}
        <div className="text-[0.78125rem] [&_ul]:mt-1.5 max-md:text-[0.8125rem]">{children}</div>
      </div>
    </div>
  )
}
