import { describe, expect, it } from 'vitest'
import { seededRandom } from '#shared/domain/order/search/random.ts'

describe('seededRandom', () => {
  const draw = (seed: number, count: number) => {
    const random = seededRandom(seed)
    return Array.from({ length: count }, random)
  }

  it('depends on the seed alone', () => {
    expect(draw(7, 5)).toEqual(draw(7, 5))
    expect(draw(7, 5)).not.toEqual(draw(8, 5))
  })

  it('lies in [0, 1) and is spread evenly', () => {
    const drawn = draw(1, 20_000)
    expect(drawn.every((value) => value >= 0 && value < 1)).toBe(true)
    // Standard error of the mean of 20 000 is .002.
    expect(Math.abs(drawn.reduce((sum, value) => sum + value, 0) / drawn.length - 0.5)).toBeLessThan(0.01)
  })
})
