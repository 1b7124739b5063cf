import { useMemo } from 'react'
import { type Plan, readPlan } from '#shared/domain/plan/read-plan.ts'
import {
  days,
  frames,
  lights,
  looks,
  moves,
  pieces,
  props,
  rules,
  sets,
  setups,
  shotPlans,
  shots,
  sitterPlaces,
  sitters,
} from '#shared/realtime/documents.ts'
import { useShoot } from './shoot-realtime.tsx'
import { useItems } from './use-items.ts'

/** The shoot's read model, worked out again when one of its documents or the brief changes. */
export function usePlan(): Plan {
  const { brief, minutes } = useShoot()
  const board = { frames: useItems('board', frames), shots: useItems('board', shots) }
  const plan = {
    days: useItems('plan', days),
    sets: useItems('plan', sets),
    moves: useItems('plan', moves),
    shotPlans: useItems('plan', shotPlans),
    rules: useItems('plan', rules),
  }
  const wardrobe = {
    sitters: useItems('looks', sitters),
    looks: useItems('looks', looks),
    pieces: useItems('looks', pieces),
  }
  const lighting = {
    setups: useItems('lighting', setups),
    lights: useItems('lighting', lights),
    sitterPlaces: useItems('lighting', sitterPlaces),
    props: useItems('lighting', props),
  }
  return useMemo(
    () => readPlan({ brief, minutes, board, plan, looks: wardrobe, lighting }),
    // eslint-disable-next-line react-hooks/exhaustive-deps -- the maps change identity when their content does; the objects around them are new at every render
    [
      brief,
      minutes,
      ...Object.values(board),
      ...Object.values(plan),
      ...Object.values(wardrobe),
      ...Object.values(lighting),
    ],
  )
}
