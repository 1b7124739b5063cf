import { useMemo } from 'react'
import type { Shot } from '#shared/domain/board/schema.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import type { Day, RuleBody, Set as ShootSet } from '#shared/domain/plan/schema.ts'
import type { DayId, SetId, ShotId } from '#shared/ids.ts'
import { type Patch, addMember, patchItem, removeItems, removeMember, upsertItem } from '#shared/realtime/collection.ts'
import { days, moves, rules, sets, shotPlans, shots } from '#shared/realtime/documents.ts'
import { useDoc, useMayWrite } from '#src/realtime/shoot-realtime.tsx'
import { type Undo, useUndo } from '#src/realtime/use-undo.ts'
import {
  addDay,
  addRule,
  addSet,
  addShot,
  copyShot,
  listNow,
  moveShot,
  placeAtEnd,
  writeSequence,
} from './write-order.ts'

/** The shots of a list in their order. */
export type List = { id: string; shots: readonly PlannedShot[] }

export type OrderWriter = {
  mayBoard: boolean
  mayPlan: boolean
  undo: Undo
  move(list: List, shotId: string, index: number): void
  /** Puts the shots of a day into this order, whatever their order is now. */
  use(dayId: string, sequence: readonly ShotId[]): void
  placeAtEnd(list: List, shotId: ShotId): void
  addShot(list: List, title: string): ShotId
  copyShot(list: List, of: PlannedShot): ShotId
  removeShot(shotId: ShotId): void
  putShotBack(shot: Shot): void
  patchShot(shotId: ShotId, patch: Patch<typeof shots>): void
  patchPlan(shotId: ShotId, patch: Patch<typeof shotPlans>): void
  wear(shotId: ShotId, lookId: string): void
  takeOff(shotId: ShotId, lookId: string): void
  addRule(rule: RuleBody): void
  removeRule(ruleId: string): void
  addDay(last: Day | undefined): DayId
  patchDay(dayId: DayId, patch: Patch<typeof days>): void
  removeDay(dayId: DayId): void
  addSet(fields: Partial<ShootSet> & { name: string }): SetId
  patchSet(setId: SetId, patch: Patch<typeof sets>): void
  removeSet(setId: SetId): void
  putSetBack(set: ShootSet): void
  setMove(moveId: string, minutes: number): void
}

/** Everything this screen writes; each call is a step of undo of its own. */
export function useOrderWriter(): OrderWriter {
  const board = useDoc('board')
  const plan = useDoc('plan')
  const mayBoard = useMayWrite('board')
  const mayPlan = useMayWrite('plan')
  const undo = useUndo(['board', 'plan'])
  const { stop } = undo
  const writes = useMemo(() => {
    const step = <T>(write: () => T): T => {
      stop()
      const result = write()
      stop()
      return result
    }
    const docs = { board, plan: mayPlan ? plan : null }
    const listed = (list: List) => list.shots.map(({ shot }) => shot)
    return {
      move: (list: List, shotId: string, index: number) =>
        step(() => moveShot(board, list.id, listed(list), shotId, index)),
      use(dayId: string, sequence: readonly ShotId[]) {
        const now = listNow(board, dayId)
        step(() =>
          writeSequence(
            board,
            dayId,
            now,
            sequence.filter((id) => now.some((shot) => shot.id === id)),
          ),
        )
      },
      placeAtEnd: (list: List, shotId: ShotId) => step(() => placeAtEnd(board, list.id, listed(list), shotId)),
      addShot: (list: List, title: string) => step(() => addShot(docs, list.id, listed(list), title)),
      copyShot: (list: List, of: PlannedShot) => step(() => copyShot(docs, listed(list), of)),
      removeShot: (shotId: ShotId) => step(() => removeItems(board, shots, [shotId], Date.now())),
      // Writing to something that was taken out brings it back.
      putShotBack: ({ id, title, place }: Shot) => step(() => upsertItem(board, shots, { id, title, place })),
      putSetBack: (set: ShootSet) => step(() => upsertItem(plan, sets, set)),
      patchShot: (shotId: ShotId, patch: Patch<typeof shots>) =>
        step(() => void patchItem(board, shots, shotId, patch)),
      patchPlan: (shotId: ShotId, patch: Patch<typeof shotPlans>) =>
        step(() => upsertItem(plan, shotPlans, { ...patch, id: shotId })),
      wear: (shotId: ShotId, lookId: string) =>
        step(() => addMember(board, shots, shotId, 'lookIds', lookId, Math.random)),
      takeOff: (shotId: ShotId, lookId: string) => step(() => removeMember(board, shots, shotId, 'lookIds', lookId)),
      addRule: (rule: RuleBody) => step(() => void addRule(plan, rule)),
      removeRule: (ruleId: string) => step(() => removeItems(plan, rules, [ruleId], Date.now())),
      addDay: (last: Day | undefined) => step(() => addDay(plan, last)),
      patchDay: (dayId: DayId, patch: Patch<typeof days>) => step(() => void patchItem(plan, days, dayId, patch)),
      removeDay: (dayId: DayId) => step(() => removeItems(plan, days, [dayId], Date.now())),
      addSet: (fields: Partial<ShootSet> & { name: string }) => step(() => addSet(plan, fields)),
      patchSet: (setId: SetId, patch: Patch<typeof sets>) => step(() => void patchItem(plan, sets, setId, patch)),
      removeSet: (setId: SetId) => step(() => removeItems(plan, sets, [setId], Date.now())),
      setMove: (moveId: string, minutes: number) => step(() => upsertItem(plan, moves, { id: moveId, minutes })),
    }
  }, [board, plan, mayPlan, stop])
  return { mayBoard, mayPlan, undo, ...writes }
}
