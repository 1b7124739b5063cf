import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { render } from '@testing-library/react'
import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import type { ReactElement } from 'react'
import { MemoryRouter } from 'react-router-dom'
import { readSyncMessage, writeSyncStep1, writeUpdate } from 'y-protocols/sync'
import * as Y from 'yjs'
import { type Role, canWriteDocument } from '#shared/access/roles.ts'
import { shootSchema } from '#shared/api/shoots.ts'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { DOCUMENT_KINDS, DOCUMENT_SCHEMA, type DocumentKind } from '#shared/realtime/documents.ts'
import { MESSAGE, parseDocumentPath } from '#shared/realtime/protocol.ts'
import { ShootRealtime } from '#src/realtime/shoot-realtime.tsx'

export const SHOOT_ID = '00000000-0000-4000-8000-0000000000aa'
export const USER_ID = 'user-1'

type Answer = { status?: number; body: unknown }
/** Answers of the network by method and path, as the real API would give them. */
export type FakeApi = Record<string, (body: unknown) => Answer>

export type ShootScreen = {
  /** The documents as the server has them. */
  docs: Readonly<Record<DocumentKind, Y.Doc>>
  /** Requests sent, in order: `POST /api/...` with its body. */
  sent: { request: string; body: unknown }[]
  show(screen: ReactElement, at?: string): void
}

/** The far end of a document's socket: keeps the document, answers sync and acknowledges, as the protocol says. */
function fakeSocket(docs: ShootScreen['docs'], role: Role) {
  return class FakeSocket extends EventTarget {
    static readonly OPEN = 1
    readonly OPEN = 1
    binaryType = 'arraybuffer'
    readyState = 0
    onopen: (() => void) | null = null
    onmessage: ((event: { data: ArrayBuffer }) => void) | null = null
    onclose: (() => void) | null = null
    onerror: (() => void) | null = null
    #taken = 0
    #kind: DocumentKind
    #forward = (update: Uint8Array, origin: unknown) => {
      if (origin !== this) this.#give(MESSAGE.sync, (encoder) => writeUpdate(encoder, update))
    }

    constructor(url: string) {
      super()
      const kind = DOCUMENT_KINDS.find((one) => one === parseDocumentPath(new URL(url).pathname)?.kind)
      if (!kind) throw new Error(`no document at ${url}`)
      this.#kind = kind
      queueMicrotask(() => {
        this.readyState = 1
        this.onopen?.()
        const hello = { role, mayWrite: canWriteDocument(role, kind), epoch: 1, schema: DOCUMENT_SCHEMA, frozen: null }
        this.#give(MESSAGE.hello, (encoder) => encoding.writeVarString(encoder, JSON.stringify(hello)))
        this.#give(MESSAGE.sync, (encoder) => writeSyncStep1(encoder, docs[kind]))
        docs[kind].on('update', this.#forward)
      })
    }

    send(data: Uint8Array) {
      const decoder = decoding.createDecoder(data)
      if (decoding.readVarUint(decoder) !== MESSAGE.sync) return
      const carriesUpdate = data[1] !== 0
      const encoder = encoding.createEncoder()
      encoding.writeVarUint(encoder, MESSAGE.sync)
      readSyncMessage(decoder, encoder, docs[this.#kind], this)
      if (encoding.length(encoder) > 1) this.#deliver(encoding.toUint8Array(encoder))
      if (!carriesUpdate) return
      this.#taken += 1
      const taken = this.#taken
      this.#give(MESSAGE.saved, (answer) => encoding.writeVarUint(answer, taken))
    }

    close() {
      docs[this.#kind].off('update', this.#forward)
      this.readyState = 3
      this.onclose?.()
    }

    #give(type: number, write: (encoder: encoding.Encoder) => void) {
      const encoder = encoding.createEncoder()
      encoding.writeVarUint(encoder, type)
      write(encoder)
      this.#deliver(encoding.toUint8Array(encoder))
    }

    #deliver(bytes: Uint8Array) {
      const data = new Uint8Array(bytes).buffer
      queueMicrotask(() => this.onmessage?.({ data }))
    }
  }
}

/** A shoot to show screens in: documents over a socket that ends here, requests answered by the given functions. */
export function shootScreen(
  role: Role,
  api: FakeApi = {},
  more: { inStudio?: boolean; date?: string } = {},
): ShootScreen {
  const docs: ShootScreen['docs'] = {
    board: new Y.Doc(),
    plan: new Y.Doc(),
    looks: new Y.Doc(),
    lighting: new Y.Doc(),
    day: new Y.Doc(),
  }
  const sent: ShootScreen['sent'] = []
  Object.assign(globalThis, {
    WebSocket: fakeSocket(docs, role),
    fetch: (path: string, { method = 'GET', body }: { method?: string; body?: string } = {}) => {
      const request = `${method} ${path}`
      const parsed: unknown = body === undefined ? undefined : JSON.parse(body)
      sent.push({ request, body: parsed })
      const handle = api[request]
      const notFound = { error: { code: 'NOT_FOUND', message: `Nothing at ${request}.` } }
      const answer = handle ? handle(parsed) : { status: 404, body: notFound }
      return Promise.resolve(new Response(JSON.stringify(answer.body), { status: answer.status ?? 200 }))
    },
  })
  const shoot = shootSchema.parse({
    id: SHOOT_ID,
    studioId: '00000000-0000-4000-8000-0000000000ab',
    inStudio: more.inStudio ?? false,
    role,
    brief: {
      title: 'Leaf, Brass & Star',
      zone: 'Europe/London',
      date: more.date ?? null,
      location: {},
      rooms: [],
      deliverables: [],
    },
    minutes: DEFAULT_MINUTES,
    epochs: {},
  })
  return {
    docs,
    sent,
    show(screen, at = '/') {
      const queryClient = new QueryClient({ defaultOptions: { queries: { retry: false } } })
      render(
        <QueryClientProvider client={queryClient}>
          <MemoryRouter initialEntries={[at]}>
            <ShootRealtime shoot={shoot} userId={USER_ID} waiting={<p>Opening</p>}>
              {screen}
            </ShootRealtime>
          </MemoryRouter>
        </QueryClientProvider>,
      )
    },
  }
}
