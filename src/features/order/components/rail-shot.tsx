import { useSortable } from '@dnd-kit/sortable'
import { CSS } from '@dnd-kit/utilities'
import { clockLabel, minutesLabel } from '#shared/domain/order/clock.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { handleName } from '../use-sorting.ts'
import { Cover } from './cover.tsx'
import { Handle } from './handle.tsx'
import { ShotLine } from './shot-line.tsx'

export type RailShotProps = {
  planned: PlannedShot
  startMin: number
  minutes: number
  topPx: number
  heightPx: number
  /** What is wrong with this shot where it stands. */
  broken: readonly string[]
  isChosen: boolean
  isLate: boolean
  mayMove: boolean
  dropSide: 'above' | 'below' | null
  onOpen: () => void
}

/** Above this a block has room for two lines, above this for one. Pixels. */
const TWO_LINES_PX = 42
export const ONE_LINE_PX = 21

/** One shot on the rail, as high as it is long. */
export function RailShot({
  planned,
  startMin,
  minutes,
  topPx,
  heightPx,
  broken,
  isChosen,
  isLate,
  mayMove,
  dropSide,
  onOpen,
}: RailShotProps) {
  const { attributes, listeners, setNodeRef, setActivatorNodeRef, transform, isDragging } = useSortable({
    id: planned.shot.id,
    disabled: !mayMove,
  })
  const two = heightPx >= TWO_LINES_PX
  const one = heightPx >= ONE_LINE_PX
  const { title } = planned.shot
  return (
    <li
      ref={setNodeRef}
      style={{ top: topPx, height: heightPx, transform: CSS.Translate.toString(transform) }}
      className={cn('absolute inset-x-0', isDragging && 'z-20 opacity-90')}
    >
      {mayMove && (
        <Handle
          name={handleName(planned)}
          nodeRef={setActivatorNodeRef}
          attributes={attributes}
          listeners={listeners}
          className={cn('absolute top-1/2 left-[50px] w-6 -translate-y-1/2', two ? 'h-9' : 'h-6')}
        />
      )}
      <button
        type="button"
        onClick={onOpen}
        aria-pressed={isChosen}
        className={cn(
          'absolute inset-y-0 right-0 left-[76px] flex items-center gap-3 overflow-hidden rounded-r border bg-print text-left hover:border-edge',
          isChosen ? 'border-velvet ring-1 ring-velvet' : broken.length > 0 || isLate ? 'border-glow' : 'border-hair',
          isDragging && 'shadow-float',
        )}
      >
        {one && <Cover shot={planned} className={cn('h-full', two ? 'w-[74px]' : 'w-10')} />}
        {one && (
          <span className={cn('flex-none text-right font-display font-semibold', two ? 'w-8 text-2xl' : 'w-7 text-lg')}>
            {planned.number}
          </span>
        )}
        {two ? (
          <span className="min-w-0 flex-1">
            <span className="block truncate leading-tight font-semibold">{title}</span>
            {broken.length > 0 ? (
              <span
                title={broken.join(' ')}
                className={cn(
                  'block text-xs leading-tight font-semibold text-glow-ink',
                  heightPx >= 62 ? 'line-clamp-2' : 'truncate',
                )}
              >
                {broken[0]}
              </span>
            ) : (
              <ShotLine shot={planned} />
            )}
          </span>
        ) : one ? (
          <span className="flex min-w-0 flex-1 items-baseline gap-2">
            <span className="truncate text-sm leading-none font-semibold">{title}</span>
            <ShotLine shot={planned} className="min-w-0 flex-1" />
          </span>
        ) : (
          <span className="sr-only">{`Shot ${planned.number ?? ''} ${title}`}</span>
        )}
        {one && (
          <span className={cn('flex-none pr-3.5 text-right', !two && 'flex items-baseline gap-2')}>
            <span className="block leading-tight font-semibold">{clockLabel(startMin)}</span>
            <span className="block text-xs text-ink-soft">{minutesLabel(minutes)}</span>
          </span>
        )}
      </button>
      {dropSide && (
        <span
          aria-hidden
          className={cn(
            'absolute right-0 left-[60px] z-30 h-[3px] rounded-full bg-velvet',
            dropSide === 'above' ? '-top-[3px]' : '-bottom-[3px]',
          )}
        />
      )}
    </li>
  )
}
