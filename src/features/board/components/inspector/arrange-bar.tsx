import { ArrowDownToLine, ArrowUpToLine, Copy, Trash2 } from 'lucide-react'
import { IconButton } from '#src/ui/button.tsx'
import { duplicateSelected, removeSelected } from '../../gestures/keys.ts'
import { asStep, useWall } from '../../wall-control.ts'
import { restack } from '../../write-board.ts'

/** What can be done with whatever is selected. */
export function ArrangeBar({ stacks }: { stacks: boolean }) {
  const control = useWall()
  const stack = (to: 'front' | 'back') => {
    asStep(control, () => restack(control.doc, control.state.selection.get(), to))
  }
  return (
    <div role="group" aria-label="Arrange" className="-mx-1.5 flex gap-0.5">
      {stacks && (
        <>
          <IconButton label="To the front" onClick={() => stack('front')}>
            <ArrowUpToLine size={16} aria-hidden />
          </IconButton>
          <IconButton label="To the back" onClick={() => stack('back')}>
            <ArrowDownToLine size={16} aria-hidden />
          </IconButton>
        </>
      )}
      <IconButton label="Duplicate" onClick={() => duplicateSelected(control)}>
        <Copy size={16} aria-hidden />
      </IconButton>
      <span className="flex-1" />
      <IconButton label="Remove" onClick={() => removeSelected(control)}>
        <Trash2 size={16} aria-hidden />
      </IconButton>
    </div>
  )
}
