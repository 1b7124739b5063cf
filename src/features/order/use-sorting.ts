import {
  type Announcements,
  type DragEndEvent,
  KeyboardCode,
  type KeyboardCoordinateGetter,
  KeyboardSensor,
  MouseSensor,
  TouchSensor,
  type UniqueIdentifier,
  closestCenter,
  useSensor,
  useSensors,
} from '@dnd-kit/core'
import { useState } from 'react'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { shotName } from './words.ts'

/** Where a shot that is being moved would come to stand, as a line on one side of another shot. */
export type DropLine = { shotId: string; side: 'above' | 'below' } | null

/** One press of an arrow key goes on to the middle of the next shot, however high the two are. */
function stepper(ids: readonly string[]): KeyboardCoordinateGetter {
  return (event, { currentCoordinates, context: { active, over, collisionRect, droppableRects } }) => {
    const by = event.code === KeyboardCode.Down ? 1 : event.code === KeyboardCode.Up ? -1 : 0
    if (by === 0 || !active || !collisionRect) return
    event.preventDefault()
    const next = ids[ids.indexOf(String(over?.id ?? active.id)) + by]
    const rect = next === undefined ? undefined : droppableRects.get(next)
    if (!rect) return
    return {
      x: currentCoordinates.x,
      y: currentCoordinates.y + rect.top + rect.height / 2 - (collisionRect.top + collisionRect.height / 2),
    }
  }
}

/** Reordering by mouse, finger and keyboard, announced in words. */
export function useSorting(shots: readonly PlannedShot[], onMove: (shotId: string, index: number) => void) {
  const ids = shots.map(({ shot }) => String(shot.id))
  const [held, setHeld] = useState<{ activeId: string; overId: string } | null>(null)
  const sensors = useSensors(
    useSensor(MouseSensor, { activationConstraint: { distance: 6 } }),
    useSensor(TouchSensor, { activationConstraint: { delay: 200, tolerance: 8 } }),
    useSensor(KeyboardSensor, { coordinateGetter: stepper(ids) }),
  )
  const name = (id: UniqueIdentifier) => {
    const planned = shots.find(({ shot }) => shot.id === id)
    return planned ? `Shot ${planned.number ?? ''} ${planned.shot.title}` : 'The shot'
  }
  const place = (id: UniqueIdentifier) => `place ${ids.indexOf(String(id)) + 1} of ${ids.length}`
  const announcements: Announcements = {
    onDragStart: ({ active }) => `${name(active.id)} picked up from ${place(active.id)}.`,
    onDragOver: ({ active, over }) => (over ? `${name(active.id)} is at ${place(over.id)}.` : undefined),
    onDragEnd: ({ active, over }) =>
      over && over.id !== active.id
        ? `${name(active.id)} moved to ${place(over.id)}.`
        : `${name(active.id)} is back where it was.`,
    onDragCancel: ({ active }) => `${name(active.id)} is back where it was.`,
  }
  const from = held ? ids.indexOf(held.activeId) : -1
  const to = held ? ids.indexOf(held.overId) : -1
  const dropLine: DropLine = held && from !== to ? { shotId: held.overId, side: to > from ? 'below' : 'above' } : null
  return {
    ids,
    dropLine,
    context: {
      sensors,
      collisionDetection: closestCenter,
      onDragStart: ({ active }: { active: { id: UniqueIdentifier } }) =>
        setHeld({ activeId: String(active.id), overId: String(active.id) }),
      onDragOver: ({ over }: { over: { id: UniqueIdentifier } | null }) =>
        setHeld((last) => last && over && { ...last, overId: String(over.id) }),
      onDragCancel: () => setHeld(null),
      onDragEnd: ({ active, over }: DragEndEvent) => {
        setHeld(null)
        if (over && over.id !== active.id) onMove(String(active.id), ids.indexOf(String(over.id)))
      },
      accessibility: {
        announcements,
        screenReaderInstructions: {
          draggable:
            'Space or Enter picks the shot up, the arrow keys move it, Space or Enter drops it, Escape puts it back.',
        },
      },
    },
  }
}

/** The name of a shot's handle: "Move shot 3, Hands on the escapement". */
export function handleName(planned: PlannedShot): string {
  return `Move ${shotName(planned)}`
}
