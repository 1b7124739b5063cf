import { performance } from 'node:perf_hooks'
import { parseArgs } from 'node:util'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { DEFAULT_BUDGET, type Proposal, proposalSteps } from '#shared/domain/order/propose.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { plannedDay } from '#tests/support/random-days.ts'
import { readInstances } from './order/instances.ts'

/**
 * Orders proposed for made-up days on which every kind of rule can be kept, and (`--instances DIR`) for published
 * instances, at most 2 s each. One JSON line a measurement. `--cpu` counts this process's CPU time instead of
 * the wall clock, for a machine that has other work to do.
 */
const DAYS = 20
const INSTANCE_MS = 2_000

const { values } = parseArgs({ options: { instances: { type: 'string' }, cpu: { type: 'boolean', default: false } } })

const nowMs = () => (values.cpu ? process.cpuUsage().user / 1000 : performance.now())

type Timed = { proposal: Proposal; firstMs: number; bestMs: number; ms: number }

function timed(problem: OrderProblem, budget: number, limitMs = Infinity): Timed {
  const startedMs = nowMs()
  const sinceMs = () => nowMs() - startedMs
  let firstMs = 0
  let bestMs = 0
  let proposal: Proposal | null = null
  for (const step of proposalSteps(problem, { seed: 1, budget })) {
    if (proposal === null) firstMs = sinceMs()
    if (step.sequence !== proposal?.sequence) bestMs = sinceMs()
    proposal = step
    if (sinceMs() > limitMs) break
  }
  if (proposal === null) throw new Error('no proposal')
  return { proposal, firstMs, bestMs, ms: sinceMs() }
}

const print = (line: unknown) => process.stdout.write(`${JSON.stringify(line)}\n`)
const round = (value: number, digits = 1) => Number(value.toFixed(digits))
const worst = (numbers: readonly number[]) => round(Math.max(...numbers))
const median = (numbers: readonly number[]) =>
  round([...numbers].sort((a, b) => a - b)[Math.floor(numbers.length / 2)] ?? 0)

for (const shots of [6, 12, 20]) {
  const runs = Array.from({ length: shots > 12 ? 6 : DAYS }, (_, seed) => {
    const problem = plannedDay(seededRandom(seed), { shots, rules: 8, sitters: 4, setups: 5, sets: 3, meal: true })
    return timed(problem, DEFAULT_BUDGET)
  })
  const gaps = runs.map((run) => run.proposal.gapMin)
  print({
    bench: 'order',
    shots,
    days: runs.length,
    proven: runs.filter((run) => run.proposal.proven).length,
    earliestWrapProven: gaps.filter((gap) => gap === 0).length,
    medianMs: median(runs.map((run) => run.ms)),
    worstMs: worst(runs.map((run) => run.ms)),
    worstFirstMs: worst(runs.map((run) => run.firstMs)),
    worstBestMs: worst(runs.map((run) => run.bestMs)),
    medianGapMin: median(gaps),
    worstGapMin: worst(gaps),
    rulesKept: runs.every((run) => run.proposal.objective.broken === 0),
  })
}

if (values.instances !== undefined) {
  const gaps: number[] = []
  for (const instance of readInstances(values.instances)) {
    const { proposal, bestMs, ms } = timed(instance.problem, 10 * DEFAULT_BUDGET, INSTANCE_MS)
    const value = instance.valueOf(schedule(instance.problem, proposal.sequence))
    const gapPercent = instance.best === 0 ? value : ((value - instance.best) / instance.best) * 100
    gaps.push(gapPercent)
    print({
      bench: 'order',
      instance: instance.name,
      nodes: instance.nodes,
      best: instance.best,
      found: value,
      broken: proposal.objective.broken,
      gapPercent: round(gapPercent, 3),
      proven: proposal.proven,
      bestMs: round(bestMs),
      ms: round(ms),
    })
  }
  print({
    bench: 'order',
    instances: gaps.length,
    meanGapPercent: round(gaps.reduce((sum, gap) => sum + gap, 0) / gaps.length, 3),
    worstGapPercent: round(Math.max(...gaps), 3),
  })
}
