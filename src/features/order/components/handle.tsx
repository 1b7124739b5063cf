import type { useSortable } from '@dnd-kit/sortable'
import { GripVertical, Menu } from 'lucide-react'
import { cn } from '#src/lib/cn.ts'

export type HandleProps = {
  name: string
  sortable: ReturnType<typeof useSortable>
  /** The three lines of the phone's list instead of the grip beside the rail. */
  lines?: boolean
  className?: string
}

/** What a shot is picked up by: mouse, finger, or Space and the arrow keys. */
export function Handle({ name, sortable, lines = false, className }: HandleProps) {
  const Sign = lines ? Menu : GripVertical
  return (
    <button
      ref={sortable.setActivatorNodeRef}
      type="button"
      {...sortable.attributes}
      {...sortable.listeners}
      aria-label={name}
      className={cn('grid cursor-grab touch-none place-items-center rounded-r text-ink-faint select-none hover:bg-ink/8 hover:text-ink active:cursor-grabbing', className)}
    >
      <Sign size={lines ? 18 : 16} aria-hidden />
    </button>
  )
}
