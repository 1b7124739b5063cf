import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { itemsTouchedBy } from '#server/realtime/touched.ts'

function touchedBy(change: (doc: Y.Doc) => void, doc = new Y.Doc()): string[] {
  const touched = new Set<string>()
  doc.on('afterTransaction', (transaction: Y.Transaction) => itemsTouchedBy(transaction, touched))
  doc.transact(() => change(doc))
  return [...touched].sort()
}

describe('itemsTouchedBy', () => {
  it('names items that appear, change at any depth, and go', () => {
    const doc = new Y.Doc()
    const inner = new Y.Map<unknown>([['n', 1]])
    doc.getMap('frames').set('deep', new Y.Map<unknown>([['inner', inner]]))
    doc.getMap('frames').set('gone', new Y.Map())
    expect(
      touchedBy((d) => {
        d.getMap('frames').set('new', new Y.Map([['a', 1]]))
        inner.set('n', 2)
        d.getMap('frames').delete('gone')
      }, doc),
    ).toEqual(['deep', 'gone', 'new'])
  })

  it('leaves out what can be no id of ours', () => {
    expect(
      touchedBy((d) => d.getMap('frames').set('a\u0000b', 1).toString() && d.getMap('frames').set('x'.repeat(65), 1)),
    ).toEqual([])
  })
})
