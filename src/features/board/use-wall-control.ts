import { useQuery } from '@tanstack/react-query'
import { useEffect, useLayoutEffect, useState } from 'react'
import type * as Y from 'yjs'
import { boundsOf } from '#shared/domain/board/geometry.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import type { Presence } from '#shared/realtime/protocol.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'
import { useDoc, useMayWrite, useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { type Store, createStore } from '#src/realtime/store.ts'
import { useSetPresence } from '#src/realtime/use-presence.ts'
import { type Undo, useUndo } from '#src/realtime/use-undo.ts'
import { boardQueries } from './queries.ts'
import { type PresencePatch, type WallControl, announce, asStep } from './wall-control.ts'
import { readWallItems } from './wall-item.ts'
import { createWallState, setView } from './wall-state.ts'
import { nameOfAll } from './words.ts'

type Person = { id: string; name: string; initials: string }

/** What of a control changes with time; hands read it when they act. */
type Now = {
  mayWrite: boolean
  undo: Undo
  plan: Plan
  person: Person
  setPresence: (patch: Partial<Presence>) => void
}

/** An undefined key disappears on the wire; the type of a presence has no word for that. */
function asPatch(patch: PresencePatch): Partial<Presence> {
  return patch as Partial<Presence>
}

const SHOWN_TO_PEERS = 10

function createControl(doc: Y.Doc, now: Store<Now>): WallControl {
  const control: WallControl = {
    doc,
    state: createWallState({ x: 0, y: 0, zoom: 1 }),
    items: () => readWallItems(doc),
    mayWrite: () => now.get().mayWrite,
    isPast: false,
    stopUndo: () => now.get().undo.stop(),
    undo: () => now.get().undo.undo(),
    redo: () => now.get().undo.redo(),
    setPresence: (patch) => now.get().setPresence(asPatch(patch)),
    made() {
      const { id, name, initials } = now.get().person
      return { by: id, name, initials, atMs: Date.now() }
    },
    coverShot(shotId, frameId) {
      asStep(control, () => patchItem(doc, shots, shotId, { coverFrameId: frameId }))
      announce(control, `Cover of shot ${now.get().plan.shots.get(shotId)?.shot.title ?? ''}`)
    },
    nameOf: (entries) => nameOfAll(entries, now.get().plan.looks),
  }
  return control
}

/** The one control of an open board, and what of it the screen itself shows. */
export function useWallControl(plan: Plan): { control: WallControl; mayWrite: boolean; undo: Undo } {
  const { userId } = useShootContext()
  const doc = useDoc('board')
  const mayWrite = useMayWrite('board')
  const undo = useUndo(['board'])
  const setPresence = useSetPresence()
  const { data: session } = useQuery(boardQueries.session())
  const person = session?.user ?? { id: userId, name: '', initials: '' }
  const [now] = useState(() => createStore<Now>({ mayWrite, undo, plan, person, setPresence }))
  const [control] = useState(() => createControl(doc, now))
  useLayoutEffect(() => now.set({ mayWrite, undo, plan, person, setPresence }))

  useEffect(() => {
    const { selection } = control.state
    const tell = () => control.setPresence({ selected: [...selection.get()].slice(0, SHOWN_TO_PEERS) })
    const stop = selection.subscribe(tell)
    return () => {
      stop()
      control.setPresence({ selected: undefined, pointer: undefined, dragging: undefined })
    }
  }, [control])
  return { control, mayWrite, undo }
}

/** Captions can be read at life size; a phone shows a little more at once. */
const FIRST_ZOOM = { wide: 1, phone: 0.6 }
const MARGIN_PX = { left: 24, top: 14 }

/** Begins where one was in this tab, else at the upper left of what hangs there, where captions can be read. */
export function useFirstView({ state, items }: WallControl, shootId: string): void {
  useLayoutEffect(() => {
    const key = `wall:${shootId}`
    const kept = parseView(sessionStorage.getItem(key))
    const bounds = boundsOf([...items().values()].map((entry) => entry.box))
    if (kept) setView(state, kept)
    else if (bounds) {
      const { widthPx } = state.viewport.get()
      const zoom = widthPx < 600 ? FIRST_ZOOM.phone : FIRST_ZOOM.wide
      setView(state, { x: bounds[0] - MARGIN_PX.left / zoom, y: bounds[1] - MARGIN_PX.top / zoom, zoom })
    }
    return () => sessionStorage.setItem(key, JSON.stringify(state.view.get()))
  }, [state, items, shootId])
}

function parseView(text: string | null) {
  if (text === null) return null
  const value: unknown = JSON.parse(text)
  if (typeof value !== 'object' || value === null || !('x' in value) || !('y' in value) || !('zoom' in value))
    return null
  const { x, y, zoom } = value
  return typeof x === 'number' && typeof y === 'number' && typeof zoom === 'number' && zoom > 0 ? { x, y, zoom } : null
}
