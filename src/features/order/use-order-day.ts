import { useMemo, useState } from 'react'
import { type OrderProblem, orderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import type { DaySchedule } from '#shared/domain/order/schedule-types.ts'
import type { Plan, PlannedDay } from '#shared/domain/plan/read-plan.ts'
import { usePlan } from '#src/realtime/use-plan.ts'

export type OrderDay = {
  planned: PlannedDay
  index: number
  problem: OrderProblem
  day: DaySchedule
}

/** The day that is shown, timed as it stands. */
export function useOrderDay(): { plan: Plan; shown: OrderDay | null; choose: (dayId: string) => void } {
  const plan = usePlan()
  const [chosen, setChosen] = useState<string | null>(null)
  const index = Math.max(
    0,
    plan.days.findIndex(({ day }) => day.id === chosen),
  )
  const shown = useMemo(() => {
    const planned = plan.days[index]
    if (!planned) return null
    const problem = orderProblem(plan, planned.day.id)
    return {
      planned,
      index,
      problem,
      day: schedule(
        problem,
        problem.shots.map(({ id }) => id),
      ),
    }
  }, [plan, index])
  return { plan, shown, choose: setChosen }
}
