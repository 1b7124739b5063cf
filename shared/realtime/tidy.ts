import * as Y from 'yjs'
import { type Collection, rootOf } from './collection.ts'
import { COLLECTIONS, type DocumentKind, lights, looks, setups, shots } from './documents.ts'
import { type Placed, byKey, keyBetween } from './order-keys.ts'

/**
 * Nothing of ours was deleted before this. A smaller `deleted` is the birth of an item that never appeared (see
 * `putItems`) or comes from a clock that was not set: it cannot be dated, so it stays.
 */
const EARLIEST_DELETION_MS = Date.UTC(2020, 0, 1)

/**
 * Takes out, for good, items of the document's collections that were deleted before `beforeMs` (ms since 1970 UTC).
 * What is in no collection, or is no item, stays. Returns how many went.
 */
export function purgeDeleted(doc: Y.Doc, kind: DocumentKind, beforeMs: number): number {
  let purged = 0
  doc.transact(() => {
    for (const c of collectionsOf(kind)) {
      const root = rootOf(doc, c)
      for (const [id, item] of itemsOf(doc, c)) {
        const atMs = item.get('deleted')
        if (typeof atMs !== 'number' || atMs < EARLIEST_DELETION_MS || atMs >= beforeMs) continue
        root.delete(id)
        purged++
      }
    }
  })
  return purged
}

/**
 * Gives every list of the document with an order key of more than `longest` characters new, short keys in the same
 * order, deleted items included. Returns how many keys were written.
 *
 * Only for a document that nobody has open: who moves something at the same time meets half of the old keys and half
 * of the new ones.
 */
export function shortenKeys(doc: Y.Doc, kind: DocumentKind, longest: number, random: () => number): number {
  let written = 0
  doc.transact(() => {
    for (const list of [...placedLists(doc, kind), ...memberLists(doc, kind)]) {
      if (list.every(({ key }) => key.length <= longest)) continue
      let last: string | null = null
      for (const entry of list.sort(byKey)) {
        last = keyBetween(last, null, random)
        entry.write(last)
        written++
      }
    }
  })
  return written
}

/** Something in an ordered list, and how its key is written. */
type Entry = Placed & { write: (key: string) => void }

/** Where an item stands: in which list, with which key; undefined when it does not say so in our way. */
type Position = { list: string; key: string; write: (key: string) => void }
type Ordered = { collection: Collection; positionOf: (item: Y.Map<unknown>) => Position | undefined }

/** Items that are ordered among themselves. Members are found by their prefixes instead. */
const ORDERED: Readonly<Record<DocumentKind, readonly Ordered[]>> = {
  board: [{ collection: shots, positionOf: placeOf }],
  plan: [],
  looks: [{ collection: looks, positionOf: rankWithin('sitterId') }],
  lighting: [
    { collection: setups, positionOf: rankWithin(null) },
    { collection: lights, positionOf: rankWithin('setupId') },
  ],
  day: [],
}

function placeOf(item: Y.Map<unknown>): Position | undefined {
  const place = item.get('place')
  if (!Array.isArray(place) || place.length !== 2) return undefined
  const [list, key] = place as unknown[]
  if (typeof list !== 'string' || typeof key !== 'string') return undefined
  return { list, key, write: (newKey) => item.set('place', [list, newKey]) }
}

/** By `rank`, which is `a0` where it was never set, among the items with the same value in the field `within`. */
function rankWithin(within: string | null): Ordered['positionOf'] {
  return (item) => {
    const list = within === null ? '' : item.get(within)
    const key = item.get('rank') ?? 'a0'
    if (typeof list !== 'string' || typeof key !== 'string') return undefined
    return { list, key, write: (newKey) => item.set('rank', newKey) }
  }
}

function placedLists(doc: Y.Doc, kind: DocumentKind): Entry[][] {
  return ORDERED[kind].flatMap(({ collection, positionOf }) => {
    const lists = new Map<string, Entry[]>()
    for (const [id, item] of itemsOf(doc, collection)) {
      const position = positionOf(item)
      if (!position) continue
      const { list, key, write } = position
      const entries = lists.get(list) ?? []
      lists.set(list, entries)
      entries.push({ id, key, write })
    }
    return [...lists.values()]
  })
}

function memberLists(doc: Y.Doc, kind: DocumentKind): Entry[][] {
  return collectionsOf(kind).flatMap((c) => {
    const prefixes = Object.values(c.members)
    return itemsOf(doc, c).flatMap(([, item]) =>
      prefixes.map((prefix) =>
        [...item.entries()].flatMap(([id, key]) =>
          id.startsWith(prefix) && typeof key === 'string'
            ? [{ id, key, write: (newKey: string) => item.set(id, newKey) }]
            : [],
        ),
      ),
    )
  })
}

function collectionsOf(kind: DocumentKind): readonly Collection[] {
  const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
  return collections
}

function itemsOf(doc: Y.Doc, c: Collection): [id: string, item: Y.Map<unknown>][] {
  const items: [string, Y.Map<unknown>][] = []
  for (const [id, raw] of rootOf(doc, c).entries()) if (raw instanceof Y.Map) items.push([id, raw])
  return items
}
