import { describe, expect, it } from 'vitest'
import { align, distribute } from '#shared/domain/board/align.ts'
import type { Box } from '#shared/domain/board/schema.ts'

const item = (id: string, ...box: Box) => ({ id, box })

describe('align', () => {
  const items = [item('a', 0, 0, 100, 50), item('b', 40, 200, 60, 30)]

  it('lines up on the common bounds and names only what moves', () => {
    expect(align(items, 'left')).toEqual(new Map([['b', [0, 200, 60, 30]]]))
    expect(align(items, 'right')).toEqual(new Map())
    expect(align(items, 'centre')).toEqual(new Map([['b', [20, 200, 60, 30]]]))
    expect(align(items, 'bottom')).toEqual(new Map([['a', [0, 180, 100, 50]]]))
  })

  it('moves nothing of nothing', () => {
    expect(align([], 'top').size).toBe(0)
  })
})

describe('distribute', () => {
  it('makes the gaps equal and leaves the outermost where they are', () => {
    const moved = distribute(
      [item('a', 0, 0, 100, 10), item('c', 300, 0, 100, 10), item('b', 110, 0, 50, 10)],
      'across',
    )
    // 400 wide, 250 filled, two gaps of 75.
    expect(moved).toEqual(new Map([['b', [175, 0, 50, 10]]]))
  })

  it('needs three', () => {
    expect(distribute([item('a', 0, 0, 10, 10), item('b', 90, 0, 10, 10)], 'across').size).toBe(0)
  })
})
