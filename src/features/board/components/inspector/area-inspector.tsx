import type { Area } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { areas } from '#shared/realtime/documents.ts'
import { useWall } from '../../wall-control.ts'
import { TextRow } from './row.tsx'

export function AreaInspector({ area, mayWrite }: { area: Area; mayWrite: boolean }) {
  const { doc } = useWall()
  return (
    <>
      <TextRow
        label="Title"
        value={area.title}
        maxLength={120}
        mayWrite={mayWrite}
        placeholder="What hangs here"
        onWrite={(title) => patchItem(doc, areas, area.id, { title })}
      />
      {mayWrite && (
        <p className="mt-1 text-xs text-ink-soft">What hangs below the line belongs to the area and moves with it.</p>
      )}
    </>
  )
}
