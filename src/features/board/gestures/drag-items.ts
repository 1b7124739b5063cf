import { areaOf } from '#shared/domain/board/reading-order.ts'
import { boundsOf, moveBox } from '#shared/domain/board/geometry.ts'
import type { Box } from '#shared/domain/board/schema.ts'
import { snapBox } from '#shared/domain/board/snap.ts'
import { announce, asStep, type WallControl } from '../wall-control.ts'
import type { WallItems } from '../wall-item.ts'
import { wayWords } from '../words.ts'
import { isDrawn } from '../wall-state.ts'
import { writeBoxes } from '../write-board.ts'

/** How near an edge must come to snap, screen pixels. */
const SNAP_PX = 6
/** What of a drag others see: presence is small. */
const SHOWN_TO_PEERS = 10

export type Drag = {
  /** Moves all that is held to (dx, dy) wall units from where it was; `free` does not snap. */
  move(dx: number, dy: number, free: boolean): void
  drop(): void
  cancel(): void
}

/** These, and everything that hangs in the areas among them. */
export function withContents(items: WallItems, ids: Iterable<string>): string[] {
  const all = new Set(ids)
  const areas = [...items.values()].filter((entry) => entry.kind === 'area')
  for (const id of [...all]) {
    const area = items.get(id)
    if (area?.kind !== 'area') continue
    for (const entry of items.values()) {
      if (entry.kind === 'area') continue
      if (areaOf(entry.box, areas) === id) all.add(entry.id)
    }
  }
  return [...all]
}

/** Shows others what is held. */
export function presentDrag(control: WallControl, boxes: ReadonlyMap<string, Box>): void {
  const dragging: Record<string, [number, number, number, number]> = {}
  for (const [id, box] of [...boxes].slice(0, SHOWN_TO_PEERS)) {
    dragging[id] = [Math.round(box[0]), Math.round(box[1]), Math.round(box[2]), Math.round(box[3])]
  }
  control.setPresence({ dragging })
}

/** Others see nothing held any more. */
export function presentDrop(control: WallControl): void {
  control.setPresence({ dragging: undefined })
}

/** Writes what is held (to the front with `raise`, when it covers something), once, as one undo step, and lets go. */
export function dropHeld(control: WallControl, raise = false): boolean {
  const { state } = control
  const held = state.own.all()
  const written = asStep(control, () => held.size > 0 && control.mayWrite() && writeBoxes(control.doc, held, raise))
  letGo(control)
  return written
}

export function letGo(control: WallControl): void {
  control.state.own.set(new Map())
  control.state.guides.set([])
  presentDrop(control)
}

/** Takes things in hand. Nothing is written until they are dropped. */
export function startDrag(control: WallControl, ids: Iterable<string>): Drag {
  const { state } = control
  const items = control.items()
  const start = new Map<string, Box>()
  for (const id of withContents(items, ids)) {
    const entry = items.get(id)
    if (entry) start.set(id, entry.box)
  }
  const bounds = boundsOf(start.values())
  const region = state.region.get()
  const neighbours = [...items.values()]
    .filter((entry) => !start.has(entry.id) && isDrawn(region, entry.box))
    .map((entry) => entry.box)

  return {
    move(dx, dy, free) {
      if (!bounds) return
      const snap = free
        ? { dx: 0, dy: 0, guides: [] }
        : snapBox(moveBox(bounds, dx, dy), neighbours, SNAP_PX / state.view.get().zoom)
      const held = new Map<string, Box>()
      for (const [id, box] of start) held.set(id, moveBox(box, dx + snap.dx, dy + snap.dy))
      state.own.set(held)
      state.guides.set(snap.guides)
      presentDrag(control, held)
    },
    drop() {
      const held = boundsOf(state.own.all().values())
      if (dropHeld(control, true) && bounds && held) {
        const entries = [...start.keys()].flatMap((id) => items.get(id) ?? [])
        announce(control, `${control.nameOf(entries)} moved to ${wayWords(bounds, held)}`)
      }
    },
    cancel: () => letGo(control),
  }
}
