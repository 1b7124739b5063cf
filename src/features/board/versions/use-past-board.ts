import { useSuspenseQuery } from '@tanstack/react-query'
import { useLayoutEffect, useMemo, useState } from 'react'
import type * as Y from 'yjs'
import type { Version } from '#shared/api/versions.ts'
import { type Plan, type ReadPlanInput, readPlan } from '#shared/domain/plan/read-plan.ts'
import { lights, looks, pieces, props, setups, sitterPlaces, sitters } from '#shared/realtime/documents.ts'
import { boardPart, planPart } from '#shared/realtime/plan-parts.ts'
import { useShoot, useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { type Store, createStore } from '#src/realtime/store.ts'
import { useItems } from '#src/realtime/use-items.ts'
import { boardQueries } from '../queries.ts'
import type { WallControl } from '../wall-control.ts'
import { type WallItems, readWallItems } from '../wall-item.ts'
import { createWallState } from '../wall-state.ts'
import { nameOfAll } from '../words.ts'
import { type PastDocs, openVersion } from './take-back-version.ts'

export type PastBoard = { version: Version; control: WallControl; plan: Plan; items: WallItems }

/** A kept version as a board to look at: its wall and shots as they stood, with the looks and setups of today. */
export function usePastBoard(versionId: string): PastBoard {
  const { shoot, documents } = useShootContext()
  const { data } = useSuspenseQuery(boardQueries.version(shoot.id, versionId))
  const past = useMemo(() => openVersion(data, documents), [data, documents])
  const plan = usePastPlan(past)
  const items = useMemo(() => readWallItems(past.board), [past])
  const [now] = useState(() => createStore(plan))
  useLayoutEffect(() => now.set(plan))
  const control = useMemo(() => pastControl(past.board, items, now), [past, items, now])
  return { version: data.version, control, plan, items }
}

/** Nothing can be held or written; the rest of the wall's ways to look around work. */
function pastControl(doc: Y.Doc, items: WallItems, now: Store<Plan>): WallControl {
  const nothing = () => undefined
  return {
    doc,
    state: createWallState({ x: 0, y: 0, zoom: 1 }),
    items: () => items,
    mayWrite: () => false,
    isPast: true,
    stopUndo: nothing,
    undo: nothing,
    redo: nothing,
    setPresence: nothing,
    made: () => ({ by: '', name: '', initials: '', atMs: 0 }),
    coverShot: nothing,
    nameOf: (entries) => nameOfAll(entries, now.get().looks),
  }
}

function usePastPlan({ board, plan }: PastDocs): Plan {
  const { brief, minutes } = useShoot()
  const then = useMemo(() => ({ board: boardPart(board), plan: planPart(plan) }), [board, plan])
  const looks = useLooksOfToday()
  const lighting = useLightingOfToday()
  return useMemo(() => readPlan({ brief, minutes, ...then, looks, lighting }), [brief, minutes, then, looks, lighting])
}

function useLooksOfToday(): ReadPlanInput['looks'] {
  const who = useItems('looks', sitters)
  const worn = useItems('looks', looks)
  const garments = useItems('looks', pieces)
  return useMemo(() => ({ sitters: who, looks: worn, pieces: garments }), [who, worn, garments])
}

function useLightingOfToday(): ReadPlanInput['lighting'] {
  const lit = useItems('lighting', setups)
  const lamps = useItems('lighting', lights)
  const places = useItems('lighting', sitterPlaces)
  const stands = useItems('lighting', props)
  return useMemo(
    () => ({ setups: lit, lights: lamps, sitterPlaces: places, props: stands }),
    [lit, lamps, places, stands],
  )
}
