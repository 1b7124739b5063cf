import * as Y from 'yjs'
import { type Collection, type Item, readItem, rootOf } from '#shared/realtime/collection.ts'

/** A collection as React reads it: an immutable map whose unchanged items keep their identity. */
export type ItemStore<C extends Collection> = {
  get(): ReadonlyMap<string, Item<C>>
  subscribe(listener: () => void): () => void
  /** Items that no schema knows, by id, with the first thing wrong. */
  unreadable(): ReadonlyMap<string, string>
}

const stores = new WeakMap<Y.Doc, Map<string, unknown>>()

/** The one store of a collection in a document; only changed items are parsed again. */
export function itemStore<C extends Collection>(doc: Y.Doc, c: C): ItemStore<C> {
  const ofDoc = stores.get(doc) ?? new Map<string, unknown>()
  stores.set(doc, ofDoc)
  const known = ofDoc.get(c.root)
  if (known !== undefined) return asStore<C>(known)
  const made = makeItemStore(doc, c)
  ofDoc.set(c.root, made)
  return made
}

/** A document has one collection per root, so what is kept under the root is this collection's store. */
function asStore<C extends Collection>(known: unknown): ItemStore<C> {
  return known as ItemStore<C>
}

function makeItemStore<C extends Collection>(doc: Y.Doc, c: C): ItemStore<C> {
  const root = rootOf(doc, c)
  const unreadable = new Map<string, string>()
  const listeners = new Set<() => void>()
  let items: Map<string, Item<C>> = new Map()

  const refresh = (ids: Iterable<string>) => {
    const next = new Map(items)
    for (const id of ids) {
      const raw = root.get(id)
      const read = raw === undefined ? undefined : readItem(c, id, raw)
      unreadable.delete(id)
      if (read?.kind === 'alive') next.set(id, read.item)
      else next.delete(id)
      if (read?.kind === 'unreadable') unreadable.set(id, read.issue)
    }
    items = next
    for (const listener of listeners) listener()
  }

  refresh(root.keys())
  root.observeDeep((events) => {
    const changed = new Set<string>()
    for (const event of events) {
      const id = event.path[0]
      if (typeof id === 'string') changed.add(id)
      else if (event instanceof Y.YMapEvent) for (const key of event.keysChanged) changed.add(String(key))
    }
    refresh(changed)
  })

  return {
    get: () => items,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    unreadable: () => unreadable,
  }
}
