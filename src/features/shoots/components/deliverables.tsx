import { useState } from 'react'
import type { Deliverable } from '#shared/domain/shoots/schema.ts'
import { civilShort } from '#src/lib/format.ts'
import { Button } from '#src/ui/button.tsx'
import { DeliverableDialog } from './deliverable-dialog.tsx'

export type DeliverablesProps = { deliverables: readonly Deliverable[]; readOnly: boolean; shootId: string }

/** What is promised: a count, what of, how it is held, what for, by when. */
export function Deliverables({ deliverables, readOnly, shootId }: DeliverablesProps) {
  const [editing, setEditing] = useState<Deliverable | 'new' | null>(null)
  return (
    <section aria-label="Deliverables">
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-xl">Promised</h2>
        {!readOnly && (
          <Button size="small" onClick={() => setEditing('new')}>
            Add a deliverable
          </Button>
        )}
      </div>
      {deliverables.length === 0 ? (
        <p className="mt-2 border-t border-hair py-3 text-sm text-ink-soft">
          Nothing yet. {readOnly ? '' : 'Write down each picture or set of pictures the client gets.'}
        </p>
      ) : (
        <ul className="mt-2">
          {deliverables.map((deliverable) => {
            const facts = [
              deliverable.orientation === 'any' ? '' : deliverable.orientation,
              deliverable.use,
              deliverable.dueOn === null ? '' : `by ${civilShort(deliverable.dueOn)}`,
            ].filter((fact) => fact !== '')
            const row = (
              <>
                <b className="w-10 flex-none text-right font-display text-2xl font-semibold">{deliverable.count}</b>
                <span className="min-w-0">
                  <span className="block font-semibold">{deliverable.title}</span>
                  {facts.length > 0 && <span className="block text-sm text-ink-soft">{facts.join(' · ')}</span>}
                </span>
              </>
            )
            return (
              <li key={deliverable.id} className="border-t border-hair">
                {readOnly ? (
                  <div className="flex items-baseline gap-4 py-2">{row}</div>
                ) : (
                  <button
                    type="button"
                    className="flex w-full items-baseline gap-4 rounded-r py-2 text-left hover:bg-white"
                    onClick={() => setEditing(deliverable)}
                    aria-label={`Change: ${deliverable.count} × ${deliverable.title}`}
                  >
                    {row}
                  </button>
                )}
              </li>
            )
          })}
        </ul>
      )}
      {editing && (
        <DeliverableDialog
          key={editing === 'new' ? 'new' : editing.id}
          deliverable={editing === 'new' ? null : editing}
          shootId={shootId}
          onClose={() => setEditing(null)}
        />
      )}
    </section>
  )
}
