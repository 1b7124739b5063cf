import type { Tag } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { tags } from '#shared/realtime/documents.ts'
import { useBoardPlan } from '../../board-plan.ts'
import { useWall } from '../../wall-control.ts'
import { lookLabel, wearerOf } from '../../words.ts'
import { ChoiceRow, TextRow } from './row.tsx'

export function TagInspector({ tag, mayWrite }: { tag: Tag; mayWrite: boolean }) {
  const { doc } = useWall()
  const plan = useBoardPlan()
  const planned = tag.lookId === null ? undefined : plan.looks.get(tag.lookId)
  const looks = [
    { value: '', label: 'No look: own words' },
    ...[...plan.looks.values()].map((look) => ({ value: String(look.look.id), label: lookLabel(look) })),
  ]
  return (
    <div className="flex flex-col gap-1">
      <ChoiceRow
        label="Look"
        value={planned ? String(planned.look.id) : ''}
        options={looks}
        mayWrite={mayWrite}
        onWrite={(value) => patchItem(doc, tags, tag.id, { lookId: value === '' ? null : value })}
      />
      <TextRow
        label="Title"
        value={tag.title}
        maxLength={120}
        mayWrite={mayWrite}
        placeholder={planned ? wearerOf(planned) : 'What the tag is for'}
        onWrite={(title) => patchItem(doc, tags, tag.id, { title })}
      />
      <TextRow
        label="Words"
        block
        rows={3}
        value={tag.text}
        maxLength={2000}
        mayWrite={mayWrite}
        onWrite={(text) => patchItem(doc, tags, tag.id, { text })}
      />
      {looks.length === 1 && mayWrite && (
        <p className="text-xs text-ink-soft">
          Once there are looks, a tag can show a look’s pieces and how far each is.
        </p>
      )}
    </div>
  )
}
