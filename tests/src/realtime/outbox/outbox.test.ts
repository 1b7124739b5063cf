import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Upload } from '#shared/api/uploads.ts'
import { uploadIdSchema } from '#shared/ids.ts'
import { ApiError } from '#src/lib/api.ts'
import { type OutboxStore, memoryOutboxStore } from '#src/realtime/outbox/outbox-store.ts'
import { type Settled, createOutbox } from '#src/realtime/outbox/outbox.ts'
import { NotAPicture } from '#src/realtime/outbox/prepare-picture.ts'
import type { SendUpload } from '#src/realtime/outbox/send-upload.ts'

const picture = () => new Blob(['a picture'])
const uploaded = (id: string): Upload => ({
  id: uploadIdSchema.parse(id),
  sha256: 'a'.repeat(64),
  widthPx: 40,
  heightPx: 30,
  palette: [],
  exposure: '',
})

type Sent = { uploadId: string; resolve: () => void; reject: (error: Error) => void; progress: (share: number) => void }

/** A server that answers when the test says so. */
function hold(): { send: SendUpload; sent: Sent[] } {
  const sent: Sent[] = []
  return {
    sent,
    send: ({ uploadId }, progress) =>
      new Promise((resolve, reject) =>
        sent.push({ uploadId, progress, reject, resolve: () => resolve(uploaded(uploadId)) }),
      ),
  }
}

function open(send: SendUpload, store: OutboxStore = memoryOutboxStore()) {
  const settled: [string, Settled['state']][] = []
  let count = 0
  const outbox = createOutbox({
    shootId: 'shoot',
    store: Promise.resolve(store),
    send,
    prepare: (blob) =>
      blob.size > 0
        ? Promise.resolve({ blob, widthPx: 40, heightPx: 30 })
        : Promise.reject(new NotAPicture('This is an empty file.')),
    now: Date.now,
    random: () => 0.5,
    onCount: (left) => (count = left),
  })
  return {
    outbox,
    settled,
    left: () => count,
    listen: () => outbox.onSettled((id, { state }) => settled.push([id, state])),
  }
}

const flush = () => vi.advanceTimersByTimeAsync(0)

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

describe('createOutbox', () => {
  it('sends three at a time and the rest as places come free', async () => {
    const { send, sent } = hold()
    const { outbox, left, listen } = open(send)
    listen()
    for (let n = 0; n < 5; n++) await outbox.add(picture(), `${n}.jpg`)
    expect(sent).toHaveLength(3)
    expect(outbox.items.get().map(({ state }) => state)).toEqual([
      'sending',
      'sending',
      'sending',
      'waiting',
      'waiting',
    ])
    expect(left()).toBe(5)
    sent[0]?.resolve()
    await flush()
    expect(sent).toHaveLength(4)
    expect(left()).toBe(4)
  })

  it('tells how far a picture is', async () => {
    const { send, sent } = hold()
    const { outbox } = open(send)
    const { uploadId } = await outbox.add(picture())
    sent[0]?.progress(0.4)
    expect(outbox.items.get()).toMatchObject([{ uploadId, state: 'sending', progress: 0.4 }])
  })

  it('says what became of a picture, also to who listens later', async () => {
    const { send, sent } = hold()
    const { outbox, settled, listen } = open(send)
    const { uploadId } = await outbox.add(picture())
    sent[0]?.resolve()
    await flush()
    expect(settled).toEqual([])
    listen()
    expect(settled).toEqual([[uploadId, 'stored']])
  })

  it('waits longer each time nobody answers, and not at all when the signal is back', async () => {
    const { send, sent } = hold()
    const { outbox } = open(send)
    await outbox.add(picture())
    sent[0]?.reject(new ApiError('OFFLINE', 'away'))
    await flush()
    expect(outbox.items.get()).toMatchObject([{ state: 'waiting' }])
    await vi.advanceTimersByTimeAsync(1999)
    expect(sent).toHaveLength(1)
    await vi.advanceTimersByTimeAsync(2)
    expect(sent).toHaveLength(2)
    sent[1]?.reject(new ApiError('OFFLINE', 'away'))
    await vi.advanceTimersByTimeAsync(3000)
    expect(sent).toHaveLength(2)
    outbox.wake()
    expect(sent).toHaveLength(3)
  })

  it('keeps a refused picture with the sentence until it is tried again or given up', async () => {
    const { send, sent } = hold()
    const { outbox, settled, listen, left } = open(send)
    listen()
    const first = await outbox.add(picture())
    const second = await outbox.add(picture())
    for (const one of sent) one.reject(new ApiError('UNSUPPORTED', 'This picture is broken.'))
    await flush()
    expect(outbox.items.get()).toMatchObject([
      { state: 'refused', why: 'This picture is broken.' },
      { state: 'refused', why: 'This picture is broken.' },
    ])
    await vi.advanceTimersByTimeAsync(120_000)
    expect(sent).toHaveLength(2)
    outbox.retry(first.uploadId)
    outbox.giveUp(second.uploadId)
    await flush()
    expect(sent).toHaveLength(3)
    sent[2]?.resolve()
    await flush()
    expect(settled).toEqual([
      [first.uploadId, 'refused'],
      [second.uploadId, 'refused'],
      [first.uploadId, 'waiting'],
      [first.uploadId, 'stored'],
    ])
    expect(left()).toBe(0)
  })

  it('goes on after a reload under the same id, with what was refused still refused', async () => {
    const store = memoryOutboxStore()
    const before = hold()
    const visit = open(before.send, store)
    const refused = await visit.outbox.add(picture(), 'refused.jpg')
    before.sent[0]?.reject(new ApiError('TOO_LARGE', 'Too large.'))
    await flush()
    const waiting = await visit.outbox.add(picture(), 'waiting.jpg')
    visit.outbox.destroy()
    const after = hold()
    const { outbox } = open(after.send, store)
    await flush()
    expect(after.sent.map(({ uploadId }) => uploadId)).toEqual([waiting.uploadId])
    expect(outbox.items.get()).toMatchObject([
      { uploadId: refused.uploadId, state: 'refused', why: 'Too large.', name: 'refused.jpg' },
      { uploadId: waiting.uploadId, state: 'sending', name: 'waiting.jpg' },
    ])
  })

  it('counts what every page of the person has waiting', async () => {
    const store = memoryOutboxStore()
    const a = open(hold().send, store)
    const b = open(hold().send, store)
    await flush()
    await a.outbox.add(picture())
    await b.outbox.add(picture())
    expect([a.left(), b.left()]).toEqual([1, 2])
  })

  it('sends nothing again once it is stored', async () => {
    const store = memoryOutboxStore()
    const { send, sent } = hold()
    const { outbox, listen } = open(send, store)
    listen()
    await outbox.add(picture())
    sent[0]?.resolve()
    await flush()
    expect(await store.list()).toEqual([])
    expect(outbox.items.get()).toMatchObject([{ progress: 1 }])
    await vi.advanceTimersByTimeAsync(20_000)
    expect(outbox.items.get()).toEqual([])
  })

  it('keeps a stored picture until a document has heard of it, and sends it again after a reload', async () => {
    const store = memoryOutboxStore()
    const before = hold()
    const visit = open(before.send, store)
    const { uploadId } = await visit.outbox.add(picture())
    before.sent[0]?.resolve()
    await flush()
    expect((await store.list()).map((entry) => entry.uploadId)).toEqual([uploadId])
    visit.outbox.wake()
    expect(before.sent).toHaveLength(1)
    visit.outbox.destroy()
    const after = hold()
    const next = open(after.send, store)
    await flush()
    after.sent[0]?.resolve()
    await flush()
    expect([next.settled, next.left()]).toEqual([[], 1])
    next.listen()
    await flush()
    expect([next.settled, next.left(), await store.list()]).toEqual([[[uploadId, 'stored']], 0, []])
  })

  it('sends nothing before whoever adds it knows its id, however slow the device is', async () => {
    const store = memoryOutboxStore()
    const slow: OutboxStore = {
      ...store,
      count: async () => {
        await new Promise((resolve) => setTimeout(resolve, 1000))
        return store.count()
      },
    }
    const { outbox } = open(
      ({ uploadId }) => new Promise((resolve) => setTimeout(() => resolve(uploaded(uploadId)), 10)),
      slow,
    )
    const seen: string[] = []
    outbox.onSettled((_id, { state }) => seen.push(state))
    void outbox.add(picture()).then(() => seen.push('added'))
    await vi.advanceTimersByTimeAsync(5000)
    expect(seen).toEqual(['added', 'stored'])
  })

  it('refuses what the browser cannot read, and what the device has no room for, in a sentence', async () => {
    const { send, sent } = hold()
    await expect(open(send).outbox.add(new Blob([]))).rejects.toThrow('This is an empty file.')
    const full = { ...memoryOutboxStore(), put: () => Promise.reject(new DOMException('full', 'QuotaExceededError')) }
    const { outbox, left } = open(send, full)
    await expect(outbox.add(picture())).rejects.toThrow(/no room left on this device.*Nothing was added/)
    expect([outbox.items.get(), sent, left()]).toEqual([[], [], 0])
    const broken = { ...memoryOutboxStore(), put: () => Promise.reject(new DOMException('?', 'InvalidStateError')) }
    await expect(open(send, broken).outbox.add(picture())).rejects.toThrow(/could not keep.*Nothing was added/)
  })
})
