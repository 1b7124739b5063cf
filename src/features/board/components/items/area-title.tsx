import type { Area } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { areas } from '#shared/realtime/documents.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import { EditInPlace } from './edit-in-place.tsx'

/** An area: a title and a line. What hangs below belongs to it; the wall inside stays free to press. */
export function AreaTitle({ area }: { area: Area }) {
  const { doc, state } = useWall()
  const editing = useStore(state.editing, (id) => id === area.id)
  return (
    <div className="pointer-events-auto flex cursor-grab items-center gap-2 py-0.5 text-xs font-semibold text-[#57524c] after:flex-1 after:border-t after:border-[#b5b1a9]">
      {editing ? (
        <EditInPlace
          label="Title of the area"
          line
          value={area.title}
          maxLength={120}
          onWrite={(title) => patchItem(doc, areas, area.id, { title })}
          className="max-w-72 px-1"
        />
      ) : (
        <span className="whitespace-nowrap">{area.title || 'An area without title'}</span>
      )}
    </div>
  )
}
