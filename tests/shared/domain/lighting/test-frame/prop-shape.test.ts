import { describe, expect, it } from 'vitest'
import { PROP_SHAPES } from '#shared/domain/lighting/schema.ts'
import { makeProp } from '#shared/domain/lighting/test-frame/prop-shape.ts'

describe('makeProp', () => {
  it('fills its width and height and does not leave them by much', () => {
    for (const shape of PROP_SHAPES) {
      const [width, height] = shape === 'cup' ? [0.09, 0.07] : [0.5, 0.9]
      const { own, wood, leaf } = makeProp(shape, width, height, 3)
      const all = (x: number, y: number, z: number) => Math.min(own(x, y, z), wood(x, y, z), leaf(x, y, z))
      let high = -Infinity
      let low = Infinity
      let wide = 0
      for (let i = -30; i <= 30; i++) {
        for (let j = -34; j <= 34; j++) {
          for (let k = -30; k <= 30; k++) {
            const x = (i / 25) * width
            const y = (j / 56) * height
            if (all(x, y, (k / 25) * width) >= 0) continue
            high = Math.max(high, y)
            low = Math.min(low, y)
            wide = Math.max(wide, Math.abs(x))
          }
        }
      }
      expect(high, shape).toBeLessThan(height * 0.56)
      expect(low, shape).toBeGreaterThan(-height * 0.56)
      // A ball and a cup are as wide as they may be within both measures; a saucer stands out.
      expect(wide, shape).toBeLessThan(width * (shape === 'cup' ? 1 : 0.56))
      expect(wide, shape).toBeGreaterThan(width * 0.3)
    }
  })
})
