/**
 * A document's cache in IndexedDB: rows of Yjs updates, appended as they happen and now and then replaced by one. Of the
 * same shape as y-indexeddb 9 wrote (`updates`, `custom`, version 1), so that caches of earlier visits go on.
 *
 * Pages of one person share it. What another page wrote is read at opening and whenever `takeIn` is called.
 */
import { type DBSchema, type IDBPDatabase, openDB } from 'idb'
import * as Y from 'yjs'

type Schema = DBSchema & {
  updates: { key: number; value: Uint8Array }
  custom: { key: string; value: unknown }
}

export type DocumentCache = {
  /** The document is as this device knew it; false when this device keeps nothing. Never rejects. */
  opened: Promise<boolean>
  /** Whether this device once had the whole document: an empty one is then known to be empty, not missing. */
  wasComplete(): boolean
  rememberComplete(): void
  /** Reads what other pages have written since. @throws when the device cannot be read. */
  takeIn(): Promise<void>
  /** Writes what is still waiting and closes the database. */
  close(): Promise<void>
}

type Options = {
  /** Told whenever it changes whether edits are kept on this device. */
  onKept: (isKept: boolean) => void
  /** Whether a change may be kept; a change made here by somebody who may not write must not look as if it would be sent. */
  mayKeep: (transaction: Y.Transaction) => boolean
  /** With so many rows they become one. */
  compactRows?: number
  /** Between a failed write and the next try. */
  retryMs?: number
}

/** Changes that come out of the cache: neither sent as an edit of this visit nor written again. */
export const CACHE_ORIGIN = Object.freeze({ kind: 'cache' as const })

const COMPLETE = 'complete'

/** Opens the database of a cache, in the shape that caches have. */
function openDatabase(name: string, onLost: () => void): Promise<IDBPDatabase<Schema>> {
  return openDB<Schema>(name, 1, {
    upgrade(fresh) {
      fresh.createObjectStore('updates', { autoIncrement: true })
      fresh.createObjectStore('custom')
    },
    // Sign-out, or letting go of these edits, in another page wants to delete it.
    blocking(_current, _blocked, event) {
      if (event.target instanceof IDBDatabase) event.target.close()
      onLost()
    },
    terminated: onLost,
  })
}

/** The document of a cache as it is kept, without keeping on to it. @throws when the device cannot be read. */
export async function readCache(name: string): Promise<Y.Doc> {
  const database = await openDatabase(name, () => undefined)
  const rows = await database.getAll('updates').finally(() => database.close())
  const doc = new Y.Doc()
  for (const row of rows) applyRow(doc, row)
  return doc
}

/** Adds to a cache that no document is open for. @throws when the device keeps nothing. */
export async function addToCache(name: string, update: Uint8Array): Promise<void> {
  const database = await openDatabase(name, () => undefined)
  const writing = database.transaction('updates', 'readwrite', { durability: 'strict' })
  await Promise.all([writing.store.add(update), writing.done]).finally(() => database.close())
}

/** A row that cannot be read must not keep the others from being read. */
function applyRow(doc: Y.Doc, row: Uint8Array): void {
  try {
    Y.applyUpdate(doc, row, CACHE_ORIGIN)
  } catch {
    // What the server has of it comes with the next exchange.
  }
}

/** Keeps a document on this device from now on, and first reads what is kept of it. */
export function openDocumentCache(
  name: string,
  doc: Y.Doc,
  { onKept, mayKeep, compactRows = 200, retryMs = 5_000 }: Options,
): DocumentCache {
  let database: IDBPDatabase<Schema> | undefined
  let isComplete = false
  let isClosed = false
  let isKept = false
  /** Not written yet. */
  let waiting: Uint8Array[] = []
  let hasOwnWaiting = false
  /** The document holds a change that must not be kept, so rows are not replaced by its state. */
  let holdsUnkept = false
  let isScheduled = false
  let isCompacting = false
  let retry: ReturnType<typeof setTimeout> | undefined
  /** Rows up to here are in the document, and of those after it the ones this page wrote. */
  let readThrough = 0
  const written = new Set<number>()
  let rows = 0
  /** Reading and replacing rows happens one after the other; appending does not wait for it. */
  let line: Promise<unknown> = Promise.resolve()

  const setKept = (next: boolean) => {
    if (isKept === next) return
    isKept = next
    onKept(next)
  }

  function inLine<T>(work: () => Promise<T>): Promise<T> {
    const done = line.then(work)
    line = done.catch(() => undefined)
    return done
  }

  function requireDatabase(): IDBPDatabase<Schema> {
    if (!database) throw new Error('The cache is not open.')
    return database
  }

  const handleUpdate = (update: Uint8Array, origin: unknown, _doc: Y.Doc, transaction: Y.Transaction) => {
    if (origin === CACHE_ORIGIN) return
    if (!mayKeep(transaction)) {
      holdsUnkept = true
      return
    }
    waiting.push(update)
    hasOwnWaiting ||= transaction.local
    if (isScheduled) return
    isScheduled = true
    queueMicrotask(() => {
      isScheduled = false
      if (isKept) void keepWaiting()
    })
  }
  doc.on('update', handleUpdate)

  async function keepWaiting(): Promise<void> {
    try {
      await append()
    } catch {
      fail()
    }
  }

  /** One row for all that one turn of the page brought. */
  async function append(): Promise<void> {
    const batch = waiting
    const isOwn = hasOwnWaiting
    if (batch.length === 0) return
    waiting = []
    hasOwnWaiting = false
    try {
      const row = batch.length === 1 && batch[0] ? batch[0] : Y.mergeUpdates(batch)
      // What the server does not have yet must outlive a power cut; what it sent may be fetched again.
      const durability = isOwn ? 'strict' : 'relaxed'
      const writing = requireDatabase().transaction('updates', 'readwrite', { durability })
      const [key] = await Promise.all([writing.store.add(row), writing.done])
      written.add(key)
      rows++
    } catch (error) {
      waiting = [...batch, ...waiting]
      hasOwnWaiting ||= isOwn
      throw error
    }
    compactWhenLong()
  }

  function compactWhenLong(): void {
    if (rows < compactRows || holdsUnkept || isCompacting) return
    isCompacting = true
    // Nothing is lost when it fails: the rows stay as they were.
    void replaceRows()
      .catch(() => undefined)
      .finally(() => (isCompacting = false))
  }

  function fail(): void {
    setKept(false)
    if (isClosed) return
    clearTimeout(retry)
    retry = setTimeout(() => void recover(), retryMs)
  }

  /** After a failure the whole state is written at once: whatever did not get through is in it. */
  async function recover(): Promise<void> {
    if (isClosed) return
    try {
      database ??= await openDatabase(name, lose)
      await (holdsUnkept ? append() : replaceRows())
      markComplete()
      setKept(true)
      await append()
    } catch {
      fail()
    }
  }

  function lose(): void {
    database = undefined
    // A database made anew numbers its rows from the beginning.
    readThrough = 0
    written.clear()
    fail()
  }

  function takeInRows(keys: readonly number[], values: readonly Uint8Array[]): void {
    const fresh = values.filter((_row, index) => !written.has(keys[index] ?? 0))
    readThrough = Math.max(readThrough, ...keys)
    written.clear()
    if (fresh.length === 0) return
    Y.transact(
      doc,
      () => {
        for (const row of fresh) applyRow(doc, row)
      },
      CACHE_ORIGIN,
      false,
    )
  }

  async function readRows(): Promise<void> {
    const reading = requireDatabase().transaction('updates')
    const range = IDBKeyRange.lowerBound(readThrough, true)
    const [keys, values, all] = await Promise.all([
      reading.store.getAllKeys(range),
      reading.store.getAll(range),
      reading.store.count(),
      reading.done,
    ])
    rows = all
    if (keys.length > 0) takeInRows(keys, values)
  }

  /** All rows become one, in one transaction: a page that dies in between leaves them as they were. */
  function replaceRows(): Promise<void> {
    return inLine(async () => {
      const writing = requireDatabase().transaction('updates', 'readwrite', { durability: 'strict' })
      // Looked at below; when a request fails first, that is what is told.
      writing.done.catch(() => undefined)
      const range = IDBKeyRange.lowerBound(readThrough, true)
      const [keys, values] = await Promise.all([writing.store.getAllKeys(range), writing.store.getAll(range)])
      if (keys.length > 0) takeInRows(keys, values)
      const taken = waiting
      const isOwn = hasOwnWaiting
      waiting = []
      hasOwnWaiting = false
      try {
        await writing.store.clear()
        const key = await writing.store.add(Y.encodeStateAsUpdate(doc))
        await writing.done
        readThrough = key
        rows = 1
      } catch (error) {
        waiting = [...taken, ...waiting]
        hasOwnWaiting ||= isOwn
        throw error
      }
    })
  }

  function markComplete(): void {
    if (isComplete) database?.put('custom', true, COMPLETE).catch(() => undefined)
  }

  async function open(): Promise<boolean> {
    // Some private windows have none.
    if (!('indexedDB' in globalThis)) return false
    try {
      database = await openDatabase(name, lose)
      // Said meanwhile by the server, perhaps.
      isComplete = (await database.get('custom', COMPLETE)) === true || isComplete
      await inLine(readRows)
      markComplete()
      setKept(true)
      await append()
      compactWhenLong()
      return true
    } catch {
      fail()
      return false
    }
  }

  const opened = open()
  return {
    opened,
    wasComplete: () => isComplete,
    rememberComplete() {
      if (isComplete) return
      isComplete = true
      markComplete()
    },
    async takeIn() {
      if (!('indexedDB' in globalThis)) return
      await opened
      await inLine(readRows)
    },
    async close() {
      doc.off('update', handleUpdate)
      isClosed = true
      clearTimeout(retry)
      await opened
      await line
      await append().catch(() => undefined)
      database?.close()
    },
  }
}
