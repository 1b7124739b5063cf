import { Popover as Base } from 'radix-ui'
import type { ReactNode } from 'react'

export type PopoverProps = {
  trigger: ReactNode
  label: string
  children: ReactNode
  align?: 'start' | 'center' | 'end'
  open?: boolean
  onOpenChange?: (open: boolean) => void
}

/** A small sheet beside what opened it. */
export function Popover({ trigger, label, children, align = 'start', open, onOpenChange }: PopoverProps) {
  return (
    <Base.Root {...(open === undefined ? {} : { open })} {...(onOpenChange === undefined ? {} : { onOpenChange })}>
      <Base.Trigger asChild>{trigger}</Base.Trigger>
      <Base.Portal>
        <Base.Content
          aria-label={label}
          align={align}
          sideOffset={6}
          collisionPadding={10}
          className="fade-in z-50 max-h-(--radix-popover-content-available-height) w-80 max-w-[calc(100vw-1.25rem)] overflow-y-auto rounded-r border border-hair bg-paper p-4 text-base text-ink shadow-over outline-none"
        >
          {children}
        </Base.Content>
      </Base.Portal>
    </Base.Root>
  )
}
