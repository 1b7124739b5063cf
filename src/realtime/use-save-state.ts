import { useMemo, useSyncExternalStore } from 'react'
import { DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { typingStore } from '#src/lib/typing.ts'
import { type SaveState, gravest } from './save-state.ts'
import { type ShootDocuments, subscribeAll, useShootContext } from './shoot-realtime.tsx'

/** Words in a field are in the page alone. */
const TYPING: SaveState = { kind: 'saving', kept: false }

/** The gravest of the open documents: what the sign on the screen says. Words still being typed are not saved. */
export function useSaveState(): SaveState {
  const { documents } = useShootContext()
  const isTyping = useSyncExternalStore(typingStore.subscribe, typingStore.isTyping)
  const store = useMemo(() => gravestStore(documents), [documents])
  const state = useSyncExternalStore(store.subscribe, store.get)
  return state.kind === 'saved' && isTyping ? TYPING : state
}

/** A snapshot must keep its identity while its content does. */
function gravestStore(documents: ShootDocuments) {
  let last: SaveState = { kind: 'saving', kept: true }
  return {
    subscribe: (listener: () => void) => subscribeAll(documents, (document) => document.save.subscribe(listener)),
    get(): SaveState {
      const next = gravest(DOCUMENT_KINDS.map((kind) => documents[kind].save.get()))
      if (JSON.stringify(next) !== JSON.stringify(last)) last = next
      return last
    },
  }
}
