import { Button } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { useWall } from '../wall-control.ts'

/** What belongs on a wall on which nothing hangs. */
export function EmptyBoard({ mayWrite, onAdd }: { mayWrite: boolean; onAdd: () => void }) {
  const { isPast } = useWall()
  return (
    <div className="pointer-events-none absolute inset-0 grid place-items-center">
      <Empty
        title={isPast ? 'Nothing hung here' : 'Nothing hangs here yet'}
        tone="paper"
        {...(mayWrite
          ? {
              action: (
                <Button variant="primary" className="pointer-events-auto" onClick={onAdd}>
                  Add pictures
                </Button>
              ),
            }
          : {})}
      >
        {isPast
          ? 'This version was kept before anything was pinned.'
          : mayWrite
            ? 'Pictures that show what the shoot should feel like, notes, and a tag for every look. Drop them here, paste them, or choose files.'
            : 'Pictures, notes and tags appear here as soon as somebody pins them.'}
      </Empty>
    </div>
  )
}
