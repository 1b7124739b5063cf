import { useMemo, useSyncExternalStore } from 'react'
import type { ShootView } from '#shared/api/shoots.ts'
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
import { itemStore } from './item-store.ts'
import { type ShootDocuments, useShootContext } from './shoot-realtime.tsx'

type PlanStore = {
  subscribe(listener: () => void): () => void
  get(shoot: ShootView): Plan
}

/** The read model of one open shoot: worked out once per change, however many screens look at it. */
function planStore({ board, plan, looks: wardrobe, lighting }: ShootDocuments): PlanStore {
  const stores = {
    frames: itemStore(board.doc, frames),
    shots: itemStore(board.doc, shots),
    days: itemStore(plan.doc, days),
    sets: itemStore(plan.doc, sets),
    moves: itemStore(plan.doc, moves),
    shotPlans: itemStore(plan.doc, shotPlans),
    rules: itemStore(plan.doc, rules),
    sitters: itemStore(wardrobe.doc, sitters),
    looks: itemStore(wardrobe.doc, looks),
    pieces: itemStore(wardrobe.doc, pieces),
    setups: itemStore(lighting.doc, setups),
    lights: itemStore(lighting.doc, lights),
    sitterPlaces: itemStore(lighting.doc, sitterPlaces),
    props: itemStore(lighting.doc, props),
  }
  const all = Object.values(stores)
  let from: readonly unknown[] = []
  let last: Plan | null = null
  return {
    subscribe(listener) {
      const stops = all.map((store) => store.subscribe(listener))
      return () => {
        for (const stop of stops) stop()
      }
    },
    get({ brief, minutes }) {
      const now: readonly unknown[] = [brief, minutes, ...all.map((store) => store.get())]
      if (last && now.every((value, index) => value === from[index])) return last
      from = now
      last = readPlan({
        brief,
        minutes,
        board: { frames: stores.frames.get(), shots: stores.shots.get() },
        plan: {
          days: stores.days.get(),
          sets: stores.sets.get(),
          moves: stores.moves.get(),
          shotPlans: stores.shotPlans.get(),
          rules: stores.rules.get(),
        },
        looks: { sitters: stores.sitters.get(), looks: stores.looks.get(), pieces: stores.pieces.get() },
        lighting: {
          setups: stores.setups.get(),
          lights: stores.lights.get(),
          sitterPlaces: stores.sitterPlaces.get(),
          props: stores.props.get(),
        },
      })
      return last
    },
  }
}

const planStores = new WeakMap<ShootDocuments, PlanStore>()

/** The shoot's read model, renewed when one of its documents or the brief changes. */
export function usePlan(): Plan {
  const { documents, shoot } = useShootContext()
  const store = useMemo(() => {
    const known = planStores.get(documents) ?? planStore(documents)
    planStores.set(documents, known)
    return known
  }, [documents])
  return useSyncExternalStore(store.subscribe, () => store.get(shoot))
}
