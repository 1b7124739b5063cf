import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cheapestPairs } from '#shared/domain/lighting/assign.ts'

function bruteForce(table: number[][], left: number, right: number): number {
  if (left > right)
    return bruteForce(
      Array.from({ length: right }, (_, j) => table.map((row) => row[j] ?? 0)),
      right,
      left,
    )
  const go = (row: number, taken: number): number => {
    if (row === left) return 0
    let best = Infinity
    for (let column = 0; column < right; column++) {
      if (!(taken & (1 << column)))
        best = Math.min(best, (table[row]?.[column] ?? 0) + go(row + 1, taken | (1 << column)))
    }
    return best
  }
  return go(0, 0)
}

describe('cheapestPairs', () => {
  it('takes the diagonal that costs less, although a first choice would not', () => {
    const cost = [
      [1, 2],
      [2, 9],
    ]
    expect(cheapestPairs([0, 1], [0, 1], (a, b) => [cost[a]?.[b] ?? 0])).toEqual([
      [0, 1],
      [1, 0],
    ])
  })
  it('decides ties by the next figure of the cost', () => {
    expect(cheapestPairs([0], [0, 1], (_, b) => [1, b === 0 ? 2 : 1])).toEqual([[0, 1]])
  })
  it('pairs as many as the smaller side has', () => {
    expect(cheapestPairs([], [1, 2], () => [0])).toEqual([])
    expect(cheapestPairs([5, 1, 9], [1], (a, b) => [Math.abs(a - b)])).toEqual([[1, 0]])
  })
  it('agrees with trying everything', () => {
    const side = fc.integer({ min: 0, max: 5 })
    fc.assert(
      fc.property(
        side,
        side,
        fc.array(fc.integer({ min: 0, max: 20 }), { minLength: 25, maxLength: 25 }),
        (left, right, values) => {
          const table = Array.from({ length: left }, (_, i) =>
            Array.from({ length: right }, (_unused, j) => values[i * 5 + j] ?? 0),
          )
          const pairs = cheapestPairs(
            [...table.keys()],
            Array.from({ length: right }, (_, j) => j),
            (a, b) => [table[a]?.[b] ?? 0],
          )
          expect(pairs).toHaveLength(Math.min(left, right))
          expect(pairs.reduce((sum, [a, b]) => sum + (table[a]?.[b] ?? 0), 0)).toBe(bruteForce(table, left, right))
        },
      ),
    )
  })
  it('pairs by order where there are more than twelve', () => {
    const many = Array.from({ length: 14 }, (_, index) => index)
    expect(cheapestPairs(many, many, () => [0])).toEqual(many.map((index) => [index, index]))
  })
})
