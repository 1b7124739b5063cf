import * as decoding from 'lib0/decoding'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import { type Collection, rootOf } from '#shared/realtime/collection.ts'
import { COLLECTIONS, DOCUMENT_SCHEMA, type DocumentKind } from '#shared/realtime/documents.ts'
import { CLOSE, type Hello, MESSAGE } from '#shared/realtime/protocol.ts'
import { countAcknowledgements } from './acknowledgements.ts'
import { cacheName, openCache, rememberComplete, rememberUnsent, unsentOf, wasComplete } from './local-cache.ts'
import { type SaveFacts, type SaveState, saveStateOf } from './save-state.ts'
import { type Store, createStore } from './store.ts'
import { createUndo } from './undo-manager.ts'

export type OpenDocument = {
  kind: DocumentKind
  doc: Y.Doc
  provider: WebsocketProvider
  undo: Y.UndoManager
  save: Store<SaveState>
  /** What the server says about this connection; null until it has said hello once. */
  hello: Store<Hello | null>
  /** Nothing to show yet: neither the cache nor the server has answered. */
  ready: Store<boolean>
  /** A permanent close code (4400–4499), when the server sent one. */
  closed: Store<number | null>
  destroy(): void
}

type Options = {
  kind: DocumentKind
  shootId: string
  userId: string
  /** Of the document as this page knows it. */
  epoch: number
  onChanged: (queryKeys: string[][]) => void
}

const REFUSED_WORDS: Readonly<Record<string, string>> = {
  'read-only': 'Your role may read this, not change it.',
  'too-large': 'The last change is too large for one step.',
  full: 'This document is full.',
  invalid: 'The last change could not be read.',
  frozen: 'This document is locked for repair.',
  'database-down': 'The database cannot be reached just now.',
}

const FIRST_MINUTES_MS = 120_000
const ASK_AFTER_FAILURES = 3

/** Opens one of a shoot's documents: first from this device, then from the server, and keeps both in step. */
export function openDocument({ kind, shootId, userId, epoch, onChanged }: Options): OpenDocument {
  const doc = new Y.Doc()
  const cache = cacheName(userId, shootId, kind, epoch)
  const acks = countAcknowledgements(unsentOf(cache))
  const facts: SaveFacts = {
    connected: false,
    settled: false,
    unsent: acks.unsent(),
    kept: false,
    refused: null,
    outdated: false,
  }
  const save = createStore<SaveState>(saveStateOf(facts))
  const hello = createStore<Hello | null>(null)
  const ready = createStore(false)
  const closed = createStore<number | null>(null)
  let destroyed = false

  const update = (change: Partial<SaveFacts> = {}) => {
    const before = facts.unsent
    Object.assign(facts, change, { unsent: acks.unsent(), settled: acks.settled() })
    // Storage is slow: not for every frame, only when the number is another.
    if (facts.unsent !== before) rememberUnsent(cache, facts.unsent)
    const next = saveStateOf({ ...facts, connected: facts.connected && navigator.onLine })
    if (JSON.stringify(next) !== JSON.stringify(save.get())) save.set(next)
  }

  // Before the provider listens: an edit is counted before the message that carries it.
  doc.on('update', (_update: Uint8Array, _from: unknown, _doc: Y.Doc, transaction: Y.Transaction) => {
    if (!transaction.local) return
    acks.edited()
    update()
  })

  /** Sees every frame that leaves: update-carrying sync messages are what the server counts. */
  class CountingSocket extends WebSocket {
    override send(data: Parameters<WebSocket['send']>[0]): void {
      const isCounted = data instanceof Uint8Array && data[0] === MESSAGE.sync && data[1] !== 0
      if (isCounted) acks.sent()
      super.send(data)
      if (isCounted) update()
    }
  }

  const origin = `${location.protocol === 'https:' ? 'wss' : 'ws'}://${location.host}`
  const provider = new WebsocketProvider(`${origin}/rt/${shootId}`, kind, doc, {
    connect: false,
    disableBc: true,
    params: { ack: '1', epoch: String(epoch) },
    resyncInterval: 45_000,
    WebSocketPolyfill: CountingSocket,
  })

  provider.messageHandlers[MESSAGE.saved] = (_encoder, decoder) => {
    acks.saved(decoding.readVarUint(decoder))
    update({ refused: acks.unsent() === 0 ? null : facts.refused })
  }
  provider.messageHandlers[MESSAGE.refused] = (_encoder, decoder) => {
    decoding.readVarUint(decoder)
    const reason = decoding.readVarString(decoder)
    update({ refused: REFUSED_WORDS[reason] ?? 'The server did not take the last change.' })
  }
  provider.messageHandlers[MESSAGE.hello] = (_encoder, decoder) => {
    const said = parseHello(decoding.readVarString(decoder))
    if (!said) return
    hello.set(said)
    update({
      outdated: said.schema > DOCUMENT_SCHEMA,
      refused: said.frozen === null ? facts.refused : (REFUSED_WORDS['frozen'] ?? null),
    })
  }
  provider.messageHandlers[MESSAGE.changed] = (_encoder, decoder) => {
    onChanged(parseQueryKeys(decoding.readVarString(decoder)))
  }

  provider.on('status', ({ status }) => {
    if (status === 'connected') acks.connected()
    update({ connected: status === 'connected' })
  })
  provider.on('sync', (synced) => {
    if (synced) {
      rememberComplete(cache)
      ready.set(true)
    }
    update()
  })
  provider.on('closed', ({ code }) => {
    closed.set(code)
    update({ outdated: code === CLOSE.epoch, connected: false })
  })

  let downSinceMs: number | null = null
  provider.on('connection-close', () => {
    // Runs before the provider sets its timer: two clients that fell together must not return together.
    downSinceMs = provider.synced ? Date.now() : (downSinceMs ?? Date.now())
    const capMs = Date.now() - downSinceMs < FIRST_MINUTES_MS ? 3000 : 30_000
    const stepMs = Math.min(2 ** (provider.wsUnsuccessfulReconnects + 1) * 100, capMs)
    provider.maxBackoffTime = stepMs * (0.3 + 0.7 * Math.random())
    // A browser cannot read why an upgrade was refused: ask over HTTP whether one is signed in still.
    const failures = provider.wsUnsuccessfulReconnects
    if (kind === 'board' && navigator.onLine && failures % ASK_AFTER_FAILURES === ASK_AFTER_FAILURES - 1) {
      onChanged([['session']])
    }
  })

  const wake = () => {
    if (document.visibilityState === 'visible' && navigator.onLine && provider.shouldConnect) provider.connect()
  }
  const handleOnline = () => {
    // The old socket may be half open: nobody would notice for half a minute.
    if (provider.shouldConnect) {
      provider.disconnect()
      provider.connect()
    }
    update()
  }
  const handleOffline = () => update()
  window.addEventListener('online', handleOnline)
  window.addEventListener('offline', handleOffline)
  window.addEventListener('pageshow', wake)
  document.addEventListener('visibilitychange', wake)

  // The cache first: with an empty state vector the server would send everything again.
  void openCache(cache, doc).then((opened) => {
    if (destroyed) return
    update({ kept: opened !== undefined })
    if (opened && (doc.store.clients.size > 0 || wasComplete(cache))) ready.set(true)
    provider.connect()
  })

  const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
  const undo = createUndo(
    doc,
    collections.map((c) => rootOf(doc, c)),
  )

  return {
    kind,
    doc,
    provider,
    undo,
    save,
    hello,
    ready,
    closed,
    destroy() {
      destroyed = true
      window.removeEventListener('online', handleOnline)
      window.removeEventListener('offline', handleOffline)
      window.removeEventListener('pageshow', wake)
      document.removeEventListener('visibilitychange', wake)
      undo.destroy()
      provider.destroy()
      doc.destroy()
    },
  }
}

function parseHello(text: string): Hello | undefined {
  try {
    // Our own server's frame on an authorised socket; a field that is missing shows as a reload, never as a right.
    return JSON.parse(text) as Hello
  } catch {
    return undefined
  }
}

function parseQueryKeys(text: string): string[][] {
  try {
    const keys: unknown = JSON.parse(text)
    return Array.isArray(keys) ? keys.filter((key): key is string[] => Array.isArray(key)) : []
  } catch {
    return []
  }
}
