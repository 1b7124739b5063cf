import { useMemo } from 'react'
import { redCautions } from '#shared/domain/lighting/cautions.ts'
import { orderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { type Readiness, readinessOf } from '#shared/domain/shoots/readiness.ts'
import { dayShots, frames } from '#shared/realtime/documents.ts'
import { useLookStandings } from '#src/features/sign-off/use-look-standings.ts'
import { useItems } from '#src/realtime/use-items.ts'
import { usePlan } from '#src/realtime/use-plan.ts'

/** The lamps of the open shoot, live. */
export function useReadiness(): Readiness[] {
  const plan = usePlan()
  const boardFrames = useItems('board', frames)
  const events = useItems('day', dayShots)
  const { standings } = useLookStandings()
  return useMemo(
    () =>
      readinessOf({
        plan,
        frames: boardFrames,
        signOffs: new Map([...standings].map(([lookId, { state }]) => [lookId, state.kind])),
        dayShots: events,
        redCautions,
        schedule: (dayId) => {
          const problem = orderProblem(plan, dayId)
          const { broken, wrapMin } = schedule(problem, problem.shots.map(({ id }) => id))
          return { broken: broken.map(({ words }) => words), wrapMin }
        },
      }),
    [plan, boardFrames, events, standings],
  )
}
