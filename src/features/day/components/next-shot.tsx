import { nextWords } from '#shared/domain/day/card.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import type { ScheduledShot } from '#shared/domain/order/schedule-types.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { CoverPicture } from './cover-picture.tsx'

export type NextShotProps = { shot: PlannedShot; next: ScheduledShot; expectedStartMin: number | null }

export function NextShot({ shot, next, expectedStartMin }: NextShotProps) {
  const when =
    expectedStartMin === null ? `planned ${clockLabel(next.startMin)}` : `about ${clockLabel(expectedStartMin)}`
  return (
    <section aria-label="Next shot" className="flex items-center gap-3 border-t border-night-3 pt-3">
      <CoverPicture shot={shot} className="h-14 w-[46px]" />
      <div className="min-w-0">
        <p className="text-[0.8125rem] text-bone-soft">Next, {when}</p>
        <p className="text-[0.9375rem] font-bold text-white">
          {shot.number} · {shot.shot.title}
        </p>
        <p className="text-[0.8125rem] text-bone-soft">{nextWords(next.changeover)}</p>
      </div>
    </section>
  )
}
