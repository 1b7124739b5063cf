import { createContext, use } from 'react'
import type { Plan } from '#shared/domain/plan/read-plan.ts'

const Context = createContext<Plan | null>(null)
export const BoardPlanProvider = Context.Provider

/** The shoot's read model, worked out once for the whole board. @throws outside of a board: a programming error. */
export function useBoardPlan(): Plan {
  const plan = use(Context)
  if (!plan) throw new Error('useBoardPlan needs a board above it')
  return plan
}
