import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Cover } from './cover.tsx'
import { ShotLine } from './shot-line.tsx'

export type LooseShotsProps = {
  shots: readonly PlannedShot[]
  mayPlace: boolean
  onPlace: (shot: PlannedShot) => void
  onOpen: (shotId: string) => void
}

/** Shots that stand on no day. */
export function LooseShots({ shots, mayPlace, onPlace, onOpen }: LooseShotsProps) {
  if (shots.length === 0) return null
  return (
    <section aria-label="Not placed yet">
      <h2 className="mb-2 text-lg">Not placed yet</h2>
      <ul className="flex flex-col gap-1.5">
        {shots.map((planned) => (
          <li
            key={planned.shot.id}
            className="flex items-center gap-3 overflow-hidden rounded-r border border-hair bg-print pr-3"
          >
            <button
              type="button"
              onClick={() => onOpen(planned.shot.id)}
              className="flex min-h-[54px] min-w-0 flex-1 items-center gap-3 text-left"
            >
              <Cover shot={planned} className="w-12 self-stretch" />
              <span className="min-w-0 flex-1">
                <span className="block truncate leading-tight font-semibold">{planned.shot.title}</span>
                <ShotLine shot={planned} />
              </span>
            </button>
            {mayPlace && (
              <Button
                size="small"
                aria-label={`Place on this day: ${planned.shot.title}`}
                onClick={() => onPlace(planned)}
              >
                Place on this day
              </Button>
            )}
          </li>
        ))}
      </ul>
    </section>
  )
}
