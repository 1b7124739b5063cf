import { describe, expect, it } from 'vitest'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { compareObjectives, objectiveOf } from '#shared/domain/order/objective.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { type LayersResult, earliestWrap, searchLayers } from '#shared/domain/order/search/layers.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { handDay } from '#tests/support/hand-day.ts'
import { permutations, plannedDay, randomDay } from '#tests/support/random-days.ts'

function run(problem: OrderProblem, strict: boolean, width = Infinity, work = Infinity): LayersResult {
  const search = searchLayers(compile(problem), { known: null, strict, width, work })
  let turn = search.next()
  while (!turn.done) turn = search.next()
  return turn.value
}

function bruteForce(problem: OrderProblem) {
  const all = [...permutations(problem.shots.map((shot) => shot.id))].map((ids) =>
    objectiveOf(problem, schedule(problem, ids)),
  )
  return all.reduce((best, objective) => (compareObjectives(objective, best) < 0 ? objective : best))
}

describe('searchLayers', () => {
  it('finds by itself what trying all orders finds, strictly where no rule need be broken', () => {
    for (let seed = 0; seed < 60; seed++) {
      const problem = randomDay(seededRandom(seed + 9000), {
        shots: 2 + (seed % 5),
        rules: seed % 6,
        sitters: 1 + (seed % 4),
      })
      const best = bruteForce(problem)
      const loose = run(problem, false)
      expect(loose.best?.order.map((shot) => problem.shots[shot]?.id)).toEqual(best.sequence)
      const strict = run(problem, true)
      expect(strict.complete).toBe(true)
      if (best.broken > 0) expect(strict.best).toBeNull()
      else expect(strict.best?.order).toEqual(loose.best?.order)
    }
  })

  it('says with a narrow beam, or stopped early, that it is not complete, and no wrap that is too late', () => {
    const problem = plannedDay(seededRandom(4), { shots: 10, rules: 3, sitters: 3 })
    const exact = run(problem, true)
    for (const partial of [run(problem, true, 5), run(problem, true, Infinity, 400)]) {
      expect(partial.complete).toBe(false)
      expect(partial.leastWrap).toBeLessThanOrEqual(exact.best?.score.wrap ?? 0)
    }
    expect(exact.leastWrap).toBe(exact.best?.score.wrap)
  })
})

describe('earliestWrap', () => {
  it('waits for what cannot begin sooner', () => {
    const c = compile(handDay({ shots: [{}, {}], rules: [{ kind: 'window', shot: 1, fromMin: 800, toMin: 900 }] }))
    expect(earliestWrap(c, 0, 540)).toBe(830)
    expect(earliestWrap(c, 0b10, 540)).toBe(580)
  })
})
