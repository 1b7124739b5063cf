// @vitest-environment jsdom
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { LOOSE, type Shot } from '#shared/domain/board/schema.ts'
import { shotIdSchema } from '#shared/ids.ts'
import { putItems, readAll } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'
import { type ShotList, addShot, dropBehind, placeShot } from '#src/features/board/write-shots.ts'

const idOf = (n: number) => shotIdSchema.parse(`00000000-0000-4000-8000-${String(n).padStart(12, '0')}`)
const DAY = 'day-one'

function withShots(count: number): Y.Doc {
  const doc = new Y.Doc()
  for (let n = 1; n <= count; n++) {
    putItems(doc, shots, [{ id: idOf(n), title: `Shot ${n}`, place: [DAY, `a${n}`] }], Math.random)
  }
  return doc
}

function list(doc: Y.Doc, id: string): ShotList {
  const byKey = (a: Shot, b: Shot) => (a.place[1] < b.place[1] ? -1 : 1)
  return { id, shots: [...readAll(doc, shots).items.values()].filter((shot) => shot.place[0] === id).sort(byKey) }
}

const titles = (doc: Y.Doc, id = DAY) =>
  list(doc, id)
    .shots.map((shot) => shot.title.slice(5))
    .join('')

describe('placeShot', () => {
  it('puts a shot directly behind another, or first', () => {
    const doc = withShots(4)
    placeShot(doc, list(doc, DAY), idOf(1), idOf(3))
    expect(titles(doc)).toBe('2314')
    placeShot(doc, list(doc, DAY), idOf(4), null)
    expect(titles(doc)).toBe('4231')
  })

  it('moves to another list in one step and leaves the rest alone', () => {
    const doc = withShots(3)
    let updates = 0
    doc.on('update', () => updates++)
    placeShot(doc, list(doc, LOOSE), idOf(2), null)
    expect(updates).toBe(1)
    expect(titles(doc)).toBe('13')
    expect(titles(doc, LOOSE)).toBe('2')
  })

  it('keeps every shot exactly once when two people reorder at the same time', () => {
    const move = fc.tuple(fc.integer({ min: 1, max: 6 }), fc.integer({ min: 0, max: 6 }))
    fc.assert(
      fc.property(
        fc.array(move, { minLength: 1, maxLength: 8 }),
        fc.array(move, { minLength: 1, maxLength: 8 }),
        (mine, theirs) => {
          const one = withShots(6)
          const two = new Y.Doc()
          Y.applyUpdate(two, Y.encodeStateAsUpdate(one))
          for (const [doc, moves] of [
            [one, mine],
            [two, theirs],
          ] as const) {
            for (const [shot, after] of moves) {
              if (shot !== after) placeShot(doc, list(doc, DAY), idOf(shot), after === 0 ? null : idOf(after))
            }
          }
          Y.applyUpdate(one, Y.encodeStateAsUpdate(two))
          Y.applyUpdate(two, Y.encodeStateAsUpdate(one))
          expect(titles(one)).toBe(titles(two))
          expect([...titles(one)].sort().join('')).toBe('123456')
        },
      ),
      { numRuns: 50 },
    )
  })
})

describe('dropBehind', () => {
  const doc = withShots(4)
  it('goes behind what it is dropped on from before, in front of it from behind', () => {
    expect(dropBehind(list(doc, DAY), idOf(1), idOf(3))).toBe(idOf(3))
    expect(dropBehind(list(doc, DAY), idOf(4), idOf(2))).toBe(idOf(1))
    expect(dropBehind(list(doc, DAY), idOf(4), idOf(1))).toBeNull()
  })

  it('takes the place of what it is dropped on from another list, and the end on the list itself', () => {
    expect(dropBehind(list(doc, DAY), 'elsewhere', idOf(2))).toBe(idOf(1))
    expect(dropBehind(list(doc, DAY), 'elsewhere', null)).toBe(idOf(4))
  })
})

describe('addShot', () => {
  it('stands at the end of the first day, or loose when there is none', () => {
    const doc = withShots(2)
    addShot(doc, [list(doc, DAY), list(doc, LOOSE)], 'Shot 9')
    expect(titles(doc)).toBe('129')
    addShot(doc, [], 'Shot 8')
    expect(titles(doc, LOOSE)).toBe('8')
  })
})
