import { useMemo, useSyncExternalStore } from 'react'
import type { Collection } from '#shared/realtime/collection.ts'
import { COLLECTIONS, DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { itemStore } from './item-store.ts'
import { type ShootDocuments, useShootContext } from './shoot-realtime.tsx'

/** How many things of the open shoot no schema of this page knows: they are kept and skipped. */
export function useUnreadable(): number {
  const { documents } = useShootContext()
  const counter = useMemo(() => countUnreadable(documents), [documents])
  return useSyncExternalStore(counter.subscribe, counter.get)
}

function countUnreadable(documents: ShootDocuments) {
  const stores = DOCUMENT_KINDS.flatMap((kind) => {
    const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
    return collections.map((c) => itemStore(documents[kind].doc, c))
  })
  return {
    get: () => stores.reduce((sum, store) => sum + store.unreadable().size, 0),
    subscribe(listener: () => void) {
      const stops = stores.map((store) => store.subscribe(listener))
      return () => stops.forEach((stop) => stop())
    },
  }
}
