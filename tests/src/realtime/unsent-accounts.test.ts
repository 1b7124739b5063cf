// @vitest-environment jsdom
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import {
  type Unsent,
  type UnsentAccount,
  addUnsent,
  forgetUnsent,
  openAccount,
  subscribeUnsent,
  unsentByCache,
  unsentOnDevice,
  writeUnsent,
} from '#src/realtime/unsent-accounts.ts'
import { fakeLocks } from '#tests/support/fake-locks.ts'

const CACHE = 'rt:ines:shoot:board:1'
const until = (condition: () => boolean) => vi.waitUntil(condition, { interval: 2 })

/** Another page sees what this one writes; a page does not hear its own. */
function tellOtherPages(key: string, newValue: string | null): void {
  window.dispatchEvent(new StorageEvent('storage', { key, newValue }))
}
const keys = () => Object.keys(localStorage).filter((key) => key.startsWith('sconce:unsent:'))
const keyOf = (edits: number) =>
  keys().find((key) => (JSON.parse(localStorage.getItem(key) ?? '{}') as Partial<Unsent>).edits === edits) ?? ''

let accounts: UnsentAccount[]
const open = (cache = CACHE) => {
  const account = openAccount(cache)
  accounts.push(account)
  return account
}

beforeEach(() => {
  localStorage.clear()
  accounts = []
  Object.defineProperty(navigator, 'locks', { value: fakeLocks(), configurable: true })
})
afterEach(() => accounts.forEach((account) => account.release()))

describe('openAccount', () => {
  it('adds two pages up instead of letting one wipe the other', () => {
    const a = open()
    const b = open()
    a.write({ edits: 3, sinceMs: 50 })
    b.write({ edits: 2, sinceMs: 70 })
    expect(unsentOnDevice('ines')).toBe(5)
    b.write(null)
    expect(unsentOnDevice('ines')).toBe(3)
    expect([...unsentByCache('rt:ines:')]).toEqual([[CACHE, { edits: 3, sinceMs: 50 }]])
  })

  it('counts a page that is gone until another takes its edits over, and never in between not', async () => {
    const a = open()
    a.write({ edits: 3, sinceMs: 50 })
    a.release()
    expect(unsentOnDevice('ines')).toBe(3)
    const sums: number[] = []
    const stop = subscribeUnsent(() => sums.push(unsentOnDevice('ines')))
    const b = open()
    const taken: Unsent[] = []
    await b.watch((unsent) => {
      taken.push(unsent)
      b.write(unsent)
    })
    await until(() => taken.length === 1)
    stop()
    expect(taken).toEqual([{ edits: 3, sinceMs: 50 }])
    expect(unsentOnDevice('ines')).toBe(3)
    expect(Math.min(...sums)).toBe(3)
  })

  it('leaves the account of a living page alone and takes it over when that page ends', async () => {
    const a = open()
    a.write({ edits: 4, sinceMs: 50 })
    const b = open()
    const taken: number[] = []
    await b.watch(({ edits }) => taken.push(edits))
    expect(taken).toEqual([])
    a.release()
    await until(() => taken.length === 1)
    expect(taken).toEqual([4])
  })

  it('notices a page that is opened later and then ends', async () => {
    const b = open()
    const taken: number[] = []
    await b.watch(({ edits }) => taken.push(edits))
    const a = open()
    a.write({ edits: 6, sinceMs: 1 })
    tellOtherPages(keyOf(6), '{}')
    a.release()
    await until(() => taken.length === 1)
    expect(taken).toEqual([6])
  })

  it('gives the edits of a page that is gone to one of two others only', async () => {
    const a = open()
    a.write({ edits: 1, sinceMs: 1 })
    const taken: string[] = []
    await Promise.all([open().watch(() => taken.push('b')), open().watch(() => taken.push('c'))])
    a.release()
    await until(() => taken.length === 1)
    await new Promise((resolve) => setTimeout(resolve, 10))
    expect(taken).toHaveLength(1)
  })

  it('writes its number again when somebody else removed it', () => {
    const a = open()
    a.write({ edits: 2, sinceMs: 1 })
    const key = keyOf(2)
    localStorage.removeItem(key)
    tellOtherPages(key, null)
    expect(unsentOnDevice('ines')).toBe(2)
  })

  it('takes over numbers of earlier versions, which had no holder', async () => {
    localStorage.setItem(`sconce:unsent:${CACHE}`, '7')
    const taken: number[] = []
    await open().watch(({ edits }) => taken.push(edits))
    expect(taken).toEqual([7])
    expect(keys()).toEqual([])
  })

  it('hands over at the next opening where pages cannot be told apart', async () => {
    Object.defineProperty(navigator, 'locks', { value: undefined, configurable: true })
    const a = open()
    a.write({ edits: 3, sinceMs: 1 })
    a.release()
    const taken: number[] = []
    await open().watch(({ edits }) => taken.push(edits))
    expect(taken).toEqual([3])
  })

  it('keeps people and caches apart', async () => {
    open().write({ edits: 1, sinceMs: 1 })
    open('rt:ines:shoot:board:10').write({ edits: 2, sinceMs: 1 })
    open('rt:soren:shoot:board:1').write({ edits: 4, sinceMs: 1 })
    expect([unsentOnDevice('ines'), unsentOnDevice('soren'), unsentOnDevice()]).toEqual([3, 4, 7])
    accounts.forEach((account) => account.release())
    const taken: number[] = []
    await open().watch(({ edits }) => taken.push(edits))
    await until(() => taken.length > 0)
    expect(taken).toEqual([1])
  })
})

describe('writeUnsent, addUnsent and forgetUnsent', () => {
  it('count for caches without a page', () => {
    writeUnsent('rt:ines:shoot:outbox:1', 2)
    addUnsent('rt:ines:shoot:board:aside', { edits: 3, sinceMs: 9 })
    addUnsent('rt:ines:shoot:board:aside', { edits: 1, sinceMs: 4 })
    expect(unsentByCache('rt:ines:').get('rt:ines:shoot:board:aside')).toEqual({ edits: 4, sinceMs: 4 })
    expect(unsentOnDevice('ines')).toBe(6)
    writeUnsent('rt:ines:shoot:outbox:1', 0)
    forgetUnsent('rt:ines:shoot:board:aside')
    expect(keys()).toEqual([])
  })
})
