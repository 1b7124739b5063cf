import { useMemo, useSyncExternalStore } from 'react'
import { DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { type SaveState, gravest } from './save-state.ts'
import { type ShootDocuments, subscribeAll, useShootContext } from './shoot-realtime.tsx'

/** The gravest of the open documents: what the sign on the screen says. */
export function useSaveState(): SaveState {
  const { documents } = useShootContext()
  const store = useMemo(() => gravestStore(documents), [documents])
  return useSyncExternalStore(store.subscribe, store.get)
}

/** A snapshot must keep its identity while its content does. */
function gravestStore(documents: ShootDocuments) {
  let last: SaveState = { kind: 'saving' }
  return {
    subscribe: (listener: () => void) => subscribeAll(documents, (document) => document.save.subscribe(listener)),
    get(): SaveState {
      const next = gravest(DOCUMENT_KINDS.map((kind) => documents[kind].save.get()))
      if (JSON.stringify(next) !== JSON.stringify(last)) last = next
      return last
    },
  }
}
