import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { appendKey, byKey, keyBetween, keysToPlace } from '#shared/realtime/order-keys.ts'

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
