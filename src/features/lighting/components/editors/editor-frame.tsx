import { ChevronLeft } from 'lucide-react'
import type { ReactNode } from 'react'
import { Button } from '#src/ui/button.tsx'

type EditorFrameProps = {
  title: ReactNode
  mayWrite: boolean
  /** Leads back to the readings; absent where the frame around has its own way out. */
  onBack: (() => void) | null
  foot?: ReactNode
  children: ReactNode
}

/** What is chosen in the drawing, with its numbers. Read-only for who may not write. */
export function EditorFrame({ title, mayWrite, onBack, foot, children }: EditorFrameProps) {
  return (
    <section aria-label="What is chosen">
      {onBack && (
        <Button variant="quiet" size="small" className="mb-1 -ml-2.5" onClick={onBack}>
          <ChevronLeft size={15} aria-hidden />
          Readings
        </Button>
      )}
      <h2 className="mb-3 flex items-center gap-2.5 text-[1.1875rem]">{title}</h2>
      <fieldset disabled={!mayWrite} className="flex min-w-0 flex-col gap-3.5">
        {children}
        {foot !== undefined && mayWrite && (
          <div className="mt-1 flex flex-wrap gap-2 border-t border-hair pt-3.5">{foot}</div>
        )}
      </fieldset>
    </section>
  )
}

/** A group of fields under one small heading. */
export function FieldGroup({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div role="group" aria-label={title} className="flex flex-col gap-2 border-t border-hair-soft pt-3">
      <h3 className="font-sans text-sm font-semibold">{title}</h3>
      {children}
    </div>
  )
}
