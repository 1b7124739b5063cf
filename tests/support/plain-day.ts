import type { Need } from '#shared/domain/board/schema.ts'
import type { OrderProblem, Transition } from '#shared/domain/order/problem.ts'
import { type ShotId, dayIdSchema, shotIdSchema } from '#shared/ids.ts'

/** Ids of shots one to nine. */
export function shotId(number: number): ShotId {
  return shotIdSchema.parse(`00000000-0000-4000-8000-${String(number).padStart(12, '0')}`)
}

/**
 * A day to follow by hand: every shot takes 30 minutes, every changeover 10 of light, rigging 20; lights on at 9:00 (540).
 * So shot 1 is planned 560–590, shot 2 600–630, shot 3 640–670, shot 4 680–710.
 */
export function plainDay(needs: readonly Need[], hardOutMin: number): OrderProblem {
  const transition = (lightingMin: number): Transition => ({
    lightingMin,
    changesLight: true,
    moveMin: 0,
    strikeMin: 0,
    dressMin: 0,
    actions: 0,
  })
  return {
    dayId: dayIdSchema.parse('00000000-0000-4000-8000-0000000000aa'),
    shots: needs.map((need, index) => ({
      id: shotId(index + 1),
      number: index + 1,
      title: `Shot ${index + 1}`,
      minutes: 30,
      need,
      setId: null,
      setName: '',
      roomId: null,
      roomName: '',
      setupId: null,
      setupName: '',
      wears: [],
    })),
    sitters: [],
    looks: [],
    lightsOnMin: 540,
    hardOutMin,
    meal: null,
    hands: 2,
    chairs: null,
    transitions: [needs.map(() => transition(20)), ...needs.map(() => needs.map(() => transition(10)))],
    actionLists: [[]],
    rules: [],
    faults: [],
  }
}
