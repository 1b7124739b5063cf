import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { useLengthUnit } from '#src/lib/length-unit.ts'
import { measureLines } from '../../measures.ts'
import type { Held } from '../../use-moving.ts'

type ReadoutProps = { held: Held; whole: WholeSetup; name: string }

/** In the plan in the half where the hand is not; from the side over the floor behind the wall. */
function placeFor(held: Held, { setup: { camera, background } }: WholeSetup): string {
  if (held.drawing === 'side') return 'top-2 left-2 md:top-auto md:bottom-2'
  return held.at[2] > (camera.at[2] + background.zM) / 2 ? 'top-2 right-2' : 'right-2 bottom-2'
}

/** Distances and angles of what a hand holds, in a corner where the hand is not. */
export function Readout({ held, whole, name }: ReadoutProps) {
  const unit = useLengthUnit()
  return (
    <div
      data-testid="readout"
      aria-hidden
      className={cn(
        'pointer-events-none absolute z-10 rounded-r border border-hair bg-paper/95 px-2.5 py-1.5 text-xs max-md:text-[0.8125rem]',
        placeFor(held, whole),
      )}
    >
      <p className="font-semibold">{name}</p>
      <dl className="grid grid-cols-[auto_auto] gap-x-3">
        {measureLines(held.part.kind, held.at, whole, unit).map(([label, value]) => (
          <div key={label} className="contents">
            <dt className="text-ink-soft">{label}</dt>
            <dd className="text-right">{value}</dd>
          </div>
        ))}
      </dl>
      {held.by === 'pointer' && held.guides.length === 0 && (
        <p className="mt-0.5 text-ink-faint max-md:hidden">Hold Alt or Ctrl to move without snapping</p>
      )}
    </div>
  )
}
