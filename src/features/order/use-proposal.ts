import { useCallback, useEffect, useRef, useState } from 'react'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import type { Proposal } from '#shared/domain/order/propose.ts'
import type { ProposeAnswer, ProposeRequest } from './propose.worker.ts'

export type ProposalState =
  /** Asked, nothing heard yet. */
  | { kind: 'asking'; problem: OrderProblem }
  | { kind: 'thinking'; problem: OrderProblem; soFar: Proposal; share: number }
  | { kind: 'found'; problem: OrderProblem; proposal: Proposal }
  | { kind: 'failed'; problem: OrderProblem }

export type AskedProposal = {
  state: ProposalState | null
  ask: (problem: OrderProblem) => void
  /** Stops thinking; what was found so far stays, unless there is nothing. */
  stop: () => void
  close: () => void
}

/** A better order, searched for beside the screen. */
export function useProposal(): AskedProposal {
  const [state, setState] = useState<ProposalState | null>(null)
  const worker = useRef<Worker | null>(null)
  const end = useCallback(() => {
    worker.current?.terminate()
    worker.current = null
  }, [])
  useEffect(() => end, [end])

  const ask = useCallback(
    (problem: OrderProblem) => {
      end()
      setState({ kind: 'asking', problem })
      const asked = new Worker(new URL('./propose.worker.ts', import.meta.url), { type: 'module' })
      worker.current = asked
      asked.addEventListener('message', ({ data }: MessageEvent<ProposeAnswer>) => {
        if (worker.current !== asked) return
        const { proposal, share } = data
        if (data.kind === 'done') end()
        setState(
          data.kind === 'done'
            ? { kind: 'found', problem, proposal }
            : { kind: 'thinking', problem, soFar: proposal, share },
        )
      })
      asked.addEventListener('error', () => {
        if (worker.current !== asked) return
        end()
        setState({ kind: 'failed', problem })
      })
      const request: ProposeRequest = { problem }
      asked.postMessage(request)
    },
    [end],
  )
  const stop = useCallback(() => {
    end()
    setState((last) =>
      last?.kind === 'thinking' ? { kind: 'found', problem: last.problem, proposal: last.soFar } : null,
    )
  }, [end])
  const close = useCallback(() => {
    end()
    setState(null)
  }, [end])
  return { state, ask, stop, close }
}
