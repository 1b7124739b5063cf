// @vitest-environment jsdom
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { LOOSE, type Shot } from '#shared/domain/board/schema.ts'
import { shotPlanSchema } from '#shared/domain/plan/schema.ts'
import { type ShotId, shotIdSchema } from '#shared/ids.ts'
import { LOCAL_ORIGIN, putItems, readAll } from '#shared/realtime/collection.ts'
import { days, shotPlans, shots } from '#shared/realtime/documents.ts'
import { addDay, addShot, copyShot, moveShot, placeAtEnd, writeSequence } from '#src/features/order/write-order.ts'

const DAY = '00000000-0000-4000-8000-0000000000aa'
const idOf = (n: number) => shotIdSchema.parse(`00000000-0000-4000-8000-${String(n).padStart(12, '0')}`)

function withShots(count: number): Y.Doc {
  const doc = new Y.Doc()
  for (let n = 1; n <= count; n++) {
    putItems(doc, shots, [{ id: idOf(n), title: `Shot ${n}`, place: [DAY, `a${n}`] }], Math.random)
  }
  return doc
}

function listOf(doc: Y.Doc, id = DAY): Shot[] {
  const all = [...readAll(doc, shots).items.values()]
  return all.filter((shot) => shot.place[0] === id).sort((a, b) => (a.place[1] < b.place[1] ? -1 : 1))
}

const numbers = (doc: Y.Doc, id = DAY) => listOf(doc, id).map((shot) => Number(shot.id.slice(-2)))

describe('moveShot', () => {
  it('puts a shot at a place of the day, writing its key alone', () => {
    const doc = withShots(5)
    const before = new Map(listOf(doc).map((shot) => [shot.id, shot.place[1]]))
    moveShot(doc, DAY, listOf(doc), idOf(1), 3)
    expect(numbers(doc)).toEqual([2, 3, 4, 1, 5])
    moveShot(doc, DAY, listOf(doc), idOf(5), 0)
    expect(numbers(doc)).toEqual([5, 2, 3, 4, 1])
    expect(listOf(doc).filter((shot) => before.get(shot.id) === shot.place[1])).toHaveLength(3)
  })
})

describe('writeSequence', () => {
  it('gives any order asked for, in one step of undo', () => {
    fc.assert(
      fc.property(fc.shuffledSubarray([1, 2, 3, 4, 5, 6, 7], { minLength: 7 }), (order) => {
        const doc = withShots(7)
        const undo = new Y.UndoManager(doc.getMap('shots'), {
          trackedOrigins: new Set([LOCAL_ORIGIN]),
          captureTimeout: 0,
        })
        writeSequence(doc, DAY, listOf(doc), order.map(idOf))
        expect(numbers(doc)).toEqual(order)
        undo.undo()
        expect(numbers(doc)).toEqual([1, 2, 3, 4, 5, 6, 7])
      }),
      { numRuns: 40 },
    )
  })

  it('writes nothing when the order stands', () => {
    const doc = withShots(3)
    let updates = 0
    doc.on('update', () => updates++)
    writeSequence(doc, DAY, listOf(doc), [1, 2, 3].map(idOf))
    expect(updates).toBe(0)
  })
})

describe('addShot', () => {
  it('places a new shot last, with a plan where the plan may be written', () => {
    const board = withShots(2)
    const plan = new Y.Doc()
    const id = addShot({ board, plan }, DAY, listOf(board), 'Leaf')
    expect(listOf(board).at(-1)).toMatchObject({ id, title: 'Leaf' })
    expect(readAll(plan, shotPlans).items.get(id)).toMatchObject({ minutes: 20 })
    const loose = addShot({ board, plan: null }, LOOSE, [], 'Star')
    expect(listOf(board, LOOSE).map((shot) => shot.id)).toEqual([loose])
    expect(readAll(plan, shotPlans).items.size).toBe(1)
  })
})

describe('copyShot', () => {
  it('stands directly behind the first', () => {
    const board = withShots(3)
    const plan = new Y.Doc()
    const first = listOf(board)[0]
    if (!first) throw new Error('no shot')
    const none: { number: null; set: null; room: null; setup: null; looks: []; cover: null; missing: [] } = {
      number: null,
      set: null,
      room: null,
      setup: null,
      looks: [],
      cover: null,
      missing: [],
    }
    const id: ShotId = copyShot({ board, plan }, listOf(board), {
      ...none,
      shot: first,
      plan: shotPlanSchema.parse({ id: first.id, minutes: 35 }),
    })
    expect(listOf(board).map((shot) => shot.title)).toEqual(['Shot 1', 'Shot 1, second', 'Shot 2', 'Shot 3'])
    expect(readAll(plan, shotPlans).items.get(id)?.minutes).toBe(35)
  })
})

describe('placeAtEnd', () => {
  it('takes a shot from its day to the end of another list', () => {
    const doc = withShots(3)
    placeAtEnd(doc, LOOSE, [], idOf(2))
    expect(numbers(doc)).toEqual([1, 3])
    placeAtEnd(doc, DAY, listOf(doc), idOf(2))
    expect(numbers(doc)).toEqual([1, 3, 2])
  })
})

describe('addDay', () => {
  it('is the day after the last with the same hours', () => {
    const plan = new Y.Doc()
    const first = addDay(plan, undefined)
    const day = readAll(plan, days).items.get(first)
    const second = addDay(plan, day && { ...day, date: '2027-10-31', lightsOnMin: 540 })
    expect(readAll(plan, days).items.get(second)).toMatchObject({ date: '2027-11-01', lightsOnMin: 540 })
  })
})
