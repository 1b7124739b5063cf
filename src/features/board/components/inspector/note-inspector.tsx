import type { Note } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { notes } from '#shared/realtime/documents.ts'
import { useWall } from '../../wall-control.ts'
import { TextRow } from './row.tsx'

export function NoteInspector({ note, mayWrite }: { note: Note; mayWrite: boolean }) {
  const { doc } = useWall()
  return (
    <TextRow
      label="Words"
      block
      rows={4}
      value={note.text}
      maxLength={2000}
      mayWrite={mayWrite}
      onWrite={(text) => patchItem(doc, notes, note.id, { text })}
    />
  )
}
