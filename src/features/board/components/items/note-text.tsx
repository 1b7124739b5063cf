import { useEffect, useRef } from 'react'
import type { Note } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { notes } from '#shared/realtime/documents.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import { EditInPlace } from './edit-in-place.tsx'

/** Words written straight on the wall. Who edits them also sets the height that they take. */
export function NoteText({ note }: { note: Note }) {
  const { doc, state } = useWall()
  const editing = useStore(state.editing, (id) => id === note.id)
  const ref = useRef<HTMLDivElement>(null)
  const wasEditing = useRef(false)
  const [x, y, w, h] = note.box

  useEffect(() => {
    const height = ref.current?.offsetHeight ?? 0
    if (wasEditing.current && !editing && height > 0 && Math.abs(height - h) > 1) {
      patchItem(doc, notes, note.id, { box: [x, y, w, Math.max(24, height)] })
    }
    wasEditing.current = editing
  }, [editing, doc, note.id, x, y, w, h])

  return (
    <div ref={ref} className="font-display text-[19px] leading-[1.25] text-[#35302b] italic">
      {editing ? (
        <EditInPlace
          label="Note"
          value={note.text}
          maxLength={2000}
          onWrite={(text) => patchItem(doc, notes, note.id, { text })}
          className="px-1 italic"
        />
      ) : (
        <span className="break-words whitespace-pre-wrap">
          {note.text || <span className="text-ink-faint">A note without words</span>}
        </span>
      )}
    </div>
  )
}
