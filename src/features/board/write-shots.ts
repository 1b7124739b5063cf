import type * as Y from 'yjs'
import { LOOSE, type Shot } from '#shared/domain/board/schema.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { type ShotId, shotIdSchema } from '#shared/ids.ts'
import { LOCAL_ORIGIN, patchItem, putItems } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'
import { appendKey, keysToPlace } from '#shared/realtime/order-keys.ts'
import { newId } from '#src/lib/new-id.ts'

/** A list of the strip: a day, or the shots that stand in none. */
export type ShotList = { id: string; shots: readonly Shot[] }

/** The strip's lists: the days in their order, loose shots last. */
export function listsOf(plan: Plan): ShotList[] {
  return [
    ...plan.days.map(({ day, shots: planned }) => ({ id: String(day.id), shots: planned.map(({ shot }) => shot) })),
    { id: LOOSE, shots: plan.loose.map(({ shot }) => shot) },
  ]
}

/** Puts a shot directly behind another of a list (null: first), in one transaction. */
export function placeShot(doc: Y.Doc, list: ShotList, shotId: string, afterId: string | null): void {
  // A shot whose day is gone stands among the loose ones but keeps its old list's key; keys compare all the same.
  const placed = list.shots.map((shot) => ({ id: String(shot.id), key: shot.place[1] }))
  const keys = keysToPlace(placed, shotId, afterId, Math.random)
  doc.transact(() => {
    for (const [id, key] of keys) patchItem(doc, shots, id, { place: [list.id, key] })
  }, LOCAL_ORIGIN)
}

/** Adds a shot at the end of the first day, or among the loose ones when there is no day. */
export function addShot(doc: Y.Doc, lists: readonly ShotList[], title: string): ShotId {
  const id = shotIdSchema.parse(newId())
  const list = lists[0]
  const key = appendKey(
    (list?.shots ?? []).map((shot) => shot.place[1]),
    Math.random,
  )
  putItems(doc, shots, [{ id, title, place: [list?.id ?? LOOSE, key] }], Math.random)
  return id
}

/**
 * Where a shot goes when it is let go over another one of `list`, or over the list itself: directly behind which shot
 * (null: first). Coming from before it in the same list it goes behind it, otherwise in front of it.
 */
export function dropBehind(list: ShotList, shotId: string, overId: string | null): string | null {
  const ids = list.shots.map((shot) => String(shot.id))
  if (overId === null) return ids.filter((id) => id !== shotId).at(-1) ?? null
  const from = ids.indexOf(shotId)
  const over = ids.indexOf(overId)
  if (from !== -1 && from < over) return overId
  return ids.filter((id) => id !== shotId)[ids.filter((id) => id !== shotId).indexOf(overId) - 1] ?? null
}
