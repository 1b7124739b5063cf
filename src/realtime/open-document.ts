import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import { writeSyncStep1 } from 'y-protocols/sync'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import { type Role, canWriteDocument } from '#shared/access/roles.ts'
import { type Collection, rootOf } from '#shared/realtime/collection.ts'
import { COLLECTIONS, DOCUMENT_SCHEMA, type DocumentKind } from '#shared/realtime/documents.ts'
import { CLOSE, type Hello, MESSAGE } from '#shared/realtime/protocol.ts'
import { takeAllOver } from '#src/lib/typing.ts'
import { countAcknowledgements } from './acknowledgements.ts'
import { addToCache, openDocumentCache } from './document-cache.ts'
import { cacheName, forgetCache, registerCache } from './local-cache.ts'
import { parseHello, parseQueryKeys } from './parse-frames.ts'
import { keepConnected } from './reconnect.ts'
import { REFUSED_WORDS, refusedWords } from './refused-words.ts'
import { type SaveFacts, type SaveState, saveStateOf } from './save-state.ts'
import { askToStayStored } from './stay-stored.ts'
import { type Store, createStore } from './store.ts'
import { createUndo } from './undo-manager.ts'
import { type Unsent, addUnsent, openAccount, unsentByCache } from './unsent-accounts.ts'

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
  /** Whether there are edits that neither the server nor this device has, and that may still get there. */
  atRisk(): boolean
  /**
   * Closes it as soon as what is on its way has arrived, or after a moment; edits that this device does not keep are
   * waited for as long as it takes.
   */
  leave(): Promise<void>
  /** Closes it now. */
  destroy(): void
}

export type DocumentEvents = {
  /** Something outside of the documents changed: what to fetch again. */
  onChanged: (queryKeys: string[][]) => void
  /** `isNew`: the first of a connection; others come when the document is locked or released. */
  onHello: (kind: DocumentKind, hello: Hello, isNew: boolean) => void
  /** Edits that this person may no longer send were put aside; the document has to be opened anew. */
  onPutAside: () => void
  /** The document was rebuilt: it has to be opened anew in its present epoch. */
  onPast: () => void
}

type Options = DocumentEvents & {
  kind: DocumentKind
  shootId: string
  userId: string
  /** As this page knows it; the server's word counts once it has come. */
  role: Role
  /** Of the document as this page knows it. */
  epoch: number
}

/** How long a lost connection is not worth a word. */
const BRIEF_MS = 4_000
const CACHE_WAIT_MS = 500
const LEAVE_MS = 4_000
const ASK_AFTER_FAILURES = 3
/** What somebody who may not write answers to the question for everything they have. */
const EMPTY_STEP_2 = new Uint8Array([MESSAGE.sync, 1, 2, 0, 0])

/** Opens one of a shoot's documents: first from this device, then from the server, and keeps both in step. */
export function openDocument(options: Options): OpenDocument {
  const { kind, shootId, userId, role, epoch, onChanged, onHello, onPutAside, onPast } = options
  const doc = new Y.Doc()
  const name = cacheName(userId, shootId, kind, epoch)
  const acks = countAcknowledgements()
  const account = openAccount(name)
  /** Edits of pages that are gone, until they have been read from the cache. */
  let takenOver = 0
  /** Those of them that could not be read. */
  let missed = 0
  let mayWrite = canWriteDocument(role, kind)
  /** Edits made without the right to: neither kept nor sent. */
  let vain = 0
  /** The server has said on this connection that it takes edits. */
  let maySend = false
  let refusedAt = 0
  let isHelloNew = true
  let isPuttingAside = false
  let isDestroyed = false
  const facts: SaveFacts = {
    link: 'brief',
    settled: false,
    unsent: 0,
    sinceMs: null,
    kept: false,
    refused: null,
    outdated: false,
  }
  const save = createStore<SaveState>(saveStateOf(facts))
  const hello = createStore<Hello | null>(null)
  const ready = createStore(false)
  const closed = createStore<number | null>(null)

  const count = () => acks.unsent() + takenOver
  const update = (change: Partial<SaveFacts> = {}) => {
    const before = facts.unsent
    const unsent = count()
    const since = unsent === 0 ? { sinceMs: null } : facts.sinceMs === null ? { sinceMs: Date.now() } : {}
    Object.assign(facts, since, change, { unsent, settled: facts.settled || acks.settled() })
    // Storage is slow: not for every frame, only when the number is another.
    if (unsent !== before) account.write(unsentToKeep())
    const next = saveStateOf(navigator.onLine ? facts : { ...facts, link: 'down' })
    if (JSON.stringify(next) !== JSON.stringify(save.get())) save.set(next)
  }

  const unsentToKeep = (): Unsent | null =>
    facts.sinceMs === null || facts.unsent <= vain ? null : { edits: facts.unsent - vain, sinceMs: facts.sinceMs }

  // Before the provider listens: an edit is counted before the message that carries it.
  doc.on('update', (_update: Uint8Array, _from: unknown, _doc: Y.Doc, { local }: Y.Transaction) => {
    if (!local) return
    askToStayStored()
    acks.edited()
    if (!mayWrite) {
      vain++
      if (hello.get()) queueMicrotask(() => void putAside())
    }
    update()
  })
  const cache = openDocumentCache(name, doc, {
    onKept: (kept) => {
      update({ kept })
      if (kept) takeInMissed()
    },
    mayKeep: ({ local }) => mayWrite || !local,
  })

  /** Sees every frame that leaves: update-carrying sync messages are what the server counts. */
  class CountingSocket extends WebSocket {
    override send(data: Parameters<WebSocket['send']>[0]): void {
      const part = data instanceof Uint8Array && data[0] === MESSAGE.sync ? data[1] : 0
      if (part !== 1 && part !== 2) return super.send(data)
      if (maySend) {
        acks.sent(part === 1 ? 'all' : 'update')
        super.send(data)
      } else if (part === 1) {
        acks.sent('nothing')
        super.send(EMPTY_STEP_2)
      }
      update()
    }
  }

  const origin = `${location.protocol === 'https:' ? 'wss' : 'ws'}://${location.host}`
  const provider = new WebsocketProvider(`${origin}/rt/${shootId}`, kind, doc, {
    connect: false,
    disableBc: true,
    // Cookies are the browser's, not the page's: the server closes when somebody else has signed in meanwhile.
    params: { ack: '1', epoch: String(epoch), user: userId },
    resyncInterval: 45_000,
    WebSocketPolyfill: CountingSocket,
    // Who is signed out is shown the way in again; who has signed in meanwhile goes on.
    shouldReconnect: ({ code }) => code === CLOSE.signedOut || code < 4400 || code >= 4500,
  })
  const connection = keepConnected(provider, (failures) => {
    // A browser cannot read why an upgrade was refused: ask over HTTP whether one is signed in still.
    if (kind === 'board' && navigator.onLine && failures % ASK_AFTER_FAILURES === 0) onChanged([['session']])
  })

  /** Asks the server for what it has; its question back is answered with everything known here. */
  const exchange = () => {
    if (!provider.wsconnected) return
    const encoder = encoding.createEncoder()
    encoding.writeVarUint(encoder, MESSAGE.sync)
    writeSyncStep1(encoder, doc)
    provider.ws?.send(encoding.toUint8Array(encoder))
  }

  provider.messageHandlers[MESSAGE.saved] = (_encoder, decoder) => {
    const n = decoding.readVarUint(decoder)
    acks.saved(n)
    update(maySend && (n >= refusedAt || count() === 0) ? { refused: null } : {})
  }
  provider.messageHandlers[MESSAGE.refused] = (_encoder, decoder) => {
    const n = decoding.readVarUint(decoder)
    const reason = decoding.readVarString(decoder)
    // Only not stored yet: it is acknowledged once it is.
    if (reason !== 'database-down') acks.refused(n)
    refusedAt = n
    update({ refused: refusedWords(reason) })
  }
  provider.messageHandlers[MESSAGE.hello] = (_encoder, decoder) => {
    const said = parseHello(decoding.readVarString(decoder))
    if (said) hear(said)
  }
  provider.messageHandlers[MESSAGE.changed] = (_encoder, decoder) => {
    onChanged(parseQueryKeys(decoding.readVarString(decoder)))
  }

  function hear(said: Hello): void {
    const isNew = isHelloNew
    const couldSend = maySend
    isHelloNew = false
    const outdated = said.schema > DOCUMENT_SCHEMA
    const isLocked = said.frozen !== null
    // A lock passes; what was written before it is kept and sent afterwards.
    mayWrite = said.mayWrite || (isLocked && canWriteDocument(said.role, kind))
    maySend = said.mayWrite && !isLocked && !outdated
    if (mayWrite) vain = 0
    if (JSON.stringify(said) !== JSON.stringify(hello.get())) hello.set(said)
    update({ outdated, refused: maySend ? null : isLocked ? REFUSED_WORDS.frozen : REFUSED_WORDS['read-only'] })
    onHello(kind, said, isNew)
    if (!mayWrite && count() > 0) void putAside()
    else if (maySend && !couldSend && !isNew) exchange()
  }

  /** What this person may no longer send is kept apart, for a copy; the document itself is read from the server anew. */
  async function putAside(): Promise<void> {
    if (isPuttingAside || isDestroyed) return
    isPuttingAside = true
    connection.stop()
    const aside = cacheName(userId, shootId, kind, 'aside')
    try {
      // Words still in a field belong to it.
      takeAllOver()
      await cache.takeIn()
      if (isDestroyed) return
      registerCache(aside)
      await addToCache(aside, Y.encodeStateAsUpdate(doc))
      if (isDestroyed) return
    } catch {
      if (isDestroyed) return
      // This device keeps nothing: the sign goes on saying so as long as the page is open.
      connection.start()
      return
    }
    addUnsent(aside, { edits: count(), sinceMs: facts.sinceMs ?? Date.now() })
    destroy()
    await forgetCache(name)
    onPutAside()
  }

  let brief: ReturnType<typeof setTimeout> | undefined
  const waitBriefly = () => {
    clearTimeout(brief)
    brief = setTimeout(() => update({ link: 'down' }), BRIEF_MS)
  }
  provider.on('status', ({ status }) => {
    if (status === 'connected') {
      clearTimeout(brief)
      acks.connected()
      isHelloNew = true
      maySend = false
      refusedAt = 1
      update({ link: 'up' })
      takeInMissed()
      void adopt()
    } else if (status === 'disconnected') {
      waitBriefly()
      update({ link: 'brief' })
    }
  })
  provider.on('sync', (isSynced) => {
    if (isSynced) {
      cache.rememberComplete()
      ready.set(true)
    }
    update()
  })
  provider.on('connection-close', (event) => {
    if (event?.code === CLOSE.signedOut && kind === 'board') onChanged([['session']])
  })
  provider.on('closed', ({ code }) => {
    clearTimeout(brief)
    // Words still in a field belong to what was not sent; after this the fields are gone.
    takeAllOver()
    closed.set(code)
    // A document that was rebuilt is opened anew in a moment: not worth a word.
    update({ link: code === CLOSE.epoch ? 'brief' : 'down' })
    if (code === CLOSE.epoch) onPast()
    if (code === CLOSE.noAccess || code === CLOSE.unknown) void letGoOfCache()
  })

  /** What is shut to this person does not stay on this device, except for what was not sent, until they let go of it. */
  async function letGoOfCache(): Promise<void> {
    await cache.close()
    // Other pages' edits wait in it too.
    if (count() === 0 && !unsentByCache(name).has(name)) await forgetCache(name)
  }

  const takeInEdits = (edits: number) =>
    cache.takeIn().then(
      () => {
        takenOver -= edits
        acks.edited(edits)
        exchange()
      },
      // Not readable now: still counted, and tried again when this device keeps edits again, or at the next connection.
      () => void (missed += edits),
    )

  function takeInMissed(): void {
    const edits = missed
    missed = 0
    if (edits > 0) void takeInEdits(edits)
  }

  /** Edits of pages that are gone are sent from here. */
  const adopt = () =>
    account.watch(({ edits, sinceMs }) => {
      takenOver += edits
      const since = facts.sinceMs === null ? sinceMs : Math.min(facts.sinceMs, sinceMs)
      update({ sinceMs: since })
      void takeInEdits(edits)
    })

  const handleNetwork = () => update()
  window.addEventListener('online', handleNetwork)
  window.addEventListener('offline', handleNetwork)

  // The cache first: with an empty state vector the server would send everything again.
  registerCache(name)
  void Promise.race([Promise.all([cache.opened, adopt()]), wait(CACHE_WAIT_MS)]).then(() => {
    if (isDestroyed) return
    waitBriefly()
    connection.start()
  })
  void cache.opened.then((isOpen) => {
    if (isOpen && (doc.store.clients.size > 0 || cache.wasComplete())) ready.set(true)
  })

  const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
  const undo = createUndo(
    doc,
    collections.map((c) => rootOf(doc, c)),
  )

  /** Also ends when what is not sent is kept and does not go out within a moment, or never will. */
  function untilSentOrKept(): Promise<void> {
    return new Promise((resolve) => {
      let timer: ReturnType<typeof setTimeout> | undefined
      const look = () => {
        if (count() === 0 || closed.get() !== null) resolve()
        else if (facts.kept) timer ??= setTimeout(resolve, LEAVE_MS)
      }
      save.subscribe(look)
      closed.subscribe(look)
      look()
    })
  }

  function destroy(): void {
    if (isDestroyed) return
    isDestroyed = true
    window.removeEventListener('online', handleNetwork)
    window.removeEventListener('offline', handleNetwork)
    connection.destroy()
    undo.destroy()
    provider.destroy()
    clearTimeout(brief)
    void cache.close().finally(() => account.release())
    doc.destroy()
  }

  return {
    kind,
    doc,
    provider,
    undo,
    save,
    hello,
    ready,
    closed,
    atRisk: () => !isDestroyed && count() > 0 && (!facts.kept || vain > 0),
    async leave() {
      if (count() > 0 && (!facts.kept || (maySend && provider.wsconnected))) {
        provider.awareness.setLocalState(null)
        await untilSentOrKept()
      }
      destroy()
    },
    destroy,
  }
}

function wait(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms))
}
