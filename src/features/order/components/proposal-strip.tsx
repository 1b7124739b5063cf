import { clockLabel } from '#shared/domain/order/clock.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import type { DaySchedule } from '#shared/domain/order/schedule-types.ts'
import { cn } from '#src/lib/cn.ts'
import { Hatch } from '#src/ui/hatch.tsx'
import { type Segment, segmentsOf } from '../segments.ts'

export type ProposalStripProps = { label: string; problem: OrderProblem; day: DaySchedule; pxPerMin: number }

/** Where a number fits. */
const TEXT_PX = 13

/** A day as a narrow strip to scale, to lay beside another. */
export function ProposalStrip({ label, problem, day, pxPerMin }: ProposalStripProps) {
  const numberOf = new Map<string, number>(problem.shots.map((shot) => [shot.id, shot.number]))
  const titleOf = new Map<string, string>(problem.shots.map((shot) => [shot.id, shot.title]))
  return (
    <ol aria-label={label} className="min-w-0">
      {segmentsOf(day).map((segment) => {
        const heightPx = Math.max(3, (segment.endMin - segment.startMin) * pxPerMin)
        const minutes = Math.ceil(segment.endMin - segment.startMin - 1e-9)
        const box = cn(
          'flex items-center justify-between gap-2 overflow-hidden rounded-sm px-1.5 text-xs leading-none',
          boxOf(segment),
        )
        const shown = heightPx >= TEXT_PX
        const name =
          segment.kind === 'shot'
            ? `Shot ${numberOf.get(segment.scheduled.shotId) ?? ''}`
            : segment.kind === 'meal'
              ? 'Meal'
              : segment.kind === 'wait'
                ? 'Wait'
                : ''
        const title =
          segment.kind === 'shot'
            ? `${name}, ${titleOf.get(segment.scheduled.shotId) ?? ''}, ${clockLabel(segment.startMin)}`
            : `${name || 'Changing over'}, ${minutes} min`
        const inner = shown ? (
          <>
            <span className="truncate">{name}</span>
            <span className={segment.kind === 'change' ? 'order-first' : ''}>{minutes}</span>
          </>
        ) : (
          <span className="sr-only">{title}</span>
        )
        return (
          <li
            key={segment.kind === 'meal' ? 'meal' : `${segment.kind}:${segment.scheduled.shotId}`}
            title={title}
            style={{ height: heightPx }}
            className="pb-[2px]"
          >
            {segment.kind === 'change' ? (
              <Hatch strong tone={segment.tone} className={cn(box, 'h-full')}>
                {inner}
              </Hatch>
            ) : (
              <div className={cn(box, 'h-full')}>{inner}</div>
            )}
          </li>
        )
      })}
    </ol>
  )
}

function boxOf({ kind }: Segment): string {
  return kind === 'shot' ? 'bg-[#ece7df]' : kind === 'change' ? '' : 'border border-dashed border-edge text-ink-soft'
}
