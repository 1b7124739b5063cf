import type * as Y from 'yjs'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import { readCache } from './document-cache.ts'
import { forgetCache, parseCacheName, registeredCaches } from './local-cache.ts'
import { unsentByCache } from './unsent-accounts.ts'

/** Edits in a cache that will never be sent: of an earlier epoch, or of somebody who may no longer write. */
export type LeftBehind = { cache: string; kind: DocumentKind; edits: number; sinceMs: number }

/**
 * What this person has in a shoot that can no longer be sent.
 *
 * @param epochs of the documents as they are now; null when the whole shoot is closed to this person
 */
export function leftBehind(
  userId: string,
  shootId: string,
  epochs: Readonly<Record<string, number>> | null,
): LeftBehind[] {
  return [...unsentByCache(`rt:${userId}:${shootId}:`)].flatMap(([cache, unsent]) => {
    const parsed = parseCacheName(cache)
    return parsed && isPast(parsed, epochs) ? [{ cache, kind: parsed.kind, ...unsent }] : []
  })
}

function isPast(
  { kind, epoch }: { kind: DocumentKind; epoch: string },
  epochs: Readonly<Record<string, number>> | null,
): boolean {
  // A page may know less than the device: what is of a newer epoch than it knows will be sent.
  return epochs === null || epoch === 'aside' || Number(epoch) < (epochs[kind] ?? 1)
}

/** Forgets caches of earlier epochs in which nothing waits. */
export async function forgetPastCaches(
  userId: string,
  shootId: string,
  epochs: Readonly<Record<string, number>>,
): Promise<void> {
  const start = `rt:${userId}:${shootId}:`
  const waiting = unsentByCache(start)
  const past = registeredCaches(start).filter((cache) => {
    const parsed = parseCacheName(cache)
    return parsed && isPast(parsed, epochs) && !waiting.has(cache)
  })
  await Promise.all(past.map(forgetCache))
}

/** The documents of what was left behind, as this device has them. @throws when the device cannot be read. */
export async function readLeftBehind(all: readonly LeftBehind[]): Promise<{ left: LeftBehind; doc: Y.Doc }[]> {
  return Promise.all(all.map(async (left) => ({ left, doc: await readCache(left.cache) })))
}

/** Lets go of edits for good. */
export async function letGo(all: readonly LeftBehind[]): Promise<void> {
  await Promise.all(all.map(({ cache }) => forgetCache(cache)))
}
