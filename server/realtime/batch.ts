import type { DocId, UserId } from '#shared/ids.ts'
import { mergedUpdates } from './merged-updates.ts'

export type LogEntry = {
  docId: DocId
  /** Who is answerable for it; null for the program itself. */
  userId: UserId | null
  /** null: a marker, which brings nothing new and only waits for what was queued before it. */
  update: Uint8Array | null
  /** Ids of the items it touches. */
  items: readonly string[]
  queuedAtMs: number
  /** Called once after the commit; `stored` is false when the document is gone. */
  settle(stored: boolean): void
}

export type LogRow = { docId: DocId; userId: UserId | null; update: Uint8Array }

/** How many entries from the front of the queue go into one transaction: at least one. */
export function batchLength(queue: readonly LogEntry[], maxRows: number, maxBytes: number): number {
  let bytes = 0
  let length = 0
  for (const entry of queue) {
    bytes += entry.update?.length ?? 0
    if (length > 0 && (length >= maxRows || bytes > maxBytes)) break
    length++
  }
  return length
}

/**
 * Rows for a batch, by document sorted by id. Neighbours of one person in one document become one row; entries of
 * different people are not reordered, so that every beginning of the log is a complete document.
 */
export function rowsOf(batch: readonly LogEntry[]): LogRow[] {
  const byDoc = new Map<DocId, { userId: UserId | null; updates: Uint8Array[] }[]>()
  for (const entry of batch) {
    if (entry.update === null) continue
    const runs = byDoc.get(entry.docId) ?? []
    byDoc.set(entry.docId, runs)
    const last = runs[runs.length - 1]
    if (last?.userId === entry.userId) last.updates.push(entry.update)
    else runs.push({ userId: entry.userId, updates: [entry.update] })
  }
  return [...byDoc.entries()]
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .flatMap(([docId, runs]) =>
      runs.flatMap(({ userId, updates }) => mergedUpdates(updates).map((update) => ({ docId, userId, update }))),
    )
}

/** Who touched what, each pair once. */
export function touchesOf(batch: readonly LogEntry[]): { docId: DocId; item: string; userId: UserId }[] {
  const touches = new Map<string, { docId: DocId; item: string; userId: UserId }>()
  for (const { docId, userId, items } of batch) {
    if (userId === null) continue
    for (const item of items) touches.set(`${docId} ${item} ${userId}`, { docId, item, userId })
  }
  return [...touches.values()]
}
