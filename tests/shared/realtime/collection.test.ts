import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import {
  LOCAL_ORIGIN,
  addMember,
  orderMembers,
  patchItem,
  putItems,
  readAll,
  readItem,
  removeItems,
  removeMember,
  upsertItem,
} from '#shared/realtime/collection.ts'
import { dayShots, frames, looks, notes, rules } from '#shared/realtime/documents.ts'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const random = () => 0.4

function sync(a: Y.Doc, b: Y.Doc) {
  Y.applyUpdate(b, Y.encodeStateAsUpdate(a, Y.encodeStateVector(b)))
  Y.applyUpdate(a, Y.encodeStateAsUpdate(b, Y.encodeStateVector(a)))
}

const note = (n: number, text = 'Everyone waits for the same comet.') => ({
  id: id(n),
  box: [0, 0, 200, 80] as [number, number, number, number],
  text,
})

describe('putItems and readAll', () => {
  it('reads back what was put, with defaults', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1)], random)
    const { items, unreadable } = readAll(doc, notes)
    expect(unreadable).toEqual([])
    expect(items.get(id(1))).toEqual({ ...note(1), z: 0 })
  })

  it('throws before writing anything when an item does not fit', () => {
    const doc = new Y.Doc()
    expect(() => putItems(doc, notes, [note(1), { ...note(2), box: [0, 0, 1, 1] }], random)).toThrow()
    expect(readAll(doc, notes).items.size).toBe(0)
  })

  it('replaces lone surrogates, which would make every sync throw', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1, 'half \uD83D a face')], random)
    expect(readAll(doc, notes).items.get(id(1))?.text).toBe('half \uFFFD a face')
  })
})

describe('readItem', () => {
  it('skips and reports what no schema knows, and reads the rest', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1)], random)
    doc.getMap('notes').set(id(2), 'not a map')
    doc.getMap('notes').set(id(3), new Y.Map([['box', 'wide']]))
    const { items, unreadable } = readAll(doc, notes)
    expect([...items.keys()]).toEqual([id(1)])
    expect(unreadable.map((bad) => bad.id).sort()).toEqual([id(2), id(3)])
    expect(readItem(notes, id(3), doc.getMap('notes').get(id(3)))).toMatchObject({ kind: 'unreadable' })
  })

  it('keeps keys that this version does not know', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1)], random)
    const raw = doc.getMap('notes').get(id(1))
    if (!(raw instanceof Y.Map)) throw new Error('expected a map')
    raw.set('tilt', 3)
    patchItem(doc, notes, id(1), { text: 'Later.' })
    expect(raw.get('tilt')).toBe(3)
  })
})

describe('patchItem', () => {
  it('writes only what changed', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1)], random)
    let updates = 0
    doc.on('update', () => updates++)
    expect(patchItem(doc, notes, id(1), { text: note(1).text, box: [0, 0, 200, 80] })).toBe(false)
    expect(updates).toBe(0)
    expect(patchItem(doc, notes, id(1), { box: [5, 0, 200, 80] })).toBe(true)
    expect(updates).toBe(1)
  })

  it('leaves fields alone that the patch does not name, though the schema has defaults for them', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [{ ...note(1), z: 7 }], random)
    patchItem(doc, notes, id(1), { text: 'x' })
    expect(readAll(doc, notes).items.get(id(1))?.z).toBe(7)
  })

  it('ignores ids that are not there', () => {
    expect(patchItem(new Y.Doc(), notes, id(9), { text: 'x' })).toBe(false)
  })
})

describe('removeItems', () => {
  it('marks as deleted, so that an edit made meanwhile is not lost with it', () => {
    const a = new Y.Doc()
    putItems(a, notes, [note(1)], random)
    const b = new Y.Doc()
    sync(a, b)
    removeItems(a, notes, [id(1)], 1_000)
    patchItem(b, notes, id(1), { text: 'still typing' })
    sync(a, b)
    expect(readAll(a, notes).items.size).toBe(0)
    const raw = b.getMap('notes').get(id(1))
    expect(raw instanceof Y.Map && raw.get('text')).toBe('still typing')
  })
})

describe('undo', () => {
  const manager = (doc: Y.Doc) =>
    new Y.UndoManager(doc.getMap('notes'), { trackedOrigins: new Set([LOCAL_ORIGIN]), captureTimeout: 0 })

  it('takes back a creation without deleting what another person put into it', () => {
    const a = new Y.Doc()
    const undo = manager(a)
    putItems(a, notes, [note(1)], random)
    const b = new Y.Doc()
    sync(a, b)
    patchItem(b, notes, id(1), { text: 'theirs' })
    sync(a, b)
    undo.undo()
    expect(readAll(a, notes).items.size).toBe(0)
    undo.redo()
    expect(readAll(a, notes).items.get(id(1))?.text).toBe('theirs')
  })

  it('takes back only own changes', () => {
    const a = new Y.Doc()
    const undo = manager(a)
    putItems(a, notes, [note(1), note(2)], random)
    undo.clear()
    const b = new Y.Doc()
    sync(a, b)
    patchItem(a, notes, id(1), { text: 'mine' })
    patchItem(b, notes, id(2), { text: 'theirs' })
    sync(a, b)
    undo.undo()
    const { items } = readAll(a, notes)
    expect(items.get(id(1))?.text).toBe(note(1).text)
    expect(items.get(id(2))?.text).toBe('theirs')
  })
})

describe('members', () => {
  const look = { id: id(1), sitterId: id(2), name: 'Night coat', pieceIds: [id(11)] }

  it('keeps both when two people add a piece at the same time', () => {
    const a = new Y.Doc()
    putItems(a, looks, [look], random)
    const b = new Y.Doc()
    sync(a, b)
    addMember(a, looks, id(1), 'pieceIds', id(12), () => 0.1)
    addMember(b, looks, id(1), 'pieceIds', id(13), () => 0.9)
    sync(a, b)
    const left = readAll(a, looks).items.get(id(1))?.pieceIds
    expect(left).toEqual(readAll(b, looks).items.get(id(1))?.pieceIds)
    expect(left?.[0]).toBe(id(11))
    expect(new Set(left)).toEqual(new Set([id(11), id(12), id(13)]))
  })

  it('takes out and puts into another order', () => {
    const doc = new Y.Doc()
    putItems(doc, looks, [{ ...look, pieceIds: [id(11), id(12), id(13)] }], random)
    orderMembers(doc, looks, id(1), 'pieceIds', [id(13), id(11), id(12)], random)
    removeMember(doc, looks, id(1), 'pieceIds', id(11))
    expect(readAll(doc, looks).items.get(id(1))?.pieceIds).toEqual([id(13), id(12)])
  })
})

describe('upsertItem', () => {
  it('makes the item when there is none and keeps other fields when there is', () => {
    const doc = new Y.Doc()
    upsertItem(doc, dayShots, { id: id(1), note: 'blinked' })
    upsertItem(doc, dayShots, { id: id(1), frames: '0412–0450' })
    expect(readAll(doc, dayShots).items.get(id(1))).toMatchObject({ note: 'blinked', frames: '0412–0450' })
  })
})

describe('sizes', () => {
  it('holds a box as one key: ten thousand moves leave a small document', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1)], random)
    for (let i = 0; i < 10_000; i++) patchItem(doc, notes, id(1), { box: [i + 1, i, 200, 80] })
    expect(Y.encodeStateAsUpdate(doc).byteLength).toBeLessThan(1_000)
  })
})

describe('collections', () => {
  it('reads every kind of rule', () => {
    const doc = new Y.Doc()
    putItems(
      doc,
      rules,
      [
        { id: id(1), rule: { kind: 'pin-place', shotId: id(21), index: 0 } },
        { id: id(2), rule: { kind: 'after', shotId: id(21), afterShotId: id(22) } },
        { id: id(3), rule: { kind: 'window', shotId: id(21), fromMin: 600, toMin: 700 } },
      ],
      random,
    )
    expect(readAll(doc, rules).items.size).toBe(3)
  })

  it('reads a frame whose picture still waits on somebody’s device', () => {
    const doc = new Y.Doc()
    putItems(
      doc,
      frames,
      [{ id: id(1), box: [0, 0, 100, 120], picture: { uploadId: id(5), state: 'waiting', widthPx: 10, heightPx: 12 } }],
      random,
    )
    expect(readAll(doc, frames).items.get(id(1))?.picture.state).toBe('waiting')
  })
})
