import {
  type Announcements,
  type DragEndEvent,
  KeyboardSensor,
  MouseSensor,
  TouchSensor,
  type UniqueIdentifier,
  closestCenter,
  useSensor,
  useSensors,
} from '@dnd-kit/core'
import { sortableKeyboardCoordinates } from '@dnd-kit/sortable'
import { useState } from 'react'
import { useBoardPlan } from '../../board-plan.ts'
import { asStep, useWall } from '../../wall-control.ts'
import { type ShotList, dropBehind, listsOf, placeShot } from '../../write-shots.ts'

const LIST = 'list:'
/** Id of a list as a place to drop on. */
export const listDropId = (listId: string): string => LIST + listId

function target(lists: readonly ShotList[], overId: string): { list: ShotList; shotId: string | null } | null {
  const onList = lists.find((list) => listDropId(list.id) === overId)
  if (onList) return { list: onList, shotId: null }
  const list = lists.find(({ shots }) => shots.some((shot) => shot.id === overId))
  return list ? { list, shotId: overId } : null
}

/** Reordering of the strip by mouse, finger and keyboard, announced in words. */
export function useStripSorting(nameOfList: (listId: string) => string) {
  const control = useWall()
  const plan = useBoardPlan()
  const lists = listsOf(plan)
  const [activeId, setActiveId] = useState<string | null>(null)
  const sensors = useSensors(
    useSensor(MouseSensor, { activationConstraint: { distance: 5 } }),
    useSensor(TouchSensor, { activationConstraint: { delay: 250, tolerance: 8 } }),
    useSensor(KeyboardSensor, { coordinateGetter: sortableKeyboardCoordinates }),
  )

  const title = (id: UniqueIdentifier) => plan.shots.get(String(id))?.shot.title ?? 'The shot'
  const where = (activeId: UniqueIdentifier, overId: UniqueIdentifier) => {
    const place = target(lists, String(overId))
    if (!place) return ''
    const index =
      place.shotId === null ? place.list.shots.length : place.list.shots.findIndex((shot) => shot.id === place.shotId)
    const isOwn = place.list.shots.some((shot) => shot.id === activeId)
    const length = place.list.shots.length + (isOwn ? 0 : 1)
    return `place ${Math.min(index + 1, length)} of ${length}${lists.length > 2 || place.list.id === 'loose' ? `, ${nameOfList(place.list.id)}` : ''}`
  }
  const announcements: Announcements = {
    onDragStart: ({ active }) => `${title(active.id)} picked up.`,
    onDragOver: ({ active, over }) =>
      over ? `${title(active.id)} is at ${where(active.id, over.id)}.` : `${title(active.id)} is over nothing.`,
    onDragEnd: ({ active, over }) =>
      over
        ? `${title(active.id)} dropped at ${where(active.id, over.id)}.`
        : `${title(active.id)} is back where it was.`,
    onDragCancel: ({ active }) => `${title(active.id)} is back where it was.`,
  }

  const handleDragEnd = ({ active, over }: DragEndEvent) => {
    setActiveId(null)
    const place = over && target(lists, String(over.id))
    if (!place || !control.mayWrite() || place.shotId === String(active.id)) return
    const isOwnList = place.list.shots.some((shot) => shot.id === active.id)
    // Let go over the list around it: nothing was meant.
    if (place.shotId === null && isOwnList) return
    asStep(control, () =>
      placeShot(control.doc, place.list, String(active.id), dropBehind(place.list, String(active.id), place.shotId)),
    )
  }

  return {
    lists,
    activeId,
    context: {
      sensors,
      collisionDetection: closestCenter,
      onDragStart: ({ active }: { active: { id: UniqueIdentifier } }) => setActiveId(String(active.id)),
      onDragEnd: handleDragEnd,
      onDragCancel: () => setActiveId(null),
      accessibility: {
        announcements,
        screenReaderInstructions: {
          draggable:
            'Space or Enter picks the shot up, arrow keys move it, Space or Enter drops it, Escape puts it back.',
        },
      },
    },
  }
}
