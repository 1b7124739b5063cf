import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { arrangeNew } from '#shared/domain/board/arrange.ts'
import { overlaps } from '#shared/domain/board/geometry.ts'

const sides = fc.integer({ min: 8, max: 500 })
const sizes = fc.array(fc.record({ w: sides, h: sides }), { maxLength: 30 })
const occupied = fc.array(
  fc.tuple(fc.integer({ min: -600, max: 2000 }), fc.integer({ min: -600, max: 2000 }), sides, sides),
  { maxLength: 40 },
)

describe('arrangeNew', () => {
  it('places every picture over nothing else, whatever hangs there', () => {
    fc.assert(
      fc.property(sizes, occupied, fc.integer({ min: 100, max: 1500 }), (list, taken, width) => {
        const boxes = arrangeNew(list, taken, { x: 24, y: 42 }, width)
        expect(boxes.map((box) => ({ w: box[2], h: box[3] }))).toEqual(list)
        for (const [i, box] of boxes.entries()) {
          for (const other of [...taken, ...boxes.slice(0, i)]) expect(overlaps(box, other)).toBe(false)
          expect(box[0]).toBeGreaterThanOrEqual(24)
          expect(box[1]).toBeGreaterThanOrEqual(42)
        }
      }),
    )
  })

  it('fills a row before it starts the next', () => {
    const boxes = arrangeNew(
      [
        { w: 100, h: 80 },
        { w: 100, h: 120 },
        { w: 100, h: 80 },
      ],
      [],
      { x: 0, y: 0 },
      230,
      20,
    )
    expect(boxes).toEqual([
      [0, 0, 100, 80],
      [120, 0, 100, 120],
      [0, 100, 100, 80],
    ])
  })
})
