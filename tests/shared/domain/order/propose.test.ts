import { describe, expect, it } from 'vitest'
import { type Objective, compareObjectives, objectiveOf } from '#shared/domain/order/objective.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { DEFAULT_BUDGET, isBetter, proposalSteps, proposeOrder } from '#shared/domain/order/propose.ts'
import { ruleKeys, withOnlyRules } from '#shared/domain/order/rules.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { permutations, randomDay } from '#tests/support/random-days.ts'

const OPTIONS = { seed: 1, budget: DEFAULT_BUDGET }

function bruteForce(problem: OrderProblem): Objective {
  let best: Objective | null = null
  for (const sequence of permutations(problem.shots.map((shot) => shot.id))) {
    const objective = objectiveOf(problem, schedule(problem, sequence))
    if (best === null || compareObjectives(objective, best) < 0) best = objective
  }
  if (best === null) throw new Error('no order')
  return best
}

describe('proposeOrder', () => {
  it.each(Array.from({ length: 10 }, (_, block) => block))(
    'finds what trying all orders finds, whole objective and order, on 20 random days (block %i)',
    (block) => {
      for (let number = 0; number < 20; number++) {
        const random = seededRandom(block * 1000 + number)
        const shots = 2 + Math.floor(random() * 5)
        const problem = randomDay(random, { shots, rules: 4 })
        const proposal = proposeOrder(problem, OPTIONS)
        expect({ day: [block, number], ...proposal.objective }).toEqual({ day: [block, number], ...bruteForce(problem) })
        expect(proposal.proven).toBe(true)
      }
    },
  )
})
