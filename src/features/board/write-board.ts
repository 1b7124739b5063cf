import type * as Y from 'yjs'
import type { z } from 'zod'
import { overlaps, tidyBox } from '#shared/domain/board/geometry.ts'
import type { Box, Made, Palette } from '#shared/domain/board/schema.ts'
import { type Stacked, toBack, toFront, topOf } from '#shared/domain/board/stack.ts'
import type { AreaId, FrameId, NoteId, PaletteId, TagId } from '#shared/ids.ts'
import { areaIdSchema, frameIdSchema, noteIdSchema, paletteIdSchema, tagIdSchema } from '#shared/ids.ts'
import { LOCAL_ORIGIN, patchItem, putItems, removeItems } from '#shared/realtime/collection.ts'
import { areas, frames, notes, palettes, tags } from '#shared/realtime/documents.ts'
import { newId } from '#src/lib/new-id.ts'
import { COLLECTION_OF, type WallItem, type WallItems, type WallKind, readWallItems } from './wall-item.ts'

/**
 * New boxes of things on the wall, all in one transaction. With `raise`, what then lies over something else comes to
 * the front. Returns whether anything was written.
 */
export function writeBoxes(doc: Y.Doc, boxes: ReadonlyMap<string, Box>, raise = false): boolean {
  const items = readWallItems(doc)
  let written = false
  doc.transact(() => {
    for (const [id, box] of boxes) {
      const entry = items.get(id)
      if (entry && patchItem(doc, COLLECTION_OF[entry.kind], id, { box: tidyBox(box) })) written = true
    }
    if (raise && written && liesOverOthers(items, boxes)) restack(doc, new Set(boxes.keys()), 'front')
  }, LOCAL_ORIGIN)
  return written
}

function liesOverOthers(items: WallItems, boxes: ReadonlyMap<string, Box>): boolean {
  const moved = [...boxes].flatMap(([id, box]) => (items.get(id)?.kind === 'area' ? [] : [box]))
  return [...items.values()].some(
    (entry) => entry.kind !== 'area' && !boxes.has(entry.id) && moved.some((box) => overlaps(box, entry.box)),
  )
}

/** Marks things as removed, all in one transaction. */
export function removeFromWall(doc: Y.Doc, ids: Iterable<string>, nowMs: number): void {
  const items = readWallItems(doc)
  doc.transact(() => {
    for (const id of ids) {
      const entry = items.get(id)
      if (entry) removeItems(doc, COLLECTION_OF[entry.kind], [id], nowMs)
    }
  }, LOCAL_ORIGIN)
}

/** Puts things before or behind all others. Areas always lie at the back. */
export function restack(doc: Y.Doc, ids: ReadonlySet<string>, to: 'front' | 'back'): void {
  const items = readWallItems(doc)
  const stack: Stacked[] = [...items.values()].filter((entry) => entry.kind !== 'area')
  const heights = to === 'front' ? toFront(stack, ids) : toBack(stack, ids)
  doc.transact(() => {
    for (const [id, z] of heights) {
      const entry = items.get(id)
      if (entry) patchItem(doc, COLLECTION_OF[entry.kind], id, { z })
    }
  }, LOCAL_ORIGIN)
}

/** A height above everything on the wall. */
export function topHeight(doc: Y.Doc): number {
  return topOf([...readWallItems(doc).values()].filter((entry) => entry.kind !== 'area'))
}

export function addNote(doc: Y.Doc, box: Box, text: string, made: Made): NoteId {
  const id = noteIdSchema.parse(newId())
  putItems(doc, notes, [{ id, box: tidyBox(box), z: topHeight(doc), text: text.slice(0, 2000), made }], Math.random)
  return id
}

export function addTag(doc: Y.Doc, box: Box, made: Made): TagId {
  const id = tagIdSchema.parse(newId())
  putItems(doc, tags, [{ id, box: tidyBox(box), z: topHeight(doc), made }], Math.random)
  return id
}

export function addArea(doc: Y.Doc, box: Box, title: string, made: Made): AreaId {
  const id = areaIdSchema.parse(newId())
  putItems(doc, areas, [{ id, box: tidyBox(box), title, made }], Math.random)
  return id
}

export function addPalette(doc: Y.Doc, box: Box, palette: Pick<Palette, 'title' | 'colours'>, made: Made): PaletteId {
  const id = paletteIdSchema.parse(newId())
  putItems(doc, palettes, [{ id, box: tidyBox(box), z: topHeight(doc), ...palette, made }], Math.random)
  return id
}

export type NewFrame = Omit<z.input<typeof frames.schema>, 'id' | 'z' | 'made' | 'box'> & { id?: FrameId; box: Box }

/** Pins pictures in front of everything, in the order given. */
export function addFrames(doc: Y.Doc, list: readonly NewFrame[], made: Made): FrameId[] {
  const z = topHeight(doc)
  const items = list.map((frame, index) => ({
    ...frame,
    id: frame.id ?? frameIdSchema.parse(newId()),
    box: tidyBox(frame.box),
    z: z + index,
    made,
  }))
  putItems(doc, frames, items, Math.random)
  return items.map(({ id }) => id)
}

const NEW_ID: Readonly<Record<WallKind, () => string>> = {
  frame: () => frameIdSchema.parse(newId()),
  note: () => noteIdSchema.parse(newId()),
  tag: () => tagIdSchema.parse(newId()),
  area: () => areaIdSchema.parse(newId()),
  palette: () => paletteIdSchema.parse(newId()),
}

/** Copies of things, moved by (dx, dy) wall units, in front, in their own order. Returns the ids of the copies. */
export function addCopies(doc: Y.Doc, entries: readonly WallItem[], dx: number, dy: number, made: Made): string[] {
  const top = topHeight(doc)
  const copies = new Map<WallKind, Record<string, unknown>[]>()
  const ids: string[] = []
  for (const [index, entry] of [...entries].sort((a, b) => a.z - b.z).entries()) {
    const id = NEW_ID[entry.kind]()
    const box = tidyBox([entry.box[0] + dx, entry.box[1] + dy, entry.box[2], entry.box[3]])
    const height = entry.kind === 'area' ? {} : { z: top + index }
    const list = copies.get(entry.kind) ?? []
    list.push({ ...entry.item, ...height, id, box, made })
    copies.set(entry.kind, list)
    ids.push(id)
  }
  for (const [kind, list] of copies) putItems(doc, COLLECTION_OF[kind], list, Math.random)
  return ids
}
