import { MoreHorizontal } from 'lucide-react'
import { LOOSE, NEEDS, type Shot } from '#shared/domain/board/schema.ts'
import { type Patch, patchItem, removeItems } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'
import { cn } from '#src/lib/cn.ts'
import { Menu, type MenuItem } from '#src/ui/menu.tsx'
import { toast } from '#src/ui/toast.ts'
import { asStep, selectedItems, useWall } from '../../wall-control.ts'
import { type ShotList, placeShot } from '../../write-shots.ts'

type ShotMenuProps = {
  shot: Shot
  lists: readonly ShotList[]
  nameOfList: (listId: string) => string
  onRename: () => void
  className?: string
}

const NEED_WORDS = { must: 'Must have', should: 'Should have', could: 'Could have' } as const

/** What can be done with one shot of the strip. */
export function ShotMenu({ shot, lists, nameOfList, onRename, className }: ShotMenuProps) {
  const control = useWall()
  const { doc } = control
  const own = lists.find((list) => list.shots.some(({ id }) => id === shot.id))
  const patch = (change: Patch<typeof shots>) => asStep(control, () => patchItem(doc, shots, shot.id, change))
  const cover = () => {
    const frame = selectedItems(control).find((entry) => entry.kind === 'frame')
    if (frame?.kind === 'frame') patch({ coverFrameId: frame.item.id })
    else toast.say('Select a frame on the wall first, or drag one onto the shot.')
  }
  const remove = () => {
    asStep(control, () => removeItems(doc, shots, [shot.id], Date.now()))
    toast.say(`“${shot.title}” was removed.`, { label: 'Undo', onPress: () => control.undo() })
  }
  const items: MenuItem[] = [
    { label: 'Rename', onSelect: onRename },
    { label: 'Selected frame as cover', onSelect: cover },
    ...(shot.coverFrameId === null
      ? []
      : [{ label: 'Take the cover off', onSelect: () => patch({ coverFrameId: null }) }]),
    'line',
    ...NEEDS.map((need) => ({
      label: NEED_WORDS[need],
      checked: shot.need === need,
      onSelect: () => patch({ need }),
    })),
    'line',
    ...lists
      .filter((list) => list.id !== own?.id)
      .map((list) => ({
        label: list.id === LOOSE ? 'Put with the loose shots' : `Move to ${nameOfList(list.id)}`,
        onSelect: () => asStep(control, () => placeShot(doc, list, shot.id, list.shots.at(-1)?.id ?? null)),
      })),
    { label: 'Remove', danger: true, onSelect: remove },
  ]
  return (
    <Menu
      trigger={
        <button
          type="button"
          aria-label={`More about ${shot.title}`}
          className={cn('grid place-items-center rounded-r text-bone hover:bg-night-3', className)}
        >
          <MoreHorizontal size={16} aria-hidden />
        </button>
      }
      items={items}
    />
  )
}
