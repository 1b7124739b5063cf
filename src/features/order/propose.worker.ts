import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { DEFAULT_BUDGET, type Proposal, proposalSteps } from '#shared/domain/order/propose.ts'

/** Asked once; the worker is thrown away afterwards. */
export type ProposeRequest = { problem: OrderProblem }
export type ProposeAnswer = { kind: 'so far' | 'done'; proposal: Proposal; share: number }

/** One seed for everybody: the same day gives the same answer. */
const SEED = 20_261
const EVERY_MS = 120

self.addEventListener('message', ({ data }: MessageEvent<ProposeRequest>) => {
  const steps = proposalSteps(data.problem, { seed: SEED, budget: DEFAULT_BUDGET })
  let saidAtMs = -Infinity
  let said: Proposal['sequence'] | null = null
  for (;;) {
    const step = steps.next()
    const proposal = step.value
    const share = Math.min(1, proposal.spent / DEFAULT_BUDGET)
    if (step.done) {
      post({ kind: 'done', proposal, share: 1 })
      return
    }
    const nowMs = performance.now()
    if (proposal.sequence !== said || nowMs - saidAtMs > EVERY_MS) {
      post({ kind: 'so far', proposal, share })
      said = proposal.sequence
      saidAtMs = nowMs
    }
  }
})

function post(answer: ProposeAnswer): void {
  self.postMessage(answer)
}
