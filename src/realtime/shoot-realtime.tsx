import { useQueryClient } from '@tanstack/react-query'
import { type ReactNode, createContext, use, useEffect, useMemo, useState, useSyncExternalStore } from 'react'
import type * as Y from 'yjs'
import { canWriteDocument, type Role } from '#shared/access/roles.ts'
import type { ShootView } from '#shared/api/shoots.ts'
import { DOCUMENT_KINDS, type DocumentKind } from '#shared/realtime/documents.ts'
import { type OpenDocument, openDocument } from './open-document.ts'
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
  const [documents, setDocuments] = useState<ShootDocuments | null>(null)

  useEffect(() => {
    // Our own text from two lines above.
    const known = JSON.parse(epochs) as Record<string, number>
    const onChanged = (keys: string[][]) => {
      for (const queryKey of keys) void queryClient.invalidateQueries({ queryKey })
    }
    const open = (kind: DocumentKind) => openDocument({ kind, shootId, userId, epoch: known[kind] ?? 1, onChanged })
    const opened: ShootDocuments = {
      board: open('board'),
      plan: open('plan'),
      looks: open('looks'),
      lighting: open('lighting'),
      day: open('day'),
    }
    const close = () => {
      for (const kind of DOCUMENT_KINDS) opened[kind].destroy()
    }
    const stopListening = listenForSignOut(userId, close)
    // Only what neither the server nor this device holds is worth a question.
    const handleUnload = (event: BeforeUnloadEvent) => {
      if (DOCUMENT_KINDS.some((kind) => opened[kind].save.get().kind === 'not-saved')) event.preventDefault()
    }
    window.addEventListener('beforeunload', handleUnload)
    const stop = DOCUMENT_KINDS.map((kind) => {
      const { hello } = opened[kind]
      let isFirst = true
      return hello.subscribe(() => {
        const queryKey = ['shoots', shootId]
        if (kind === 'board') {
          // What this page holds may come from this device; after a pause, news of other things were missed as well.
          void queryClient.invalidateQueries({ queryKey, exact: isFirst })
          isFirst = false
        } else if (hello.get()?.role !== queryClient.getQueryData<ShootView>(queryKey)?.role) {
          void queryClient.invalidateQueries({ queryKey, exact: true })
        }
      })
    })
    // eslint-disable-next-line react-hooks/set-state-in-effect -- sockets are opened here and nowhere else; this hands them to the screens
    setDocuments(opened)
    return () => {
      for (const off of stop) off()
      stopListening()
      window.removeEventListener('beforeunload', handleUnload)
      close()
      setDocuments(null)
    }
  }, [shootId, userId, epochs, queryClient])

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
  return ready ? children : waiting
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
  if (closed !== null) return false
  return canWriteDocument(shoot.role, kind) && (hello === null || (hello.mayWrite && hello.frozen === null))
}

/** The permanent close code of the gravest document (no access, unknown, signed out), or null. */
export function useClosed(): number | null {
  const { documents } = useShootContext()
  return useSyncExternalStore(
    (listener) => subscribeAll(documents, (document) => document.closed.subscribe(listener)),
    () => DOCUMENT_KINDS.map((kind) => documents[kind].closed.get()).find((code) => code !== null) ?? null,
  )
}
