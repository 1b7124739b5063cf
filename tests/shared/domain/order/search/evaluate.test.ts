import { describe, expect, it } from 'vitest'
import { movedShots, objectiveOf } from '#shared/domain/order/objective.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { Evaluator, NO_SCORE, compareScores, compareTies, movedIn } from '#shared/domain/order/search/evaluate.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { handDay } from '#tests/support/hand-day.ts'
import { randomDay } from '#tests/support/random-days.ts'

describe('Evaluator', () => {
  it('agrees with the schedule on random days and orders, whose meals and chairs it works out another way', () => {
    for (let seed = 0; seed < 250; seed++) {
      const random = seededRandom(seed)
      const problem = randomDay(random, { shots: 2 + (seed % 9), rules: 6, sitters: 1 + (seed % 4) })
      const order = problem.shots.map((_, shot) => shot).sort(() => random() - 0.5)
      const { broken, must, should, wrap, light, wait } = new Evaluator(compile(problem)).score(order, { ...NO_SCORE })
      const objective = objectiveOf(
        problem,
        schedule(
          problem,
          order.flatMap((shot) => problem.shots[shot]?.id ?? []),
        ),
      )
      expect({ seed, broken, must, should, wrap, light, wait }).toEqual({
        seed,
        broken: objective.broken,
        must: objective.mustNotMade,
        should: objective.shouldNotMade,
        wrap: objective.wrapMin,
        light: objective.lightingChanges,
        wait: objective.waitingMin,
      })
      expect(movedIn(order)).toBe(
        movedShots(
          problem.shots.map((shot) => shot.id),
          objective.sequence,
        ),
      )
    }
  })
})

describe('compareScores', () => {
  it('looks at breaches before the wrap, and not at minutes late', () => {
    const score = { ...NO_SCORE, broken: 0, wrap: 700 }
    expect(compareScores({ ...score, broken: 1, wrap: 600 }, score)).toBeGreaterThan(0)
    expect(compareScores({ ...score, lateMin: 9 }, { ...score, lateMin: 0 })).toBe(0)
  })
})

describe('compareTies', () => {
  it('takes the order with fewer shots moved, then that of the ids', () => {
    const c = compile(handDay({ shots: [{}, {}, {}] }))
    expect(compareTies(c, [0, 2, 1], [2, 1, 0])).toBeLessThan(0)
    expect(compareTies(c, [0, 2, 1], [1, 0, 2])).toBeLessThan(0)
    expect(compareTies(c, [1, 0, 2], [1, 0, 2])).toBe(0)
  })
})
