import { useSyncExternalStore } from 'react'
import type { Collection, Item } from '#shared/realtime/collection.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import { itemStore } from './item-store.ts'
import { useDoc } from './shoot-realtime.tsx'

/** Living items of a collection by id; unchanged items keep their identity from one change to the next. */
export function useItems<C extends Collection>(kind: DocumentKind, c: C): ReadonlyMap<string, Item<C>> {
  const store = itemStore(useDoc(kind), c)
  return useSyncExternalStore(store.subscribe, store.get)
}
