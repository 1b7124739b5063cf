import { X } from 'lucide-react'
import { Dialog as Base } from 'radix-ui'
import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import { IconButton } from './button.tsx'
import { useReturnFocus } from './use-return-focus.ts'

export type SheetProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: ReactNode
  /** Where it comes in from; `bottom` on phones. */
  side?: 'right' | 'bottom'
  /** The dark set: the phone on the day, the left column. */
  night?: boolean
  footer?: ReactNode
  children: ReactNode
}

/** A sheet drawn in from an edge, for what needs more room than a menu. */
export function Sheet({ open, onOpenChange, title, side = 'bottom', night = false, footer, children }: SheetProps) {
  const focus = useReturnFocus()
  return (
    <Base.Root open={open} onOpenChange={onOpenChange}>
      <Base.Portal>
        <Base.Overlay className="fade-in fixed inset-0 z-50 bg-night/55" />
        <Base.Content
          {...focus}
          aria-describedby={undefined}
          className={cn(
            'fixed z-50 flex flex-col shadow-over outline-none',
            night ? 'on-night bg-night-2 text-bone' : 'bg-paper text-ink',
            side === 'bottom'
              ? 'rise-in inset-x-0 bottom-0 mx-auto max-h-[88dvh] max-w-2xl rounded-r'
              : 'slide-in inset-y-0 right-0 w-[min(26rem,100vw)] border-l border-hair',
          )}
        >
          <header className="flex items-center gap-3 px-5 pt-4 pb-2">
            <Base.Title className="flex-1 text-xl">{title}</Base.Title>
            <Base.Close asChild>
              <IconButton
                label="Close"
                className={cn('-mr-2', night && 'text-bone-soft hover:bg-night-3 hover:text-bone')}
              >
                <X size={18} aria-hidden />
              </IconButton>
            </Base.Close>
          </header>
          <div className="min-h-0 flex-1 overflow-y-auto px-5 pb-6">{children}</div>
          {footer !== undefined && (
            <footer
              className={cn(
                'flex flex-wrap justify-end gap-2 border-t px-5 py-3 max-md:pb-6',
                night ? 'border-night-3' : 'border-hair',
              )}
            >
              {footer}
            </footer>
          )}
        </Base.Content>
      </Base.Portal>
    </Base.Root>
  )
}
