import * as Y from 'yjs'
import { LOOSE } from '#shared/domain/board/schema.ts'
import { lookIdSchema, shotIdSchema, uploadIdSchema } from '#shared/ids.ts'
import {
  LOCAL_ORIGIN,
  addMember,
  patchItem,
  putItems,
  removeItems,
  removeMember,
  rootOf,
} from '#shared/realtime/collection.ts'
import { frames, shots } from '#shared/realtime/documents.ts'
import { appendKey, keysToPlace } from '#shared/realtime/order-keys.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { placeShot } from '#src/features/board/write-shots.ts'
import { listNow, moveShot, placeAtEnd, writeSequence } from '#src/features/order/write-order.ts'
import { createUndo } from '#src/realtime/undo-manager.ts'

// Random histories of a board that several people order, each deed checked against plain arrays as it is done.

export const LISTS = ['day one', 'day two', LOOSE] as const

const DEED_KINDS = [
  ...['add', 'add', 'add', 'move', 'move', 'move', 'move', 'sort', 'remove', 'remove'],
  ...['undo', 'undo', 'undo', 'redo', 'redo', 'hang', 'shift', 'take down', 'look', 'no look'],
  ...['exchange', 'exchange', 'exchange', 'leave', 'return', 'return'],
] as const

/** One thing that happens; `one` and `two` in [0, 1) pick what it happens to from what there is at that moment. */
export type Deed = {
  /** Index of the person. */
  who: number
  kind: (typeof DEED_KINDS)[number]
  one: number
  two: number
  /** Keys fall together as if two people had the same luck. */
  isUnlucky: boolean
  /** Belongs to the undo step before it, like a change made within the same half second. */
  joins: boolean
}

/** A deed from five numbers in [0, 1), so that whoever draws numbers can draw deeds. */
export function deedOf(who: number, kind: number, one: number, two: number, chance: number): Deed {
  const pickedKind = DEED_KINDS[Math.floor(kind * DEED_KINDS.length)] ?? 'move'
  return { who: Math.floor(who * 3), kind: pickedKind, one, two, isUnlucky: chance < 0.4, joins: chance > 0.85 }
}

export function randomDeeds(seed: number, count: number): Deed[] {
  const random = seededRandom(seed)
  return Array.from({ length: count }, () => deedOf(random(), random(), random(), random(), random()))
}

/** What people see: shots by list in their order, the looks of each, and frames with their boxes. */
export type View = {
  lists: Record<string, string[]>
  looks: Record<string, string[]>
  frames: Record<string, string>
}

const REMOVED_AT_MS = Date.UTC(2026, 9, 14)

export const EMPTY_VIEW: View = { lists: { 'day one': [], 'day two': [], loose: [] }, looks: {}, frames: {} }

type Act =
  | { kind: 'add'; id: string; list: string; at: number }
  /** `at` counts without the shot itself. */
  | { kind: 'move'; id: string; list: string; at: number }
  | { kind: 'sort'; list: string; ids: string[] }
  | { kind: 'remove'; id: string }
  | { kind: 'hang'; id: string; box: [number, number, number, number] }
  | { kind: 'shift'; id: string; box: [number, number, number, number] }
  | { kind: 'take down'; id: string }
  | { kind: 'look'; id: string; lookId: string }
  | { kind: 'no look'; id: string; lookId: string }

const uuid = (kind: number, n: number) => `00000000-0000-4000-8000-${String(kind * 1e9 + n).padStart(12, '0')}`

function pick<T>(list: readonly T[], share: number): T | undefined {
  return list[Math.floor(share * list.length)]
}

/** What a deed means where this is seen; undefined when there is nothing it could be done to. */
export function actOf(view: View, { kind, one, two }: Deed, n: number): Act | undefined {
  const list = pick(LISTS, (one * 7) % 1) ?? LOOSE
  const inList = view.lists[list] ?? []
  const shotId = pick(Object.values(view.lists).flat(), two)
  const frameId = pick(Object.keys(view.frames).sort(), two)
  const box: [number, number, number, number] = [Math.floor(one * 50), Math.floor(two * 50), 200, 150]
  switch (kind) {
    case 'add':
      return { kind, id: uuid(1, n), list, at: Math.floor(two * (inList.length + 1)) }
    case 'move':
      if (shotId === undefined) return undefined
      return { kind, id: shotId, list, at: Math.floor(one * inList.filter((id) => id !== shotId).length + one) }
    case 'sort': {
      const random = seededRandom(Math.floor(one * 2 ** 32))
      const ranked = inList.map((id) => ({ id, rank: random() })).sort((a, b) => a.rank - b.rank)
      return inList.length < 2 ? undefined : { kind, list, ids: ranked.map(({ id }) => id) }
    }
    case 'remove':
      return shotId === undefined ? undefined : { kind, id: shotId }
    case 'hang':
      return { kind, id: uuid(2, n), box }
    case 'shift':
      return frameId === undefined ? undefined : { kind, id: frameId, box }
    case 'take down':
      return frameId === undefined ? undefined : { kind, id: frameId }
    case 'look':
    case 'no look':
      return shotId === undefined ? undefined : { kind, id: shotId, lookId: uuid(3, Math.floor(one * 4)) }
    default:
      return undefined
  }
}

/** The same on plain arrays and objects. */
export function viewAfter(before: View, act: Act): View {
  const view = structuredClone(before)
  const without = (id: string) => {
    for (const list of LISTS) view.lists[list] = (view.lists[list] ?? []).filter((other) => other !== id)
  }
  switch (act.kind) {
    case 'add':
      view.lists[act.list]?.splice(act.at, 0, act.id)
      view.looks[act.id] = []
      break
    case 'move':
      without(act.id)
      view.lists[act.list]?.splice(act.at, 0, act.id)
      break
    case 'sort':
      view.lists[act.list] = act.ids
      break
    case 'remove':
      without(act.id)
      delete view.looks[act.id]
      break
    case 'hang':
    case 'shift':
      view.frames[act.id] = JSON.stringify(act.box)
      break
    case 'take down':
      delete view.frames[act.id]
      break
    case 'look':
    case 'no look': {
      const looks = view.looks[act.id] ?? []
      const has = looks.includes(act.lookId)
      if (act.kind === 'look') view.looks[act.id] = has ? looks : [...looks, act.lookId]
      else view.looks[act.id] = looks.filter((id) => id !== act.lookId)
    }
  }
  return view
}

/** Reads what people see, without the program's own reader. */
export function viewOf(doc: Y.Doc): View {
  const view = structuredClone(EMPTY_VIEW)
  const placed: { id: string; list: string; key: string }[] = []
  const below = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0)
  for (const [id, map] of mapsOf(doc, 'shots')) {
    if (typeof map.get('deleted') === 'number') continue
    const [list, key] = map.get('place') as [string, string]
    placed.push({ id, list, key })
    const looks = [...map.entries()].flatMap(([name, rank]) =>
      name.startsWith('look:') && typeof rank === 'string' ? [{ id: name.slice('look:'.length), rank }] : [],
    )
    looks.sort((a, b) => below(a.rank, b.rank) || below(a.id, b.id))
    view.looks[id] = looks.map((look) => look.id)
  }
  placed.sort((a, b) => below(a.key, b.key) || below(a.id, b.id))
  for (const { id, list } of placed) (view.lists[list] ??= []).push(id)
  for (const [id, map] of mapsOf(doc, 'frames'))
    if (typeof map.get('deleted') !== 'number') view.frames[id] = JSON.stringify(map.get('box'))
  return view
}

function mapsOf(doc: Y.Doc, root: string): [string, Y.Map<unknown>][] {
  return [...doc.getMap(root).entries()].filter((entry): entry is [string, Y.Map<unknown>] => entry[1] instanceof Y.Map)
}

const CHANGING = /^(place|deleted|box|look:.*)$/

/** `root/id/key` → value, as JSON. */
type Fields = Map<string, string>

function fieldsOf(doc: Y.Doc): Fields {
  const fields: Fields = new Map()
  for (const root of ['shots', 'frames'])
    for (const [id, map] of mapsOf(doc, root))
      for (const [key, value] of map.entries())
        if (CHANGING.test(key)) fields.set(`${root}/${id}/${key}`, JSON.stringify(value))
  return fields
}

/** Fields that differ, with what they were. A new item is born deleted, with all else that it has: no step undoes that. */
function changesOf(before: Fields, after: Fields): Map<string, string | undefined> {
  const changes = new Map<string, string | undefined>()
  for (const name of new Set([...before.keys(), ...after.keys()])) {
    const item = name.slice(0, name.lastIndexOf('/'))
    const isNew = !before.has(`${item}/deleted`)
    if (isNew && !name.endsWith('/deleted')) continue
    const was = isNew ? '1' : before.get(name)
    if (was !== after.get(name)) changes.set(name, was)
  }
  return changes
}

/** What one undo step replaced, field by field: more than one value when somebody else wrote while it went on. */
type Step = Map<string, { replaced: (string | undefined)[]; wrote: string | undefined }>

function extend(step: Step, before: Fields, after: Fields, hasHeard: boolean): Step {
  for (const [name, was] of changesOf(before, after)) {
    const field = step.get(name)
    const isOwn = field?.wrote === was && !hasHeard
    const replaced = field && isOwn ? field.replaced : [...(field?.replaced ?? []), was]
    step.set(name, { replaced, wrote: after.get(name) })
  }
  return step
}

/** A person with the document as they have it. Whatever they do that plain arrays would not is thrown. */
export class Person {
  readonly doc: Y.Doc
  readonly undo: Y.UndoManager
  isAway = false
  readonly #steps = new WeakMap<object, Step>()
  #seen: Fields = new Map()
  #isPopping = false
  /** Whether something came from others since the last deed. */
  #hasHeard = false
  #added: object | null = null
  #popped: object | null = null

  /** @param state what a device has kept of the document */
  constructor(clientId: number, state?: Uint8Array) {
    this.doc = new Y.Doc()
    this.doc.clientID = clientId
    if (state) Y.applyUpdate(this.doc, state, 'remote')
    this.undo = createUndo(this.doc, [rootOf(this.doc, shots), rootOf(this.doc, frames)])
    this.doc.on('update', (_update: Uint8Array, _origin: unknown, _doc: Y.Doc, { local }: Y.Transaction) => {
      if (!local) this.#hasHeard = true
    })
    const remember = ({ stackItem }: { stackItem: object }) => {
      if (this.#isPopping) {
        this.#added = stackItem
        return
      }
      const now = fieldsOf(this.doc)
      this.#steps.set(stackItem, extend(this.#steps.get(stackItem) ?? new Map(), this.#seen, now, this.#hasHeard))
      this.#seen = now
    }
    this.undo.on('stack-item-added', remember)
    this.undo.on('stack-item-updated', remember)
    this.undo.on('stack-item-popped', ({ stackItem }) => {
      this.#popped = stackItem
    })
  }

  /** Does a deed and checks it. Returns whether it wrote anything. */
  do(deed: Deed, n: number): boolean {
    if (deed.kind === 'undo' || deed.kind === 'redo') return this.#goBack(deed.kind)
    const before = viewOf(this.doc)
    const act = actOf(before, deed, n)
    if (!act) return false
    if (!deed.joins) this.undo.stopCapturing()
    const fields = (this.#seen = fieldsOf(this.doc))
    withChance(deed.isUnlucky ? () => 0.3 : seededRandom(n), () => perform(this.doc, act, deed.two < 0.5))
    this.#hasHeard = false
    demandSame(viewOf(this.doc), viewAfter(before, act), `${this.doc.clientID} did ${JSON.stringify(act)}`)
    if (act.kind === 'move' || act.kind === 'add') demandOwnKey(this.doc, act.id, act.list)
    return changesOf(fields, fieldsOf(this.doc)).size > 0
  }

  #pop(kind: 'undo' | 'redo'): void {
    this.#added = this.#popped = null
    this.#isPopping = true
    this.undo[kind]()
    this.#isPopping = false
  }

  /** Nothing may change but what the step holds, and that only to what it was before the step. */
  #goBack(kind: 'undo' | 'redo'): boolean {
    const before = fieldsOf(this.doc)
    this.#pop(kind)
    const after = fieldsOf(this.doc)
    const step = this.#popped && this.#steps.get(this.#popped)
    const changes = changesOf(before, after)
    for (const [name, was] of changes) {
      const replaced = step?.get(name)?.replaced ?? []
      if (!replaced.includes(after.get(name)))
        throw new Error(`${kind} made ${name} ${after.get(name)}: was ${was}, before the step ${replaced.join()}`)
    }
    if (this.#added) this.#steps.set(this.#added, extend(new Map(), before, after, false))
    return changes.size > 0
  }
}

/** The program's own random numbers for a while. */
function withChance(random: () => number, work: () => void): void {
  const own = Math.random
  Math.random = random
  try {
    work()
  } finally {
    Math.random = own
  }
}

/** Does it the way the screens do. `isOther` takes another of the ways there are. */
function perform(doc: Y.Doc, act: Act, isOther: boolean): void {
  switch (act.kind) {
    case 'add':
      return addShot(doc, act.list, act.id, act.at)
    case 'move': {
      const list = listNow(doc, act.list)
      const others = list.filter((shot) => shot.id !== act.id)
      const isHere = others.length < list.length
      const after = others[act.at - 1]?.id ?? null
      if (isOther && act.at === others.length) placeAtEnd(doc, act.list, others, shotIdSchema.parse(act.id))
      else if (isOther && isHere) moveShot(doc, act.list, list, act.id, act.at)
      else placeShot(doc, { id: act.list, shots: list }, act.id, after)
      return
    }
    case 'sort':
      return writeSequence(
        doc,
        act.list,
        listNow(doc, act.list),
        act.ids.map((id) => shotIdSchema.parse(id)),
      )
    case 'remove':
      return removeItems(doc, shots, [act.id], REMOVED_AT_MS)
    case 'hang': {
      const picture = {
        uploadId: uploadIdSchema.parse(uuid(4, 1)),
        state: 'stored' as const,
        widthPx: 300,
        heightPx: 200,
      }
      return putItems(doc, frames, [{ id: act.id, box: act.box, picture }], Math.random)
    }
    case 'shift':
      patchItem(doc, frames, act.id, { box: act.box })
      return
    case 'take down':
      return removeItems(doc, frames, [act.id], REMOVED_AT_MS)
    case 'look':
      return addMember(doc, shots, act.id, 'lookIds', lookIdSchema.parse(act.lookId), Math.random)
    case 'no look':
      return removeMember(doc, shots, act.id, 'lookIds', act.lookId)
  }
}

/** At the end like a new shot, otherwise behind another like a copied one; the screens choose the id themselves. */
function addShot(doc: Y.Doc, listId: string, id: string, at: number): void {
  const placed = listNow(doc, listId).map((shot) => ({ id: String(shot.id), key: shot.place[1] }))
  const ranks = placed.map(({ key }) => key)
  const isLast = at === placed.length
  const after = placed[at - 1]?.id ?? null
  const keys = isLast ? new Map([[id, appendKey(ranks, Math.random)]]) : keysToPlace(placed, id, after, Math.random)
  doc.transact(() => {
    for (const [other, key] of keys) if (other !== id) patchItem(doc, shots, other, { place: [listId, key] })
  }, LOCAL_ORIGIN)
  putItems(doc, shots, [{ id, title: `Shot ${id.slice(-4)}`, place: [listId, keys.get(id) ?? 'a0'] }], Math.random)
}

function demandSame(got: View, wanted: View, what: string): void {
  const [a, b] = [canonical(got), canonical(wanted)]
  if (a !== b) throw new Error(`${what}\ngot    ${a}\nwanted ${b}`)
}

export function canonical({ lists, looks, frames: hung }: View): string {
  const sorted = <T>(record: Record<string, T>) => Object.entries(record).sort(([a], [b]) => (a < b ? -1 : 1))
  return JSON.stringify([sorted(lists), sorted(looks), sorted(hung)])
}

/** What was just placed stands by its key alone, not by how ties are broken. */
function demandOwnKey(doc: Y.Doc, id: string, list: string): void {
  const keys = (viewOf(doc).lists[list] ?? []).map((other) => {
    const place = mapsOf(doc, 'shots')
      .find(([shotId]) => shotId === other)?.[1]
      .get('place') as [string, string]
    return { id: other, key: place[1] }
  })
  const at = keys.findIndex((other) => other.id === id)
  const [before, own, after] = [keys[at - 1]?.key, keys[at]?.key ?? '', keys[at + 1]?.key]
  if ((before !== undefined && before >= own) || (after !== undefined && own >= after))
    throw new Error(`${id} got the key ${own} between ${before} and ${after}`)
}

/** How many shots hold the key of another one in their list. */
export function tiesIn(doc: Y.Doc): number {
  const alive = new Set(Object.values(viewOf(doc).lists).flat())
  const places = mapsOf(doc, 'shots').flatMap(([id, map]) => (alive.has(id) ? [JSON.stringify(map.get('place'))] : []))
  return places.length - new Set(places).size
}

/** Gives `to` what `from` has. Every field must then be what one of the two held. */
export function hand(from: Person, to: Person): void {
  const [theirs, own] = [fieldsOf(from.doc), fieldsOf(to.doc)]
  Y.applyUpdate(to.doc, Y.encodeStateAsUpdate(from.doc, Y.encodeStateVector(to.doc)), 'remote')
  const now = fieldsOf(to.doc)
  for (const name of new Set([...theirs.keys(), ...own.keys(), ...now.keys()])) {
    const value = now.get(name)
    // A field may be absent (a look that was never added, or whose adding was undone), but not for want of the item.
    const isKnownTo = (fields: Fields) => fields.has(`${name.slice(0, name.lastIndexOf('/'))}/deleted`)
    if (![theirs, own].some((fields) => isKnownTo(fields) && fields.get(name) === value))
      throw new Error(`${name} became ${value}; it was ${theirs.get(name)} there and ${own.get(name)} here`)
  }
}

/** Everything everybody has goes to everybody. */
export function settle(people: readonly Person[]): void {
  for (let round = 0; round < 2; round++)
    for (const from of people) for (const to of people) if (from !== to) hand(from, to)
}

/** Every living shot exactly once, and the same for everybody. */
export function demandOneOrder(docs: readonly Y.Doc[]): void {
  const [first, ...others] = docs.map(viewOf)
  if (!first) return
  for (const other of others) demandSame(other, first, 'after everything was exchanged')
  const ids = Object.values(first.lists).flat()
  if (new Set(ids).size !== ids.length) throw new Error('a shot stands twice')
  if (Object.keys(first.lists).some((list) => !LISTS.some((known) => known === list)))
    throw new Error('a shot stands in a list nobody chose')
}
