import { describe, expect, it } from 'vitest'
import {
  LARGE_PIXELS,
  ROUGH_PIXELS,
  STRIP_PIXELS,
  pictureSize,
} from '#shared/domain/lighting/test-frame/picture-size.ts'

describe('pictureSize', () => {
  it('has square pixels: the shape of the 24 × 36 mm frame, to a pixel', () => {
    for (const pixels of [ROUGH_PIXELS, STRIP_PIXELS, LARGE_PIXELS]) {
      const upright = pictureSize('upright', pixels)
      expect(Math.abs(upright.height - upright.width * 1.5)).toBeLessThanOrEqual(1)
      expect(pictureSize('across', pixels)).toEqual({ width: upright.height, height: upright.width })
      const square = pictureSize('square', pixels)
      expect(square.width).toBe(square.height)
    }
  })

  it('has about so many pixels', () => {
    for (const orientation of ['upright', 'across', 'square'] as const) {
      const { width, height } = pictureSize(orientation, LARGE_PIXELS)
      expect((width * height) / LARGE_PIXELS).toBeCloseTo(1, 2)
    }
  })
})
