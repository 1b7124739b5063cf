import { cn } from '#src/lib/cn.ts'

/** A light's radio group: its letter in a circle; dashed when it has none. */
export function GroupLetter({ group }: { group: string | null }) {
  return (
    <span
      className={cn(
        'inline-grid size-[22px] flex-none place-items-center rounded-full border-[1.5px] text-xs font-bold',
        group === null ? 'border-dashed border-edge' : 'border-ink',
      )}
      aria-label={group === null ? 'no group' : `group ${group}`}
      role="img"
    >
      {group}
    </span>
  )
}
