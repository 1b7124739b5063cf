import { type KitItemId, kitItemIdSchema } from '#shared/ids.ts'
import {
  type Read,
  meteredCell,
  quoted,
  readMetered,
  readNumber,
  readOneOf,
  readPower,
  readYesOrNo,
  readZoom,
  zoomCell,
} from './kit-cells.ts'
import {
  type Column,
  FROM,
  KIND_HEAD,
  KIT_COLUMNS,
  NAME_HEAD,
  NOTE_HEAD,
  QUANTITY_HEAD,
  SOURCE,
} from './kit-columns.ts'
import {
  KIT_KINDS,
  type KitInput,
  type KitKind,
  PROVENANCES,
  type Stated,
  kitInputSchema,
  meteredSchema,
  statedSchema,
  unitNumbersSchema,
} from './schema.ts'

export type CsvCell = string | number

/** A row of a file with the number of the line it begins on, counted from 1. */
export type CsvLine = { line: number; cells: readonly string[] }

/** An item as the kit room holds it. */
export type StoredItem = KitInput & { id: KitItemId; version: number }

/** Every head there is, in the order they are written. */
export const KIT_HEADS: readonly string[] = [
  ...new Set([
    KIND_HEAD,
    NAME_HEAD,
    QUANTITY_HEAD,
    NOTE_HEAD,
    ...KIT_KINDS.flatMap((kind) =>
      KIT_COLUMNS[kind].flatMap(({ head, type }) =>
        type.is === 'stated' ? [head, head + FROM, head + SOURCE] : [head],
      ),
    ),
  ]),
]

const plainHead = (head: string) => head.slice(0, 80).trim().replace(/\s+/g, ' ').toLowerCase()
const HEAD_BY_PLAIN = new Map(KIT_HEADS.map((head) => [plainHead(head), head]))

/** Whether a cell is the head of a column of the kit: how a file's delimiter is told. */
export function isKitHead(cell: string): boolean {
  return HEAD_BY_PLAIN.has(plainHead(cell))
}

/** Numbers of an item by key. The schema has parsed the item; here its keys come from the table of columns. */
function numbersOf({ body }: KitInput): Record<string, unknown> {
  return body.numbers
}

/** Modifiers whose name is theirs alone. */
function byOwnName(items: readonly { id: KitItemId; name: string }[]): Map<string, KitItemId> {
  const ids = new Map<string, KitItemId>()
  const twice = new Set<string>()
  for (const { id, name } of items) {
    if (ids.has(name)) twice.add(name)
    ids.set(name, id)
  }
  for (const name of twice) ids.delete(name)
  return ids
}

const isModifier = (item: KitInput) => item.body.kind === 'modifier'

/** The whole kit as a table, heads first; numbers are numbers, so that spreadsheets can count with them. */
export function kitTable(kit: readonly StoredItem[]): CsvCell[][] {
  const nameById = new Map([...byOwnName(kit.filter(isModifier))].map(([name, id]) => [String(id), name]))
  return [[...KIT_HEADS], ...kit.map((item) => cellsOf(item, (id) => nameById.get(id)))]
}

function cellsOf(item: KitInput, nameOf: (id: string) => string | undefined): CsvCell[] {
  const cells = new Map<string, CsvCell>([
    [KIND_HEAD, item.body.kind],
    [NAME_HEAD, item.name],
    [QUANTITY_HEAD, item.quantity],
    [NOTE_HEAD, item.note],
  ])
  const numbers = numbersOf(item)
  for (const { head, key, type } of KIT_COLUMNS[item.body.kind]) {
    const value = numbers[key]
    if (type.is === 'stated') {
      const stated = statedSchema.safeParse(value)
      if (!stated.success) continue
      cells
        .set(head, stated.data.value)
        .set(head + FROM, stated.data.from)
        .set(head + SOURCE, stated.data.source)
    } else if (type.is === 'yes or no') cells.set(head, value === true ? 'yes' : 'no')
    else if (type.is === 'power') cells.set(head, `1/${String(value)}`)
    else if (type.is === 'zoom') cells.set(head, zoomCell(unitNumbersSchema.shape.zoom.parse(value)))
    else if (type.is === 'readings') cells.set(head, meteredCell(meteredSchema.array().parse(value), nameOf))
    else if (typeof value === 'number' || typeof value === 'string') cells.set(head, value)
  }
  return KIT_HEADS.map((head) => cells.get(head) ?? '')
}

/** One row of a file as it would be taken. `version` null: a new item, whose id stands for it until it has one. */
export type KitRow =
  | { kind: 'new'; line: number; name: string; id: KitItemId; version: null; input: KitInput }
  | {
      kind: 'change'
      line: number
      name: string
      id: KitItemId
      version: number
      input: KitInput
      /** What changes, in words: "Guide number (m): 58 → 52". */
      changes: string[]
    }
  | { kind: 'same'; line: number; name: string }
  | { kind: 'bad'; line: number; name: string; messages: string[] }

export type KitFile =
  | { kind: 'refused'; message: string }
  | { kind: 'read'; rows: KitRow[]; /** Heads that mean nothing here. */ leftOut: string[] }

type Draft = { line: number; cell: (head: string) => string | undefined; kind: KitKind; name: string }

/**
 * Reads rows of a file against the kit as it stands. A row belongs to the item of its kind and name, the second row of
 * a name to the second such item; columns that are not in the file keep what the item has. Nothing is thrown: each bad
 * row says why. `newId` gives an id for each new item.
 */
export function readKitTable(
  lines: readonly CsvLine[],
  kit: readonly StoredItem[],
  newId: () => string,
  mostRows: number,
): KitFile {
  const [heads, ...body] = lines
  if (!heads) return { kind: 'refused', message: 'The file is empty. Nothing was changed.' }
  const columns = new Map<string, number>()
  const leftOut: string[] = []
  heads.cells.forEach((cell, index) => {
    const head = HEAD_BY_PLAIN.get(plainHead(cell))
    if (head !== undefined && !columns.has(head)) columns.set(head, index)
    else if (cell.trim() !== '') leftOut.push(quoted(cell))
  })
  if (!columns.has(KIND_HEAD) || !columns.has(NAME_HEAD))
    return {
      kind: 'refused',
      message: `The first line has to name the columns, and ${KIND_HEAD} and ${NAME_HEAD} have to be among them. Export the kit to see how such a file looks. Nothing was changed.`,
    }
  if (body.length === 0)
    return { kind: 'refused', message: 'There are columns and no rows below them. Nothing was changed.' }
  if (body.length > mostRows)
    return {
      kind: 'refused',
      message: `The file has ${body.length} rows; at most ${mostRows} are read at a time. Split it. Nothing was changed.`,
    }

  const rows = new Map<number, KitRow>()
  const drafts: Draft[] = []
  for (const { line, cells } of body) {
    const cell = (head: string) => {
      const index = columns.get(head)
      return index === undefined ? undefined : (cells[index] ?? '')
    }
    const name = (cell(NAME_HEAD) ?? '').trim()
    const kind = readOneOf(cell(KIND_HEAD) ?? '', KIT_KINDS)
    const known = kind.ok ? KIT_KINDS.find((candidate) => candidate === kind.value) : undefined
    const messages = [
      ...(kind.ok ? [] : [`${KIND_HEAD}: ${kind.message}.`]),
      ...(name === '' ? [`${NAME_HEAD}: it has none.`] : []),
    ]
    if (known === undefined || messages.length > 0)
      rows.set(line, { kind: 'bad', line, name: name.slice(0, 120), messages })
    else drafts.push({ line, cell, kind: known, name })
  }

  const seen = new Map<string, number[]>()
  const modifierIds = byOwnName(kit.filter(isModifier))
  const place = (draft: Draft) => {
    const key = `${draft.kind} ${draft.name}`
    const before = seen.get(key) ?? []
    seen.set(key, [...before, draft.line])
    const stored = kit.filter((item) => item.body.kind === draft.kind && item.name === draft.name)
    const row =
      before.length > 0 && before.length >= stored.length
        ? bad(draft, [`The same kind and name stands in line ${before[0]} already: keep one of them.`])
        : readRow(draft, stored[before.length], newId, modifierIds)
    rows.set(draft.line, row)
    if (row.kind === 'new' && draft.kind === 'modifier') modifierIds.set(row.name, row.id)
  }
  // Modifiers first: meter readings of units name them.
  drafts.filter(({ kind }) => kind === 'modifier').forEach(place)
  drafts.filter(({ kind }) => kind !== 'modifier').forEach(place)
  return { kind: 'read', rows: [...rows.values()].sort((a, b) => a.line - b.line), leftOut }
}

function bad({ line, name }: Draft, messages: string[]): KitRow {
  return { kind: 'bad', line, name: name.slice(0, 120), messages }
}

function readRow(
  draft: Draft,
  stored: StoredItem | undefined,
  newId: () => string,
  modifierIds: ReadonlyMap<string, KitItemId>,
): KitRow {
  const faults = new Map<string, string>()
  const fault = (head: string, message: string) => {
    if (!faults.has(head)) faults.set(head, `${head}: ${message.replace(/\.$/, '')}.`)
  }
  const before = stored ? numbersOf(stored) : {}
  const numbers: Record<string, unknown> = { ...before }
  for (const column of KIT_COLUMNS[draft.kind]) {
    const read = readColumn(column, draft.cell, before[column.key], modifierIds)
    if (read?.ok) numbers[column.key] = read.value
    else if (read) fault(column.head, read.message)
  }
  const quantityCell = draft.cell(QUANTITY_HEAD) ?? ''
  const quantity = readNumber(quantityCell)
  if (quantityCell.trim() !== '' && !quantity.ok) fault(QUANTITY_HEAD, quantity.message)
  const parsed = kitInputSchema.safeParse({
    name: draft.name,
    quantity: quantity.ok ? quantity.value : (stored?.quantity ?? 1),
    note: draft.cell(NOTE_HEAD) ?? stored?.note ?? '',
    body: { kind: draft.kind, numbers },
  })
  for (const issue of parsed.error?.issues ?? []) {
    const column = KIT_COLUMNS[draft.kind].find(({ key }) => issue.path[1] === 'numbers' && issue.path[2] === key)
    const last = issue.path.at(-1)
    const head = column
      ? column.head + (last === 'source' ? SOURCE : '')
      : ({ name: NAME_HEAD, quantity: QUANTITY_HEAD }[String(issue.path[0])] ?? NOTE_HEAD)
    if (issue.code === 'too_big' && issue.origin === 'string')
      fault(head, `it is too long; at most ${issue.maximum} characters fit`)
    else if (column && numbers[column.key] === undefined)
      fault(head, 'it is missing; put in the maker’s figure or measure it')
    else fault(head, issue.message)
  }
  if (!parsed.success || faults.size > 0) return bad(draft, [...faults.values()])
  const input = parsed.data
  const { line } = draft
  const { name } = input
  if (!stored) return { kind: 'new', line, name, id: kitItemIdSchema.parse(newId()), version: null, input }
  const changes = changesBetween(stored, input)
  if (changes.length === 0) return { kind: 'same', line, name }
  return { kind: 'change', line, name, id: stored.id, version: stored.version, input, changes }
}

/** What a column says of a row; undefined: nothing, so that the item keeps what it has. */
function readColumn(
  { head, type, key }: Column,
  cellOf: Draft['cell'],
  before: unknown,
  modifierIds: ReadonlyMap<string, KitItemId>,
): Read<unknown> | undefined {
  if (type.is === 'stated') return readStated(head, type.mayBeEmpty ?? false, cellOf, before)
  const cell = cellOf(head)
  if (cell === undefined) return undefined
  const isEmpty = cell.trim() === ''
  switch (type.is) {
    case 'number':
      return isEmpty ? (type.mayBeEmpty ? { ok: true, value: null } : undefined) : readNumber(cell)
    case 'words':
      // A colour that is not given is the one it has; other words may be taken away.
      return isEmpty && key === 'colour' ? undefined : { ok: true, value: cell }
    case 'yes or no':
      return isEmpty ? undefined : readYesOrNo(cell)
    case 'power':
      return isEmpty ? undefined : readPower(cell)
    case 'one of':
      return isEmpty ? undefined : readOneOf(cell, type.words)
    case 'zoom':
      return readZoom(cell)
    case 'readings':
      return readMetered(
        cell,
        (name) => modifierIds.get(name),
        (id) => kitItemIdSchema.safeParse(id).data,
      )
  }
}

function readStated(
  head: string,
  mayBeEmpty: boolean,
  cellOf: Draft['cell'],
  before: unknown,
): Read<Stated | null> | undefined {
  const had = statedSchema.safeParse(before).data
  const cell = cellOf(head)
  if (cell?.trim() === '' && mayBeEmpty) return { ok: true, value: null }
  const read = cell === undefined || cell.trim() === '' ? undefined : readNumber(cell)
  if (read && !read.ok) return read
  const value = read?.value ?? had?.value
  if (value === undefined) return undefined
  const isOld = value === had?.value
  const fromCell = cellOf(head + FROM) ?? ''
  const from = readOneOf(fromCell, PROVENANCES)
  if (fromCell.trim() !== '' && !from.ok) return from
  const known = PROVENANCES.find((candidate) => from.ok && candidate === from.value)
  return {
    ok: true,
    value: {
      value,
      from: known ?? (isOld && had ? had.from : 'assumed'),
      source: cellOf(head + SOURCE) ?? (isOld && had ? had.source : ''),
    },
  }
}

/** What a row changes of an item, a head at a time, in words. */
function changesBetween(stored: StoredItem, input: KitInput): string[] {
  const nameOf = () => undefined
  const [old, now] = [cellsOf(stored, nameOf), cellsOf(input, nameOf)]
  return KIT_HEADS.flatMap((head, index) => {
    const [from, to] = [String(old[index] ?? ''), String(now[index] ?? '')]
    if (from === to) return []
    const isShort = [from, to].every((cell) => cell.length <= 40 && !cell.includes('\n'))
    return [isShort ? `${head}: ${from || 'nothing'} → ${to || 'nothing'}` : `${head} changes`]
  })
}
