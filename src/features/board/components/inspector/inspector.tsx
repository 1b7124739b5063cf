import { X } from 'lucide-react'
import type { ReactNode } from 'react'
import { useBoardPlan } from '../../board-plan.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import type { WallItem, WallItems } from '../../wall-item.ts'
import { select } from '../../wall-state.ts'
import { KIND_WORDS } from '../../words.ts'
import { ArrangeBar } from './arrange-bar.tsx'
import { AreaInspector } from './area-inspector.tsx'
import { FrameInspector } from './frame-inspector.tsx'
import { ManyInspector } from './many-inspector.tsx'
import { NoteInspector } from './note-inspector.tsx'
import { PaletteInspector } from './palette-inspector.tsx'
import { TagInspector } from './tag-inspector.tsx'
import { WallSummary } from './wall-summary.tsx'

function One({ entry, mayWrite }: { entry: WallItem; mayWrite: boolean }) {
  switch (entry.kind) {
    case 'frame':
      return <FrameInspector frame={entry.item} mayWrite={mayWrite} />
    case 'note':
      return <NoteInspector note={entry.item} mayWrite={mayWrite} />
    case 'tag':
      return <TagInspector tag={entry.item} mayWrite={mayWrite} />
    case 'area':
      return <AreaInspector area={entry.item} mayWrite={mayWrite} />
    case 'palette':
      return <PaletteInspector palette={entry.item} mayWrite={mayWrite} />
  }
}

type InspectorProps = { items: WallItems; mayWrite: boolean }

export function useInspected(items: WallItems): { title: string; entries: WallItem[] } {
  const { state } = useWall()
  const selection = useStore(state.selection)
  const entries = [...selection].flatMap((id) => items.get(id) ?? [])
  const [first] = entries
  return {
    entries,
    title: !first ? 'On the wall' : entries.length === 1 ? KIND_WORDS[first.kind] : `${entries.length} things`,
  }
}

/** Everything about what is selected; without a heading, for the sheet on phones. */
export function InspectorBody({ items, mayWrite }: InspectorProps) {
  const plan = useBoardPlan()
  const { entries } = useInspected(items)
  const [first] = entries
  if (!first) return <WallSummary items={items} looks={plan.looks} />
  return (
    <>
      {entries.length === 1 ? (
        <One key={first.id} entry={first} mayWrite={mayWrite} />
      ) : (
        mayWrite && <ManyInspector count={entries.length} />
      )}
      {mayWrite && (
        <div className="mt-2.5 border-t border-hair-soft pt-1.5">
          <ArrangeBar stacks={entries.some((entry) => entry.kind !== 'area')} />
        </div>
      )}
    </>
  )
}

/** The sheet docked at the right of the wall. */
export function Inspector({ items, mayWrite }: InspectorProps) {
  const { state } = useWall()
  const { title, entries } = useInspected(items)
  let close: ReactNode = null
  if (entries.length > 0) {
    close = (
      <button
        type="button"
        aria-label="Close"
        className="-mr-2 grid size-7 place-items-center rounded-r text-ink-soft hover:bg-ink/5 hover:text-ink"
        onClick={() => select(state, [])}
      >
        <X size={15} aria-hidden />
      </button>
    )
  }
  return (
    <aside
      aria-label="Inspector"
      className="flex w-[250px] flex-none flex-col overflow-y-auto border-l border-hair bg-paper px-[17px] py-3"
    >
      <div className="mb-1.5 flex min-h-7 items-center justify-between">
        <h2 className="font-sans text-base font-semibold">{title}</h2>
        {close}
      </div>
      <div>
        <InspectorBody items={items} mayWrite={mayWrite} />
      </div>
    </aside>
  )
}
