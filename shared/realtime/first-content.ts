import * as Y from 'yjs'
import type { DayId } from '#shared/ids.ts'
import { putItems } from './collection.ts'
import { type DocumentKind, days } from './documents.ts'

/**
 * First content of a new shoot's documents, encoded once and inserted as seq 1; never rebuilt later (a second
 * building would duplicate what devices hold). One day to put shots on, everything else empty.
 */
export function firstContent(
  day: { id: DayId; date: string | null },
  random: () => number,
): Record<DocumentKind, Uint8Array> {
  const plan = new Y.Doc()
  putItems(plan, days, [{ id: day.id, date: day.date }], random)
  const empty = () => Y.encodeStateAsUpdate(new Y.Doc())
  return { board: empty(), plan: Y.encodeStateAsUpdate(plan), looks: empty(), lighting: empty(), day: empty() }
}
