import type { OrderProblem } from '../problem.ts'
import { type RuleKey, ruleKeys, withOnlyRules } from '../rules.ts'
import { compile } from './compiled.ts'
import { improveOrders } from './improve.ts'
import { searchLayers } from './layers.ts'

/** Rules that cannot all be kept. `minimal`: leaving out any one of them makes the others possible. */
export type Conflict = { keys: RuleKey[]; minimal: boolean }

const SHORT_WORK = 3000
const WIDTH = 200_000

/**
 * A set of rules that contradict one another, given that all of them do: each in turn is left out, for good when the
 * rest still cannot be kept (deletion filter). Where the work allowed does not decide, the rule stays and the set is
 * not called minimal. Yields the work spent.
 */
export function* findConflict(
  problem: OrderProblem,
  options: { seed: number; work: number },
): Generator<number, Conflict> {
  let keys = ruleKeys(problem)
  let minimal = true
  let spent = 0
  for (const key of [...keys]) {
    const without = keys.filter((other) => other !== key)
    const answer = yield* canKeep(withOnlyRules(problem, new Set(without)), {
      seed: options.seed,
      work: options.work - spent,
    })
    spent += answer.spent
    if (answer.kind === 'no') keys = without
    if (answer.kind === 'unknown') minimal = false
  }
  return { keys, minimal }
}

/** Whether some order keeps every rule of a problem. */
function* canKeep(
  problem: OrderProblem,
  options: { seed: number; work: number },
): Generator<number, { kind: 'yes' | 'no' | 'unknown'; spent: number }> {
  const c = compile(problem)
  let spent = 0
  for (const progress of improveOrders(c, { seed: options.seed, work: Math.min(SHORT_WORK, options.work) })) {
    spent = progress.spent
    if (progress.best.score.broken === 0) return { kind: 'yes', spent }
    yield spent
  }
  const search = searchLayers(c, { known: null, strict: true, width: WIDTH, work: options.work - spent })
  let turn = search.next()
  while (!turn.done) {
    yield spent + turn.value
    turn = search.next()
  }
  const { best, complete } = turn.value
  return { kind: best ? 'yes' : complete ? 'no' : 'unknown', spent: spent + turn.value.spent }
}
