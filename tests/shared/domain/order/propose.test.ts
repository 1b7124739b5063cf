import { describe, expect, it } from 'vitest'
import { type Objective, compareObjectives, objectiveOf } from '#shared/domain/order/objective.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { DEFAULT_BUDGET, isBetter, proposalSteps, proposeOrder } from '#shared/domain/order/propose.ts'
import { type RuleKey, withOnlyRules } from '#shared/domain/order/rules.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { handDay, inOrder, ruleId } from '#tests/support/hand-day.ts'
import { permutations, plannedDay, randomDay } from '#tests/support/random-days.ts'

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
        const shots = 2 + Math.floor(random() * 6)
        const problem = randomDay(random, { shots, rules: 4 })
        const proposal = proposeOrder(problem, OPTIONS)
        expect({ day: [block, number], ...proposal.objective }).toEqual({
          day: [block, number],
          ...bruteForce(problem),
        })
        expect(proposal.proven).toBe(true)
      }
    },
  )
})

describe('proposeOrder, beyond small days', () => {
  it('proves twelve shots with rules of every kind', () => {
    for (const seed of [1, 2, 3]) {
      const problem = plannedDay(seededRandom(seed), { shots: 12, rules: 8, sitters: 4, setups: 5, meal: true })
      const proposal = proposeOrder(problem, OPTIONS)
      expect(proposal).toMatchObject({ proven: true, gapMin: 0, conflict: null, objective: { broken: 0 } })
    }
  })

  it('never answers worse than the order as it stands, and says how much earlier a better one might wrap', () => {
    const problem = plannedDay(seededRandom(5), { shots: 20, rules: 8, sitters: 4, setups: 5, meal: true })
    const proposal = proposeOrder(problem, { seed: 1, budget: 200_000 })
    const present = objectiveOf(
      problem,
      schedule(
        problem,
        problem.shots.map((shot) => shot.id),
      ),
    )
    expect(compareObjectives(proposal.objective, present)).toBeLessThanOrEqual(0)
    expect(proposal.leastWrapMin + proposal.gapMin).toBe(proposal.objective.wrapMin)
    expect(new Set(proposal.sequence)).toEqual(new Set(problem.shots.map((shot) => shot.id)))
  })

  it('answers for more shots than sets of shots can be kept for', () => {
    const problem = randomDay(seededRandom(6), { shots: 40, rules: 6, sitters: 5, setups: 6 })
    const proposal = proposeOrder(problem, { seed: 1, budget: 100_000 })
    expect(proposal.sequence).toHaveLength(40)
    expect(proposal.objective).toEqual(objectiveOf(problem, schedule(problem, proposal.sequence)))
  })

  it('gives the same answer to the same seed and budget', () => {
    const problem = plannedDay(seededRandom(7), { shots: 16, rules: 6, sitters: 3 })
    const options = { seed: 4, budget: 150_000 }
    expect(proposeOrder(problem, options)).toEqual(proposeOrder(problem, options))
  })

  it('tells of better and better orders and can be stopped after any', () => {
    const problem = plannedDay(seededRandom(8), { shots: 14, rules: 6, sitters: 3 })
    const told: Objective[] = []
    const last = proposeOrder(problem, {
      seed: 1,
      budget: 100_000,
      onBetter: (proposal) => told.push(proposal.objective),
    })
    told
      .slice(1)
      .forEach((objective, index) =>
        expect(compareObjectives(objective, told[index] ?? objective)).toBeLessThanOrEqual(0),
      )
    expect(told.at(-1)).toEqual(last.objective)
    expect(proposalSteps(problem, { seed: 1, budget: 100_000 }).next().value.sequence).toHaveLength(14)
  })

  it('is content with no shots and with one', () => {
    expect(proposeOrder(handDay({ shots: [] }), OPTIONS)).toMatchObject({ sequence: [], proven: true, gapMin: 0 })
    expect(proposeOrder(handDay({ shots: [{}] }), OPTIONS)).toMatchObject({ sequence: inOrder(0), proven: true })
  })

  it('names rules that contradict one another, none of which can be left out', () => {
    const problem = handDay({
      shots: [{}, {}, {}, {}],
      rules: [
        { kind: 'pin-place', shot: 3, index: -1 },
        { kind: 'after', shot: 0, after: 1 },
        { kind: 'after', shot: 1, after: 2 },
        { kind: 'after', shot: 2, after: 0 },
        { kind: 'window', shot: 3, fromMin: 500, toMin: 1200 },
      ],
    })
    const proposal = proposeOrder(problem, OPTIONS)
    expect(proposal).toMatchObject({ proven: true, objective: { broken: 1 } })
    expect(proposal.conflict).toEqual({ minimal: true, keys: [1, 2, 3].map((index) => `rule:${ruleId(index)}`) })
  })

  it('finds minimal contradictions on random days', () => {
    let contradictions = 0
    for (let seed = 0; seed < 40; seed++) {
      const problem = randomDay(seededRandom(seed + 500), { shots: 5, rules: 5 })
      const { conflict } = proposeOrder(problem, OPTIONS)
      if (conflict === null) continue
      contradictions++
      expect(conflict.minimal).toBe(true)
      const brokenWith = (keys: readonly RuleKey[]) => bruteForce(withOnlyRules(problem, new Set(keys))).broken
      expect(brokenWith(conflict.keys)).toBeGreaterThan(0)
      for (const key of conflict.keys) expect(brokenWith(conflict.keys.filter((other) => other !== key))).toBe(0)
    }
    expect(contradictions).toBeGreaterThan(5)
  })

  it('finds the waits of CSPLib problem 039 (talent scheduling, concert): 49 as given, 17 at best', () => {
    // Nine pieces, five players; rows are players, columns pieces. https://www.csplib.org/Problems/prob039/
    const plays = ['110101101', '110111010', '110000110', '100011001', '001011110']
    const minutes = [2, 4, 1, 3, 3, 2, 5, 7, 7]
    const players = plays.map((_, player) => `Player ${player}`)
    const problem = handDay({
      shots: minutes.map((length, piece) => ({
        minutes: length,
        looks: players.filter((_, player) => plays[player]?.[piece] === '1'),
      })),
      looks: Object.fromEntries(players.map((name) => [name, { sitter: name, changeMin: 0 }])),
      light: () => 0,
    })
    const present = schedule(
      problem,
      problem.shots.map((shot) => shot.id),
    )
    expect(present.waitingMin).toBe(49)
    expect(proposeOrder(problem, OPTIONS)).toMatchObject({ proven: true, objective: { waitingMin: 17 } })
  })
})

describe('isBetter', () => {
  it('is false for the order as it stands', () => {
    const problem = handDay({ shots: [{}, {}] })
    const proposal = proposeOrder(problem, OPTIONS)
    expect(proposal.sequence).toEqual(inOrder(0, 1))
    expect(isBetter(problem, proposal)).toBe(false)
  })
})
