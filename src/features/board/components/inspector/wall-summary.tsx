import { byArea } from '#shared/domain/board/reading-order.ts'
import { boundsOf } from '#shared/domain/board/geometry.ts'
import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { count } from '#src/lib/format.ts'
import { focusItem } from '../../gestures/keys.ts'
import { goTo } from '../../gestures/view-moves.ts'
import { useWall } from '../../wall-control.ts'
import type { WallItems } from '../../wall-item.ts'
import { lookLabel } from '../../words.ts'

/** With nothing selected: the areas as ways to go, and which looks have no frame yet. */
export function WallSummary({ items, looks }: { items: WallItems; looks: ReadonlyMap<string, PlannedLook> }) {
  const control = useWall()
  const all = [...items.values()]
  const areas = all.flatMap((entry) => (entry.kind === 'area' ? [entry] : []))
  const groups = byArea(
    areas,
    all.filter((entry) => entry.kind !== 'area'),
  )
  const pictured = new Set(
    all.flatMap((entry) => (entry.kind === 'frame' && entry.item.lookId !== null ? [String(entry.item.lookId)] : [])),
  )
  const bare = [...looks.values()].filter(({ look }) => !pictured.has(look.id))
  return (
    <>
      {groups.some(({ area }) => area) && (
        <ul className="mb-3">
          {groups.map(({ area, items: hung }) => (
            <li key={area?.id ?? 'rest'} className="border-t border-hair-soft first:border-t-0">
              <button
                type="button"
                disabled={!area && hung.length === 0}
                className="flex w-full justify-between gap-2 rounded-r py-1.5 text-left text-[0.78125rem] hover:underline max-md:min-h-11 max-md:items-center"
                onClick={() => {
                  const box = boundsOf([...(area ? [area.box] : []), ...hung.map((entry) => entry.box)])
                  if (box) goTo(control, box)
                  if (area) focusItem(control, area.id)
                }}
              >
                <span className="min-w-0 truncate">
                  {area ? area.item.title || 'An area without title' : 'Outside of areas'}
                </span>
                <span className="flex-none text-ink-faint">{count(hung.length, 'thing')}</span>
              </button>
            </li>
          ))}
        </ul>
      )}
      {bare.length > 0 && (
        <div className="border-t border-hair-soft pt-2 text-xs text-ink-soft">
          <b className="font-semibold text-ink">Looks without a frame</b>
          <ul className="mt-0.5">
            {bare.map((planned) => (
              <li key={planned.look.id}>{lookLabel(planned)}</li>
            ))}
          </ul>
        </div>
      )}
      {groups.length === 0 && bare.length === 0 && (
        <p className="text-[0.78125rem] text-ink-soft">Nothing hangs here yet.</p>
      )}
    </>
  )
}
