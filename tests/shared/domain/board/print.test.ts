import { describe, expect, it } from 'vitest'
import { PRINT_INSET, fitPrint, printSize } from '#shared/domain/board/print.ts'

describe('printSize', () => {
  it('gives upright and across the same surface and the picture its own proportions', () => {
    for (const [widthPx, heightPx] of [
      [3000, 4000],
      [4000, 3000],
      [2000, 2000],
    ] as const) {
      const { w, h } = printSize(widthPx, heightPx)
      // Sides are whole units: half a unit of rounding on each.
      expect((w - PRINT_INSET.w) / (h - PRINT_INSET.h)).toBeCloseTo(widthPx / heightPx, 1)
      expect(Math.abs((w - PRINT_INSET.w) * (h - PRINT_INSET.h) - 48_000)).toBeLessThan(300)
    }
  })
})

describe('fitPrint', () => {
  it('keeps place and width', () => {
    expect(fitPrint([5, 6, 212, 100], 4000, 5000)).toEqual([5, 6, 212, 286])
  })
})
