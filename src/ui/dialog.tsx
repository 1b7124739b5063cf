import { X } from 'lucide-react'
import { Dialog as Base } from 'radix-ui'
import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import { IconButton } from './button.tsx'
import { useReturnFocus } from './use-return-focus.ts'

export type DialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: ReactNode
  description?: ReactNode
  /** Buttons at the foot; the main one last. */
  footer?: ReactNode
  wide?: boolean
  children?: ReactNode
}

/** A sheet of paper over the screen. Focus goes in, stays in, and comes back to what opened it. */
export function Dialog({ open, onOpenChange, title, description, footer, wide = false, children }: DialogProps) {
  const focus = useReturnFocus({ inField: true })
  return (
    <Base.Root open={open} onOpenChange={onOpenChange}>
      <Base.Portal>
        <Base.Overlay className="fade-in fixed inset-0 z-50 bg-night/55" />
        <Base.Content
          {...focus}
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
          className={cn(
            'rise-in fixed inset-x-0 bottom-0 z-50 mx-auto flex max-h-[92dvh] flex-col rounded-r bg-paper text-ink shadow-over outline-none',
            'md:inset-0 md:m-auto md:h-fit md:max-h-[88dvh] md:w-[calc(100%-3rem)]',
            wide ? 'md:max-w-3xl' : 'md:max-w-md',
          )}
        >
          <header className="flex items-start gap-3 px-5 pt-4 pb-2 md:px-6 md:pt-5">
            <div className="min-w-0 flex-1">
              <Base.Title className="text-xl">{title}</Base.Title>
              {description !== undefined && (
                <Base.Description className="mt-1 text-sm text-ink-soft">{description}</Base.Description>
              )}
            </div>
            <Base.Close asChild>
              <IconButton label="Close" className="-mt-1 -mr-2">
                <X size={18} aria-hidden />
              </IconButton>
            </Base.Close>
          </header>
          <div className="min-h-0 flex-1 overflow-y-auto px-5 pt-1 pb-5 md:px-6">{children}</div>
          {footer !== undefined && (
            <footer className="flex flex-wrap justify-end gap-2 border-t border-hair px-5 py-3 max-md:pb-6 md:px-6">
              {footer}
            </footer>
          )}
        </Base.Content>
      </Base.Portal>
    </Base.Root>
  )
}
