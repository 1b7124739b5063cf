// @vitest-environment jsdom
import { IDBFactory, IDBKeyRange, IDBObjectStore } from 'fake-indexeddb'
import 'fake-indexeddb/auto'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { patchItem, putItems, readAll } from '#shared/realtime/collection.ts'
import { DOCUMENT_SCHEMA, notes } from '#shared/realtime/documents.ts'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { holdTyping } from '#src/lib/typing.ts'
import { leftBehind, letGo, readLeftBehind } from '#src/realtime/left-behind.ts'
import { registeredCaches } from '#src/realtime/local-cache.ts'
import { type OpenDocument, openDocument } from '#src/realtime/open-document.ts'
import { unsentOnDevice } from '#src/realtime/unsent-accounts.ts'
import { fakeLocks } from '#tests/support/fake-locks.ts'
import { type FarEnd, farEnd } from '#tests/support/far-end.ts'

const ID = '00000000-0000-4000-8000-000000000001'
const until = (condition: () => boolean | Promise<boolean>) => vi.waitUntil(condition, { interval: 2, timeout: 8_000 })

let end: FarEnd
let opened: OpenDocument[]
let fetched: string[]
let putAside: number
let past: number
let hellos: boolean[]

type Page = {
  document: OpenDocument
  write: (text: string) => void
  text: () => string | undefined
  sign: () => string
}

/** A page of one person that has the board open. */
function page(change: { userId?: string; epoch?: number; role?: 'photographer' | 'crew' } = {}): Page {
  const document = openDocument({
    kind: 'board',
    shootId: 'shoot',
    userId: change.userId ?? 'ines',
    role: change.role ?? 'photographer',
    epoch: change.epoch ?? 1,
    onChanged: (keys) => fetched.push(...keys.map((key) => key.join('/'))),
    onHello: (_kind, _hello, isNew) => hellos.push(isNew),
    onPutAside: () => putAside++,
    onPast: () => past++,
  })
  opened.push(document)
  return {
    document,
    write: (text) => void patchItem(document.doc, notes, ID, { text }),
    text: () => readAll(document.doc, notes).items.get(ID)?.text,
    sign: () => document.save.get().kind,
  }
}

/** The same, once the server has everything of it. */
async function savedPage(change?: Parameters<typeof page>[0]): Promise<Page> {
  const one = page(change)
  await until(() => one.sign() === 'saved')
  return one
}

/** Whether the words left this device in any frame. */
const everSent = (words: string) =>
  end.sockets.some(({ received }) => received.some((frame) => new TextDecoder().decode(frame).includes(words)))
/** Other pages hear what one writes; here all are one page, which does not hear itself. */
const tellOtherPages = () => {
  for (const key of Object.keys(localStorage))
    window.dispatchEvent(new StorageEvent('storage', { key, newValue: localStorage.getItem(key) }))
}
const onServer = () => readAll(end.doc, notes).items.get(ID)?.text
const setOnline = (isOnline: boolean) => {
  vi.spyOn(navigator, 'onLine', 'get').mockReturnValue(isOnline)
  window.dispatchEvent(new Event(isOnline ? 'online' : 'offline'))
}

beforeEach(() => {
  globalThis.indexedDB = new IDBFactory()
  globalThis.IDBKeyRange = IDBKeyRange
  localStorage.clear()
  Object.defineProperty(navigator, 'locks', { value: fakeLocks(), configurable: true })
  end = farEnd()
  putItems(end.doc, notes, [{ id: ID, box: [0, 0, 80, 40], text: 'as it was' }], () => 0.5)
  vi.stubGlobal('WebSocket', end.WebSocket)
  opened = []
  fetched = []
  putAside = 0
  past = 0
  hellos = []
})
afterEach(() => {
  opened.forEach((document) => document.destroy())
  vi.restoreAllMocks()
  vi.useRealTimers()
})

describe('openDocument', () => {
  it('says saved when the server has everything, and not before', async () => {
    const one = page()
    expect(one.sign()).toBe('saving')
    await until(() => one.sign() === 'saved')
    end.updates = 'hold'
    one.write('mine')
    expect(one.sign()).toBe('saving')
    await until(() => onServer() === 'mine')
    expect(one.sign()).toBe('saving')
    end.release()
    await until(() => one.sign() === 'saved')
  })

  it('has no word for a connection that comes back soon: saving with unsent edits, saved without', async () => {
    const one = await savedPage()
    const signs: string[] = []
    one.document.save.subscribe(() => signs.push(one.sign()))
    end.fall(CLOSE.restart)
    expect(one.sign()).toBe('saved')
    one.write('meanwhile')
    expect(one.sign()).toBe('saving')
    await until(() => one.sign() === 'saved')
    expect(onServer()).toBe('meanwhile')
    expect(signs).toEqual(['saving', 'saved'])
  })

  it('says offline when it stays away, with how many since when, and everything goes out in the end', async () => {
    const one = await savedPage()
    vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout', 'Date'], now: Date.now() })
    const atMs = Date.now()
    end.answer = 1006
    end.fall()
    one.write('kept')
    await vi.advanceTimersByTimeAsync(3_900)
    expect(one.sign()).toBe('saving')
    await vi.advanceTimersByTimeAsync(200)
    expect(one.document.save.get()).toEqual({ kind: 'offline', unsent: 1, sinceMs: atMs })
    end.answer = 'take'
    await vi.advanceTimersByTimeAsync(3_000)
    vi.useRealTimers()
    await until(() => one.sign() === 'saved')
    expect(onServer()).toBe('kept')
  })

  it('says offline at once when the browser knows it', async () => {
    const one = await savedPage()
    setOnline(false)
    expect(one.sign()).toBe('offline')
    setOnline(true)
    await until(() => one.sign() === 'saved')
  })

  it('tells the server whose page it is', async () => {
    await savedPage({ userId: 'ines' })
    expect(new URL(end.sockets[0]?.url ?? '').searchParams.get('user')).toBe('ines')
  })

  it('asks whether one is signed in still when it is turned away, keeps what was written, and sends it afterwards', async () => {
    const one = await savedPage()
    // The session ends; then upgrades are refused, which a browser sees as no answer.
    end.answer = 1006
    end.fall(CLOSE.signedOut)
    one.write('before signing in again')
    expect(fetched).toContain('session')
    expect(one.document.closed.get()).toBeNull()
    await one.document.leave()
    expect(unsentOnDevice('ines')).toBe(1)
    end.answer = 'take'
    await savedPage({ userId: 'soren' })
    expect(onServer()).toBe('as it was')
    await savedPage()
    expect(onServer()).toBe('before signing in again')
    expect(unsentOnDevice('ines')).toBe(0)
  })

  it('hands the edits of a page that is gone to the other open page, which sends them', async () => {
    const a = page()
    const b = page()
    await until(() => a.sign() === 'saved' && b.sign() === 'saved')
    expect(a.document.doc.clientID).not.toBe(b.document.doc.clientID)
    // Page a loses its network alone, is edited, and is closed.
    a.document.provider.disconnect()
    a.write('from the closed page')
    expect(unsentOnDevice('ines')).toBe(1)
    expect(b.text()).toBe('as it was')
    tellOtherPages()
    a.document.destroy()
    await until(() => onServer() === 'from the closed page')
    await until(() => b.sign() === 'saved' && unsentOnDevice('ines') === 0)
    expect(b.text()).toBe('from the closed page')
  })

  it('counts what it took over as unsent until the server has it', async () => {
    const a = await savedPage()
    end.answer = 1006
    end.fall()
    a.write('one')
    a.write('two')
    a.document.destroy()
    const b = page()
    await until(() => b.text() === 'two')
    expect([unsentOnDevice('ines'), b.sign()]).toEqual([2, 'saving'])
    end.answer = 'take'
    end.updates = 'hold'
    await until(() => onServer() === 'two')
    expect([unsentOnDevice('ines'), b.sign()]).toEqual([2, 'saving'])
    end.release()
    await until(() => b.sign() === 'saved')
    expect(unsentOnDevice('ines')).toBe(0)
  })

  it('says not saved when offline and the device is full, and offline once it keeps again', async () => {
    const one = await savedPage()
    vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] })
    end.answer = 1006
    end.fall()
    setOnline(false)
    const full = vi.spyOn(IDBObjectStore.prototype, 'add').mockImplementation(() => {
      throw new DOMException('The device is full.', 'QuotaExceededError')
    })
    one.write('nowhere to keep it')
    await vi.waitFor(() => expect(one.sign()).toBe('not-saved'))
    full.mockRestore()
    await vi.advanceTimersByTimeAsync(5_000)
    await vi.waitFor(() => expect(one.sign()).toBe('offline'))
  })

  it('never sends what was written for another epoch, and keeps it apart', async () => {
    const one = await savedPage()
    end.answer = 1006
    end.fall()
    one.write('for the old epoch')
    end.answer = CLOSE.epoch
    await until(() => one.document.closed.get() === CLOSE.epoch)
    expect(past).toBe(1)
    // The page goes on by itself: nobody has to load it anew.
    expect(one.sign()).toBe('saving')
    await one.document.leave()
    end.answer = 'take'
    const next = await savedPage({ epoch: 2 })
    expect(next.text()).toBe('as it was')
    expect(everSent('for the old epoch')).toBe(false)
    const left = leftBehind('ines', 'shoot', { board: 2 })
    expect(left).toMatchObject([{ kind: 'board', edits: 1, cache: 'rt:ines:shoot:board:1' }])
    const [read] = await readLeftBehind(left)
    expect(read && readAll(read.doc, notes).items.get(ID)?.text).toBe('for the old epoch')
    await letGo(left)
    expect([leftBehind('ines', 'shoot', { board: 2 }), unsentOnDevice('ines')]).toEqual([[], 0])
  })

  it('puts aside what a person may no longer send, and reads the document anew', async () => {
    const one = await savedPage()
    end.answer = 1006
    end.fall(CLOSE.roleChanged)
    one.write('too late')
    end.hello = { ...end.hello, role: 'crew', mayWrite: false }
    end.answer = 'take'
    await until(() => putAside === 1)
    expect(everSent('too late')).toBe(false)
    expect(leftBehind('ines', 'shoot', { board: 1 })).toMatchObject([{ kind: 'board', edits: 1 }])
    const again = await savedPage({ role: 'crew' })
    expect([again.text(), onServer()]).toEqual(['as it was', 'as it was'])
    const [read] = await readLeftBehind(leftBehind('ines', 'shoot', { board: 1 }))
    expect(read && readAll(read.doc, notes).items.get(ID)?.text).toBe('too late')
  })

  it('puts aside words too that come out of a field after the right to write them is gone', async () => {
    const one = await savedPage()
    end.sayHello({ role: 'crew', mayWrite: false })
    await until(() => one.document.hello.get()?.mayWrite === false)
    one.write('typed across it')
    await until(() => putAside === 1)
    expect(everSent('typed across it')).toBe(false)
    expect(leftBehind('ines', 'shoot', { board: 1 })).toMatchObject([{ kind: 'board', edits: 1 }])
  })

  it('takes over what is still being typed when edits are put aside', async () => {
    const one = await savedPage()
    end.answer = 1006
    end.fall(CLOSE.roleChanged)
    one.write('first words')
    const release = holdTyping(() => one.write('first words and more'))
    end.hello = { ...end.hello, role: 'crew', mayWrite: false }
    end.answer = 'take'
    await until(() => putAside === 1)
    release()
    const [read] = await readLeftBehind(leftBehind('ines', 'shoot', { board: 1 }))
    expect(read && readAll(read.doc, notes).items.get(ID)?.text).toBe('first words and more')
  })

  it('opens no socket when it is closed while edits are being put aside', async () => {
    const one = await savedPage()
    end.answer = 1006
    end.fall(CLOSE.roleChanged)
    one.write('too late')
    end.hello = { ...end.hello, role: 'crew', mayWrite: false }
    end.answer = 'take'
    const before = end.sockets.length
    one.document.hello.subscribe(() => queueMicrotask(one.document.destroy))
    await until(() => one.document.hello.get()?.mayWrite === false)
    const sockets = end.sockets.length
    expect(sockets).toBeGreaterThan(before)
    await new Promise((resolve) => setTimeout(resolve, 50))
    expect([putAside, end.sockets.length]).toEqual([0, sockets])
    expect(unsentOnDevice('ines')).toBe(1)
    expect(leftBehind('ines', 'shoot', { board: 1 })).toEqual([])
  })

  it('forgets the cache of a shoot that is shut to this person, and keeps it while edits wait in it', async () => {
    await savedPage()
    expect(registeredCaches('rt:ines:shoot:')).toEqual(['rt:ines:shoot:board:1'])
    end.fall(CLOSE.noAccess)
    await until(() => registeredCaches('rt:ines:shoot:').length === 0)
    const two = await savedPage({ userId: 'soren' })
    end.answer = 1006
    end.fall()
    two.write('not gone out')
    end.answer = CLOSE.noAccess
    await until(() => two.document.closed.get() === CLOSE.noAccess)
    const left = leftBehind('soren', 'shoot', null)
    expect(left).toMatchObject([{ edits: 1 }])
    const [read] = await readLeftBehind(left)
    expect(read && readAll(read.doc, notes).items.get(ID)?.text).toBe('not gone out')
    await letGo(left)
    expect((await indexedDB.databases()).map(({ name }) => name)).toEqual([])
  })

  it('keeps the cache of a shoot that is shut while another page has unsent edits in it', async () => {
    const a = page()
    const b = page()
    await until(() => a.sign() === 'saved' && b.sign() === 'saved')
    a.document.provider.disconnect()
    a.write('not gone out')
    end.answer = CLOSE.noAccess
    end.fall(CLOSE.noAccess)
    await until(() => b.document.closed.get() === CLOSE.noAccess)
    await b.document.leave()
    await a.document.leave()
    await new Promise((resolve) => setTimeout(resolve, 20))
    const [read] = await readLeftBehind(leftBehind('ines', 'shoot', null))
    expect(read && readAll(read.doc, notes).items.get(ID)?.text).toBe('not gone out')
  })

  it('neither sends nor keeps what somebody writes who may not', async () => {
    end.hello = { ...end.hello, role: 'crew', mayWrite: false }
    const one = await savedPage({ role: 'crew' })
    one.write('not mine to write')
    expect(one.document.save.get()).toMatchObject({ kind: 'not-saved' })
    await one.document.leave()
    const again = page({ role: 'crew' })
    await until(() => again.document.ready.get())
    expect([again.text(), onServer()]).toEqual(['as it was', 'as it was'])
  })

  it('holds everything while the document is locked, says so, and sends it when it is released', async () => {
    const one = await savedPage()
    end.sayHello({ frozen: 'quarantine', mayWrite: false })
    await until(() => one.document.hello.get()?.frozen === 'quarantine')
    expect(one.sign()).toBe('saved')
    // Words that were in a field when the lock came.
    one.write('in the middle of a word')
    expect(one.document.save.get()).toMatchObject({
      kind: 'not-saved',
      why: expect.stringMatching(/locked for repair/),
    })
    expect(putAside).toBe(0)
    end.sayHello({ frozen: null, mayWrite: true })
    await until(() => one.sign() === 'saved')
    expect(onServer()).toBe('in the middle of a word')
    expect(hellos).toEqual([true, false, false])
  })

  it('sends nothing to a document whose schema it does not know, and asks for a reload', async () => {
    end.hello = { ...end.hello, schema: DOCUMENT_SCHEMA + 1 }
    const one = page()
    await until(() => one.sign() === 'reload')
    one.write('by an old page')
    await until(() => unsentOnDevice('ines') === 1)
    expect(onServer()).toBe('as it was')
  })

  it.each(['too-large', 'full', 'invalid'] as const)(
    'says why a change was refused (%s) and clears it once it is taken',
    async (reason) => {
      const one = await savedPage()
      end.updates = reason
      one.write('refused')
      await until(() => one.sign() === 'not-saved')
      one.write('and refused again')
      end.updates = 'save'
      end.fall(CLOSE.tryAgain)
      await until(() => one.sign() === 'saved')
      expect(onServer()).toBe('and refused again')
    },
  )

  it('does not take the acknowledgement of a later message for that of a refused one', async () => {
    const one = await savedPage()
    end.updates = 'full'
    one.write('refused')
    await until(() => one.sign() === 'not-saved')
    const before = end.sockets.at(-1)?.received.length ?? 0
    end.updates = 'save'
    one.write('taken')
    await until(() => end.sockets.at(-1)?.received.length === before + 1)
    await until(() => one.sign() === 'saving')
    expect(unsentOnDevice('ines')).toBe(2)
    // The server asks for everything, as it does when something is missing.
    end.ask()
    await until(() => one.sign() === 'saved')
    expect(onServer()).toBe('taken')
  })

  it('waits a moment on leaving for what is on its way', async () => {
    const one = await savedPage()
    end.updates = 'hold'
    one.write('last words')
    const left = one.document.leave()
    expect(unsentOnDevice('ines')).toBe(1)
    end.release()
    await left
    expect([onServer(), unsentOnDevice('ines')]).toEqual(['last words', 0])
  })

  it('stays open on leaving, and is at risk, as long as neither the server nor this device has the edits', async () => {
    const full = vi.spyOn(IDBObjectStore.prototype, 'add').mockImplementation(() => {
      throw new DOMException('The device is full.', 'QuotaExceededError')
    })
    const one = await savedPage()
    end.answer = 1006
    end.fall()
    expect(one.document.atRisk()).toBe(false)
    one.write('only on this page')
    await until(() => one.document.atRisk())
    expect(one.document.save.get()).toEqual({ kind: 'saving', kept: false })
    let hasLeft = false
    const left = one.document.leave().then(() => (hasLeft = true))
    await new Promise((resolve) => setTimeout(resolve, 50))
    expect(hasLeft).toBe(false)
    end.answer = 'take'
    await left
    full.mockRestore()
    expect([onServer(), one.document.atRisk()]).toEqual(['only on this page', false])
  })

  it('counts what it could not read from the device at first, and sends it once it can', async () => {
    const a = await savedPage()
    const b = await savedPage()
    a.document.provider.disconnect()
    a.write('of the closed page')
    tellOtherPages()
    const unreadable = vi.spyOn(IDBObjectStore.prototype, 'getAllKeys').mockImplementation(() => {
      throw new DOMException('The device cannot be read.', 'UnknownError')
    })
    a.document.destroy()
    await until(() => unreadable.mock.calls.length > 0 && b.sign() === 'saving')
    unreadable.mockRestore()
    end.fall()
    await until(() => onServer() === 'of the closed page')
    await until(() => b.sign() === 'saved' && unsentOnDevice('ines') === 0)
  })

  it('asks once that what is kept on this device may stay, of people who edit', async () => {
    const persist = vi.fn(() => Promise.resolve(true))
    Object.defineProperty(navigator, 'storage', { value: { persist }, configurable: true })
    vi.resetModules()
    const { askToStayStored } = await import('#src/realtime/stay-stored.ts')
    localStorage.clear()
    askToStayStored()
    askToStayStored()
    expect(persist).toHaveBeenCalledTimes(1)
  })
})
