// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { IDBObjectStore } from 'fake-indexeddb'
import { openDB } from 'idb'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import * as Y from 'yjs'
import { type DocumentCache, addToCache, openDocumentCache, readCache } from '#src/realtime/document-cache.ts'

const until = (condition: () => boolean | Promise<boolean>) => vi.waitUntil(condition, { interval: 2, timeout: 5_000 })

let name = ''
let number = 0
const open: DocumentCache[] = []

type Page = { doc: Y.Doc; cache: DocumentCache; kept: boolean[]; words: () => unknown }

/** A page that has the document open. */
function page(options: { compactRows?: number; retryMs?: number; mayKeep?: () => boolean } = {}): Page {
  const doc = new Y.Doc()
  const kept: boolean[] = []
  const cache = openDocumentCache(name, doc, {
    onKept: (isKept) => kept.push(isKept),
    mayKeep: () => true,
    ...options,
  })
  open.push(cache)
  return { doc, cache, kept, words: () => doc.getMap('words').toJSON() }
}

const say = ({ doc }: Page, key: string, word: string) => void doc.getMap('words').set(key, word)

async function rows(): Promise<Uint8Array[]> {
  const database = await openDB(name)
  const all: Uint8Array[] = await database.getAll('updates')
  database.close()
  return all
}

async function isMarkedComplete(): Promise<unknown> {
  const database = await openDB(name)
  const marked: unknown = await database.get('custom', 'complete')
  database.close()
  return marked
}

/** From now on the device refuses to write, until the returned function is called. */
function fill(): () => void {
  const spy = vi.spyOn(IDBObjectStore.prototype, 'add').mockImplementation(() => {
    throw new DOMException('The device is full.', 'QuotaExceededError')
  })
  return () => spy.mockRestore()
}

beforeEach(() => {
  name = `rt:person:shoot:board:${++number}`
})
afterEach(async () => {
  vi.restoreAllMocks()
  await Promise.all(open.splice(0).map((cache) => cache.close()))
})

describe('openDocumentCache', () => {
  it('gives a document back as it was left', async () => {
    const first = page()
    await first.cache.opened
    say(first, 'a', 'felt')
    await first.cache.close()
    const second = page()
    expect(await second.cache.opened).toBe(true)
    expect(second.words()).toEqual({ a: 'felt' })
    expect(second.doc.clientID).not.toBe(first.doc.clientID)
  })

  it('keeps what was changed before the database was open', async () => {
    const first = page()
    say(first, 'a', 'early')
    await first.cache.close()
    const second = page()
    await second.cache.opened
    expect(second.words()).toEqual({ a: 'early' })
  })

  it('writes one row for all that one turn brings', async () => {
    const one = page()
    await one.cache.opened
    for (let n = 0; n < 20; n++) say(one, `k${n}`, 'x')
    await until(async () => (await rows()).length > 0)
    say(one, 'later', 'x')
    await until(async () => (await rows()).length === 2)
    await one.cache.close()
    const again = page()
    await again.cache.opened
    expect(Object.keys(again.doc.getMap('words').toJSON())).toHaveLength(21)
  })

  it('does not send or count what comes from the device as an edit of this visit', async () => {
    const first = page()
    say(first, 'a', 'felt')
    await first.cache.close()
    const second = page()
    const locals: boolean[] = []
    second.doc.on('update', (_update: Uint8Array, _origin: unknown, _doc: Y.Doc, { local }: Y.Transaction) =>
      locals.push(local),
    )
    await second.cache.opened
    expect(locals).toEqual([false])
  })

  it('reads caches of the library used before', async () => {
    // The layout y-indexeddb 9 creates: version 1, `updates` with generated keys, `custom`.
    const old = new Y.Doc()
    old.getMap('words').set('a', 'from before')
    const database = await openDB(name, 1, {
      upgrade(fresh) {
        fresh.createObjectStore('updates', { autoIncrement: true })
        fresh.createObjectStore('custom')
      },
    })
    await database.add('updates', Y.encodeStateAsUpdate(old))
    database.close()
    const one = page()
    await one.cache.opened
    expect(one.words()).toEqual({ a: 'from before' })
  })

  it('makes one row of many, now and then, and loses none of another page', async () => {
    const a = page({ compactRows: 5 })
    const b = page({ compactRows: 1000 })
    await Promise.all([a.cache.opened, b.cache.opened])
    for (let n = 0; n < 12; n++) {
      say(a, `a${n}`, 'x')
      say(b, `b${n}`, 'x')
      await new Promise((resolve) => setTimeout(resolve))
    }
    await Promise.all([a.cache.close(), b.cache.close()])
    expect((await rows()).length).toBeLessThan(24)
    const again = page()
    await again.cache.opened
    expect(Object.keys(again.doc.getMap('words').toJSON())).toHaveLength(24)
  })

  it('survives two pages that both write and both make one row of many, in any order', async () => {
    for (let round = 0; round < 5; round++) {
      name = `rt:person:shoot:plan:${++number}`
      const pages = [page({ compactRows: 3 }), page({ compactRows: 4 }), page({ compactRows: 2 })]
      await Promise.all(pages.map(({ cache }) => cache.opened))
      const expected = new Set<string>()
      for (let n = 0; n < 30; n++) {
        const key = `${n}`
        expected.add(key)
        const one = pages[(n * 7 + round) % 3]
        if (one) say(one, key, 'x')
        if (n % (round + 2) === 0) await new Promise((resolve) => setTimeout(resolve))
      }
      await Promise.all(pages.map(({ cache }) => cache.close()))
      const again = page()
      await again.cache.opened
      expect(new Set(Object.keys(again.doc.getMap('words').toJSON()))).toEqual(expected)
    }
  })

  it('takes in what another page wrote, when asked', async () => {
    const a = page()
    const b = page()
    await Promise.all([a.cache.opened, b.cache.opened])
    say(a, 'a', 'felt')
    await a.cache.close()
    expect(b.words()).toEqual({})
    await b.cache.takeIn()
    expect(b.words()).toEqual({ a: 'felt' })
    expect(b.doc.clientID).not.toBe(a.doc.clientID)
  })

  it('says so when the device is full, and keeps everything once there is room again', async () => {
    const one = page({ retryMs: 5 })
    await one.cache.opened
    const makeRoom = fill()
    say(one, 'a', 'one')
    await until(() => one.kept.at(-1) === false)
    say(one, 'b', 'two')
    makeRoom()
    await until(() => one.kept.at(-1) === true)
    await one.cache.close()
    const again = page()
    await again.cache.opened
    expect(again.words()).toEqual({ a: 'one', b: 'two' })
  })

  it('leaves the rows as they were when making one of them fails half-way', async () => {
    const one = page({ compactRows: 4, retryMs: 100_000 })
    await one.cache.opened
    for (let n = 0; n < 3; n++) {
      say(one, `${n}`, 'x')
      await until(async () => (await rows()).length === n + 1)
    }
    const add = IDBObjectStore.prototype.add
    let adds = 0
    vi.spyOn(IDBObjectStore.prototype, 'add').mockImplementation(function (this: IDBObjectStore, ...row) {
      const request = add.apply(this, row)
      // The fourth change is written; the state that is to stand for all four is not.
      if (++adds === 2) this.transaction.abort()
      return request
    })
    say(one, 'last', 'x')
    await until(() => adds === 2)
    await until(async () => (await rows()).length === 4)
    const again = page()
    await again.cache.opened
    expect(Object.keys(again.doc.getMap('words').toJSON())).toEqual(['0', '1', '2', 'last'])
  })

  it('opens anew when the browser takes the database away', async () => {
    const one = page({ retryMs: 5 })
    await one.cache.opened
    say(one, 'a', 'one')
    await until(async () => (await rows()).length === 1)
    await new Promise<void>((resolve) => {
      indexedDB.deleteDatabase(name).onsuccess = () => resolve()
    })
    expect(one.kept.at(-1)).toBe(false)
    await until(() => one.kept.at(-1) === true)
    await one.cache.close()
    const again = page()
    await again.cache.opened
    expect(again.words()).toEqual({ a: 'one' })
  })

  it('keeps nothing that is not to be kept', async () => {
    let may = true
    const one = page({ mayKeep: () => may, compactRows: 2 })
    await one.cache.opened
    say(one, 'a', 'kept')
    may = false
    say(one, 'b', 'not kept')
    may = true
    for (const key of ['c', 'd', 'e']) say(one, key, 'kept')
    await one.cache.close()
    const again = page()
    await again.cache.opened
    expect(again.doc.getMap('words').get('b')).toBeUndefined()
    expect(again.doc.getMap('words').get('a')).toBe('kept')
  })

  it('remembers that it once had the whole document', async () => {
    const one = page()
    await one.cache.opened
    expect(one.cache.wasComplete()).toBe(false)
    one.cache.rememberComplete()
    await one.cache.close()
    const again = page()
    await again.cache.opened
    expect(again.cache.wasComplete()).toBe(true)
  })

  it('remembers it also when it is said before the database is open, and after the database was taken away', async () => {
    const one = page({ retryMs: 5 })
    one.cache.rememberComplete()
    await one.cache.opened
    expect(one.cache.wasComplete()).toBe(true)
    await until(async () => (await isMarkedComplete()) === true)
    await new Promise<void>((resolve) => {
      indexedDB.deleteDatabase(name).onsuccess = () => resolve()
    })
    await until(() => one.kept.length === 3)
    await until(async () => (await isMarkedComplete()) === true)
  })

  it('overwrites nothing that another page wrote after the database was taken away', async () => {
    const one = page({ retryMs: 50 })
    await one.cache.opened
    for (const key of ['a', 'b', 'c']) {
      say(one, key, 'mine')
      await until(async () => (await rows()).length === 'abc'.indexOf(key) + 1)
    }
    await one.cache.takeIn()
    await new Promise<void>((resolve) => {
      indexedDB.deleteDatabase(name).onsuccess = () => resolve()
    })
    const other = new Y.Doc()
    other.getMap('words').set('d', 'of another page')
    await addToCache(name, Y.encodeStateAsUpdate(other))
    await until(() => one.kept.at(-1) === true)
    expect(one.words()).toEqual({ a: 'mine', b: 'mine', c: 'mine', d: 'of another page' })
    expect((await readCache(name)).getMap('words').toJSON()).toEqual(one.words())
  })

  it('skips a row that cannot be read and gives the others', async () => {
    const one = page()
    say(one, 'a', 'felt')
    await one.cache.close()
    await addToCache(name, new Uint8Array([9, 9, 9, 255]))
    const again = page()
    expect(await again.cache.opened).toBe(true)
    expect(again.words()).toEqual({ a: 'felt' })
  })
})

describe('readCache', () => {
  it('reads what pages and additions have left, and nothing where there is nothing', async () => {
    expect((await readCache(name)).getMap('words').size).toBe(0)
    const one = page()
    say(one, 'a', 'felt')
    await one.cache.close()
    const added = new Y.Doc()
    added.getMap('words').set('b', 'brass')
    await addToCache(name, Y.encodeStateAsUpdate(added))
    expect((await readCache(name)).getMap('words').toJSON()).toEqual({ a: 'felt', b: 'brass' })
  })
})
