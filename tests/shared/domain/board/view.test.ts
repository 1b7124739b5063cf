import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  MAX_ZOOM,
  MIN_ZOOM,
  fitBox,
  panBy,
  pinch,
  reveal,
  toScreen,
  toWall,
  visibleBox,
  wheelFactor,
  zoomAt,
} from '#shared/domain/board/view.ts'

const views = fc.record({
  x: fc.double({ min: -9000, max: 9000, noNaN: true }),
  y: fc.double({ min: -9000, max: 9000, noNaN: true }),
  zoom: fc.double({ min: MIN_ZOOM, max: MAX_ZOOM, noNaN: true }),
})
const points = fc.record({ x: fc.integer({ min: 0, max: 1440 }), y: fc.integer({ min: 0, max: 900 }) })
const viewport = { widthPx: 1000, heightPx: 600 }

describe('toWall', () => {
  it('is undone by toScreen', () => {
    fc.assert(
      fc.property(views, points, (view, px) => {
        const back = toScreen(view, toWall(view, px))
        expect(back.x).toBeCloseTo(px.x, 6)
        expect(back.y).toBeCloseTo(px.y, 6)
      }),
    )
  })
})

describe('zoomAt', () => {
  it('keeps the wall point under the pointer and stays inside the limits', () => {
    fc.assert(
      fc.property(views, points, fc.double({ min: 0.01, max: 100, noNaN: true }), (view, px, factor) => {
        const after = zoomAt(view, px, factor)
        expect(toWall(after, px).x).toBeCloseTo(toWall(view, px).x, 5)
        expect(toWall(after, px).y).toBeCloseTo(toWall(view, px).y, 5)
        expect(after.zoom).toBeGreaterThanOrEqual(MIN_ZOOM)
        expect(after.zoom).toBeLessThanOrEqual(MAX_ZOOM)
      }),
    )
  })
})

describe('wheelFactor', () => {
  it('zooms in as much as it zooms out', () => {
    expect(wheelFactor(100) * wheelFactor(-100)).toBeCloseTo(1, 12)
    expect(wheelFactor(-100)).toBeGreaterThan(1)
  })
})

describe('panBy', () => {
  it('moves the wall with the hand at any zoom', () => {
    const before = { x: 40, y: 10, zoom: 0.5 }
    const point = { x: 100, y: 100 }
    const moved = toScreen(panBy(before, 30, -20), point)
    const was = toScreen(before, point)
    expect(moved.x - was.x).toBeCloseTo(30, 9)
    expect(moved.y - was.y).toBeCloseTo(-20, 9)
  })
})

describe('pinch', () => {
  it('doubles the zoom when the fingers double their distance and holds what is between them', () => {
    const view = { x: 0, y: 0, zoom: 1 }
    const after = pinch(
      view,
      [
        { x: 100, y: 100 },
        { x: 200, y: 100 },
      ],
      [
        { x: 50, y: 120 },
        { x: 250, y: 120 },
      ],
    )
    expect(after.zoom).toBeCloseTo(2, 9)
    expect(toScreen(after, { x: 150, y: 100 })).toEqual({ x: 150, y: 120 })
  })
})

describe('fitBox', () => {
  it('shows the whole box in the middle, never larger than life', () => {
    const view = fitBox([-200, 50, 4000, 900], viewport, 40)
    const seen = visibleBox(view, viewport)
    expect(seen[0]).toBeLessThanOrEqual(-200)
    expect(seen[0] + seen[2]).toBeGreaterThanOrEqual(3800)
    expect(toScreen(view, { x: 1800, y: 500 }).x).toBeCloseTo(500, 6)
    expect(toScreen(view, { x: 1800, y: 500 }).y).toBeCloseTo(300, 6)
    expect(fitBox([0, 0, 100, 100], viewport, 40).zoom).toBe(1)
  })
})

describe('reveal', () => {
  it('leaves the view alone when the box is seen, and goes just far enough when not', () => {
    const view = { x: 0, y: 0, zoom: 1 }
    expect(reveal(view, [100, 100, 200, 200], viewport, 20)).toBe(view)
    expect(reveal(view, [1100, 100, 200, 200], viewport, 20)).toEqual({ x: 320, y: 0, zoom: 1 })
    expect(reveal(view, [-300, 100, 200, 200], viewport, 20)).toEqual({ x: -320, y: 0, zoom: 1 })
  })
})
