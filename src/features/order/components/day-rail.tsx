import type { ReactNode } from 'react'
import { clockLabel, minutesLabel } from '#shared/domain/order/clock.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { Hatch } from '#src/ui/hatch.tsx'
import { Popover } from '#src/ui/popover.tsx'
import { type Segment, segmentsOf, spreadLabels } from '../segments.ts'
import type { OrderDay } from '../use-order-day.ts'
import type { DropLine } from '../use-sorting.ts'
import { ChangeoverDetails } from './changeover-details.tsx'
import { ONE_LINE_PX, RailShot } from './rail-shot.tsx'
import { SITTER_RAIL_PX, SitterHours } from './sitter-hours.tsx'

/** One minute on the rail. */
const PX_PER_MIN = 2.6
const HEAD_PX = 10
const LABEL_PX = 17
/** The least height in which a line of 12 px stands whole. */
const FIT_PX = 13
/** Room for what does not fit on the rail, by its width. */
const GUTTER = 'clamp(110px, 17%, 300px)'

export type DayRailProps = {
  plan: Plan
  shown: OrderDay
  chosenId: string | null
  mayMove: boolean
  dropLine: DropLine
  onOpen: (shotId: string) => void
}

/** The day to scale: what is made, what lies between, when it is, and who is here. */
export function DayRail({ plan, shown, chosenId, mayMove, dropLine, onOpen }: DayRailProps) {
  const { problem, day, planned } = shown
  const hasHardOut = day.hardOutMin <= day.wrapMin + 45
  const endMin = Math.max(day.wrapMin, hasHardOut ? day.hardOutMin : 0) + 12
  const topOf = (atMin: number) => HEAD_PX + (atMin - day.lightsOnMin) * PX_PER_MIN
  const segments = segmentsOf(day)
  const heightOf = ({ startMin, endMin: to }: Segment) => Math.max(2, (to - startMin) * PX_PER_MIN - 1)
  const beside = segments.filter((segment) =>
    segment.kind !== 'shot' ? heightOf(segment) < FIT_PX : heightOf(segment) < ONE_LINE_PX,
  )
  const tops = spreadLabels(
    beside.map((segment) => topOf(segment.startMin) + heightOf(segment) / 2 - LABEL_PX / 2),
    LABEL_PX,
  )
  const sittersPx = problem.sitters.length * SITTER_RAIL_PX + (problem.sitters.length > 0 ? 12 : 0)
  const gutter = beside.length > 0 ? GUTTER : '0px'
  const hours = Array.from(
    { length: Math.floor(endMin / 60) - Math.ceil(day.lightsOnMin / 60) + 1 },
    (_, k) => (Math.ceil(day.lightsOnMin / 60) + k) * 60,
  )
  const brokenOf = (shotId: string) => day.broken.filter((rule) => rule.shotId === shotId).map(({ words }) => words)
  return (
    <div
      className="relative overflow-hidden rounded-r border border-hair bg-paper"
      style={{ height: topOf(endMin) + HEAD_PX }}
    >
      {hours.map((hourMin) => (
        <div
          key={hourMin}
          aria-hidden
          className="absolute inset-x-0 border-t border-hair-soft pt-0.5 pl-3 text-xs text-ink-faint"
          style={{ top: topOf(hourMin) }}
        >
          {clockLabel(hourMin)}
        </div>
      ))}
      {hasHardOut && (
        <div
          className="absolute inset-x-0 z-10 border-t-2 border-velvet pr-3 text-right text-xs font-semibold text-velvet"
          style={{ top: topOf(day.hardOutMin) }}
        >
          Hard out {clockLabel(day.hardOutMin)}
        </div>
      )}
      <ol
        aria-label="The day in order"
        className="absolute inset-y-0 left-0"
        style={{ right: `calc(${12 + sittersPx}px + ${gutter})` }}
      >
        {segments.map((segment) => {
          const box = { top: topOf(segment.startMin), height: heightOf(segment) }
          if (segment.kind === 'shot') {
            const shot = plan.shots.get(segment.scheduled.shotId)
            if (!shot) return null
            return (
              <RailShot
                key={shot.shot.id}
                planned={shot}
                startMin={segment.startMin}
                minutes={segment.endMin - segment.startMin}
                topPx={box.top}
                heightPx={box.height}
                broken={brokenOf(shot.shot.id)}
                isLate={!segment.scheduled.made}
                isChosen={chosenId === shot.shot.id}
                mayMove={mayMove}
                dropSide={dropLine?.shotId === shot.shot.id ? dropLine.side : null}
                onOpen={() => onOpen(shot.shot.id)}
              />
            )
          }
          return (
            <li key={keyOf(segment)} className="absolute right-0 left-[76px]" style={box}>
              <Between segment={segment} hands={planned.day.hands} heightPx={box.height} />
            </li>
          )
        })}
      </ol>
      {beside.map((segment, index) => (
        <div
          key={keyOf(segment)}
          className="absolute flex items-center gap-1.5 text-xs"
          style={{ top: tops[index] ?? 0, height: LABEL_PX, right: 8 + sittersPx, width: GUTTER }}
        >
          <span aria-hidden className="w-2 flex-none border-t border-edge" />
          <GutterLabel segment={segment} plan={plan} hands={planned.day.hands} onOpen={onOpen} />
        </div>
      ))}
      <SitterHours problem={problem} day={day} endMin={endMin} topOf={topOf} />
    </div>
  )
}

function keyOf(segment: Segment): string {
  return segment.kind === 'meal' ? 'meal' : `${segment.kind}:${segment.scheduled.shotId}`
}

function wordsOf(segment: Segment): string {
  return segment.kind === 'meal' ? 'Meal' : segment.kind === 'shot' ? '' : segment.words
}

type BetweenProps = { segment: Exclude<Segment, { kind: 'shot' }>; hands: number; heightPx: number }

/** What lies between two shots; pressing a changeover spells it out. */
function Between({ segment, hands, heightPx }: BetweenProps) {
  const isNarrow = heightPx < FIT_PX
  const minutes = minutesLabel(segment.endMin - segment.startMin)
  if (segment.kind === 'meal' || segment.kind === 'wait') {
    return (
      <div className="my-[2px] flex h-[calc(100%-4px)] items-center gap-2 rounded-r border border-dashed border-edge px-3.5 text-sm text-ink-soft">
        {!isNarrow && (
          <>
            <span className="min-w-0 flex-1 truncate">{wordsOf(segment)}</span>
            <span className="whitespace-nowrap">
              {clockLabel(segment.startMin)} · {minutes}
            </span>
          </>
        )}
      </div>
    )
  }
  return (
    <Hatch tone={segment.tone} className="h-full">
      <Spelled
        segment={segment}
        hands={hands}
        className="flex size-full items-center gap-2 px-3.5 text-left text-xs leading-[1.3] hover:brightness-97"
      >
        {isNarrow ? (
          <span className="sr-only">{`${segment.words}, ${minutes}`}</span>
        ) : (
          <>
            <span className={cn('min-w-0 flex-1', heightPx >= 2.5 * LABEL_PX ? 'line-clamp-2' : 'truncate')}>
              {segment.words}
            </span>
            <b className="font-semibold whitespace-nowrap">{minutes}</b>
          </>
        )}
      </Spelled>
    </Hatch>
  )
}

export type SpelledProps = {
  segment: Extract<Segment, { kind: 'change' }>
  hands: number
  className: string
  children: ReactNode
}

/** A changeover's words as a button that opens the whole list. */
export function Spelled({ segment, hands, className, children }: SpelledProps) {
  return (
    <Popover
      label="What is done in this changeover"
      trigger={
        <button type="button" className={className}>
          {children}
        </button>
      }
    >
      <ChangeoverDetails scheduled={segment.scheduled} hands={hands} />
    </Popover>
  )
}

type GutterLabelProps = { segment: Segment; plan: Plan; hands: number; onOpen: (shotId: string) => void }

/** What does not fit on the rail at its scale, said beside it. */
function GutterLabel({ segment, plan, hands, onOpen }: GutterLabelProps) {
  const minutes = minutesLabel(segment.endMin - segment.startMin)
  if (segment.kind === 'shot') {
    const shot = plan.shots.get(segment.scheduled.shotId)
    return (
      <button
        type="button"
        className="min-w-0 truncate text-left font-semibold hover:underline"
        onClick={() => onOpen(segment.scheduled.shotId)}
      >
        {shot?.number} {shot?.shot.title}, {clockLabel(segment.startMin)}, {minutes}
      </button>
    )
  }
  const text = (
    <>
      <b className="font-semibold">{minutes}</b> {wordsOf(segment)}
    </>
  )
  if (segment.kind !== 'change') return <span className="min-w-0 truncate text-ink-soft">{text}</span>
  return (
    <Spelled
      segment={segment}
      hands={hands}
      className={cn(
        'min-w-0 truncate text-left hover:underline',
        segment.tone === 'draft' ? 'text-draft' : 'text-glow-deep',
      )}
    >
      {text}
    </Spelled>
  )
}
