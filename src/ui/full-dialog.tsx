import { X } from 'lucide-react'
import { Dialog as Base } from 'radix-ui'
import type { ReactNode } from 'react'
import { IconButton } from './button.tsx'
import { useReturnFocus } from './use-return-focus.ts'

type FullDialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: ReactNode
  description: ReactNode
  /** Beside the title. */
  actions?: ReactNode
  children: ReactNode
}

/** The neutral wall over the whole screen, for looking at something. */
export function FullDialog({ open, onOpenChange, title, description, actions, children }: FullDialogProps) {
  const focus = useReturnFocus({ inField: false })
  return (
    <Base.Root open={open} onOpenChange={onOpenChange}>
      <Base.Portal>
        <Base.Content
          {...focus}
          className="fade-in fixed inset-0 z-50 flex flex-col overflow-y-auto bg-surround text-ink outline-none md:overflow-hidden"
        >
          <header className="flex flex-wrap items-center gap-x-3 gap-y-1 px-[18px] py-2.5 md:px-6 md:py-3.5">
            <div className="min-w-0 flex-1">
              <Base.Title className="truncate text-xl">{title}</Base.Title>
              <Base.Description className="text-sm text-ink-soft">{description}</Base.Description>
            </div>
            <Base.Close asChild>
              <IconButton label="Close" className="md:order-last">
                <X size={18} aria-hidden />
              </IconButton>
            </Base.Close>
            {actions !== undefined && (
              <div className="flex items-center gap-x-3 gap-y-1.5 max-md:w-full max-md:flex-wrap">{actions}</div>
            )}
          </header>
          {children}
        </Base.Content>
      </Base.Portal>
    </Base.Root>
  )
}
