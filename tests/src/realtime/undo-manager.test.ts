import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { noteSchema } from '#shared/domain/board/schema.ts'
import { noteIdSchema } from '#shared/ids.ts'
import { LOCAL_ORIGIN, patchItem, putItems, readAll } from '#shared/realtime/collection.ts'
import { notes } from '#shared/realtime/documents.ts'
import { createUndo } from '#src/realtime/undo-manager.ts'

const ID = noteIdSchema.parse('0a6f3a52-6c1c-4f7e-9a65-1f3f0c1d2e01')

function exchange(a: Y.Doc, b: Y.Doc): void {
  const fromA = Y.encodeStateAsUpdate(a)
  const fromB = Y.encodeStateAsUpdate(b)
  Y.applyUpdate(a, fromB)
  Y.applyUpdate(b, fromA)
}

/** Two people on one note; `winner` has the client id whose value wins when both write at once. */
function pair(winner: 'a' | 'b') {
  const a = new Y.Doc()
  const b = new Y.Doc()
  a.clientID = winner === 'a' ? 20 : 10
  b.clientID = winner === 'a' ? 10 : 20
  putItems(a, notes, [noteSchema.parse({ id: ID, box: [0, 0, 80, 40], text: 'as it was' })], () => 0.5, 'before')
  exchange(a, b)
  const undo = createUndo(a, [a.getMap(notes.root)])
  const text = (doc: Y.Doc) => readAll(doc, notes).items.get(ID)?.text
  return { a, b, undo, text }
}

describe('createUndo', () => {
  it('brings the value before the step back when another person wrote the field at the same moment and lost', () => {
    const { a, b, undo, text } = pair('a')
    patchItem(a, notes, ID, { text: 'mine' })
    patchItem(b, notes, ID, { text: 'theirs' })
    exchange(a, b)
    expect(text(a)).toBe('mine')
    undo.undo()
    exchange(a, b)
    expect(text(a)).toBe('as it was')
    expect(text(b)).toBe('as it was')
  })

  it("leaves the other person's value where theirs won", () => {
    const { a, b, undo, text } = pair('b')
    patchItem(a, notes, ID, { text: 'mine' })
    patchItem(b, notes, ID, { text: 'theirs' })
    exchange(a, b)
    undo.undo()
    exchange(a, b)
    expect(text(a)).toBe('theirs')
    expect(text(b)).toBe('theirs')
  })

  it('leaves what somebody wrote later', () => {
    const { a, b, undo, text } = pair('a')
    patchItem(a, notes, ID, { text: 'mine' })
    exchange(a, b)
    patchItem(b, notes, ID, { text: 'later' })
    exchange(a, b)
    undo.undo()
    expect(text(a)).toBe('later')
  })

  it('goes back to the first value of a step of several writes, and forward again', () => {
    const { a, b, undo, text } = pair('a')
    patchItem(a, notes, ID, { text: 'one' })
    patchItem(a, notes, ID, { text: 'two' })
    undo.undo()
    expect(text(a)).toBe('as it was')
    undo.redo()
    expect(text(a)).toBe('two')
    exchange(a, b)
    expect(text(b)).toBe('two')
  })

  it('takes a field away that the step itself first wrote', () => {
    const doc = new Y.Doc()
    const root = doc.getMap<unknown>('shots')
    const item = new Y.Map<unknown>()
    root.set('a', item)
    const undo = createUndo(doc, [root])
    doc.transact(() => item.set('note', 'W'), LOCAL_ORIGIN)
    doc.transact(() => item.set('note', 'Wind'), LOCAL_ORIGIN)
    undo.undo()
    expect(item.has('note')).toBe(false)
    undo.redo()
    expect(item.get('note')).toBe('Wind')
  })
})
