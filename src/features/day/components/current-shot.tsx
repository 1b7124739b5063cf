import type { DayProgress } from '#shared/domain/day/progress.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import type { ScheduledShot } from '#shared/domain/order/schedule-types.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { behindWords, shotLine } from '../words.ts'

export type CurrentShotProps = {
  shot: PlannedShot
  current: ScheduledShot
  progress: DayProgress
  nowMin: number | null
}

/** The shot that is made now: its number large, where it is, and how it stands against the plan. */
export function CurrentShot({ shot, current, progress, nowMin }: CurrentShotProps) {
  const line = progress.lines.find(({ shotId }) => shotId === current.shotId)
  const startMin = line?.plannedStartMin ?? current.startMin
  const endMin = line?.plannedEndMin ?? current.endMin
  const part = nowMin === null ? 0 : Math.max(0, Math.min(1, (nowMin - startMin) / Math.max(1, endMin - startMin)))
  const { behindMin } = progress
  return (
    <section aria-label="Current shot">
      <div className="flex items-end gap-3.5">
        <span
          className="font-display text-4xl leading-[0.95] font-semibold text-white"
          aria-label={`Shot ${shot.number ?? ''}`}
        >
          {shot.number}
        </span>
        <h1 className="pb-1 text-[1.5625rem] leading-[1.15] text-balance text-white">{shot.shot.title}</h1>
      </div>
      <p className="mt-1.5 text-[0.84375rem] text-bone-soft">{shotLine(shot)}</p>
      {shot.shot.note !== '' && <p className="mt-1 font-display text-[1rem] text-bone italic">{shot.shot.note}</p>}
      <div className="relative mt-3 mb-1 h-1.5 overflow-hidden rounded-t-[6px] bg-night-3">
        <div
          className="absolute inset-y-0 left-0 bg-linear-to-r from-glow-deep to-glow-lit"
          style={{ width: `${Math.round(part * 100)}%` }}
        />
      </div>
      <div className="flex flex-wrap items-center justify-between gap-2 text-[0.8125rem] text-bone-soft">
        <span>
          Planned {clockLabel(startMin)} to {clockLabel(endMin)}
        </span>
        {behindMin !== null && (
          <span
            className={cn(
              'rounded-r px-2 py-0.5 font-semibold',
              behindMin > 0 ? 'bg-[#3a2413] text-[#ffc988]' : 'bg-night-3 text-bone',
            )}
          >
            {behindWords(behindMin)}
          </span>
        )}
      </div>
    </section>
  )
}
