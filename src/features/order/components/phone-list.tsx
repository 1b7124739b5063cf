import { useSortable } from '@dnd-kit/sortable'
import { CSS } from '@dnd-kit/utilities'
import { clockLabel, minutesLabel } from '#shared/domain/order/clock.ts'
import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { Hatch } from '#src/ui/hatch.tsx'
import { segmentsOf } from '../segments.ts'
import type { OrderDay } from '../use-order-day.ts'
import { type DropLine, handleName } from '../use-sorting.ts'
import { Cover } from './cover.tsx'
import { Spelled } from './day-rail.tsx'
import { Handle } from './handle.tsx'
import { ShotLine } from './shot-line.tsx'

export type PhoneListProps = {
  plan: Plan
  shown: OrderDay
  mayMove: boolean
  dropLine: DropLine
  onOpen: (shotId: string) => void
}

/** The day as a list with its times, for a narrow screen. */
export function PhoneList({ plan, shown, mayMove, dropLine, onOpen }: PhoneListProps) {
  const { day, planned } = shown
  return (
    <ol aria-label="The day in order">
      {segmentsOf(day).map((segment) => {
        const minutes = Math.ceil(segment.endMin - segment.startMin - 1e-9)
        if (segment.kind === 'shot') {
          const shot = plan.shots.get(segment.scheduled.shotId)
          if (!shot) return null
          const broken = day.broken.find((rule) => rule.shotId === shot.shot.id)?.words
          return (
            <PhoneShot
              key={shot.shot.id}
              planned={shot}
              startMin={segment.startMin}
              minutes={minutes}
              broken={broken}
              mayMove={mayMove}
              dropSide={dropLine?.shotId === shot.shot.id ? dropLine.side : null}
              onOpen={() => onOpen(shot.shot.id)}
            />
          )
        }
        if (segment.kind === 'change') {
          return (
            <li key={`change:${segment.scheduled.shotId}`}>
              <Hatch tone={segment.tone}>
                <Spelled
                  segment={segment}
                  hands={planned.day.hands}
                  className="flex min-h-11 w-full items-center gap-2 py-1 pr-3 pl-[62px] text-left text-[0.8125rem]"
                >
                  <span className="min-w-0 flex-1 truncate">{segment.words}</span>
                  <b className="font-semibold">
                    {minutes}
                    <span className="sr-only"> minutes</span>
                  </b>
                </Spelled>
              </Hatch>
            </li>
          )
        }
        return (
          <li
            key={segment.kind === 'meal' ? 'meal' : `wait:${segment.scheduled.shotId}`}
            className="my-1 flex min-h-9 items-center gap-2 border border-dashed border-edge pr-3 pl-[62px] text-[0.8125rem] text-ink-soft"
          >
            <span className="min-w-0 flex-1">
              {segment.kind === 'meal' ? `Meal, ${clockLabel(segment.startMin)}` : segment.words}
            </span>
            <b className="font-semibold">
              {minutes}
              <span className="sr-only"> minutes</span>
            </b>
          </li>
        )
      })}
    </ol>
  )
}

type PhoneShotProps = {
  planned: PlannedShot
  startMin: number
  minutes: number
  broken: string | undefined
  mayMove: boolean
  dropSide: 'above' | 'below' | null
  onOpen: () => void
}

function PhoneShot({ planned, startMin, minutes, broken, mayMove, dropSide, onOpen }: PhoneShotProps) {
  const { attributes, listeners, setNodeRef, setActivatorNodeRef, transform, isDragging } = useSortable({
    id: planned.shot.id,
    disabled: !mayMove,
  })
  return (
    <li
      ref={setNodeRef}
      style={{ transform: CSS.Translate.toString(transform) }}
      className={cn(
        'relative flex items-stretch rounded-r border bg-print',
        broken === undefined ? 'border-hair' : 'border-glow',
        isDragging && 'z-20 opacity-90 shadow-float',
      )}
    >
      <button type="button" onClick={onOpen} className="flex min-h-[66px] min-w-0 flex-1 items-stretch text-left">
        <span className="flex w-[62px] flex-none items-center justify-end pr-2.5 text-sm font-semibold">
          {clockLabel(startMin)}
        </span>
        <Cover shot={planned} className="w-[54px] self-stretch" />
        <span className="flex min-w-0 flex-1 flex-col justify-center px-2.5 py-1.5">
          <span className="text-sm leading-tight font-semibold">
            {planned.number} · {planned.shot.title}
          </span>
          {broken === undefined ? (
            <span className="flex min-w-0 items-baseline text-xs text-ink-soft">
              <ShotLine shot={planned} className="min-w-0" />
              <span className="flex-none whitespace-pre"> · {minutesLabel(minutes)}</span>
            </span>
          ) : (
            <span className="text-xs leading-tight font-semibold text-glow-ink">{broken}</span>
          )}
        </span>
      </button>
      {mayMove && (
        <Handle
          lines
          name={handleName(planned)}
          nodeRef={setActivatorNodeRef}
          attributes={attributes}
          listeners={listeners}
          className="w-11 flex-none"
        />
      )}
      {dropSide && (
        <span
          aria-hidden
          className={cn(
            'absolute inset-x-0 z-30 h-[3px] bg-velvet',
            dropSide === 'above' ? '-top-[3px]' : '-bottom-[3px]',
          )}
        />
      )}
    </li>
  )
}
