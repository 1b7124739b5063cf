import type { DayLine } from '#shared/domain/day/progress.ts'
import type { ShotState } from '#shared/domain/day/schema.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import type { ShotId } from '#shared/ids.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { Lamp, type LampState } from '#src/ui/lamp.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { CoverPicture } from './cover-picture.tsx'

const STATE_WORDS: Record<ShotState, string> = {
  waiting: 'waiting',
  'under way': 'under way',
  got: 'got',
  skipped: 'skipped',
}
const LAMPS: Record<ShotState, LampState> = { waiting: 'unlit', 'under way': 'half', got: 'lit', skipped: 'unlit' }

export type ShotListProps = {
  lines: readonly DayLine[]
  currentId: ShotId | null
  shotOf: (id: string) => PlannedShot | undefined
  noteOf: (id: ShotId) => string
  /** Missing for somebody who only reads. */
  onState?: ((id: ShotId, state: ShotState) => void) | undefined
}

/** All shots of the day with their lamps; each can be begun, taken back or dropped from here. */
export function ShotList({ lines, currentId, shotOf, noteOf, onState }: ShotListProps) {
  return (
    <ol>
      {lines.map((line) => {
        const shot = shotOf(line.shotId)
        if (!shot) return null
        const isOver = line.state === 'got' || line.state === 'skipped'
        const time = isOver
          ? STATE_WORDS[line.state]
          : `${line.expectedStartMin === null ? '' : 'about '}${clockLabel(line.expectedStartMin ?? line.plannedStartMin)}`
        const row = (
          <span className="flex w-full items-center gap-3 py-2 text-left">
            <CoverPicture shot={shot} className="h-12 w-10" />
            <span className="min-w-0 flex-1">
              <span
                className={cn(
                  'block text-[0.9375rem] font-semibold',
                  line.shotId === currentId ? 'text-white' : 'text-bone',
                  line.state === 'skipped' && 'line-through',
                )}
              >
                {shot.number} · {shot.shot.title}
              </span>
              <span className="block text-[0.8125rem] text-bone-soft">
                {[line.shotId === currentId ? 'now' : time, noteOf(line.shotId)]
                  .filter((part) => part !== '')
                  .join(' · ')}
              </span>
            </span>
            <Lamp state={LAMPS[line.state]} label={STATE_WORDS[line.state]} />
          </span>
        )
        return (
          <li
            key={line.shotId}
            className={cn(
              'border-b border-[#292521]',
              line.shotId === currentId && 'border-l-3 border-l-glow-lit pl-2.5',
            )}
          >
            {onState ? (
              <Menu
                trigger={
                  <button
                    type="button"
                    className="block min-h-12 w-full rounded-r hover:bg-night-3"
                    aria-label={`Shot ${shot.number ?? ''}, ${shot.shot.title}, ${STATE_WORDS[line.state]}`}
                  >
                    {row}
                  </button>
                }
                items={[
                  ...(line.state === 'under way'
                    ? []
                    : [{ label: 'Begin this one now', onSelect: () => onState(line.shotId, 'under way') }]),
                  ...(line.state === 'got' ? [] : [{ label: 'Got it', onSelect: () => onState(line.shotId, 'got') }]),
                  ...(line.state === 'skipped'
                    ? []
                    : [{ label: 'Skip', onSelect: () => onState(line.shotId, 'skipped') }]),
                  ...(line.state === 'waiting'
                    ? []
                    : [{ label: 'Back to waiting', onSelect: () => onState(line.shotId, 'waiting') }]),
                ]}
              />
            ) : (
              row
            )}
          </li>
        )
      })}
    </ol>
  )
}
