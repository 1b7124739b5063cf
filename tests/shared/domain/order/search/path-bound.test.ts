import { describe, expect, it } from 'vitest'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { bitCount, orderRules, pathBound } from '#shared/domain/order/search/path-bound.ts'
import { Evaluator, NO_SCORE } from '#shared/domain/order/search/evaluate.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { handDay } from '#tests/support/hand-day.ts'
import { permutations, randomDay } from '#tests/support/random-days.ts'

describe('pathBound', () => {
  it('is exact where nothing but light takes time', () => {
    const random = seededRandom(2)
    const cost = Array.from({ length: 30 }, () => 1 + Math.floor(random() * 40))
    const c = compile(handDay({ shots: [{}, {}, {}, {}, {}], light: (from, to) => cost[(from + 1) * 5 + to] ?? 0 }))
    const best = (first: number) => {
      const orders = [...permutations([0, 1, 2, 3, 4])].filter((order) => order[0] === first)
      return Math.min(...orders.map((order) => new Evaluator(c).score(order, { ...NO_SCORE }).wrap))
    }
    const bound = pathBound(c, false)
    for (let first = 0; first < 5; first++) {
      expect(540 + (cost[first] ?? 0) + 30 + bound.minutes(1 << first, first)).toBe(best(first))
    }
  })

  it('is never above what an order takes, for few shots and for many', () => {
    for (let seed = 0; seed < 30; seed++) {
      const problem = randomDay(seededRandom(seed), { shots: seed % 2 === 0 ? 9 : 18, rules: 0, meal: false })
      const c = compile(problem)
      const order = problem.shots.map((_, shot) => shot)
      const bound = pathBound(c, false)
      const evaluator = new Evaluator(c)
      const first = order[0] ?? 0
      const whole = evaluator.score(order, { ...NO_SCORE })
      expect((c.delta[first] ?? 0) + c.lightsOn + (c.minutes[first] ?? 0) + bound.minutes(1, 0)).toBeLessThanOrEqual(
        whole.wrap,
      )
      expect(bound.lights(1, 0)).toBeLessThanOrEqual(whole.light)
    }
  })

  it('knows no way on where places contradict one another', () => {
    const c = compile(
      handDay({
        shots: [{}, {}, {}],
        rules: [
          { kind: 'after', shot: 1, after: 2 },
          { kind: 'pin-place', shot: 1, index: 1 },
        ],
      }),
    )
    expect(pathBound(c, true).minutes(0b001, 0)).toBe(Infinity)
    expect(pathBound(c, true).minutes(0b100, 2)).toBeLessThan(Infinity)
    expect(pathBound(c, false).minutes(0b001, 0)).toBeLessThan(Infinity)
  })
})

describe('orderRules', () => {
  it('lets nothing in between shots that belong together', () => {
    const allowed = orderRules(compile(handDay({ shots: [{}, {}, {}], rules: [{ kind: 'together', shots: [0, 2] }] })))
    expect(allowed(0b001, 0, 1)).toBe(false)
    expect(allowed(0b001, 0, 2)).toBe(true)
    expect(allowed(0b101, 2, 1)).toBe(true)
  })
})

describe('bitCount', () => {
  it('counts', () => {
    expect([0, 1, 0b1011].map(bitCount)).toEqual([0, 1, 3])
  })
})
