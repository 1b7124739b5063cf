import { describe, expect, it } from 'vitest'
import { areaOf, byArea, nextInDirection, readingOrder } from '#shared/domain/board/reading-order.ts'
import type { Box } from '#shared/domain/board/schema.ts'

const item = (id: string, ...box: Box) => ({ id, box })
const wear = item('wear', 560, 14, 410, 500)
const light = item('light', 24, 14, 520, 20)

describe('readingOrder', () => {
  it('goes by rows although tops differ a little', () => {
    expect(
      readingOrder([item('c', 0, 300, 50, 50), item('b', 120, 0, 90, 90), item('a', 0, 12, 90, 90)]).map(
        ({ id }) => id,
      ),
    ).toEqual(['a', 'b', 'c'])
  })
})

describe('areaOf', () => {
  it('is the area that holds the middle', () => {
    expect(areaOf([580, 40, 100, 100], [wear, light])).toBe('wear')
  })

  it('is the title above when the area is only its line', () => {
    expect(areaOf([30, 60, 100, 100], [wear, light])).toBe('light')
  })

  it('is nothing beside both', () => {
    expect(areaOf([1200, 60, 100, 100], [wear, light])).toBeNull()
  })
})

describe('byArea', () => {
  it('puts areas in reading order and the rest last', () => {
    const groups = byArea(
      [wear, light],
      [item('x', 1500, 0, 10, 10), item('w', 600, 60, 50, 50), item('l', 40, 60, 50, 50)],
    )
    expect(groups.map(({ area, items }) => [area?.id ?? null, items.map(({ id }) => id)])).toEqual([
      ['light', ['l']],
      ['wear', ['w']],
      [null, ['x']],
    ])
  })
})

describe('nextInDirection', () => {
  const wall = [item('right', 200, 10, 50, 50), item('far', 500, 0, 50, 50), item('below', 0, 200, 50, 50)]

  it('takes the near one straight ahead', () => {
    expect(nextInDirection([0, 0, 50, 50], wall, 'right')).toBe('right')
    expect(nextInDirection([0, 0, 50, 50], wall, 'down')).toBe('below')
  })

  it('is null at the end of the wall', () => {
    expect(nextInDirection([0, 0, 50, 50], wall, 'up')).toBeNull()
  })
})
