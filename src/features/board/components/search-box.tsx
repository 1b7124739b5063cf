import { ChevronDown, ChevronUp, Search } from 'lucide-react'
import { useMemo, useState } from 'react'
import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { searchBoard } from '#shared/domain/board/search.ts'
import { useBoardPlan } from '../board-plan.ts'
import { inKeyboardOrder } from '../gestures/keys.ts'
import { goTo } from '../gestures/view-moves.ts'
import { announce, useWall } from '../wall-control.ts'
import type { WallItem, WallItems } from '../wall-item.ts'
import { select } from '../wall-state.ts'
import { lookLabel } from '../words.ts'

/** All words of a thing that can be searched. */
function wordsOf(entry: WallItem, looks: ReadonlyMap<string, PlannedLook>): string {
  switch (entry.kind) {
    case 'frame':
      return `${entry.item.caption} ${entry.item.credit}`
    case 'note':
      return entry.item.text
    case 'tag': {
      const planned = entry.item.lookId === null ? undefined : looks.get(entry.item.lookId)
      const bound = planned ? `${lookLabel(planned)} ${planned.pieces.map((piece) => piece.name).join(' ')}` : ''
      return `${entry.item.title} ${entry.item.text} ${bound}`
    }
    case 'area':
    case 'palette':
      return entry.item.title
  }
}

/** Finds words on the wall and goes from one to the next. `onFound` is for screens without a wall in sight. */
export function SearchBox({ items, onFound }: { items: WallItems; onFound?: (entry: WallItem) => void }) {
  const control = useWall()
  const [query, setQuery] = useState('')
  const [at, setAt] = useState(0)
  const { looks } = useBoardPlan()
  const found = useMemo(() => {
    if (query.trim() === '') return []
    return searchBoard(
      inKeyboardOrder(items).map((entry) => ({ id: entry.id, words: wordsOf(entry, looks) })),
      query,
    )
  }, [query, items, looks])

  const go = (index: number, ids = found) => {
    if (ids.length === 0) return
    const wrapped = (index + ids.length) % ids.length
    setAt(wrapped)
    const entry = items.get(ids[wrapped] ?? '')
    if (!entry) return
    select(control.state, [entry.id])
    control.state.focused.set(entry.id)
    goTo(control, entry.box)
    onFound?.(entry)
    announce(control, `${control.nameOf([entry])}, ${wrapped + 1} of ${ids.length}`)
  }

  return (
    <search className="flex items-center gap-1">
      <div className="relative">
        <Search
          size={15}
          aria-hidden
          className="pointer-events-none absolute top-1/2 left-2.5 -translate-y-1/2 text-ink-faint"
        />
        <input
          type="search"
          aria-label="Search the wall"
          placeholder="Search"
          value={query}
          onChange={(event) => {
            setQuery(event.target.value)
            setAt(0)
          }}
          onKeyDown={(event) => {
            if (event.key === 'Enter') {
              const isHere = control.state.selection.get().has(found[at] ?? '')
              go(isHere ? at + (event.shiftKey ? -1 : 1) : at)
            } else if (event.key === 'Escape') setQuery('')
          }}
          className="w-36 rounded-r border border-edge bg-white py-[7px] pr-2 pl-8 text-sm max-md:min-h-11 max-md:w-full max-md:text-[1rem]"
        />
      </div>
      {query.trim() !== '' && (
        <>
          <span role="status" className="min-w-12 text-center text-xs text-ink-soft">
            {found.length === 0 ? 'Nothing' : `${Math.min(at + 1, found.length)} of ${found.length}`}
          </span>
          <button
            type="button"
            aria-label="Last found"
            disabled={found.length === 0}
            className="grid size-7 place-items-center rounded-r hover:bg-ink/5 max-md:size-11"
            onClick={() => go(at - 1)}
          >
            <ChevronUp size={15} aria-hidden />
          </button>
          <button
            type="button"
            aria-label="Next found"
            disabled={found.length === 0}
            className="grid size-7 place-items-center rounded-r hover:bg-ink/5 max-md:size-11"
            onClick={() => go(at + 1)}
          >
            <ChevronDown size={15} aria-hidden />
          </button>
        </>
      )}
    </search>
  )
}
