import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  bottomOf,
  boundsOf,
  boxBetween,
  containsPoint,
  hitTest,
  overlaps,
  resizeBox,
  rightOf,
  tidyBox,
  touchedBy,
} from '#shared/domain/board/geometry.ts'
import { boxSchema, type Box } from '#shared/domain/board/schema.ts'

const boxes = fc.tuple(
  fc.integer({ min: -5000, max: 5000 }),
  fc.integer({ min: -5000, max: 5000 }),
  fc.integer({ min: 8, max: 900 }),
  fc.integer({ min: 8, max: 900 }),
)

describe('tidyBox', () => {
  it('always fits the schema, whatever comes in', () => {
    fc.assert(
      fc.property(fc.tuple(fc.double(), fc.double(), fc.double(), fc.double()), (box) => {
        expect(boxSchema.safeParse(tidyBox(box)).success).toBe(true)
      }),
    )
  })
})

describe('overlaps', () => {
  it('is symmetrical and does not count touching edges', () => {
    fc.assert(fc.property(boxes, boxes, (a, b) => overlaps(a, b) === overlaps(b, a)))
    expect(overlaps([0, 0, 10, 10], [10, 0, 10, 10])).toBe(false)
    expect(overlaps([0, 0, 10, 10], [9, 9, 10, 10])).toBe(true)
  })
})

describe('boundsOf', () => {
  it('holds every box and is null for none', () => {
    fc.assert(
      fc.property(fc.array(boxes, { minLength: 1, maxLength: 20 }), (list) => {
        const bounds = boundsOf(list)
        if (!bounds) throw new Error('no bounds')
        for (const box of list) {
          expect(containsPoint(bounds, { x: box[0], y: box[1] })).toBe(true)
          expect(containsPoint(bounds, { x: rightOf(box), y: bottomOf(box) })).toBe(true)
        }
      }),
    )
    expect(boundsOf([])).toBeNull()
  })
})

describe('touchedBy', () => {
  it('names what a marquee drawn from any corner touches', () => {
    const items = [
      { id: 'a', box: [0, 0, 10, 10] as Box },
      { id: 'b', box: [50, 50, 10, 10] as Box },
    ]
    expect(touchedBy(boxBetween({ x: 55, y: 55 }, { x: 5, y: 5 }), items)).toEqual(['a', 'b'])
    expect(touchedBy(boxBetween({ x: 20, y: 5 }, { x: 5, y: 20 }), items)).toEqual(['a'])
  })
})

describe('hitTest', () => {
  it('is the highest under the point, the later one among equals, null beside everything', () => {
    const items = [
      { id: 'low', box: [0, 0, 10, 10] as Box, z: 0 },
      { id: 'high', box: [5, 5, 10, 10] as Box, z: 2 },
      { id: 'later', box: [0, 0, 10, 10] as Box, z: 0 },
    ]
    expect(hitTest({ x: 7, y: 7 }, items)).toBe('high')
    expect(hitTest({ x: 1, y: 1 }, items)).toBe('later')
    expect(hitTest({ x: 40, y: 1 }, items)).toBeNull()
  })
})

describe('resizeBox', () => {
  it('leaves the opposite corner where it is', () => {
    fc.assert(
      fc.property(
        boxes,
        fc.integer({ min: -400, max: 400 }),
        fc.integer({ min: -400, max: 400 }),
        fc.boolean(),
        (box, dx, dy, keepAspect) => {
          const from = resizeBox(box, 'tl', dx, dy, { keepAspect, min: 8 })
          expect(rightOf(from)).toBeCloseTo(rightOf(box), 6)
          expect(bottomOf(from)).toBeCloseTo(bottomOf(box), 6)
          const to = resizeBox(box, 'br', dx, dy, { keepAspect, min: 8 })
          expect([to[0], to[1]]).toEqual([box[0], box[1]])
          expect(Math.min(from[2], from[3], to[2], to[3])).toBeGreaterThanOrEqual(8 - 1e-9)
        },
      ),
    )
  })

  it('keeps the proportions of what is inside the inset', () => {
    const [, , w, h] = resizeBox([0, 0, 212, 286], 'br', 100, 10, {
      keepAspect: true,
      min: 60,
      inset: { w: 12, h: 36 },
    })
    expect(w).toBeCloseTo(312, 6)
    expect((w - 12) / (h - 36)).toBeCloseTo(200 / 250, 6)
  })
})
