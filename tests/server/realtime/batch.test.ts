import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { docIdSchema, userIdSchema } from '#shared/ids.ts'
import { type LogEntry, batchLength, rowsOf, touchesOf } from '#server/realtime/batch.ts'

const docA = docIdSchema.parse('aaaaaaaa-0000-4000-8000-000000000000')
const docB = docIdSchema.parse('bbbbbbbb-0000-4000-8000-000000000000')
const ada = userIdSchema.parse('ada')
const bo = userIdSchema.parse('bo')

function entry(more: Partial<LogEntry>): LogEntry {
  return { docId: docA, userId: ada, update: null, items: [], queuedAtMs: 0, settle: () => undefined, ...more }
}

function edits(count: number): Uint8Array[] {
  const doc = new Y.Doc()
  const updates: Uint8Array[] = []
  doc.on('update', (update: Uint8Array) => updates.push(update))
  for (let i = 0; i < count; i++) doc.getMap('m').set(`k${i}`, i)
  return updates
}

describe('batchLength', () => {
  const queue = [10, 10, 10].map((length) => entry({ update: new Uint8Array(length) }))

  it('stops before too many rows or bytes', () => {
    expect(batchLength(queue, 2, 1000)).toBe(2)
    expect(batchLength(queue, 100, 25)).toBe(2)
    expect(batchLength(queue, 100, 30)).toBe(3)
  })

  it('takes at least one, however large', () => {
    expect(batchLength(queue, 100, 5)).toBe(1)
    expect(batchLength([], 100, 5)).toBe(0)
  })
})

describe('rowsOf', () => {
  it('makes one row of a person’s run and sorts by document', () => {
    const [a, b, c] = edits(3)
    const rows = rowsOf([
      entry({ docId: docB, update: a ?? null }),
      entry({ update: b ?? null }),
      entry({ docId: docB, update: b ?? null }),
      entry({ docId: docB, update: c ?? null }),
    ])
    expect(rows.map((row) => row.docId)).toEqual([docA, docB])
    const doc = new Y.Doc()
    Y.applyUpdate(doc, rows[1]?.update ?? new Uint8Array())
    expect(doc.getMap('m').toJSON()).toEqual({ k0: 0, k1: 1, k2: 2 })
  })

  it('does not bring forward what builds on somebody else’s edit', () => {
    const [a, b, c] = edits(3)
    const rows = rowsOf([
      entry({ userId: ada, update: a ?? null }),
      entry({ userId: bo, update: b ?? null }),
      entry({ userId: ada, update: c ?? null }),
    ])
    expect(rows.map((row) => row.userId)).toEqual([ada, bo, ada])
  })

  it('makes no row of markers and several of what cannot be merged', () => {
    expect(rowsOf([entry({}), entry({ userId: bo })])).toEqual([])
    const broken = [Uint8Array.of(9, 9, 9), Uint8Array.of(8, 8)]
    expect(rowsOf(broken.map((update) => entry({ update }))).map((row) => row.update)).toEqual(broken)
  })
})

describe('touchesOf', () => {
  it('names each person and item once, and nobody for the program itself', () => {
    const touches = touchesOf([
      entry({ items: ['x', 'y'] }),
      entry({ items: ['x'] }),
      entry({ items: ['x'], userId: bo }),
      entry({ items: ['z'], userId: null }),
    ])
    expect(touches).toEqual([
      { docId: docA, item: 'x', userId: ada },
      { docId: docA, item: 'y', userId: ada },
      { docId: docA, item: 'x', userId: bo },
    ])
  })
})
