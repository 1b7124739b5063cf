import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { patchItem, putItems, removeItems } from '#shared/realtime/collection.ts'
import { notes } from '#shared/realtime/documents.ts'
import { itemStore } from '#src/realtime/item-store.ts'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const note = (n: number) => ({ id: id(n), box: [0, 0, 100, 50] as [number, number, number, number], text: `Note ${n}` })

describe('itemStore', () => {
  it('keeps the identity of items that did not change', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1), note(2)], () => 0.5)
    const store = itemStore(doc, notes)
    const before = store.get()
    let calls = 0
    store.subscribe(() => calls++)
    patchItem(doc, notes, id(1), { text: 'Changed' })
    expect(calls).toBe(1)
    expect(store.get()).not.toBe(before)
    expect(store.get().get(id(2))).toBe(before.get(id(2)))
    expect(store.get().get(id(1))?.text).toBe('Changed')
  })

  it('drops what is deleted and reports what it cannot read', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [note(1)], () => 0.5)
    const store = itemStore(doc, notes)
    removeItems(doc, notes, [id(1)], 5)
    doc.getMap('notes').set(id(3), new Y.Map([['box', 1]]))
    expect(store.get().size).toBe(0)
    expect([...store.unreadable().keys()]).toEqual([id(3)])
  })

  it('is one per document and collection', () => {
    const doc = new Y.Doc()
    expect(itemStore(doc, notes)).toBe(itemStore(doc, notes))
  })
})
