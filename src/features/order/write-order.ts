import type * as Y from 'yjs'
import type { Shot } from '#shared/domain/board/schema.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import type { Day, RuleBody, Set as ShootSet } from '#shared/domain/plan/schema.ts'
import {
  type DayId,
  type RuleId,
  type SetId,
  type ShotId,
  dayIdSchema,
  ruleIdSchema,
  setIdSchema,
  shotIdSchema,
} from '#shared/ids.ts'
import { BIRTH_ORIGIN, LOCAL_ORIGIN, patchItem, putItems, readAll, upsertItem } from '#shared/realtime/collection.ts'
import { days, rules, sets, shotPlans, shots } from '#shared/realtime/documents.ts'
import { type Placed, appendKey, byKey, keysToPlace } from '#shared/realtime/order-keys.ts'
import { newId } from '#src/lib/new-id.ts'

type Listed = readonly Pick<Shot, 'id' | 'place'>[]

function placedOf(list: Listed): Placed[] {
  return list.map((shot) => ({ id: String(shot.id), key: shot.place[1] }))
}

/** A key behind all shots of a list. */
function lastKey(list: Listed): string {
  return appendKey(
    list.map((shot) => shot.place[1]),
    Math.random,
  )
}

function writePlaces(board: Y.Doc, listId: string, keys: ReadonlyMap<string, string>): void {
  board.transact(() => {
    for (const [id, key] of keys) patchItem(board, shots, id, { place: [listId, key] })
  }, LOCAL_ORIGIN)
}

/** Moves a shot within its day to a place counted from 0, in one transaction. */
export function moveShot(board: Y.Doc, dayId: string, list: Listed, shotId: string, index: number): void {
  const others = list.filter((shot) => shot.id !== shotId)
  writePlaces(board, dayId, keysToPlace(placedOf(list), shotId, others[index - 1]?.id ?? null, Math.random))
}

/** Puts all shots of a day into this order, in one transaction; shots that stand right already keep their keys. */
export function writeSequence(board: Y.Doc, dayId: string, list: Listed, sequence: readonly ShotId[]): void {
  let placed = placedOf(list).sort(byKey)
  const changed = new Map<string, string>()
  sequence.forEach((id, at) => {
    if (placed[at]?.id === id) return
    const keys = keysToPlace(placed, id, sequence[at - 1] ?? null, Math.random)
    for (const [moved, key] of keys) changed.set(moved, key)
    placed = placed.map((item) => ({ ...item, key: keys.get(item.id) ?? item.key })).sort(byKey)
  })
  writePlaces(board, dayId, changed)
}

/** The shots that stand on a day now, in their order. */
export function listNow(board: Y.Doc, dayId: string): Shot[] {
  const all = [...readAll(board, shots).items.values()].filter((shot) => shot.place[0] === dayId)
  return all.sort((a, b) => byKey({ id: a.id, key: a.place[1] }, { id: b.id, key: b.place[1] }))
}

/** Puts a shot at the end of a day (or among those not placed yet). */
export function placeAtEnd(board: Y.Doc, listId: string, list: Listed, shotId: ShotId): void {
  patchItem(board, shots, shotId, { place: [listId, lastKey(list)] })
}

/**
 * Adds a shot at the end of a list and gives back its id. `plan` is null for who may not write it: the shot then
 * has the defaults of a plan until somebody does.
 */
export function addShot(
  docs: { board: Y.Doc; plan: Y.Doc | null },
  listId: string,
  list: Listed,
  title: string,
): ShotId {
  const id = shotIdSchema.parse(newId())
  // The birth of a plan is no step of undo: it goes unseen once the shot is taken back.
  if (docs.plan) upsertItem(docs.plan, shotPlans, { id, minutes: 20 }, BIRTH_ORIGIN)
  putItems(docs.board, shots, [{ id, title, place: [listId, lastKey(list)] }], Math.random)
  return id
}

/** A second shot directly behind the first, with the same plan, looks and cover. */
export function copyShot(docs: { board: Y.Doc; plan: Y.Doc | null }, list: Listed, of: PlannedShot): ShotId {
  const id = shotIdSchema.parse(newId())
  const keys = keysToPlace(placedOf(list), id, of.shot.id, Math.random)
  if (docs.plan) upsertItem(docs.plan, shotPlans, { ...of.plan, id }, BIRTH_ORIGIN)
  const title = `${of.shot.title}, second`.slice(0, 120)
  const own: Shot = { ...of.shot, id, title, place: [of.shot.place[0], keys.get(id) ?? of.shot.place[1]] }
  keys.delete(id)
  writePlaces(docs.board, of.shot.place[0], keys)
  putItems(docs.board, shots, [own], Math.random)
  return id
}

export function addRule(plan: Y.Doc, rule: RuleBody): RuleId {
  const id = ruleIdSchema.parse(newId())
  putItems(plan, rules, [{ id, rule }], Math.random)
  return id
}

export function addSet(plan: Y.Doc, fields: Partial<ShootSet> & { name: string }): SetId {
  const id = setIdSchema.parse(newId())
  putItems(plan, sets, [{ ...fields, id }], Math.random)
  return id
}

/** Another day with the hours, meal and hands of the last one, a day later when that is known. */
export function addDay(plan: Y.Doc, last: Day | undefined): DayId {
  const id = dayIdSchema.parse(newId())
  putItems(plan, days, [{ ...last, id, date: last?.date ? dayAfter(last.date) : null }], Math.random)
  return id
}

function dayAfter(date: string): string {
  const next = new Date(`${date}T12:00:00Z`)
  next.setUTCDate(next.getUTCDate() + 1)
  return next.toISOString().slice(0, 10)
}
