import { CORNERS, type Corner, type Point, boxBetween, touchedBy } from '#shared/domain/board/geometry.ts'
import { type View, panBy, pinch, toWall } from '#shared/domain/board/view.ts'
import { type WallControl, announce } from '../wall-control.ts'
import { select, setView, toggle } from '../wall-state.ts'
import { type Drag, startDrag } from './drag-items.ts'
import { type Resize, startResize } from './resize-item.ts'

/** How far a press may wander and still be a click, screen pixels. */
const SLOP_PX = 4
const TOUCH_SLOP_PX = 9
/** How long a finger rests on a thing before it is picked up, ms. */
const LONG_PRESS_MS = 380
/** Two presses on the same thing within this time edit its words, ms. */
const DOUBLE_PRESS_MS = 400
/** Nearer than this to the edge, what is held pushes the wall along, screen pixels. */
const EDGE_PX = 28

type Gesture =
  | { kind: 'none' }
  | { kind: 'pressed'; at: Point; id: string | null; wasSelected: boolean; additive: boolean; touch: boolean }
  | { kind: 'pan'; last: Point }
  | { kind: 'drag'; drag: Drag; view: View; from: Point; last: Point; free: boolean }
  | { kind: 'resize'; resize: Resize; from: Point }
  | { kind: 'marquee'; from: Point; last: Point; before: ReadonlySet<string> }
  | { kind: 'pinch'; view: View; from: readonly [Point, Point] }

function closest(target: EventTarget | null, selector: string): HTMLElement | null {
  return target instanceof Element ? target.closest<HTMLElement>(selector) : null
}

function cornerOf(target: EventTarget | null): Corner | null {
  const name = closest(target, '[data-corner]')?.dataset['corner']
  return CORNERS.find((corner) => corner === name) ?? null
}

/** The shot of the strip under a point of the screen, when one frame alone is held. */
function shotUnder(
  { state, items, mayWrite }: WallControl,
  event: PointerEvent,
): { shotId: string; frameId: string } | null {
  const [only, ...more] = state.own.all().keys()
  const entry = only === undefined ? undefined : items().get(only)
  if (!mayWrite() || entry?.kind !== 'frame' || more.length > 0) return null
  const target = document.elementFromPoint(event.clientX, event.clientY)
  const shotId = closest(target, '[data-shot-id]')?.dataset['shotId']
  return shotId ? { shotId, frameId: entry.id } : null
}

/** Mouse, pen and fingers on the wall. Returns what takes the listeners off again. */
export function attachPointer(element: HTMLElement, control: WallControl): () => void {
  const { state } = control
  const fingers = new Map<number, Point>()
  let gesture: Gesture = { kind: 'none' }
  let lastPress: { id: string | null; atMs: number } = { id: null, atMs: 0 }
  let pressTimer: ReturnType<typeof setTimeout> | undefined
  let edgeFrame = 0
  let edges = element.getBoundingClientRect()

  const local = (event: PointerEvent | MouseEvent): Point => ({
    x: event.clientX - edges.left,
    y: event.clientY - edges.top,
  })
  const isInside = (px: Point): boolean => px.x >= 0 && px.y >= 0 && px.x <= edges.width && px.y <= edges.height
  const wallPoint = (px: Point): Point => toWall(state.view.get(), px)

  const begin = (px: Point, pressed: Extract<Gesture, { kind: 'pressed' }>) => {
    clearTimeout(pressTimer)
    if (pressed.id === null) {
      gesture = pressed.touch
        ? { kind: 'pan', last: px }
        : {
            kind: 'marquee',
            from: wallPoint(pressed.at),
            last: px,
            before: pressed.additive ? state.selection.get() : new Set(),
          }
    } else if (pressed.touch || !control.mayWrite()) gesture = { kind: 'pan', last: px }
    else gesture = pickedUp(pressed.at)
  }

  const pickedUp = (px: Point): Gesture => {
    edgeFrame = requestAnimationFrame(pushEdges)
    const drag = startDrag(control, state.selection.get())
    return { kind: 'drag', drag, view: state.view.get(), from: wallPoint(px), last: px, free: false }
  }

  const apply = () => {
    switch (gesture.kind) {
      case 'drag': {
        const at = wallPoint(gesture.last)
        gesture.drag.move(at.x - gesture.from.x, at.y - gesture.from.y, gesture.free)
        break
      }
      case 'marquee': {
        const box = boxBetween(gesture.from, wallPoint(gesture.last))
        const touched = touchedBy(
          box,
          [...control.items().values()].filter((entry) => entry.kind !== 'area'),
        )
        state.marquee.set(box)
        select(state, [...gesture.before, ...touched])
        break
      }
      case 'none':
      case 'pressed':
      case 'pan':
      case 'resize':
      case 'pinch':
        break
    }
  }

  /** While something is held near the edge, the wall goes along. */
  const pushEdges = () => {
    if (gesture.kind !== 'drag' && gesture.kind !== 'marquee') return
    const { x, y } = gesture.last
    const { widthPx, heightPx } = state.viewport.get()
    const push = (at: number, size: number) =>
      at < EDGE_PX ? (EDGE_PX - at) / 3 : at > size - EDGE_PX ? (size - EDGE_PX - at) / 3 : 0
    const dx = push(x, widthPx)
    const dy = push(y, heightPx)
    // Outside of the wall it stays: over the strip a frame is being given to a shot.
    if (isInside(gesture.last) && (dx !== 0 || dy !== 0)) {
      setView(state, panBy(state.view.get(), Math.max(-16, Math.min(16, dx)), Math.max(-16, Math.min(16, dy))))
      apply()
    }
    edgeFrame = requestAnimationFrame(pushEdges)
  }

  const stop = () => {
    clearTimeout(pressTimer)
    cancelAnimationFrame(edgeFrame)
    gesture = { kind: 'none' }
    state.marquee.set(null)
    state.overShot.set(null)
  }

  const cancel = () => {
    if (gesture.kind === 'drag') gesture.drag.cancel()
    if (gesture.kind === 'resize') gesture.resize.cancel()
    stop()
  }

  const startPinch = () => {
    cancel()
    const [a, b] = [...fingers.values()]
    if (a && b) gesture = { kind: 'pinch', view: state.view.get(), from: [a, b] }
  }

  const handleDown = (event: PointerEvent) => {
    if (closest(event.target, '[data-wall-ignore]')) return
    edges = element.getBoundingClientRect()
    const px = local(event)
    const touch = event.pointerType === 'touch'
    if (touch) {
      fingers.set(event.pointerId, px)
      if (fingers.size === 2) return startPinch()
      if (fingers.size > 2) return
    }
    if (state.lifted.get() || (gesture.kind !== 'none' && !touch)) return
    element.setPointerCapture(event.pointerId)
    if (event.button === 1 || state.panning.get()) {
      event.preventDefault()
      gesture = { kind: 'pan', last: px }
      return
    }
    if (event.button !== 0) return
    const corner = cornerOf(event.target)
    const [only] = state.selection.get()
    const resizing = corner && only ? control.items().get(only) : undefined
    if (corner && resizing && control.mayWrite()) {
      gesture = { kind: 'resize', resize: startResize(control, resizing, corner), from: wallPoint(px) }
      return
    }
    const id = closest(event.target, '[data-wall-id]')?.dataset['wallId'] ?? null
    const additive = event.shiftKey || event.ctrlKey || event.metaKey
    const wasSelected = id !== null && state.selection.get().has(id)
    gesture = { kind: 'pressed', at: px, id, wasSelected, additive, touch }
    if (id !== null && !touch) {
      state.focused.set(id)
      if (additive) toggle(state, [id])
      else if (!wasSelected) select(state, [id])
    }
    if (id === null && !touch) element.focus({ preventScroll: true })
    if (touch && id !== null && control.mayWrite()) pressTimer = setTimeout(() => longPress(id, px), LONG_PRESS_MS)
  }

  const longPress = (id: string, px: Point) => {
    if (gesture.kind !== 'pressed') return
    if (!state.selection.get().has(id)) select(state, [id])
    state.focused.set(id)
    gesture = pickedUp(px)
    if ('vibrate' in navigator) navigator.vibrate(12)
    const entry = control.items().get(id)
    if (entry) announce(control, `${control.nameOf([entry])} picked up`)
  }

  const handleMove = (event: PointerEvent) => {
    if (gesture.kind === 'none') edges = element.getBoundingClientRect()
    const px = local(event)
    if (event.pointerType !== 'touch') {
      const at = wallPoint(px)
      control.setPresence({ pointer: [Math.round(at.x), Math.round(at.y)] })
    } else if (fingers.has(event.pointerId)) fingers.set(event.pointerId, px)
    switch (gesture.kind) {
      case 'none':
        break
      case 'pressed':
        if (Math.hypot(px.x - gesture.at.x, px.y - gesture.at.y) < (gesture.touch ? TOUCH_SLOP_PX : SLOP_PX)) break
        begin(px, gesture)
        handleMove(event)
        break
      case 'pan':
        setView(state, panBy(state.view.get(), px.x - gesture.last.x, px.y - gesture.last.y))
        gesture.last = px
        break
      case 'drag':
        gesture.last = px
        gesture.free = event.altKey
        apply()
        state.overShot.set(isInside(px) ? null : (shotUnder(control, event)?.shotId ?? null))
        break
      case 'marquee':
        if (edgeFrame === 0) edgeFrame = requestAnimationFrame(pushEdges)
        gesture.last = px
        apply()
        break
      case 'resize': {
        const at = wallPoint(px)
        gesture.resize.move(at.x - gesture.from.x, at.y - gesture.from.y)
        break
      }
      case 'pinch': {
        const [a, b] = [...fingers.values()]
        if (a && b) setView(state, pinch(gesture.view, gesture.from, [a, b]))
        break
      }
    }
  }

  const isSecondPress = (id: string, atMs: number): boolean => {
    const isSecond = lastPress.id === id && atMs - lastPress.atMs < DOUBLE_PRESS_MS
    lastPress = isSecond ? { id: null, atMs } : { id, atMs }
    return isSecond
  }

  const handleUp = (event: PointerEvent) => {
    fingers.delete(event.pointerId)
    switch (gesture.kind) {
      case 'pressed':
        // The wall has captured the pointer: a double click of the browser would name the wall, not the thing.
        if (gesture.id !== null && !gesture.additive && isSecondPress(gesture.id, event.timeStamp)) {
          if (control.mayWrite()) state.editing.set(gesture.id)
        } else if (gesture.touch) {
          select(state, gesture.id === null ? [] : [gesture.id])
          state.focused.set(gesture.id)
        } else if (gesture.id === null) {
          if (!gesture.additive) select(state, [])
        } else if (gesture.wasSelected && !gesture.additive) select(state, [gesture.id])
        break
      case 'drag': {
        const onShot = isInside(local(event)) ? null : shotUnder(control, event)
        if (onShot) {
          gesture.drag.cancel()
          setView(state, gesture.view)
          control.coverShot(onShot.shotId, onShot.frameId)
        } else gesture.drag.drop()
        break
      }
      case 'resize':
        gesture.resize.drop()
        break
      case 'pinch': {
        const [rest] = fingers.values()
        gesture = rest ? { kind: 'pan', last: rest } : { kind: 'none' }
        return
      }
      case 'marquee':
        announce(control, `${state.selection.get().size} things selected`)
        break
      case 'none':
      case 'pan':
        break
    }
    if (fingers.size === 0) stop()
    edgeFrame = 0
  }

  const handleCancel = (event: PointerEvent) => {
    fingers.delete(event.pointerId)
    cancel()
  }

  const handleLeave = () => control.setPresence({ pointer: undefined })

  const handleEscape = (event: KeyboardEvent) => {
    if (event.key !== 'Escape' || (gesture.kind !== 'drag' && gesture.kind !== 'resize')) return
    event.stopPropagation()
    cancel()
    announce(control, 'put back')
  }

  const stopMenu = (event: Event) => {
    // A long press opens a menu of the browser on some phones.
    if (gesture.kind === 'drag') event.preventDefault()
  }

  const listeners: readonly [string, (event: never) => void][] = [
    ['pointerdown', handleDown],
    ['pointermove', handleMove],
    ['pointerup', handleUp],
    ['pointercancel', handleCancel],
    ['pointerleave', handleLeave],
    ['contextmenu', stopMenu],
  ]
  for (const [name, listener] of listeners) element.addEventListener(name, listener as EventListener)
  window.addEventListener('keydown', handleEscape, true)
  return () => {
    for (const [name, listener] of listeners) element.removeEventListener(name, listener as EventListener)
    window.removeEventListener('keydown', handleEscape, true)
    cancel()
  }
}
