import type { ShotId } from '#shared/ids.ts'
import { type Objective, compareObjectives, objectiveOf } from './objective.ts'
import type { OrderProblem } from './problem.ts'
import { schedule } from './schedule.ts'
import { assignmentBound } from './search/assignment-bound.ts'
import { type Compiled, compile } from './search/compiled.ts'
import { type Conflict, findConflict } from './search/conflict.ts'
import { compareScores, compareTies } from './search/evaluate.ts'
import { improveOrders } from './search/improve.ts'
import { type Known, LAYERS_MAX, earliestWrap, searchLayers } from './search/layers.ts'

/** Up to this many shots the answer is proven (unless the budget is smaller than any day needs). */
export const EXACT_SHOTS = 12

/** Units of work (one shot placed once) that a screen allows by default: a few seconds. */
export const DEFAULT_BUDGET = 5_000_000

export type ProposeOptions = { seed: number; budget: number }

export type Proposal = {
  sequence: readonly ShotId[]
  objective: Objective
  /** No order of these shots is better, by the whole objective. */
  proven: boolean
  /** No better order wraps before. */
  leastWrapMin: number
  /** Minutes between the wrap and `leastWrapMin`: what a better order might still save; 0 when proven. */
  gapMin: number
  /** Rules that contradict one another, when no order keeps all rules and that is known. */
  conflict: Conflict | null
  /** Units of work spent so far. */
  spent: number
}

/**
 * Finds the best order of a day by `compareObjectives`, in steps: yields the first answer after a few evaluations (the
 * order as it stands is the first candidate, so the answer is never worse), then every better one, and the latest
 * again while working on, so that it can be stopped at any time. The same problem, seed and budget give the same answer.
 *
 * Local search gives a good order; a search in layers with Pareto labels then proves the best one, or, where a day is too
 * large for that, keeps the most promising and says how early a better order might wrap.
 */
export function* proposalSteps(problem: OrderProblem, options: ProposeOptions): Generator<Proposal, Proposal> {
  const c = compile(problem)
  const run = new Run(problem, c)
  const small = c.n <= EXACT_SHOTS
  const share = small ? Math.min(options.budget / 4, 1500 * c.n) : options.budget / 8
  yield* run.improve(options.seed, c.n > LAYERS_MAX ? options.budget : share)
  if (run.best.score.broken > 0) yield* run.proveBreaches(options)
  let width = small ? Infinity : 2000
  for (let pass = 1; !run.proven && c.n <= LAYERS_MAX && run.spent < options.budget; pass++) {
    const all = yield* run.layers(run.best.score.broken === 0, width, options.budget)
    if (all) break
    width *= 5
    yield* run.improve(options.seed + pass, Math.min(options.budget / 10, options.budget - run.spent))
  }
  return run.proposal()
}

/** Runs `proposalSteps` to its end; `onBetter` hears of every better order and of the last. */
export function proposeOrder(
  problem: OrderProblem,
  options: ProposeOptions & { onBetter?: (proposal: Proposal) => void },
): Proposal {
  let told: readonly ShotId[] | null = null
  const steps = proposalSteps(problem, options)
  for (;;) {
    const step = steps.next()
    if (step.done || step.value.sequence !== told) {
      told = step.value.sequence
      options.onBetter?.(step.value)
    }
    if (step.done) return step.value
  }
}

class Run {
  best: Known
  spent = 0
  proven = false
  private conflict: Conflict | null = null
  private leastWrap: number
  private answer: { of: Known; sequence: readonly ShotId[]; objective: Objective }
  private readonly problem: OrderProblem
  private readonly c: Compiled

  constructor(problem: OrderProblem, c: Compiled) {
    this.problem = problem
    this.c = c
    this.leastWrap = leastWrapOf(c)
    this.best = {
      order: problem.shots.map((_, shot) => shot),
      score: { broken: Infinity, must: 0, should: 0, wrap: Infinity, light: 0, wait: 0, lateMin: 0 },
    }
    this.answer = this.answerOf(this.best)
  }

  *improve(seed: number, work: number): Generator<Proposal, void> {
    const before = this.spent
    for (const progress of improveOrders(this.c, { seed, work })) {
      this.spent = before + progress.spent
      this.take(progress.best)
      yield this.proposal()
    }
  }

  /** Whether no order keeps all rules, and if so which rules contradict one another. */
  *proveBreaches(options: ProposeOptions): Generator<Proposal, void> {
    if (this.c.n > LAYERS_MAX) return
    const whole = yield* this.layers(true, this.c.n <= EXACT_SHOTS ? Infinity : 50_000, options.budget / 2)
    if (!whole || this.best.score.broken === 0) return
    this.proven = false
    const filter = findConflict(this.problem, {
      seed: options.seed,
      work: this.c.n <= EXACT_SHOTS ? options.budget : options.budget / 4,
    })
    for (;;) {
      const turn = filter.next()
      if (turn.done) {
        this.conflict = turn.value
        return
      }
      yield this.proposal()
    }
  }

  /** One search in layers; true when it went through everything. */
  *layers(strict: boolean, width: number, budget: number): Generator<Proposal, boolean> {
    const before = this.spent
    const known = strict && this.best.score.broken > 0 ? null : this.best
    const search = searchLayers(this.c, { known, strict, width, work: budget - before })
    let turn = search.next()
    while (!turn.done) {
      this.spent = before + turn.value
      yield this.proposal()
      turn = search.next()
    }
    const { best, complete, leastWrap, spent } = turn.value
    this.spent = before + spent
    if (best) this.take(best)
    const decided = strict === (this.best.score.broken === 0)
    if (decided) this.leastWrap = Math.max(this.leastWrap, Math.min(leastWrap, this.best.score.wrap))
    this.proven = complete && decided
    yield this.proposal()
    return complete
  }

  proposal(): Proposal {
    if (this.answer.of !== this.best) this.answer = this.answerOf(this.best)
    const { sequence, objective } = this.answer
    const leastWrapMin = this.proven ? objective.wrapMin : Math.min(this.leastWrap, objective.wrapMin)
    return {
      sequence,
      objective,
      proven: this.proven,
      leastWrapMin,
      gapMin: objective.wrapMin - leastWrapMin,
      conflict: this.conflict,
      spent: Math.round(this.spent),
    }
  }

  private take(known: Known): void {
    const ahead = compareScores(known.score, this.best.score) || compareTies(this.c, known.order, this.best.order)
    if (ahead < 0) this.best = known
  }

  private answerOf(known: Known): { of: Known; sequence: readonly ShotId[]; objective: Objective } {
    const sequence = known.order.flatMap((shot) => this.problem.shots[shot]?.id ?? [])
    return { of: known, sequence, objective: objectiveOf(this.problem, schedule(this.problem, sequence)) }
  }
}

/** No order wraps before: all shots, the meal and the cheapest ways in; or one shot after another as they become possible. */
function leastWrapOf(c: Compiled): number {
  if (c.n === 0) return c.lightsOn
  const shots = c.minutes.reduce((sum, minutes) => sum + minutes, 0)
  const path = c.lightsOn + shots + (c.hasMeal && c.n > 1 ? c.mealMin : 0) + assignmentBound(c)
  return Math.max(path, earliestWrap(c, 0, c.lightsOn))
}

/** Whether a proposal is better than the order as it stands, by the objective. */
export function isBetter(problem: OrderProblem, proposal: Proposal): boolean {
  const present = problem.shots.map((shot) => shot.id)
  return compareObjectives(proposal.objective, objectiveOf(problem, schedule(problem, present))) < 0
}
