// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { IDBDatabase } from 'fake-indexeddb'
import { deleteDB } from 'idb'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { registeredCaches } from '#src/realtime/local-cache.ts'
import { type OutboxEntry, openOutboxStore, outboxName } from '#src/realtime/outbox/outbox-store.ts'

let number = 0
let name = ''

beforeEach(() => {
  localStorage.clear()
  name = outboxName('ines', `shoot-${++number}`)
})
afterEach(() => void vi.restoreAllMocks())

const entry = (uploadId: string): OutboxEntry => ({
  uploadId,
  shootId: 'shoot',
  blob: new Blob(['a picture']),
  name: 'a.jpg',
  widthPx: 40,
  heightPx: 30,
  addedAtMs: 1,
  tries: 0,
  state: 'waiting',
})

describe('openOutboxStore', () => {
  it('keeps pictures for the next visit and for every page of the person', async () => {
    const store = await openOutboxStore(name)
    await store.put(entry('a'))
    const other = await openOutboxStore(name)
    await other.put(entry('b'))
    expect([await store.count(), (await other.list()).map(({ uploadId }) => uploadId)]).toEqual([2, ['a', 'b']])
    await store.remove('a')
    expect(await other.count()).toBe(1)
  })

  it('lets another page delete the database, and keeps pictures in a new one that sign-out finds', async () => {
    const store = await openOutboxStore(name)
    await store.put(entry('a'))
    await deleteDB(name)
    localStorage.clear()
    expect(await store.list()).toEqual([])
    await store.put(entry('b'))
    expect(await (await openOutboxStore(name)).count()).toBe(1)
    expect(registeredCaches('rt:ines:')).toEqual([name])
  })

  it('goes on after the browser lost the connection, and passes on that there is no room', async () => {
    const store = await openOutboxStore(name)
    const transaction = vi.spyOn(IDBDatabase.prototype, 'transaction')
    const failOnce = (error: DOMException) =>
      transaction.mockImplementationOnce(() => {
        throw error
      })
    failOnce(new DOMException('lost', 'InvalidStateError'))
    await store.put(entry('a'))
    expect(await store.count()).toBe(1)
    failOnce(new DOMException('full', 'QuotaExceededError'))
    await expect(store.put(entry('b'))).rejects.toMatchObject({ name: 'QuotaExceededError' })
  })
})
