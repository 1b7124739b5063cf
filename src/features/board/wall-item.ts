import { useMemo } from 'react'
import type * as Y from 'yjs'
import type { Area, Box, Frame, Note, Palette, Tag } from '#shared/domain/board/schema.ts'
import type { Collection } from '#shared/realtime/collection.ts'
import { areas, frames, notes, palettes, tags } from '#shared/realtime/documents.ts'
import { itemStore } from '#src/realtime/item-store.ts'
import { useItems } from '#src/realtime/use-items.ts'

export type WallKind = 'frame' | 'note' | 'tag' | 'area' | 'palette'

/** Anything that hangs on the wall, in one shape. Areas lie below everything. */
export type WallItem = { id: string; box: Box; z: number } & (
  | { kind: 'frame'; item: Frame }
  | { kind: 'note'; item: Note }
  | { kind: 'tag'; item: Tag }
  | { kind: 'area'; item: Area }
  | { kind: 'palette'; item: Palette }
)
export type WallItems = ReadonlyMap<string, WallItem>

export const COLLECTION_OF: Readonly<Record<WallKind, Collection>> = {
  frame: frames,
  note: notes,
  tag: tags,
  area: areas,
  palette: palettes,
}

const AREA_Z = -1_000_000
const wrapped = new WeakMap<object, WallItem>()

/** An unchanged item keeps its wrapper, so that a memoised view of it stays. */
function wrap<T extends Frame | Note | Tag | Area | Palette>(item: T, make: (item: T) => WallItem): WallItem {
  const known = wrapped.get(item)
  if (known) return known
  const made = make(item)
  wrapped.set(item, made)
  return made
}

type Maps = {
  frames: ReadonlyMap<string, Frame>
  notes: ReadonlyMap<string, Note>
  tags: ReadonlyMap<string, Tag>
  areas: ReadonlyMap<string, Area>
  palettes: ReadonlyMap<string, Palette>
}

function join(maps: Maps): WallItems {
  const all = new Map<string, WallItem>()
  for (const area of maps.areas.values()) {
    all.set(
      area.id,
      wrap(area, (item) => ({ kind: 'area', id: item.id, box: item.box, z: AREA_Z, item })),
    )
  }
  for (const frame of maps.frames.values()) {
    all.set(
      frame.id,
      wrap(frame, (item) => ({ kind: 'frame', id: item.id, box: item.box, z: item.z, item })),
    )
  }
  for (const note of maps.notes.values()) {
    all.set(
      note.id,
      wrap(note, (item) => ({ kind: 'note', id: item.id, box: item.box, z: item.z, item })),
    )
  }
  for (const tag of maps.tags.values()) {
    all.set(
      tag.id,
      wrap(tag, (item) => ({ kind: 'tag', id: item.id, box: item.box, z: item.z, item })),
    )
  }
  for (const palette of maps.palettes.values()) {
    all.set(
      palette.id,
      wrap(palette, (item) => ({ kind: 'palette', id: item.id, box: item.box, z: item.z, item })),
    )
  }
  return all
}

/** Everything on the wall by id. */
export function useWallItems(): WallItems {
  const hungFrames = useItems('board', frames)
  const hungNotes = useItems('board', notes)
  const hungTags = useItems('board', tags)
  const hungAreas = useItems('board', areas)
  const hungPalettes = useItems('board', palettes)
  return useMemo(
    () => join({ frames: hungFrames, notes: hungNotes, tags: hungTags, areas: hungAreas, palettes: hungPalettes }),
    [hungFrames, hungNotes, hungTags, hungAreas, hungPalettes],
  )
}

/** Everything on the wall as the document has it now, for code outside of rendering. */
export function readWallItems(doc: Y.Doc): WallItems {
  return join({
    frames: itemStore(doc, frames).get(),
    notes: itemStore(doc, notes).get(),
    tags: itemStore(doc, tags).get(),
    areas: itemStore(doc, areas).get(),
    palettes: itemStore(doc, palettes).get(),
  })
}
