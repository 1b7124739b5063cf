import { describe, expect, it } from 'vitest'
import { toBack, toFront, topOf } from '#shared/domain/board/stack.ts'

const items = [
  { id: 'a', z: 0 },
  { id: 'b', z: 3 },
  { id: 'c', z: 5 },
]

describe('toFront', () => {
  it('lifts above the rest and keeps the order of what is lifted', () => {
    expect(toFront(items, new Set(['a', 'b']))).toEqual(
      new Map([
        ['a', 6],
        ['b', 7],
      ]),
    )
  })

  it('writes nothing for what is on top already', () => {
    expect(
      toFront(
        [
          { id: 'a', z: 0 },
          { id: 'b', z: 1 },
        ],
        new Set(['b']),
      ).size,
    ).toBe(0)
  })
})

describe('toBack', () => {
  it('puts below the rest and keeps the order', () => {
    expect(toBack(items, new Set(['c', 'b']))).toEqual(
      new Map([
        ['b', -2],
        ['c', -1],
      ]),
    )
  })
})

describe('topOf', () => {
  it('is above everything, 0 on an empty wall', () => {
    expect(topOf(items)).toBe(6)
    expect(topOf([])).toBe(0)
  })
})
