import * as Y from 'yjs'
import { type Picture, pictureSchema } from '#shared/domain/board/schema.ts'
import { BIRTH_ORIGIN, type Collection, LOCAL_ORIGIN, readAll, readItem, rootOf } from './collection.ts'
import { COLLECTIONS, type DocumentKind, frames } from './documents.ts'

/** One field of an item; undefined takes it out. */
type Change = { id: string; key: string; value: unknown }

/**
 * A document as it stood, from its full state. Whether a picture's file is on the server is not a matter of taste and
 * cannot be taken back: what `now` knows of a picture holds here too.
 */
export function openPast(kind: DocumentKind, state: Uint8Array, now: Y.Doc): Y.Doc {
  const past = new Y.Doc()
  Y.applyUpdate(past, state)
  if (kind === 'board') settlePictures(past, now)
  return past
}

function settlePictures(past: Y.Doc, now: Y.Doc): void {
  const known = new Map<string, { picture: Picture; frame: Y.Map<unknown> }>()
  for (const frame of rootOf(now, frames).values()) {
    const picture = frame instanceof Y.Map ? pictureSchema.safeParse(frame.get('picture')).data : undefined
    if (frame instanceof Y.Map && picture && picture.state !== 'waiting')
      known.set(picture.uploadId, { picture, frame })
  }
  past.transact(() => {
    for (const frame of rootOf(past, frames).values()) {
      if (!(frame instanceof Y.Map)) continue
      const then = pictureSchema.safeParse(frame.get('picture')).data
      const settled = then && known.get(then.uploadId)
      if (!settled || then.state === settled.picture.state) continue
      frame.set('picture', settled.picture)
      // Found when the picture arrived, and nobody had written anything else there.
      if (JSON.stringify(frame.get('palette') ?? []) === '[]') frame.set('palette', settled.frame.get('palette') ?? [])
      if ((frame.get('exposure') ?? '') === '') frame.set('exposure', settled.frame.get('exposure') ?? '')
    }
  })
}

/** Ids of items by what taking back does to them. */
export type Differences = {
  /** Living then, not now. */
  back: string[]
  /** Living now, not then. */
  gone: string[]
  /** Living both times, and not the same. */
  changed: string[]
}

/** What of a collection differs between a document and its past, by what people can read. */
export function differencesOf(doc: Y.Doc, past: Y.Doc, c: Collection): Differences {
  const now = readAll(doc, c).items
  const then = readAll(past, c).items
  const root = rootOf(doc, c)
  // Taking back leaves alone what is no item at all.
  const canLive = (id: string) => !root.has(id) || root.get(id) instanceof Y.Map
  return {
    back: [...then.keys()].filter((id) => !now.has(id) && canLive(id)),
    gone: [...now.keys()].filter((id) => !then.has(id)),
    changed: [...then].flatMap(([id, item]) => (now.has(id) && !isSame(now.get(id), item) ? [id] : [])),
  }
}

/**
 * Makes everything people can read in a document what it was in `past`, by a forward change of one's own that everybody
 * sees, that merges, and that one undo takes back. Deleted items live again, purged ones are born again (undo never
 * takes that away from others), later ones are deleted at `nowMs` (ms since 1970). Roots and fields that no schema
 * knows stay as they are. Returns whether anything was written.
 */
export function takeBack(doc: Y.Doc, kind: DocumentKind, past: Y.Doc, nowMs: number): boolean {
  const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
  const plans = collections.map((c) => ({ root: rootOf(doc, c), ...changesOf(doc, past, c, nowMs) }))
  if (plans.every(({ changes }) => changes.length === 0)) return false
  doc.transact(() => {
    for (const { root, births } of plans) for (const [id, map] of births) root.set(id, map)
  }, BIRTH_ORIGIN)
  doc.transact(() => {
    for (const { root, changes } of plans) for (const change of changes) write(root, change)
  }, LOCAL_ORIGIN)
  return true
}

function write(root: Y.Map<unknown>, { id, key, value }: Change): void {
  const map = root.get(id)
  if (!(map instanceof Y.Map)) return
  if (value === undefined) map.delete(key)
  else map.set(key, value)
}

function changesOf(
  doc: Y.Doc,
  past: Y.Doc,
  c: Collection,
  nowMs: number,
): { births: Map<string, Y.Map<unknown>>; changes: Change[] } {
  const root = rootOf(doc, c)
  const births = new Map<string, Y.Map<unknown>>()
  const changes: Change[] = []
  const pastRoot = rootOf(past, c)
  for (const [id, then] of pastRoot.entries()) {
    if (!(then instanceof Y.Map) || isDeleted(then)) continue
    const now = root.get(id)
    if (now instanceof Y.Map) changes.push(...fieldsToThen(c, id, new Map(then.entries()), now))
    else if (now === undefined) births.set(id, bornAgain(then))
    if (now === undefined || (now instanceof Y.Map && isDeleted(now)))
      changes.push({ id, key: 'deleted', value: false })
  }
  for (const [id, now] of root.entries()) {
    const then = pastRoot.get(id)
    const wasThere = then instanceof Y.Map && !isDeleted(then)
    if (wasThere || !(now instanceof Y.Map) || readItem(c, id, now).kind !== 'alive') continue
    changes.push({ id, key: 'deleted', value: nowMs })
    // An item that its first written field makes live again must not bring the others with it.
    if (c.schema.safeParse({ id }).success) changes.push(...fieldsToThen(c, id, new Map(), now))
  }
  return { births, changes }
}

/** The item as it was, not yet to be seen. */
function bornAgain(then: Y.Map<unknown>): Y.Map<unknown> {
  const map = then.clone()
  map.set('deleted', 1)
  return map
}

/** What makes an item's known fields and members those of then. */
function fieldsToThen(c: Collection, id: string, then: ReadonlyMap<string, unknown>, now: Y.Map<unknown>): Change[] {
  const prefixes = Object.values(c.members)
  const isMember = (key: string) => prefixes.some((prefix) => key.startsWith(prefix))
  const fields = Object.keys(c.schema.shape).filter((key) => key !== 'id' && !(key in c.members))
  const keys = new Set([...fields, ...[...then.keys(), ...now.keys()].filter(isMember)])
  return [...keys].flatMap((key): Change[] => {
    const value = then.get(key)
    return isSame(value, now.get(key)) ? [] : [{ id, key, value: copied(value) }]
  })
}

function copied(value: unknown): unknown {
  return value instanceof Y.AbstractType ? value.clone() : value
}

function isDeleted(map: Y.Map<unknown>): boolean {
  return typeof map.get('deleted') === 'number'
}

function isSame(a: unknown, b: unknown): boolean {
  return JSON.stringify(a) === JSON.stringify(b)
}
