/**
 * How many own edits only this device holds, in `localStorage`: one account for every open document of every page, so
 * that two pages never write the same number. A page that dies leaves its account behind; whoever has the document open
 * takes it over, after reading that page's edits from the cache.
 *
 * Key: `sconce:unsent:<cache>#<holder>`; without a holder it counts what is sent by other means (pictures).
 */
import { newId } from '#src/lib/new-id.ts'

const PREFIX = 'sconce:unsent:'

export type Unsent = { edits: number; sinceMs: number }

export type UnsentAccount = {
  /** Keeps the present number; none forgets the account. */
  write(unsent: Unsent | null): void
  /**
   * Calls back with the account of every page that held this document and is gone: those of before now, and others when
   * they go. `adopt` must have counted it when it returns. Resolves when those of before have been handed over.
   */
  watch(adopt: (unsent: Unsent) => void): Promise<void>
  /** The document is closed here: what is still unsent may be taken over by another page. */
  release(): void
}

const listeners = new Set<() => void>()

function tell(): void {
  for (const listener of listeners) listener()
}

/** Told whenever an account changes, in this page or another. */
export function subscribeUnsent(listener: () => void): () => void {
  const handleStorage = ({ key }: StorageEvent) => {
    if (key === null || key.startsWith(PREFIX)) listener()
  }
  listeners.add(listener)
  window.addEventListener('storage', handleStorage)
  return () => {
    listeners.delete(listener)
    window.removeEventListener('storage', handleStorage)
  }
}

/** Storage may be forbidden: then nothing is known beyond this visit. */
function storedKeys(): string[] {
  try {
    return Object.keys(localStorage)
  } catch {
    return []
  }
}

function read(key: string): Unsent | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(key) ?? 'null')
    if (typeof kept === 'number') return kept > 0 ? { edits: kept, sinceMs: Date.now() } : null
    if (typeof kept !== 'object' || kept === null || !('edits' in kept) || !('sinceMs' in kept)) return null
    const { edits, sinceMs } = kept
    return typeof edits === 'number' && typeof sinceMs === 'number' && edits > 0 ? { edits, sinceMs } : null
  } catch {
    return null
  }
}

function write(key: string, unsent: Unsent | null): void {
  try {
    if (unsent === null) localStorage.removeItem(key)
    else localStorage.setItem(key, JSON.stringify(unsent))
  } catch {
    // Storage is full or forbidden: the sign still counts within this visit.
  }
  tell()
}

function cacheOf(key: string): string {
  return key.slice(PREFIX.length).split('#', 1)[0] ?? ''
}

/** All that is unsent in caches whose name begins so, by cache; accounts of several pages add up. */
export function unsentByCache(start: string): ReadonlyMap<string, Unsent> {
  const sums = new Map<string, Unsent>()
  for (const key of storedKeys()) {
    if (!key.startsWith(PREFIX + start)) continue
    const unsent = read(key)
    const sum = sums.get(cacheOf(key))
    if (unsent) sums.set(cacheOf(key), sum ? addUp(sum, unsent) : unsent)
  }
  return sums
}

/** The sum of two accounts, as old as the older one. */
export function addUp(a: Unsent, b: Unsent): Unsent {
  return { edits: a.edits + b.edits, sinceMs: Math.min(a.sinceMs, b.sinceMs) }
}

/** Own edits and pictures of this person (of everybody without one) that only this device holds, in all pages and shoots. */
export function unsentOnDevice(userId?: string): number {
  return [...unsentByCache(userId === undefined ? 'rt:' : `rt:${userId}:`).values()].reduce(
    (sum, { edits }) => sum + edits,
    0,
  )
}

/** Keeps a number for a cache that no document is open for. */
export function writeUnsent(cache: string, edits: number): void {
  const key = PREFIX + cache
  write(key, edits === 0 ? null : { edits, sinceMs: read(key)?.sinceMs ?? Date.now() })
}

/** Adds to what is counted for a cache that no document is open for. */
export function addUnsent(cache: string, unsent: Unsent): void {
  const key = PREFIX + cache
  const before = read(key)
  write(key, before ? addUp(before, unsent) : unsent)
}

/** Forgets all accounts of a cache. */
export function forgetUnsent(cache: string): void {
  for (const key of storedKeys()) if (key.startsWith(PREFIX) && cacheOf(key) === cache) write(key, null)
}

/** A page holds the lock of its account as long as it lives; the browser lets go of it however the page ends. */
function locks(): LockManager | undefined {
  // Not on pages over plain http: there a living page cannot be told from a dead one.
  return typeof navigator === 'undefined' ? undefined : navigator.locks
}

/** Opens this page's account of a cache. */
export function openAccount(cache: string): UnsentAccount {
  const key = `${PREFIX}${cache}#${newId()}`
  const watched = new Set([key])
  const released = new AbortController()
  let held: Unsent | null = null
  void locks()
    ?.request(key, { signal: released.signal }, () => untilAborted(released.signal))
    .catch(() => undefined)

  let adopt: ((unsent: Unsent) => void) | undefined
  const takeOver = (other: string) => {
    watched.delete(other)
    if (released.signal.aborted) return
    const unsent = read(other)
    // Counted here before it is no longer counted there.
    if (unsent) adopt?.(unsent)
    write(other, null)
  }
  const takeOverWhenGone = async (other: string): Promise<void> => {
    if (watched.has(other)) return
    watched.add(other)
    const manager = locks()
    if (!manager) return takeOver(other)
    await manager.request(other, { ifAvailable: true }, (lock) => {
      if (lock) return takeOver(other)
      void manager.request(other, { signal: released.signal }, () => takeOver(other)).catch(() => undefined)
    })
  }

  const handleStorage = ({ key: changed, newValue }: StorageEvent) => {
    if (changed === null) return
    if (changed === key && newValue === null && held) write(key, held)
    const isOfAnother = changed !== key && changed.startsWith(PREFIX) && cacheOf(changed) === cache
    if (isOfAnother && newValue !== null && adopt && locks()) void takeOverWhenGone(changed)
  }
  window.addEventListener('storage', handleStorage)

  return {
    write(unsent) {
      held = unsent
      write(key, unsent)
    },
    async watch(onGone) {
      adopt = onGone
      const others = storedKeys().filter((other) => other.startsWith(PREFIX) && cacheOf(other) === cache)
      await Promise.all(others.map(takeOverWhenGone))
    },
    release() {
      window.removeEventListener('storage', handleStorage)
      released.abort()
    },
  }
}

function untilAborted(signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    if (signal.aborted) resolve()
    else signal.addEventListener('abort', () => resolve(), { once: true })
  })
}
