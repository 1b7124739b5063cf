import { useMemo, useState } from 'react'
import { type CardRow, cardRows } from '#shared/domain/day/card.ts'
import { type DayProgress, dayProgress } from '#shared/domain/day/progress.ts'
import type { DayShot, Tick } from '#shared/domain/day/schema.ts'
import { orderProblem } from '#shared/domain/order/problem.ts'
import type { Plan, PlannedDay, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { dayShots as dayShotsCollection, ticks as ticksCollection } from '#shared/realtime/documents.ts'
import { useItems } from '#src/realtime/use-items.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import { civilDate, minuteOfDay, useNow } from './use-now.ts'

/** A shoot's hours reach this far past midnight before the day counts as over, minutes. */
const AFTER_MIDNIGHT_MIN = 2 * 1440

export type ShownDay = {
  plan: Plan
  planned: PlannedDay
  progress: DayProgress
  rows: CardRow[]
  dayShots: ReadonlyMap<string, DayShot>
  ticks: ReadonlyMap<string, Tick>
  nowMin: number | null
  shotOf: (id: string) => PlannedShot | undefined
}

/** The day that is shown, worked out again with every change of the plan, of what happened, and of the clock. */
export function useDay(): { day: ShownDay | null; days: readonly PlannedDay[]; choose: (dayId: string) => void } {
  const plan = usePlan()
  const dayShots = useItems('day', dayShotsCollection)
  const ticks = useItems('day', ticksCollection)
  const nowMs = useNow()
  const [chosen, setChosen] = useState<string | null>(null)
  const withShots = plan.days.filter(({ shots }) => shots.length > 0)
  const planned =
    withShots.find(({ day }) => day.id === chosen) ??
    suggestedDay(withShots, dayShots, civilDate(nowMs, plan.brief.zone))
  const problem = useMemo(() => (planned ? orderProblem(plan, planned.day.id) : null), [plan, planned])
  const day = useMemo((): ShownDay | null => {
    if (!planned || !problem) return null
    const { zone } = plan.brief
    const date = planned.day.date ?? plan.brief.date
    const minute = date === null ? null : minuteOfDay(nowMs, date, zone)
    const nowMin = minute !== null && minute >= 0 && minute < AFTER_MIDNIGHT_MIN ? minute : null
    const progress = dayProgress({
      problem,
      sequence: planned.shots.map(({ shot }) => shot.id),
      dayShots,
      nowMin,
      minuteOf: (atMs) => (date === null ? planned.day.lightsOnMin : minuteOfDay(atMs, date, zone)),
    })
    const shotOf = (id: string) => plan.shots.get(id)
    const rows = progress.current ? cardRows(progress.current.changeover, shotOf(progress.current.shotId)) : []
    return { plan, planned, progress, rows, dayShots, ticks, nowMin, shotOf }
  }, [plan, planned, problem, dayShots, ticks, nowMs])
  return { day, days: withShots, choose: setChosen }
}

/** Today's, else the first with a shot still to make, else the last. */
function suggestedDay(
  days: readonly PlannedDay[],
  dayShots: ReadonlyMap<string, DayShot>,
  today: string,
): PlannedDay | undefined {
  const isOpen = ({ shots }: PlannedDay) =>
    shots.some(({ shot }) => !['got', 'skipped'].includes(dayShots.get(shot.id)?.event?.state ?? 'waiting'))
  return days.find(({ day }) => day.date === today) ?? days.find(isOpen) ?? days.at(-1)
}
