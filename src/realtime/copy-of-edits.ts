import * as Y from 'yjs'
import { type Collection, type ReadItem, readItem, rootOf } from '#shared/realtime/collection.ts'
import { COLLECTIONS, type DocumentKind } from '#shared/realtime/documents.ts'
import type { LeftBehind } from './left-behind.ts'

/** An item as it is on this device and in the shoot; null where it is not there (any more). */
type CopiedItem = { id: string; name: string; here: unknown; inTheShoot?: unknown }

export type CopyOfEdits = {
  what: string
  shoot: { id: string; title: string }
  savedAt: string
  documents: {
    document: string
    changesNotInTheShoot: number
    since: string
    /** Whether only what differs from the shoot is listed, or everything this device has. */
    lists: 'what differs from the shoot' | 'everything on this device'
    collections: Record<string, CopiedItem[]>
  }[]
}

type NamedDocument = { kind: DocumentKind; doc: Y.Doc }

export type Copied = {
  left: LeftBehind
  /** As this device has it. */
  mine: Y.Doc
  /** As the server has it; null when that is not known. */
  theirs: Y.Doc | null
}

/**
 * What could not be sent, for a person to read and to write down again: a file of plain words and numbers.
 *
 * @param known documents in which the names of things are looked up that are themselves without one (the plan of a shot)
 */
export function copyOfEdits(
  shoot: { id: string; title: string },
  documents: readonly Copied[],
  known: readonly NamedDocument[],
  nowMs: number,
): CopyOfEdits {
  const names = namesIn([...known, ...documents.map(({ left, mine }) => ({ kind: left.kind, doc: mine }))])
  return {
    what: 'Changes that were made on this device and are not in the shoot',
    shoot: { id: shoot.id, title: shoot.title },
    savedAt: new Date(nowMs).toISOString(),
    documents: documents.map(({ left, mine, theirs }) => {
      const all: Record<string, Collection> = COLLECTIONS[left.kind]
      const collections = Object.entries(all)
        .map(([name, c]) => [name, copiedItems(c, mine, theirs, names)] as const)
        .filter(([, items]) => items.length > 0)
      return {
        document: left.kind,
        changesNotInTheShoot: left.edits,
        since: new Date(left.sinceMs).toISOString(),
        lists: theirs ? 'what differs from the shoot' : 'everything on this device',
        collections: Object.fromEntries(collections),
      }
    }),
  }
}

type Names = ReadonlyMap<string, string>

function namesIn(documents: readonly NamedDocument[]): Names {
  const names = new Map<string, string>()
  for (const { kind, doc } of documents) {
    const all: readonly Collection[] = Object.values(COLLECTIONS[kind])
    for (const c of all)
      for (const [id, raw] of rootOf(doc, c)) {
        const name = nameOf(valueOf(readItem(c, id, raw), raw))
        if (name !== '') names.set(id, name)
      }
  }
  return names
}

function copiedItems(c: Collection, mine: Y.Doc, theirs: Y.Doc | null, names: Names): CopiedItem[] {
  const there = theirs && rootOf(theirs, c)
  return [...rootOf(mine, c)].flatMap(([id, raw]): CopiedItem[] => {
    const here = valueOf(readItem(c, id, raw), raw)
    if (!there) return here === null ? [] : [{ id, name: names.get(id) ?? '', here }]
    const other = there.get(id)
    const inTheShoot = other === undefined ? null : valueOf(readItem(c, id, other), other)
    if (JSON.stringify(here) === JSON.stringify(inTheShoot)) return []
    return [{ id, name: nameOf(here ?? inTheShoot) || (names.get(id) ?? ''), here, inTheShoot }]
  })
}

/** An item's fields; null once deleted; what no schema knows as it stands. */
function valueOf(read: ReadItem<Collection>, raw: unknown): unknown {
  switch (read.kind) {
    case 'alive':
      return read.item
    case 'deleted':
      return null
    case 'unreadable':
      return raw instanceof Y.AbstractType ? (raw.toJSON() as unknown) : raw
  }
}

const NAMING_FIELDS = ['name', 'title', 'character', 'text', 'purpose']

/** What people call an item. */
function nameOf(item: unknown): string {
  if (typeof item !== 'object' || item === null) return ''
  const fields = new Map(Object.entries(item))
  for (const field of NAMING_FIELDS) {
    const value: unknown = fields.get(field)
    if (typeof value === 'string' && value.trim() !== '') return value
  }
  return ''
}
