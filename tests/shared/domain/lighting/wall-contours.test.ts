import { describe, expect, it } from 'vitest'
import { wallContours } from '#shared/domain/lighting/wall-contours.ts'
import type { WallMap } from '#shared/domain/lighting/wall.ts'

function mapOf(value: (x: number, y: number) => number | null, count = 41): WallMap {
  const xM = Array.from({ length: count }, (_, index) => -1 + (2 * index) / (count - 1))
  const yM = Array.from({ length: count }, (_, index) => 2 - (2 * index) / (count - 1))
  return { xM, yM, underMainStops: yM.map((y) => xM.map((x) => value(x, y))) }
}

describe('wallContours', () => {
  it('draws an even slope as straight lines where it is a whole number of stops', () => {
    const contours = wallContours(mapOf((x) => 2.5 + 2 * x))
    expect(contours.map((contour) => contour.stops)).toEqual([1, 2, 3, 4])
    for (const { stops, pieces } of contours) {
      for (const [x1, , x2] of pieces) {
        expect(x1).toBeCloseTo((stops - 2.5) / 2, 9)
        expect(x2).toBeCloseTo((stops - 2.5) / 2, 9)
      }
      const length = pieces.reduce((sum, [x1, y1, x2, y2]) => sum + Math.hypot(x2 - x1, y2 - y1), 0)
      expect(length).toBeCloseTo(2, 9)
    }
  })

  it('draws a round glow as circles: radius and length against πd', () => {
    const contours = wallContours(mapOf((x, y) => 8 * (x ** 2 + (y - 1) ** 2) - 0.5, 201))
    const first = contours.find((contour) => contour.stops === 1)
    const radius = Math.sqrt(1.5 / 8)
    const length = first?.pieces.reduce((sum, [x1, y1, x2, y2]) => sum + Math.hypot(x2 - x1, y2 - y1), 0)
    expect(length).toBeCloseTo(2 * Math.PI * radius, 2)
    for (const [x, y] of first?.pieces ?? []) expect(Math.hypot(x, y - 1)).toBeCloseTo(radius, 3)
  })

  it('draws nothing on a wall that is dark, even, or not seen', () => {
    expect(wallContours(mapOf(() => Infinity))).toEqual([])
    expect(wallContours(mapOf(() => 1.5))).toEqual([])
    expect(wallContours(mapOf(() => null))).toEqual([])
  })

  it('draws no line into what the camera does not see', () => {
    const contours = wallContours(mapOf((x) => (x > 0 ? null : 2.5 + 2 * x)))
    expect(contours.map((contour) => contour.stops)).toEqual([1, 2])
  })
})
