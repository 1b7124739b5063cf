import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { differenceOf } from '#server/realtime/difference.ts'

function decoded(doc: Y.Doc): Y.Doc {
  const copy = new Y.Doc()
  Y.applyUpdate(copy, Y.encodeStateAsUpdate(doc))
  return copy
}

/** Another document with the same edits as far as clocks can tell: the same client, as many of them. */
function twin(a: (doc: Y.Doc) => void, b: (doc: Y.Doc) => void): [Y.Doc, Y.Doc] {
  const docs = [a, b].map((edit) => {
    const doc = new Y.Doc()
    doc.clientID = 7
    edit(doc)
    return decoded(doc)
  })
  return [docs[0] ?? new Y.Doc(), docs[1] ?? new Y.Doc()]
}

describe('differenceOf', () => {
  it('is null for the same edits, however the documents were built', () => {
    const random = seededRandom(3)
    const source = new Y.Doc()
    const updates: Uint8Array[] = []
    source.on('update', (update: Uint8Array) => updates.push(update))
    const text = source.getText('text')
    for (let i = 0; i < 400; i++) {
      const at = Math.floor(random() * (text.length + 1))
      if (random() < 0.6) text.insert(at, 'ab😀')
      else if (text.length > at) text.delete(at, Math.min(3, text.length - at))
      source.getMap('items').set(`k${i % 20}`, new Y.Map([['box', [i, undefined, NaN, 2n ** 60n, Uint8Array.of(i)]]]))
      source.getArray('list').insert(0, [i, null])
    }
    text.format(0, 4, { bold: true })
    source.getXmlFragment('xml').insert(0, [new Y.XmlElement('p'), new Y.XmlText('hello')])
    const oneByOne = new Y.Doc()
    for (const update of updates) Y.applyUpdate(oneByOne, update)
    const atOnce = new Y.Doc()
    Y.applyUpdate(atOnce, Y.mergeUpdates(updates))
    expect(differenceOf(oneByOne, atOnce)).toBe(null)
    expect(differenceOf(oneByOne, decoded(atOnce))).toBe(null)
  })

  it('sees an edit more, and a deletion more', () => {
    const source = new Y.Doc()
    source.getMap('items').set('a', 1)
    const before = decoded(source)
    source.getMap('items').delete('a')
    expect(differenceOf(before, decoded(source))).toBe('deletions')
    source.getMap('items').set('b', 1)
    expect(differenceOf(before, decoded(source))).toBe('clocks')
  })

  it('sees other content behind the same clocks: values, keys, nested, order, format, kind', () => {
    const set = (key: string, value: unknown) => (doc: Y.Doc) => void doc.getMap('items').set(key, value)
    expect(differenceOf(...twin(set('a', 1), set('a', 2)))).toBe('content')
    expect(differenceOf(...twin(set('a', 1), set('b', 1)))).toBe('content')
    expect(differenceOf(...twin(set('a', null), set('a', undefined)))).toBe('content')
    const nested = (value: unknown) => (doc: Y.Doc) => void doc.getMap('items').set('m', new Y.Map([['v', value]]))
    expect(differenceOf(...twin(nested(1), nested('1')))).toBe('content')
    const list = (values: number[]) => (doc: Y.Doc) => doc.getArray('list').insert(0, values)
    expect(differenceOf(...twin(list([1, 2]), list([2, 1])))).toBe('content')
    const bold = (value: boolean) => (doc: Y.Doc) => doc.getText('text').insert(0, 'x', { bold: value })
    expect(differenceOf(...twin(bold(true), bold(false)))).toBe('content')
    const kind = (type: Y.Map<unknown> | Y.Array<unknown>) => (doc: Y.Doc) => void doc.getMap('items').set('m', type)
    expect(differenceOf(...twin(kind(new Y.Map()), kind(new Y.Array())))).toBe('content')
  })

  it('takes an empty root for none, and half a million characters in one piece', () => {
    const [a, b] = twin(
      (doc) => doc.getText('text').insert(0, 'x'.repeat(500_000)),
      (doc) => doc.getText('text').insert(0, 'x'.repeat(500_000)),
    )
    b.getMap('empty')
    expect(differenceOf(a, b)).toBe(null)
  })
})
