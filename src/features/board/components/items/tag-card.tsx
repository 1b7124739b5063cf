import type { Tag } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { tags } from '#shared/realtime/documents.ts'
import { SwingTag } from '#src/ui/swing-tag.tsx'
import { useBoardPlan } from '../../board-plan.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import { wearerOf } from '../../words.ts'
import { EditInPlace } from './edit-in-place.tsx'

/** What a tag says: its own words, or a look's pieces and how far each is. */
export function TagContent({ tag }: { tag: Tag }) {
  const { doc, state } = useWall()
  const plan = useBoardPlan()
  const editing = useStore(state.editing, (id) => id === tag.id)
  const planned = tag.lookId === null ? undefined : plan.looks.get(tag.lookId)
  const title = tag.title || (planned ? wearerOf(planned) : '')
  return (
    <>
      {editing ? (
        <EditInPlace
          label="Title of the tag"
          line
          value={tag.title}
          maxLength={120}
          onWrite={(text) => patchItem(doc, tags, tag.id, { title: text })}
          className="font-display text-[1rem] font-semibold"
        />
      ) : (
        <div className="font-display text-[1rem] leading-snug font-semibold break-words">
          {title || <span className="font-normal text-ink-faint">{tag.text ? '' : 'An empty tag'}</span>}
        </div>
      )}
      {planned && planned.look.name !== title && <div className="text-xs text-ink-soft">{planned.look.name}</div>}
      {tag.text !== '' && <p className="mt-1 break-words whitespace-pre-wrap">{tag.text}</p>}
      {planned && planned.pieces.length > 0 && (
        <ul>
          {planned.pieces.map((piece) => (
            <li key={piece.id}>
              <span className="min-w-0 break-words">{piece.name}</span>
              <span className="flex-none text-ink-faint">{piece.status}</span>
            </li>
          ))}
        </ul>
      )}
      {planned && planned.pieces.length === 0 && <p className="mt-1 text-ink-faint">No pieces in this look yet</p>}
    </>
  )
}

/** A tag as it hangs on the wall. */
export function TagCard({ tag }: { tag: Tag }) {
  return (
    <SwingTag className="[&>div]:min-h-(--box-h)">
      <TagContent tag={tag} />
    </SwingTag>
  )
}
