import type { DraggableAttributes, DraggableSyntheticListeners } from '@dnd-kit/core'
import { GripVertical, Menu } from 'lucide-react'
import { cn } from '#src/lib/cn.ts'

export type HandleProps = {
  name: string
  nodeRef: (node: HTMLElement | null) => void
  attributes: DraggableAttributes
  listeners: DraggableSyntheticListeners
  /** The three lines of the phone's list instead of the grip beside the rail. */
  lines?: boolean
  className?: string
}

/** What a shot is picked up by: mouse, finger, or Space and the arrow keys. */
export function Handle({ name, nodeRef, attributes, listeners, lines = false, className }: HandleProps) {
  const Sign = lines ? Menu : GripVertical
  return (
    <button
      ref={nodeRef}
      type="button"
      {...attributes}
      {...listeners}
      aria-label={name}
      className={cn(
        'grid cursor-grab touch-none place-items-center rounded-r text-ink-faint select-none hover:bg-ink/8 hover:text-ink active:cursor-grabbing',
        className,
      )}
    >
      <Sign size={lines ? 18 : 16} aria-hidden />
    </button>
  )
}
