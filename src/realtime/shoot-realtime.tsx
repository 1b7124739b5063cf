import { useQueryClient } from '@tanstack/react-query'
import { type ReactNode, createContext, use, useEffect, useMemo, useRef, useState, useSyncExternalStore } from 'react'
import type * as Y from 'yjs'
import { canWriteDocument, type Role } from '#shared/access/roles.ts'
import type { ShootView } from '#shared/api/shoots.ts'
import { DOCUMENT_KINDS, DOCUMENT_SCHEMA, type DocumentKind } from '#shared/realtime/documents.ts'
import { takeAllOver } from '#src/lib/typing.ts'
import { forgetPastCaches } from './left-behind.ts'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { type DocumentEvents, type OpenDocument, openDocument } from './open-document.ts'
import { listenForSignOut } from './sign-out.ts'

export type ShootDocuments = Readonly<Record<DocumentKind, OpenDocument>>

type ShootContext = { shoot: ShootView; userId: string; documents: ShootDocuments }

const Context = createContext<ShootContext | null>(null)

type ShootRealtimeProps = { shoot: ShootView; userId: string; children: ReactNode; waiting: ReactNode }

/**
 * Opens the five documents of a shoot, each once, and closes them on leaving. Shows `waiting` until every document has
 * come from this device or the server.
 */
export function ShootRealtime({ shoot, userId, children, waiting }: ShootRealtimeProps) {
  const queryClient = useQueryClient()
  const shootId = shoot.id
  const epochs = JSON.stringify(shoot.epochs)
  const role = useRef(shoot.role)
  useEffect(() => {
    role.current = shoot.role
  })
  const [documents, setDocuments] = useState<ShootDocuments | null>(null)
  /** Counts how often documents had to be opened anew. */
  const [opening, setOpening] = useState(0)

  useEffect(() => {
    // Our own text from above.
    const known = JSON.parse(epochs) as Record<string, number>
    const queryKey = ['shoots', shootId]
    let isFirst = true
    let past: ReturnType<typeof setTimeout> | undefined
    const openAnew = () => setOpening((before) => before + 1)
    const events: DocumentEvents = {
      onChanged: (keys) => {
        for (const key of keys) void queryClient.invalidateQueries({ queryKey: key })
      },
      onHello: (kind, hello, isNew) => {
        const isOtherRole = hello.role !== queryClient.getQueryData<ShootView>(queryKey)?.role
        if (kind === 'board' && isNew) {
          // What this page holds may come from this device; after a pause, news of other things were missed as well.
          void queryClient.invalidateQueries({ queryKey, exact: isFirst })
          isFirst = false
        } else if (isOtherRole) void queryClient.invalidateQueries({ queryKey, exact: true })
      },
      onPutAside: openAnew,
      // There is a newer one, and which is asked first. The pause is for the server to put the old one away everywhere.
      onPast: () => {
        void queryClient.invalidateQueries({ queryKey, exact: true })
        clearTimeout(past)
        past = setTimeout(openAnew, 2_000 + 4_000 * Math.random())
      },
    }
    const open = (kind: DocumentKind) =>
      openDocument({ kind, shootId, userId, role: role.current, epoch: known[kind] ?? 1, ...events })
    const opened: ShootDocuments = {
      board: open('board'),
      plan: open('plan'),
      looks: open('looks'),
      lighting: open('lighting'),
      day: open('day'),
    }
    void forgetPastCaches(userId, shootId, known)
    const stopListening = listenForSignOut(userId, () => {
      for (const kind of DOCUMENT_KINDS) opened[kind].destroy()
    })
    // Only what neither the server nor this device holds is worth a question.
    const handleUnload = (event: BeforeUnloadEvent) => {
      if (DOCUMENT_KINDS.some((kind) => opened[kind].atRisk())) event.preventDefault()
    }
    window.addEventListener('beforeunload', handleUnload)

    setDocuments(opened)
    return () => {
      // Fields below close after this: their words go into the documents while these are open.
      takeAllOver()
      clearTimeout(past)
      const left = DOCUMENT_KINDS.map((kind) => opened[kind].leave())
      void Promise.all(left).then(() => {
        stopListening()
        window.removeEventListener('beforeunload', handleUnload)
      })
      setDocuments(null)
    }
  }, [shootId, userId, epochs, opening, queryClient])

  const value = useMemo(() => (documents ? { shoot, userId, documents } : null), [shoot, userId, documents])
  if (!value) return waiting
  return (
    <Context value={value}>
      <WhenReady documents={value.documents} waiting={waiting}>
        {children}
      </WhenReady>
    </Context>
  )
}

function WhenReady({
  documents,
  waiting,
  children,
}: {
  documents: ShootDocuments
  waiting: ReactNode
  children: ReactNode
}) {
  const ready = useSyncExternalStore(
    (listener) => subscribeAll(documents, (document) => document.ready.subscribe(listener)),
    () => DOCUMENT_KINDS.every((kind) => documents[kind].ready.get()),
  )
  const closed = useFirstClosed(documents)
  // What is shut for good is told by the screens.
  return ready || (closed !== null && closed !== CLOSE.epoch) ? children : waiting
}

/** Subscribes to something of every document; returns one unsubscribe. */
export function subscribeAll(documents: ShootDocuments, subscribe: (document: OpenDocument) => () => void): () => void {
  const stops = DOCUMENT_KINDS.map((kind) => subscribe(documents[kind]))
  return () => {
    for (const stop of stops) stop()
  }
}

/** The open shoot. @throws outside of ShootRealtime: a programming error. */
export function useShootContext(): ShootContext {
  const context = use(Context)
  if (!context) throw new Error('useShootContext needs a ShootRealtime above it')
  return context
}

export function useShoot(): ShootView {
  return useShootContext().shoot
}

export function useRole(): Role {
  return useShootContext().shoot.role
}

export function useDoc(kind: DocumentKind): Y.Doc {
  return useShootContext().documents[kind].doc
}

/** Whether this person may write this document: by role, and by what the server said on the connection. */
export function useMayWrite(kind: DocumentKind): boolean {
  const { shoot, documents } = useShootContext()
  const hello = useSyncExternalStore(documents[kind].hello.subscribe, documents[kind].hello.get)
  const closed = useSyncExternalStore(documents[kind].closed.subscribe, documents[kind].closed.get)
  if (closed !== null || !canWriteDocument(shoot.role, kind)) return false
  return hello === null || (hello.mayWrite && hello.frozen === null && hello.schema <= DOCUMENT_SCHEMA)
}

/** The permanent close code of the gravest document (no access, unknown, another epoch), or null. */
export function useClosed(): number | null {
  return useFirstClosed(useShootContext().documents)
}

function useFirstClosed(documents: ShootDocuments): number | null {
  return useSyncExternalStore(
    (listener) => subscribeAll(documents, (document) => document.closed.subscribe(listener)),
    () => DOCUMENT_KINDS.map((kind) => documents[kind].closed.get()).find((code) => code !== null) ?? null,
  )
}
