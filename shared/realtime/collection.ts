import * as Y from 'yjs'
import type { z } from 'zod'
import { appendKey, keyBetween } from './order-keys.ts'

/**
 * A root map of a document: id → Y.Map whose keys are the fields of `schema` (without `id`).
 *
 * A field named in `members` is a set of ids kept as one key per member (`<prefix><member id>` → fractional key, or
 * null once taken out), so that two people adding at the same time both keep theirs; it reads as an ordered array.
 * Deletion is `deleted: time in ms`; `false` or absent is alive.
 */
export type Collection<Schema extends z.ZodObject = z.ZodObject> = {
  readonly root: string
  readonly schema: Schema
  readonly members: Readonly<Record<string, string>>
}

export type Item<C extends Collection> = z.output<C['schema']>
type Input<C extends Collection> = z.input<C['schema']>
/** A change of some fields; members change through `addMember` and `removeMember`. */
export type Patch<C extends Collection> = Partial<Omit<Input<C>, 'id'>>

/** What one person's own changes carry, so that undo takes back only these. */
export const LOCAL_ORIGIN = Object.freeze({ kind: 'local' as const })
/** The birth of an item: not undone (that would delete what others put into it); its undo sets `deleted`. */
export const BIRTH_ORIGIN = Object.freeze({ kind: 'birth' as const })

export function collection<Schema extends z.ZodObject>(
  root: string,
  schema: Schema,
  members: Readonly<Record<string, string>> = {},
): Collection<Schema> {
  return { root, schema, members }
}

export type ReadItem<C extends Collection> =
  { kind: 'alive'; item: Item<C> } | { kind: 'deleted'; atMs: number } | { kind: 'unreadable'; issue: string }

/** The document's map of a collection. */
export function rootOf(doc: Y.Doc, c: Collection): Y.Map<unknown> {
  return doc.getMap(c.root)
}

/** Reads one item leniently: what no schema knows is reported, never thrown. */
export function readItem<C extends Collection>(c: C, id: string, raw: unknown): ReadItem<C> {
  if (!(raw instanceof Y.Map)) return { kind: 'unreadable', issue: 'not a map' }
  const fields: Record<string, unknown> = {}
  const memberKeys = new Map<string, [key: string, id: string][]>()
  const prefixes = Object.entries(c.members)
  for (const [key, value] of raw.entries()) {
    const member = prefixes.find(([, prefix]) => key.startsWith(prefix))
    if (!member) fields[key] = value
    else if (typeof value === 'string') {
      const list = memberKeys.get(member[0]) ?? []
      list.push([value, key.slice(member[1].length)])
      memberKeys.set(member[0], list)
    }
  }
  if (typeof fields['deleted'] === 'number') return { kind: 'deleted', atMs: fields['deleted'] }
  for (const [field] of prefixes) {
    const list = memberKeys.get(field) ?? []
    list.sort(([a, x], [b, y]) => (a < b ? -1 : a > b ? 1 : x < y ? -1 : 1))
    fields[field] = list.map(([, memberId]) => memberId)
  }
  const parsed = c.schema.safeParse({ ...fields, id })
  if (parsed.success) return { kind: 'alive', item: asItem<C>(parsed.data) }
  const issue = parsed.error.issues[0]
  return { kind: 'unreadable', issue: `${issue?.path.join('.') ?? ''}: ${issue?.message ?? 'does not parse'}` }
}

/** zod's inference through a generic collection is opaque to the compiler; the schema has just parsed the value. */
function asItem<C extends Collection>(parsed: unknown): Item<C> {
  return parsed as Item<C>
}

export type ReadAll<C extends Collection> = {
  items: Map<string, Item<C>>
  unreadable: { id: string; issue: string }[]
}

/** Every living item by id; what does not parse is skipped and reported. */
export function readAll<C extends Collection>(doc: Y.Doc, c: C): ReadAll<C> {
  const items = new Map<string, Item<C>>()
  const unreadable: { id: string; issue: string }[] = []
  for (const [id, raw] of rootOf(doc, c).entries()) {
    const read = readItem(c, id, raw)
    if (read.kind === 'alive') items.set(id, read.item)
    else if (read.kind === 'unreadable') unreadable.push({ id, issue: read.issue })
  }
  return { items, unreadable }
}

/**
 * Puts new items. The birth is a transaction of its own with `deleted` set, their appearance a second, undoable one.
 *
 * @throws when an item does not fit the schema (a programming error: screens parse before they write).
 */
export function putItems<C extends Collection>(
  doc: Y.Doc,
  c: C,
  items: readonly Input<C>[],
  random: () => number,
  origin: unknown = LOCAL_ORIGIN,
): void {
  const root = rootOf(doc, c)
  const parsed = items.map((item) => c.schema.parse(item))
  doc.transact(() => {
    for (const item of parsed) {
      const map = new Y.Map<unknown>()
      for (const [key, value] of Object.entries(item)) {
        if (key === 'id' || value === undefined) continue
        const prefix = c.members[key]
        if (prefix === undefined) map.set(key, value)
        else {
          let last: string | null = null
          for (const memberId of Array.isArray(value) ? value : []) {
            last = keyBetween(last, null, random)
            map.set(prefix + String(memberId), last)
          }
        }
      }
      map.set('deleted', 1)
      root.set(String(item['id']), map)
    }
  }, BIRTH_ORIGIN)
  doc.transact(() => {
    for (const item of parsed) mapOf(root, String(item['id']))?.set('deleted', false)
  }, origin)
}

function mapOf(root: Y.Map<unknown>, id: string): Y.Map<unknown> | undefined {
  const map = root.get(id)
  return map instanceof Y.Map ? map : undefined
}

/** Changes fields of an item; unknown ids and unchanged values are left alone. Returns whether anything was written. */
export function patchItem<C extends Collection>(
  doc: Y.Doc,
  c: C,
  id: string,
  patch: Patch<C>,
  origin: unknown = LOCAL_ORIGIN,
): boolean {
  const map = mapOf(rootOf(doc, c), id)
  if (!map) return false
  const checked = c.schema.partial().parse(patch)
  const changes = Object.entries(checked).filter(
    ([key, value]) =>
      key in patch &&
      !(key in c.members) &&
      value !== undefined &&
      JSON.stringify(map.get(key)) !== JSON.stringify(value),
  )
  if (changes.length === 0) return false
  doc.transact(() => {
    for (const [key, value] of changes) map.set(key, value)
  }, origin)
  return true
}

/** Marks items as deleted; the server purges them after 30 days. */
export function removeItems(
  doc: Y.Doc,
  c: Collection,
  ids: readonly string[],
  nowMs: number,
  origin: unknown = LOCAL_ORIGIN,
): void {
  const root = rootOf(doc, c)
  doc.transact(() => {
    for (const id of ids) mapOf(root, id)?.set('deleted', nowMs)
  }, origin)
}

/** Adds a member at the end of a member field (or leaves it where it is when already there). */
export function addMember(
  doc: Y.Doc,
  c: Collection,
  id: string,
  field: string,
  memberId: string,
  random: () => number,
  origin: unknown = LOCAL_ORIGIN,
): void {
  const map = mapOf(rootOf(doc, c), id)
  const prefix = c.members[field]
  if (!map || prefix === undefined || typeof map.get(prefix + memberId) === 'string') return
  const keys = [...map.entries()].flatMap(([k, v]) => (k.startsWith(prefix) && typeof v === 'string' ? [v] : []))
  doc.transact(() => map.set(prefix + memberId, appendKey(keys, random)), origin)
}

/** Puts the members of a field into this order; ids that are no members are ignored. */
export function orderMembers(
  doc: Y.Doc,
  c: Collection,
  id: string,
  field: string,
  memberIds: readonly string[],
  random: () => number,
  origin: unknown = LOCAL_ORIGIN,
): void {
  const map = mapOf(rootOf(doc, c), id)
  const prefix = c.members[field]
  if (!map || prefix === undefined) return
  doc.transact(() => {
    let last: string | null = null
    for (const memberId of memberIds) {
      if (typeof map.get(prefix + memberId) !== 'string') continue
      last = keyBetween(last, null, random)
      map.set(prefix + memberId, last)
    }
  }, origin)
}

/** Takes a member out of a member field. */
export function removeMember(
  doc: Y.Doc,
  c: Collection,
  id: string,
  field: string,
  memberId: string,
  origin: unknown = LOCAL_ORIGIN,
): void {
  const map = mapOf(rootOf(doc, c), id)
  const prefix = c.members[field]
  if (!map || prefix === undefined || typeof map.get(prefix + memberId) !== 'string') return
  doc.transact(() => map.set(prefix + memberId, null), origin)
}

/** Writes a field of an item that may not exist yet (the plan of a shot, the day's record of a shot). */
export function upsertItem<C extends Collection>(
  doc: Y.Doc,
  c: C,
  item: Input<C>,
  origin: unknown = LOCAL_ORIGIN,
): void {
  const parsed = c.schema.partial().parse(item)
  const id = String(parsed['id'])
  const root = rootOf(doc, c)
  doc.transact(() => {
    let map = mapOf(root, id)
    if (!map) {
      map = new Y.Map<unknown>()
      root.set(id, map)
    }
    for (const [key, value] of Object.entries(parsed)) {
      if (
        key !== 'id' &&
        key in item &&
        value !== undefined &&
        JSON.stringify(map.get(key)) !== JSON.stringify(value)
      ) {
        map.set(key, value)
      }
    }
    if (typeof map.get('deleted') === 'number') map.set('deleted', false)
  }, origin)
}
