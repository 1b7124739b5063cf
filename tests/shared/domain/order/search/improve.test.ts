import { describe, expect, it } from 'vitest'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { Evaluator, NO_SCORE, compareScores } from '#shared/domain/order/search/evaluate.ts'
import { improveOrders } from '#shared/domain/order/search/improve.ts'
import { searchLayers } from '#shared/domain/order/search/layers.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { plannedDay } from '#tests/support/random-days.ts'

describe('improveOrders', () => {
  const c = compile(plannedDay(seededRandom(3), { shots: 14, rules: 6, sitters: 3 }))
  const all = [...improveOrders(c, { seed: 1, work: 30_000 })]

  it('gets better from answer to answer and scores them rightly', () => {
    all
      .slice(1)
      .forEach(({ best }, index) =>
        expect(compareScores(best.score, all[index]?.best.score ?? best.score)).toBeLessThanOrEqual(0),
      )
    const last = all.at(-1)?.best
    expect(last && new Evaluator(c).score(last.order, { ...NO_SCORE })).toEqual(last?.score)
  })

  it('stops when its work is spent', () => {
    expect(all.at(-1)?.spent).toBeLessThan(60_000)
  })

  it('comes to the wrap that is proven the earliest on most small days', () => {
    let reached = 0
    for (let seed = 0; seed < 15; seed++) {
      const day = compile(plannedDay(seededRandom(seed), { shots: 8, rules: 4, sitters: 2 }))
      const best = [...improveOrders(day, { seed, work: 12_000 })].at(-1)?.best ?? null
      const search = searchLayers(day, { known: best, strict: false, width: Infinity, work: Infinity })
      let turn = search.next()
      while (!turn.done) turn = search.next()
      if (turn.value.leastWrap === best?.score.wrap && best.score.broken === 0) reached++
    }
    expect(reached).toBeGreaterThanOrEqual(13)
  })
})
