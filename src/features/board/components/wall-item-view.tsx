import { memo, useEffect, useRef } from 'react'
import { cn } from '#src/lib/cn.ts'
import type { Corner } from '#shared/domain/board/geometry.ts'
import { useIsSelected, useHangsAt, useStore } from '../use-wall-state.ts'
import { useWall } from '../wall-control.ts'
import type { WallItem } from '../wall-item.ts'
import { AreaTitle } from './items/area-title.tsx'
import { FramePrint } from './items/frame-print.tsx'
import { NoteText } from './items/note-text.tsx'
import { PaletteSwatches } from './items/palette-swatches.tsx'
import { TagCard } from './items/tag-card.tsx'

function Body({ entry }: { entry: WallItem }) {
  switch (entry.kind) {
    case 'frame':
      return <FramePrint frame={entry.item} />
    case 'note':
      return <NoteText note={entry.item} />
    case 'tag':
      return <TagCard tag={entry.item} />
    case 'area':
      return <AreaTitle area={entry.item} />
    case 'palette':
      return <PaletteSwatches palette={entry.item} />
  }
}

type WallItemViewProps = { entry: WallItem; name: string; mayWrite: boolean }

const SHELL =
  'absolute top-0 left-0 cursor-grab rounded-sm outline-offset-2 select-none transition-transform duration-200 ease-out ' +
  'data-held:z-[2000000]! data-held:cursor-grabbing data-held:transition-none motion-reduce:transition-none ' +
  'focus-visible:[outline:calc(2px/var(--detail))_dashed_var(--color-draft)] ' +
  'data-marked:[outline:calc(2px/var(--detail))_solid_var(--color-draft)] ' +
  'data-selected:[outline:calc(2.5px/var(--detail))_solid_var(--color-draft)] ' +
  'data-[kind=area]:pointer-events-none'

const HANDLES: readonly [corner: Corner, place: string][] = [
  ['tl', '-top-1.5 -left-1.5 cursor-nwse-resize'],
  ['tr', '-top-1.5 -right-1.5 cursor-nesw-resize'],
  ['bl', '-bottom-1.5 -left-1.5 cursor-nesw-resize'],
  ['br', '-right-1.5 -bottom-1.5 cursor-nwse-resize'],
]

function Handles() {
  return HANDLES.map(([corner, place]) => (
    <span
      key={corner}
      aria-hidden
      data-corner={corner}
      className={cn(
        'pointer-events-auto absolute z-10 size-3 rounded-full border-2 border-draft bg-white before:absolute before:-inset-2.5',
        place,
      )}
      style={{ scale: 'calc(1 / var(--detail))' }}
    />
  ))
}

/** One thing on the wall. Where it hangs is written to its style directly; it is drawn again only when it changes. */
export const WallItemView = memo(function WallItemView({ entry, name, mayWrite }: WallItemViewProps) {
  const { state } = useWall()
  const ref = useRef<HTMLDivElement>(null)
  const selected = useIsSelected(entry.id)
  const focused = useStore(state.focused, (id) => id === entry.id)
  const editing = useStore(state.editing, (id) => id === entry.id)
  const alone = useStore(state.selection, (selection) => selection.size === 1 && selection.has(entry.id))
  const mark = useStore(state.marks, (marks) => marks.get(entry.id))
  useHangsAt(ref, entry.id, entry.box)

  useEffect(() => {
    const element = ref.current
    const active = document.activeElement
    // Only when the hand is on the wall or nowhere: a field in the inspector keeps its focus.
    const isFree = active === document.body || element?.closest('[data-wall]')?.contains(active)
    if (focused && !editing && isFree) element?.focus({ preventScroll: true })
  }, [focused, editing])

  return (
    <div
      ref={ref}
      {...(editing ? { role: 'group' } : { role: 'button', 'aria-pressed': selected })}
      aria-label={name}
      tabIndex={focused ? 0 : -1}
      data-wall-id={entry.id}
      data-kind={entry.kind}
      data-selected={selected || undefined}
      data-marked={mark ? true : undefined}
      className={SHELL}
      style={{ zIndex: Math.round(entry.z) }}
      onFocus={() => state.focused.set(entry.id)}
    >
      <Body entry={entry} />
      {mark && (
        <span
          aria-hidden
          title={mark.name}
          className="absolute -top-[13px] left-2 rounded-full px-[7px] py-px text-[11px] leading-[1.4] font-semibold text-white"
          style={{ background: mark.colour }}
        >
          {mark.initials}
        </span>
      )}
      {alone && !editing && mayWrite && <Handles />}
    </div>
  )
})
