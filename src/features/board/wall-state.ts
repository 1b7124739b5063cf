import type { Guide } from '#shared/domain/board/snap.ts'
import type { Box } from '#shared/domain/board/schema.ts'
import { growBox, overlaps } from '#shared/domain/board/geometry.ts'
import { type View, type Viewport, visibleBox } from '#shared/domain/board/view.ts'
import { type Store, createStore } from '#src/realtime/store.ts'

/** Boxes held somewhere else than the document says, by id; whoever draws one item listens to that item alone. */
export type HeldBoxes = {
  get(id: string): Box | undefined
  all(): ReadonlyMap<string, Box>
  set(boxes: ReadonlyMap<string, Box>): void
  subscribe(id: string, listener: () => void): () => void
  subscribeAll(listener: () => void): () => void
}

function createHeldBoxes(): HeldBoxes {
  let held: ReadonlyMap<string, Box> = new Map()
  const ofId = new Map<string, Set<() => void>>()
  const ofAll = new Set<() => void>()
  return {
    get: (id) => held.get(id),
    all: () => held,
    set(boxes) {
      if (boxes.size === 0 && held.size === 0) return
      const before = held
      held = boxes
      for (const id of boxes.keys()) for (const listener of ofId.get(id) ?? []) listener()
      for (const id of before.keys()) if (!boxes.has(id)) for (const listener of ofId.get(id) ?? []) listener()
      for (const listener of ofAll) listener()
    },
    subscribe(id, listener) {
      const listeners = ofId.get(id) ?? new Set()
      ofId.set(id, listeners)
      listeners.add(listener)
      return () => {
        listeners.delete(listener)
        if (listeners.size === 0) ofId.delete(id)
      }
    },
    subscribeAll(listener) {
      ofAll.add(listener)
      return () => ofAll.delete(listener)
    },
  }
}

/** Who else has something selected. */
export type Mark = { name: string; initials: string; colour: string }

/** What this person sees and holds on the wall. Nothing of it is in the document. */
export type WallState = {
  view: Store<View>
  viewport: Store<Viewport>
  /** What is drawn: the visible part and a margin; changes rarely, the view at every movement. */
  region: Store<Box>
  /** Screen pixels per wall unit in coarse steps, for the choice of a picture's size. */
  detail: Store<number>
  selection: Store<ReadonlySet<string>>
  /** The item that the keyboard stands on. */
  focused: Store<string | null>
  /** What is edited in place. */
  editing: Store<string | null>
  /** Picked up by the keyboard. */
  lifted: Store<boolean>
  own: HeldBoxes
  remote: HeldBoxes
  /** The shot of the strip that a frame is held over. */
  overShot: Store<string | null>
  /** Others' selections by the thing's id. */
  marks: Store<ReadonlyMap<string, Mark>>
  guides: Store<readonly Guide[]>
  marquee: Store<Box | null>
  /** Space is down: the wall is dragged instead of things on it. */
  panning: Store<boolean>
  /** Said to screen readers. */
  announcement: Store<string>
}

const EMPTY: ReadonlySet<string> = new Set()

export function createWallState(view: View): WallState {
  return {
    view: createStore(view),
    viewport: createStore({ widthPx: 0, heightPx: 0 }),
    region: createStore<Box>([0, 0, 0, 0]),
    detail: createStore(1),
    selection: createStore(EMPTY),
    focused: createStore<string | null>(null),
    editing: createStore<string | null>(null),
    lifted: createStore(false),
    own: createHeldBoxes(),
    remote: createHeldBoxes(),
    overShot: createStore<string | null>(null),
    marks: createStore<ReadonlyMap<string, Mark>>(new Map()),
    guides: createStore<readonly Guide[]>([]),
    marquee: createStore<Box | null>(null),
    panning: createStore(false),
    announcement: createStore(''),
  }
}

/** Sets the view and, when what is drawn no longer covers it, what is drawn. */
export function setView(state: WallState, view: View): void {
  state.view.set(view)
  const seen = visibleBox(view, state.viewport.get())
  const region = state.region.get()
  const covered =
    seen[0] >= region[0] &&
    seen[1] >= region[1] &&
    seen[0] + seen[2] <= region[0] + region[2] &&
    seen[1] + seen[3] <= region[1] + region[3]
  // Far larger than needed after zooming in: draw less again.
  if (!covered || region[2] > seen[2] * 4) state.region.set(growBox(seen, Math.max(seen[2], seen[3]) * 0.5))
  state.detail.set(2 ** Math.ceil(Math.log2(view.zoom) - 0.01))
}

export function setViewport(state: WallState, viewport: Viewport): void {
  const before = state.viewport.get()
  if (before.widthPx === viewport.widthPx && before.heightPx === viewport.heightPx) return
  state.viewport.set(viewport)
  setView(state, state.view.get())
}

export function isDrawn(region: Box, box: Box): boolean {
  // Captions, tags and notes may reach below their box.
  return overlaps(region, growBox(box, 60))
}

export function select(state: WallState, ids: Iterable<string>): void {
  const next = new Set(ids)
  const before = state.selection.get()
  if (next.size === before.size && [...next].every((id) => before.has(id))) return
  state.selection.set(next.size === 0 ? EMPTY : next)
}

/** Adds to the selection what is not in it and takes out what is. */
export function toggle(state: WallState, ids: Iterable<string>): void {
  const next = new Set(state.selection.get())
  for (const id of ids) if (!next.delete(id)) next.add(id)
  select(state, next)
}
