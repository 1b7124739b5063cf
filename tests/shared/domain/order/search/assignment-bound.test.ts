import { describe, expect, it } from 'vitest'
import { assignmentBound } from '#shared/domain/order/search/assignment-bound.ts'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { Evaluator, NO_SCORE } from '#shared/domain/order/search/evaluate.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { handDay } from '#tests/support/hand-day.ts'
import { permutations } from '#tests/support/random-days.ts'

describe('assignmentBound', () => {
  it('is never above the least changeovers of any order, and often is that', () => {
    let exact = 0
    for (let seed = 0; seed < 60; seed++) {
      const random = seededRandom(seed)
      const cost = Array.from({ length: 30 }, () => Math.floor(random() * 50))
      const c = compile(handDay({ shots: [{}, {}, {}, {}, {}], light: (from, to) => cost[(from + 1) * 5 + to] ?? 0 }))
      const evaluator = new Evaluator(c)
      const wraps = [...permutations([0, 1, 2, 3, 4])].map((order) => evaluator.score(order, { ...NO_SCORE }).wrap)
      const least = Math.min(...wraps) - 540 - 150
      expect(assignmentBound(c)).toBeLessThanOrEqual(least)
      if (assignmentBound(c) === least) exact++
    }
    expect(exact).toBeGreaterThan(20)
  })

  it('is the only way of a day of one shot', () => {
    expect(assignmentBound(compile(handDay({ shots: [{}] })))).toBe(20)
  })
})
