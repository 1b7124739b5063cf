import { X } from 'lucide-react'
import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'
import { IconButton } from './button.tsx'
import { Sheet } from './sheet.tsx'
import { useIsPhone } from './use-media.ts'

export type PanelProps = {
  title: string
  onClose: () => void
  /** Beside the title: a menu of what else can be done. */
  aside?: ReactNode
  /** Stays in sight at the foot. */
  footer?: ReactNode
  /** Its width and how it stays in sight beside what scrolls. */
  className?: string
  children: ReactNode
}

/** What is chosen, docked at the side of a screen; on phones a sheet. */
export function Panel({ title, onClose, aside, footer, className, children }: PanelProps) {
  const isPhone = useIsPhone()
  if (isPhone) {
    return (
      <Sheet open onOpenChange={(open) => !open && onClose()} title={title} footer={footer}>
        {aside !== undefined && aside !== false && <div className="absolute top-3.5 right-14">{aside}</div>}
        <div className="flex flex-col gap-4">{children}</div>
      </Sheet>
    )
  }
  return (
    <aside
      aria-label={title}
      className={cn('flex min-h-0 flex-none flex-col border-l border-hair bg-paper', className)}
    >
      <header className="flex items-start gap-1 px-[22px] pt-4 pb-1.5">
        <h2 className="min-w-0 flex-1 text-xl">{title}</h2>
        {aside}
        <IconButton label="Close" className="-mt-1.5 -mr-2" onClick={onClose}>
          <X size={18} aria-hidden />
        </IconButton>
      </header>
      <div className="flex min-h-0 flex-1 flex-col gap-4 overflow-y-auto px-[22px] pt-1 pb-8">{children}</div>
      {footer !== undefined && <footer className="flex gap-2 border-t border-hair px-[22px] py-3">{footer}</footer>}
    </aside>
  )
}

/** A part of a panel under a name of its own. */
export function PanelSection({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title} className="border-t border-hair pt-3">
      <h3 className="label-small mb-2 font-sans">{title}</h3>
      <div className="flex flex-col gap-3">{children}</div>
    </section>
  )
}
