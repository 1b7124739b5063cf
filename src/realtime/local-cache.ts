import { IndexeddbPersistence } from 'y-indexeddb'
import type * as Y from 'yjs'

/** Every cache this browser has made, so that sign-out finds them (`indexedDB.databases` is not everywhere). */
const REGISTRY = 'sconce:caches'
const UNSENT = 'sconce:unsent:'

/** One cache per person, shoot, document and epoch: a rebuilt document must never meet an old cache. */
export function cacheName(userId: string, shootId: string, kind: string, epoch: number): string {
  return `rt:${userId}:${shootId}:${kind}:${epoch}`
}

function registered(): string[] {
  try {
    const names: unknown = JSON.parse(localStorage.getItem(REGISTRY) ?? '[]')
    return Array.isArray(names) ? names.filter((name) => typeof name === 'string') : []
  } catch {
    return []
  }
}

/** Remembers a database of this browser by name; `rt:<user>:` in front lets sign-out find and forget it. */
export function registerCache(name: string): void {
  localStorage.setItem(REGISTRY, JSON.stringify([...new Set([...registered(), name])]))
}

/** Opens the document's cache; resolves to undefined where the browser gives none. Gives up waiting after half a second. */
export async function openCache(name: string, doc: Y.Doc): Promise<IndexeddbPersistence | undefined> {
  // Some private windows have none; the library would leave a rejected promise behind.
  if (!('indexedDB' in globalThis)) return undefined
  try {
    registerCache(name)
    const cache = new IndexeddbPersistence(name, doc)
    const opened = cache._db.then(() => true)
    const usable = await Promise.race([opened.catch(() => false), wait(500).then(() => true)])
    if (!usable) return undefined
    await Promise.race([cache.whenSynced, wait(500)])
    return cache
  } catch {
    return undefined
  }
}

function wait(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms))
}

/** Edits of an earlier visit that were never acknowledged. */
export function unsentOf(name: string): number {
  try {
    return Math.max(0, Number(localStorage.getItem(UNSENT + name) ?? 0) || 0)
  } catch {
    return 0
  }
}

export function rememberUnsent(name: string, unsent: number): void {
  try {
    if (unsent === 0) localStorage.removeItem(UNSENT + name)
    else localStorage.setItem(UNSENT + name, String(unsent))
  } catch {
    // Storage is full or forbidden: the sign still counts within this visit.
  }
}

const COMPLETE = 'sconce:complete:'

/** Whether this device once had the whole document: an empty one is then known to be empty, not missing. */
export function wasComplete(name: string): boolean {
  try {
    return localStorage.getItem(COMPLETE + name) !== null
  } catch {
    return false
  }
}

export function rememberComplete(name: string): void {
  try {
    localStorage.setItem(COMPLETE + name, '1')
  } catch {
    // Storage is full or forbidden: the document opens with a signal only.
  }
}

/** Own edits of this person that some cache on this device still holds. */
export function unsentOnDevice(userId: string): number {
  return registered()
    .filter((name) => name.startsWith(`rt:${userId}:`))
    .reduce((sum, name) => sum + unsentOf(name), 0)
}

/** Forgets one cache, after its document has been closed. */
export function forgetCache(name: string): Promise<void> {
  rememberUnsent(name, 0)
  localStorage.removeItem(COMPLETE + name)
  localStorage.setItem(REGISTRY, JSON.stringify(registered().filter((other) => other !== name)))
  return new Promise((resolve) => {
    const request = indexedDB.deleteDatabase(name)
    request.onsuccess = () => resolve()
    request.onerror = () => resolve()
    // Another tab still holds it; the deletion happens when that tab lets go.
    request.onblocked = () => resolve()
  })
}

/** Forgets everything of a person on this device: at sign-out, after what is unsent has gone or was given up. */
export async function forgetPerson(userId: string): Promise<void> {
  await Promise.all(
    registered()
      .filter((name) => name.startsWith(`rt:${userId}:`))
      .map(forgetCache),
  )
  if ('caches' in window)
    for (const key of await caches.keys()) if (key.startsWith('sconce-data')) await caches.delete(key)
}
