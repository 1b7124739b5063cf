import { type DBSchema, type IDBPDatabase, openDB } from 'idb'
import { cacheName, registerCache } from '../local-cache.ts'

/** A picture that is on this device and not yet on the server. */
export type OutboxEntry = {
  uploadId: string
  shootId: string
  blob: Blob
  name: string
  widthPx: number
  heightPx: number
  addedAtMs: number
  tries: number
  /** `refused` by the server for good, with its sentence in `why`. */
  state: 'waiting' | 'refused'
  why?: string
}

export type OutboxStore = {
  list(): Promise<OutboxEntry[]>
  /** How many there are, those of other pages included. */
  count(): Promise<number>
  /** @throws DOMException, `QuotaExceededError` when the device is full. */
  put(entry: OutboxEntry): Promise<void>
  remove(uploadId: string): Promise<void>
}

type Schema = DBSchema & { pictures: { key: string; value: OutboxEntry } }

/** The database of one person's outbox in one shoot; its name lets sign-out find it among the caches. */
export function outboxName(userId: string, shootId: string): string {
  return cacheName(userId, shootId, 'outbox', 1)
}

/** What a connection that is gone answers. */
const GONE: ReadonlySet<string> = new Set(['InvalidStateError', 'UnknownError'])

/**
 * Pictures kept in IndexedDB; in memory alone where the browser gives none. A connection that ends (another page deletes
 * the database, the browser lets go of it) is made anew when it is needed; what another page deletes is empty from then
 * on, until a picture is added.
 */
export async function openOutboxStore(name: string): Promise<OutboxStore> {
  let opening: Promise<IDBPDatabase<Schema>> | undefined
  let isDeleted = false
  const open = async () => {
    registerCache(name)
    return openDB<Schema>(name, 1, {
      upgrade: (fresh) => void fresh.createObjectStore('pictures', { keyPath: 'uploadId' }),
      // Sign-out in another tab wants to delete it.
      blocking: (_current, _blocked, event) => {
        if (event.target instanceof IDBDatabase) event.target.close()
        opening = undefined
        isDeleted = true
      },
      terminated: () => (opening = undefined),
    })
  }
  const connection = () => {
    opening ??= open().catch((error: unknown) => {
      opening = undefined
      throw error
    })
    return opening
  }
  const run = async <T>(work: (database: IDBPDatabase<Schema>) => Promise<T>): Promise<T> => {
    try {
      return await work(await connection())
    } catch (error) {
      if (!(error instanceof DOMException && GONE.has(error.name))) throw error
      opening = undefined
      return work(await connection())
    }
  }
  const runUnlessDeleted = async <T>(work: (database: IDBPDatabase<Schema>) => Promise<T>, nothing: T): Promise<T> =>
    isDeleted ? nothing : run(work)
  try {
    await connection()
  } catch {
    return memoryOutboxStore()
  }
  return {
    list: () => runUnlessDeleted((database) => database.getAll('pictures'), []),
    count: () => runUnlessDeleted((database) => database.count('pictures'), 0),
    put: async (entry) => {
      isDeleted = false
      await run((database) => database.put('pictures', entry))
    },
    remove: (uploadId) => runUnlessDeleted((database) => database.delete('pictures', uploadId), undefined),
  }
}

/** Pictures kept for this visit only. */
export function memoryOutboxStore(): OutboxStore {
  const entries = new Map<string, OutboxEntry>()
  return {
    list: () => Promise.resolve([...entries.values()]),
    count: () => Promise.resolve(entries.size),
    put: (entry) => Promise.resolve(void entries.set(entry.uploadId, entry)),
    remove: (uploadId) => Promise.resolve(void entries.delete(uploadId)),
  }
}
