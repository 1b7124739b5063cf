import * as Y from 'yjs'
import { frameIdSchema, noteIdSchema, uploadIdSchema } from '#shared/ids.ts'
import type { Box } from '#shared/domain/board/schema.ts'
import { LOCAL_ORIGIN, putItems, readAll } from '#shared/realtime/collection.ts'
import { COLLECTIONS, frames, notes } from '#shared/realtime/documents.ts'
import type { PresencePatch, WallControl } from '#src/features/board/wall-control.ts'
import { readWallItems } from '#src/features/board/wall-item.ts'
import { createWallState, setViewport } from '#src/features/board/wall-state.ts'
import { nameOfAll } from '#src/features/board/words.ts'

export type TestWall = WallControl & {
  /** How often the document was written by this person. */
  writes: () => number
  presence: PresencePatch[]
  boxOf: (id: string) => Box | undefined
  readOnly: (value: boolean) => void
}

export const FRAME = frameIdSchema.parse('00000000-0000-4000-8000-000000000001')
export const OTHER = frameIdSchema.parse('00000000-0000-4000-8000-000000000002')
export const NOTE = noteIdSchema.parse('00000000-0000-4000-8000-000000000003')
const UPLOAD = uploadIdSchema.parse('00000000-0000-4000-8000-0000000000ff')

/** A wall with two frames side by side and a note below, on a document of its own. */
export function testWall(): TestWall {
  const doc = new Y.Doc()
  const picture = { uploadId: UPLOAD, state: 'stored' as const, widthPx: 800, heightPx: 1000 }
  putItems(
    doc,
    frames,
    [
      { id: FRAME, box: [0, 0, 212, 286], picture, caption: 'Collar high' },
      { id: OTHER, box: [300, 0, 212, 286], z: 1, picture, caption: 'Ochre against slate' },
    ],
    Math.random,
  )
  putItems(doc, notes, [{ id: NOTE, box: [0, 400, 200, 52], z: 2, text: 'Quiet hands' }], Math.random)
  const undo = new Y.UndoManager(
    Object.values(COLLECTIONS.board).map((c) => doc.getMap(c.root)),
    { trackedOrigins: new Set([LOCAL_ORIGIN]), captureTimeout: 500 },
  )
  let writes = 0
  let readOnly = false
  doc.on('update', () => writes++)
  const presence: PresencePatch[] = []
  const state = createWallState({ x: -50, y: -50, zoom: 1 })
  setViewport(state, { widthPx: 1000, heightPx: 700 })
  return {
    doc,
    state,
    items: () => readWallItems(doc),
    mayWrite: () => !readOnly,
    isPast: false,
    stopUndo: () => undo.stopCapturing(),
    undo: () => void undo.undo(),
    redo: () => void undo.redo(),
    setPresence: (patch) => presence.push(patch),
    made: () => ({ by: 'u1', name: 'Ines Marlow', initials: 'IM', atMs: 1 }),
    coverShot: () => undefined,
    nameOf: (entries) => nameOfAll(entries),
    writes: () => writes,
    presence,
    boxOf: (id) => readAll(doc, frames).items.get(id)?.box ?? readAll(doc, notes).items.get(id)?.box,
    readOnly: (value) => {
      readOnly = value
    },
  }
}
