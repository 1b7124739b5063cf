import { useDeferredValue, useMemo, useState } from 'react'
import { orderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import {
  lights,
  looks,
  moves,
  pieces,
  props,
  sets,
  setups,
  shotPlans,
  shots,
  sitterPlaces,
  sitters,
  days,
  rules,
} from '#shared/realtime/documents.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { useItems } from '#src/realtime/use-items.ts'

export type Changeovers = {
  /** Minutes of changeover before each shot, by its id; none before the first of a day. */
  before: ReadonlyMap<string, number>
  totalMin: number
}

/** What the running order reads, each the same for as long as its content is. */
function useOrderInputs(): readonly unknown[] {
  const { brief, minutes } = useShoot()
  return [
    brief,
    minutes,
    useItems('board', shots),
    useItems('plan', days),
    useItems('plan', sets),
    useItems('plan', moves),
    useItems('plan', shotPlans),
    useItems('plan', rules),
    useItems('looks', sitters),
    useItems('looks', looks),
    useItems('looks', pieces),
    useItems('lighting', setups),
    useItems('lighting', lights),
    useItems('lighting', sitterPlaces),
    useItems('lighting', props),
  ]
}

/** Minutes between shots as the running order works them out. Frames moving on the wall change nothing here. */
export function useChangeovers(plan: Plan): Changeovers {
  const inputs = useOrderInputs()
  const [known, setKnown] = useState({ inputs, plan })
  // The plan is new whenever a frame moves: keep the one from when something changed that the order reads.
  const changed = inputs.some((input, index) => input !== known.inputs[index])
  if (changed) setKnown({ inputs, plan })
  const calm = useDeferredValue(changed ? plan : known.plan)
  return useMemo(() => changeoversOf(calm), [calm])
}

function changeoversOf(plan: Plan): Changeovers {
  const before = new Map<string, number>()
  let totalMin = 0
  for (const { day, shots: planned } of plan.days) {
    if (planned.length === 0) continue
    const result = schedule(
      orderProblem(plan, day.id),
      planned.map(({ shot }) => shot.id),
    )
    for (const [index, shot] of result.shots.entries()) {
      if (index === 0) continue
      before.set(shot.shotId, shot.changeover.minutes)
      totalMin += shot.changeover.minutes
    }
  }
  return { before, totalMin }
}
