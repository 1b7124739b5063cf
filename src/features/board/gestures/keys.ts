import type { Box } from '#shared/domain/board/schema.ts'
import { boundsOf, moveBox } from '#shared/domain/board/geometry.ts'
import { type Direction, byArea, nextInDirection } from '#shared/domain/board/reading-order.ts'
import { reveal } from '#shared/domain/board/view.ts'
import { announce, asStep, selectedItems, type WallControl } from '../wall-control.ts'
import type { WallItem, WallItems } from '../wall-item.ts'
import { select, setView } from '../wall-state.ts'
import { wayWords } from '../words.ts'
import { addCopies, removeFromWall, writeBoxes } from '../write-board.ts'
import { dropHeld, letGo, presentDrag, withContents } from './drag-items.ts'
import { fitAll, zoomBy } from './view-moves.ts'

/** One press of an arrow key, and with Shift, wall units. */
const STEP = 10
const LARGE_STEP = 60
const COPY_OFFSET = 24

const ARROWS: Readonly<Record<string, Direction>> = {
  ArrowLeft: 'left',
  ArrowRight: 'right',
  ArrowUp: 'up',
  ArrowDown: 'down',
}

/** Everything in the order of the keyboard: area by area, an area's title first. */
export function inKeyboardOrder(items: WallItems): WallItem[] {
  const all = [...items.values()]
  const areas = all.filter((entry) => entry.kind === 'area')
  const rest = all.filter((entry) => entry.kind !== 'area')
  return byArea(areas, rest).flatMap(({ area, items }) => (area ? [area, ...items] : items))
}

export function focusItem(control: WallControl, id: string): void {
  const { state } = control
  const entry = control.items().get(id)
  if (!entry) return
  state.focused.set(id)
  setView(state, reveal(state.view.get(), entry.box, state.viewport.get(), 24))
}

const keyboardOrder = (control: WallControl): WallItem[] => inKeyboardOrder(control.items())

function delta(direction: Direction, large: boolean): readonly [number, number] {
  const step = large ? LARGE_STEP : STEP
  return { left: [-step, 0], right: [step, 0], up: [0, -step], down: [0, step] }[direction] as [number, number]
}

/** Moves what the keyboard holds; nothing is written yet. */
function moveLifted(control: WallControl, dx: number, dy: number): void {
  const { state } = control
  const items = control.items()
  const held = new Map<string, Box>()
  for (const [id, box] of state.own.all()) held.set(id, moveBox(box, dx, dy))
  state.own.set(held)
  presentDrag(control, held)
  const before = boundsOf([...held.keys()].flatMap((id) => (items.get(id) ? [items.get(id)?.box ?? [0, 0, 8, 8]] : [])))
  const now = boundsOf(held.values())
  if (!before || !now) return
  setView(state, reveal(state.view.get(), now, state.viewport.get(), 24))
  announce(control, `moved to ${wayWords(before, now)}`)
}

export function pickUp(control: WallControl): void {
  const { state } = control
  const focused = state.focused.get()
  if (!control.mayWrite() || focused === null) return
  if (!state.selection.get().has(focused)) select(state, [focused])
  const items = control.items()
  const held = new Map<string, Box>()
  for (const id of withContents(items, state.selection.get())) {
    const entry = items.get(id)
    if (entry) held.set(id, entry.box)
  }
  state.own.set(held)
  state.lifted.set(true)
  announce(
    control,
    `${control.nameOf(selectedItems(control))} picked up. Arrows move, Enter drops, Escape puts it back.`,
  )
}

export function dropLifted(control: WallControl): void {
  const names = control.nameOf(selectedItems(control))
  control.state.lifted.set(false)
  dropHeld(control)
  announce(control, `${names} dropped`)
}

export function cancelLifted(control: WallControl): void {
  const names = control.nameOf(selectedItems(control))
  control.state.lifted.set(false)
  letGo(control)
  announce(control, `${names} is back where it was`)
}

/** Moves the selection by one step and writes it; presses that follow quickly are one undo step. */
function nudge(control: WallControl, direction: Direction, large: boolean): void {
  const items = control.items()
  const [dx, dy] = delta(direction, large)
  const boxes = new Map<string, Box>()
  for (const id of withContents(items, control.state.selection.get())) {
    const entry = items.get(id)
    if (entry) boxes.set(id, moveBox(entry.box, dx, dy))
  }
  writeBoxes(control.doc, boxes)
  announce(control, `moved ${Math.abs(dx || dy)} ${direction}`)
}

function roam(control: WallControl, direction: Direction): void {
  const { state } = control
  const items = control.items()
  const here = state.focused.get()
  const entry = here === null ? undefined : items.get(here)
  const next = entry
    ? nextInDirection(
        entry.box,
        [...items.values()].filter(({ id }) => id !== here),
        direction,
      )
    : keyboardOrder(control)[0]?.id
  if (next) focusItem(control, next)
}

export function removeSelected(control: WallControl): void {
  const entries = selectedItems(control)
  if (entries.length === 0 || !control.mayWrite()) return
  const order = keyboardOrder(control)
  const at = order.findIndex(({ id }) => id === entries[0]?.id)
  const gone = new Set(entries.map(({ id }) => id))
  const next =
    order.slice(at + 1).find(({ id }) => !gone.has(id)) ??
    order
      .slice(0, at)
      .reverse()
      .find(({ id }) => !gone.has(id))
  asStep(control, () => removeFromWall(control.doc, gone, Date.now()))
  select(control.state, [])
  control.state.focused.set(next?.id ?? null)
  announce(control, `${control.nameOf(entries)} removed. Ctrl+Z brings it back.`)
}

export function duplicateSelected(control: WallControl): void {
  const entries = selectedItems(control)
  if (entries.length === 0 || !control.mayWrite()) return
  const ids = asStep(control, () => addCopies(control.doc, entries, COPY_OFFSET, COPY_OFFSET, control.made()))
  select(control.state, ids)
  control.state.focused.set(ids[0] ?? null)
  announce(control, `${control.nameOf(entries)} copied`)
}

/** What a key does on the wall. Returns whether it was one of ours. */
export function handleWallKey(control: WallControl, event: KeyboardEvent): boolean {
  const { state } = control
  const command = event.ctrlKey || event.metaKey
  const key = event.key.length === 1 ? event.key.toLowerCase() : event.key
  const direction = ARROWS[key]
  if (state.lifted.get()) {
    if (direction) moveLifted(control, ...delta(direction, event.shiftKey))
    else if (key === 'Enter' || key === ' ') dropLifted(control)
    else if (key === 'Escape') cancelLifted(control)
    else return key === 'Tab'
    return true
  }
  if (command) {
    switch (key) {
      case 'a':
        select(state, control.items().keys())
        announce(control, `${state.selection.get().size} things selected`)
        return true
      case 'd':
        duplicateSelected(control)
        return true
      default:
        return false
    }
  }
  if (direction) {
    if (state.selection.get().size > 0 && control.mayWrite()) nudge(control, direction, event.shiftKey)
    else roam(control, direction)
    return true
  }
  switch (key) {
    case 'Enter':
    case ' ': {
      const focused = state.focused.get()
      if (focused === null) return false
      if (control.mayWrite()) pickUp(control)
      else select(state, [focused])
      return true
    }
    case 'Escape':
      if (state.selection.get().size === 0) return false
      select(state, [])
      announce(control, 'Nothing selected. Arrows go from one thing to the next.')
      return true
    case 'Home':
    case 'End': {
      const next = keyboardOrder(control).at(key === 'Home' ? 0 : -1)
      if (next) focusItem(control, next.id)
      return true
    }
    case 'Delete':
    case 'Backspace':
      removeSelected(control)
      return true
    case 'F2': {
      const [only] = selectedItems(control)
      const id = only?.id ?? state.focused.get()
      if (id && control.mayWrite()) state.editing.set(id)
      return true
    }
    case '+':
    case '=':
      zoomBy(control, 1.25)
      return true
    case '-':
    case '−':
      zoomBy(control, 0.8)
      return true
    case '0':
      fitAll(control)
      return true
    default:
      return false
  }
}
