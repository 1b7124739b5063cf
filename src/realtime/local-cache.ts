import { deleteDB } from 'idb'
import { DOCUMENT_KINDS, type DocumentKind } from '#shared/realtime/documents.ts'
import { forgetUnsent, unsentByCache } from './unsent-accounts.ts'

/** Every cache this browser has made, so that sign-out finds them (`indexedDB.databases` is not everywhere). */
const REGISTRY = 'sconce:caches'

/**
 * One cache per person, shoot, document and epoch: a rebuilt document must never meet an old cache. In place of an epoch,
 * `aside` is where edits are put that can no longer be sent.
 */
export function cacheName(userId: string, shootId: string, kind: string, epoch: number | 'aside'): string {
  return `rt:${userId}:${shootId}:${kind}:${epoch}`
}

/** Kind and epoch of a document's cache; undefined for other caches (pictures). */
export function parseCacheName(name: string): { kind: DocumentKind; epoch: string } | undefined {
  const [, , , kind, epoch] = name.split(':')
  const known = DOCUMENT_KINDS.find((one) => one === kind)
  return known && epoch !== undefined ? { kind: known, epoch } : undefined
}

/** Names of this browser's caches that begin so. */
export function registeredCaches(start: string): string[] {
  try {
    const names: unknown = JSON.parse(localStorage.getItem(REGISTRY) ?? '[]')
    if (!Array.isArray(names)) return []
    return names.filter((name): name is string => typeof name === 'string' && name.startsWith(start))
  } catch {
    return []
  }
}

function register(names: readonly string[]): void {
  try {
    localStorage.setItem(REGISTRY, JSON.stringify(names))
  } catch {
    // Storage is full or forbidden: sign-out then asks the browser itself.
  }
}

/** Remembers a database of this browser by name; `rt:<user>:` in front lets sign-out find and forget it. */
export function registerCache(name: string): void {
  register([...new Set([...registeredCaches(''), name])])
}

/** Forgets one cache, after its document has been closed here. */
export async function forgetCache(name: string): Promise<void> {
  forgetUnsent(name)
  register(registeredCaches('').filter((other) => other !== name))
  if (!('indexedDB' in globalThis)) return
  await new Promise<void>((resolve) => {
    // Another page still holds it: the deletion happens when that page lets go.
    deleteDB(name, { blocked: () => resolve() }).then(resolve, () => resolve())
  })
}

async function knownDatabases(start: string): Promise<string[]> {
  const found = await globalThis.indexedDB?.databases?.().catch(() => [])
  return (found ?? []).flatMap(({ name }) => (name?.startsWith(start) ? [name] : []))
}

/** Forgets everything of a person on this device: at sign-out, after what is unsent has gone or was given up. */
export async function forgetPerson(userId: string): Promise<void> {
  const start = `rt:${userId}:`
  const names = new Set([...registeredCaches(start), ...unsentByCache(start).keys(), ...(await knownDatabases(start))])
  await Promise.all([...names].map(forgetCache))
  if ('caches' in globalThis)
    for (const key of await caches.keys()) if (key.startsWith('sconce-data')) await caches.delete(key)
}
