import type { Upload } from '#shared/api/uploads.ts'
import { ApiError } from '#src/lib/api.ts'
import { newId } from '#src/lib/new-id.ts'
import { type Store, createStore } from '../store.ts'
import type { OutboxEntry, OutboxStore } from './outbox-store.ts'
import { NotAPicture, type PreparedPicture } from './prepare-picture.ts'
import type { SendUpload } from './send-upload.ts'

export type OutboxItem = {
  uploadId: string
  name: string
  addedAtMs: number
  widthPx: number
  heightPx: number
  state: 'waiting' | 'sending' | 'refused'
  /** 0 to 1 while it is being sent. */
  progress: number
  /** The server's sentence when it refused. */
  why: string
  /** The picture as it is on this device. */
  localUrl: string
}

/** What became of a picture: `waiting` again after somebody asked to try once more. */
export type Settled = { state: 'stored'; upload: Upload } | { state: 'refused'; why: string } | { state: 'waiting' }
type OnSettled = (uploadId: string, settled: Settled) => void

export type Added = { uploadId: string; widthPx: number; heightPx: number }

export type Outbox = {
  items: Store<readonly OutboxItem[]>
  /** Keeps a picture on this device and sends it when it can. @throws NotAPicture with a sentence; nothing is kept then. */
  add(file: Blob, name?: string): Promise<Added>
  /** Sends a refused picture once more. */
  retry(uploadId: string): void
  /** Forgets a picture without sending it. */
  giveUp(uploadId: string): void
  /** Sends what waits now, not when its pause is over. */
  wake(): void
  /** Told what became of each picture, those settled before anybody listened included. */
  onSettled(listener: OnSettled): () => void
  destroy(): void
}

type Deps = {
  shootId: string
  store: Promise<OutboxStore>
  send: SendUpload
  prepare: (file: Blob) => Promise<PreparedPicture>
  now: () => number
  random: () => number
  /** Told how many pictures are on this device only, whichever page they were added on. */
  onCount: (count: number) => void
}

const AT_ONCE = 3
const LONGEST_PAUSE_MS = 60_000
/** How long a stored picture is still shown from this device, so that it does not blink. */
const LINGER_MS = 15_000

/** Answers after which sending again can help: signed out, too many, starting, no answer. Anything else is for good. */
const PASSING: ReadonlySet<string> = new Set(['OFFLINE', 'STARTING', 'INTERNAL', 'TOO_MANY', 'SIGNED_OUT'])

/** Pictures of one person and shoot on their way to the server, three at a time, kept on the device until they are there. */
export function createOutbox({ shootId, store, send, prepare, now, random, onCount }: Deps): Outbox {
  const items = createStore<readonly OutboxItem[]>([])
  const entries = new Map<string, OutboxEntry>()
  const notBeforeMs = new Map<string, number>()
  const sending = new Map<string, AbortController>()
  const lingering = new Set<string>()
  const listeners = new Set<OnSettled>()
  let unheard: [string, Settled][] = []
  let timer: ReturnType<typeof setTimeout> | undefined
  let destroyed = false

  const change = (uploadId: string, patch: Partial<OutboxItem>) =>
    items.set(items.get().map((item) => (item.uploadId === uploadId ? { ...item, ...patch } : item)))
  const tellCount = async () => {
    const count = await (await store).count().catch(() => entries.size)
    if (!destroyed) onCount(count)
  }
  const show = (entry: OutboxEntry) => {
    const { uploadId, name, addedAtMs, widthPx, heightPx, state, why = '', blob } = entry
    entries.set(uploadId, entry)
    items.set([
      ...items.get(),
      { uploadId, name, addedAtMs, widthPx, heightPx, state, progress: 0, why, localUrl: URL.createObjectURL(blob) },
    ])
  }
  const hide = (uploadId: string) => {
    const item = items.get().find((one) => one.uploadId === uploadId)
    items.set(items.get().filter((one) => one.uploadId !== uploadId))
    if (item) URL.revokeObjectURL(item.localUrl)
  }
  const tell = (uploadId: string, settled: Settled) => {
    if (listeners.size === 0) unheard.push([uploadId, settled])
    for (const listener of listeners) listener(uploadId, settled)
  }
  /** The picture itself is kept already; without room for its number of tries it only starts counting again. */
  const note = async (entry: OutboxEntry) => {
    entries.set(entry.uploadId, entry)
    await store.then((opened) => opened.put(entry)).catch(() => undefined)
  }
  const forget = async (uploadId: string) => {
    entries.delete(uploadId)
    await (await store).remove(uploadId)
    await tellCount()
  }

  async function sendOne(entry: OutboxEntry) {
    const { uploadId } = entry
    const abort = new AbortController()
    sending.set(uploadId, abort)
    change(uploadId, { state: 'sending', progress: 0 })
    try {
      const upload = await send(entry, (progress) => change(uploadId, { progress }), abort.signal)
      // First into the document, then out of the outbox: a tab that dies in between sends it again, which changes nothing.
      tell(uploadId, { state: 'stored', upload })
      change(uploadId, { progress: 1 })
      lingering.add(uploadId)
      setTimeout(() => hide(uploadId), LINGER_MS)
      // Without a document to tell it stays on the device, so that the next visit sends it again and tells then.
      if (listeners.size > 0) await forget(uploadId)
      else entries.delete(uploadId)
    } catch (error) {
      if (entries.has(uploadId) && !destroyed) await failed(entry, error)
    } finally {
      sending.delete(uploadId)
      pump()
    }
  }

  async function failed(entry: OutboxEntry, error: unknown) {
    const { uploadId } = entry
    const tries = entry.tries + 1
    if (error instanceof ApiError && !PASSING.has(error.code)) {
      change(uploadId, { state: 'refused', why: error.message, progress: 0 })
      tell(uploadId, { state: 'refused', why: error.message })
      await note({ ...entry, tries, state: 'refused', why: error.message })
      return
    }
    const pauseMs = Math.min(LONGEST_PAUSE_MS, 1000 * 2 ** Math.min(tries, 10)) * (0.75 + random() / 2)
    notBeforeMs.set(uploadId, now() + pauseMs)
    change(uploadId, { state: 'waiting', progress: 0 })
    await note({ ...entry, tries })
  }

  /** Starts what may start now and comes back when the next pause is over. */
  function pump() {
    if (destroyed) return
    clearTimeout(timer)
    let nextMs = Infinity
    for (const entry of [...entries.values()].sort((a, b) => a.addedAtMs - b.addedAtMs)) {
      if (entry.state !== 'waiting' || sending.has(entry.uploadId)) continue
      if (sending.size >= AT_ONCE) return
      const startMs = notBeforeMs.get(entry.uploadId) ?? 0
      if (startMs <= now()) void sendOne(entry)
      else nextMs = Math.min(nextMs, startMs)
    }
    if (nextMs < Infinity) timer = setTimeout(pump, nextMs - now())
  }

  void store.then(async (opened) => {
    const kept = await opened.list()
    if (destroyed) return
    for (const entry of kept.sort((a, b) => a.addedAtMs - b.addedAtMs)) if (!entries.has(entry.uploadId)) show(entry)
    pump()
    await tellCount()
  })

  return {
    items,
    async add(file, name = file instanceof File ? file.name : 'picture') {
      const prepared = await prepare(file)
      const entry: OutboxEntry = {
        uploadId: newId(),
        shootId,
        name,
        addedAtMs: now(),
        tries: 0,
        state: 'waiting',
        ...prepared,
      }
      // Not among the entries before it is kept: nothing is sent that a reload would lose.
      try {
        await (await store).put(entry)
      } catch (error) {
        const isFull = error instanceof DOMException && error.name === 'QuotaExceededError'
        throw new NotAPicture(
          isFull
            ? 'There is no room left on this device to keep the picture until it is sent. Nothing was added. Free some space and add it again.'
            : 'This device could not keep the picture until it is sent. Nothing was added. Load the page again and add it once more.',
        )
      }
      show(entry)
      await tellCount()
      pump()
      return { uploadId: entry.uploadId, widthPx: entry.widthPx, heightPx: entry.heightPx }
    },
    retry(uploadId) {
      const entry = entries.get(uploadId)
      if (entry?.state !== 'refused') return
      const { why: _why, ...rest } = entry
      notBeforeMs.delete(uploadId)
      change(uploadId, { state: 'waiting', why: '' })
      tell(uploadId, { state: 'waiting' })
      void note({ ...rest, state: 'waiting' }).then(pump)
    },
    giveUp(uploadId) {
      if (lingering.has(uploadId)) return
      void forget(uploadId)
      sending.get(uploadId)?.abort()
      hide(uploadId)
    },
    wake() {
      notBeforeMs.clear()
      pump()
    },
    onSettled(listener) {
      listeners.add(listener)
      const heard = unheard
      unheard = []
      for (const [uploadId, settled] of heard) {
        listener(uploadId, settled)
        if (settled.state === 'stored') void forget(uploadId)
      }
      return () => listeners.delete(listener)
    },
    destroy() {
      destroyed = true
      clearTimeout(timer)
      for (const abort of sending.values()) abort.abort()
      for (const item of items.get()) URL.revokeObjectURL(item.localUrl)
      items.set([])
    },
  }
}
