import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { appendKey, byKey, keyBetween, keysToPlace } from '#shared/realtime/order-keys.ts'
import { patchItem, putItems, readAll, removeItems } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'

describe('keyBetween', () => {
  it('lies strictly between its neighbours whatever the chance', () => {
    fc.assert(
      fc.property(fc.infiniteStream(fc.double({ min: 0, max: 0.999, noNaN: true })), (stream) => {
        const random = () => stream.next().value ?? 0
        const a = keyBetween(null, null, random)
        const c = keyBetween(a, null, random)
        const b = keyBetween(a, c, random)
        expect(a < b && b < c).toBe(true)
      }),
    )
  })
})

describe('appendKey', () => {
  it('is above every key', () => {
    expect(appendKey(['a1', 'a0V', 'Zz'], () => 0.2) > 'a1').toBe(true)
  })
})

describe('byKey', () => {
  it('breaks ties by id', () => {
    expect(
      [
        { id: 'b', key: 'a0' },
        { id: 'a', key: 'a0' },
      ]
        .sort(byKey)
        .map((x) => x.id),
    ).toEqual(['a', 'b'])
  })
})

describe('keysToPlace', () => {
  it('re-keys the run of equal keys that it must get past', () => {
    const list = [
      { id: 'a', key: 'a0' },
      { id: 'b', key: 'a0' },
      { id: 'c', key: 'a1' },
    ]
    const keys = keysToPlace(list, 'c', 'a', () => 0.5)
    const placed = list.map((item) => ({ id: item.id, key: keys.get(item.id) ?? item.key })).sort(byKey)
    expect(placed.map((item) => item.id)).toEqual(['a', 'c', 'b'])
  })

  it('puts first when there is nothing before', () => {
    const list = [
      { id: 'a', key: 'a0' },
      { id: 'b', key: 'a1' },
    ]
    expect((keysToPlace(list, 'b', null, () => 0.5).get('b') ?? 'z') < 'a0').toBe(true)
  })
})

describe('an ordered list that three people reorder', () => {
  it('has every shot exactly once and the same order everywhere, over 20 random histories with offline spells', () => {
    for (let run = 0; run < 20; run++) {
      const random = seededRandom(run + 1)
      const docs = [new Y.Doc(), new Y.Doc(), new Y.Doc()]
      const pick = <T>(list: readonly T[]): T | undefined => list[Math.floor(random() * list.length)]
      const made = new Set<string>()
      const gone = new Set<string>()
      let counter = 0
      const order = (doc: Y.Doc) =>
        [...readAll(doc, shots).items.values()].map((shot) => ({ id: String(shot.id), key: shot.place[1] })).sort(byKey)
      for (let step = 0; step < 150; step++) {
        const doc = pick(docs) ?? docs[0]
        if (!doc) throw new Error('no document')
        const list = order(doc)
        const kind = random()
        if (list.length < 3 || kind < 0.25) {
          const shotId = `00000000-0000-4000-8000-${String(run * 1000 + ++counter).padStart(12, '0')}`
          const after = pick(list)?.id ?? null
          const key = keysToPlace(list, shotId, after, random).get(shotId) ?? 'a0'
          putItems(doc, shots, [{ id: shotId, title: `Shot ${counter}`, place: ['day', key] }], random)
          made.add(shotId)
        } else if (kind < 0.9) {
          const moved = pick(list)?.id
          const after = pick(list.filter((item) => item.id !== moved))?.id ?? null
          if (moved)
            for (const [id, key] of keysToPlace(list, moved, after, random))
              patchItem(doc, shots, id, { place: ['day', key] })
        } else {
          const removed = pick(list)?.id
          if (removed) {
            removeItems(doc, shots, [removed], step)
            gone.add(removed)
          }
        }
        if (random() < 0.2) {
          const [a, b] = [pick(docs), pick(docs)]
          if (a && b) Y.applyUpdate(b, Y.encodeStateAsUpdate(a, Y.encodeStateVector(b)))
        }
      }
      for (const a of docs) for (const b of docs) Y.applyUpdate(b, Y.encodeStateAsUpdate(a, Y.encodeStateVector(b)))
      for (const a of docs) for (const b of docs) Y.applyUpdate(b, Y.encodeStateAsUpdate(a, Y.encodeStateVector(b)))
      const orders = docs.map((doc) => order(doc).map((item) => item.id))
      expect(orders[1]).toEqual(orders[0])
      expect(orders[2]).toEqual(orders[0])
      expect(new Set(orders[0]).size).toBe(orders[0]?.length)
      expect(new Set(orders[0])).toEqual(new Set([...made].filter((id) => !gone.has(id))))
    }
  })
})
