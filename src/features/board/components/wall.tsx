import { type CSSProperties, type DragEvent, type RefObject, useLayoutEffect, useMemo, useRef, useState } from 'react'
import type { Point } from '#shared/domain/board/geometry.ts'
import { toWall } from '#shared/domain/board/view.ts'
import { cn } from '#src/lib/cn.ts'
import { useBoardPlan } from '../board-plan.ts'
import { attachKeyboard } from '../gestures/keyboard.ts'
import { focusItem, inKeyboardOrder } from '../gestures/keys.ts'
import { attachPointer } from '../gestures/pointer.ts'
import { attachWheel } from '../gestures/wheel.ts'
import { useStore } from '../use-wall-state.ts'
import { type WallControl, useWall } from '../wall-control.ts'
import type { WallItem, WallItems } from '../wall-item.ts'
import { isDrawn, setViewport } from '../wall-state.ts'
import { nameOf } from '../words.ts'
import { PeersLayer } from './peers-layer.tsx'
import { WallItemView } from './wall-item-view.tsx'

type WallProps = {
  items: WallItems
  mayWrite: boolean
  onDropFiles: (files: File[], at: Point) => void
}

const HELP =
  'Arrow keys go from one thing to the next. Enter or Space picks up, arrows move, with Shift in larger steps, Enter drops, Escape puts it back. ' +
  'What is selected moves with the arrows at once; Escape lets go of it. F2 edits the words, Delete removes. Plus and minus zoom, 0 shows everything.'

/** Keeps a layer at the view, without drawing anything again. */
function useFollowsView(control: WallControl, ref: RefObject<HTMLElement | null>): void {
  const { view } = control.state
  useLayoutEffect(() => {
    const apply = () => {
      const { x, y, zoom } = view.get()
      if (ref.current) ref.current.style.transform = `scale(${zoom}) translate(${-x}px, ${-y}px)`
    }
    apply()
    return view.subscribe(apply)
  }, [view, ref])
}

function useHands(control: WallControl, ref: RefObject<HTMLElement | null>): void {
  useLayoutEffect(() => {
    const element = ref.current
    if (!element) return
    const measure = () => setViewport(control.state, { widthPx: element.clientWidth, heightPx: element.clientHeight })
    measure()
    const observer = typeof ResizeObserver === 'undefined' ? undefined : new ResizeObserver(measure)
    observer?.observe(element)
    const stops = [attachPointer(element, control), attachWheel(element, control), attachKeyboard(element, control)]
    return () => {
      observer?.disconnect()
      for (const stop of stops) stop()
    }
  }, [control, ref])
}

/** Everything on the wall that may be seen, in the order of the keyboard. */
function useDrawn(items: WallItems): WallItem[] {
  const { state } = useWall()
  const region = useStore(state.region)
  const selection = useStore(state.selection)
  const focused = useStore(state.focused)
  const ordered = useMemo(() => inKeyboardOrder(items), [items])
  return useMemo(
    () =>
      ordered.filter(
        (entry) =>
          entry.id === focused || isDrawn(region, entry.box) || (selection.size <= 50 && selection.has(entry.id)),
      ),
    [ordered, region, selection, focused],
  )
}

function hasFiles(event: DragEvent): boolean {
  return [...event.dataTransfer.types].includes('Files')
}

/** Lines keep about their width at every zoom. React's types know no custom properties. */
function detailStyle(detail: number): CSSProperties {
  return { '--detail': detail } as CSSProperties
}

/** The wall: pans, zooms, and holds everything that hangs on it. */
export function Wall({ items, mayWrite, onDropFiles }: WallProps) {
  const control = useWall()
  const { state } = control
  const plan = useBoardPlan()
  const wall = useRef<HTMLDivElement>(null)
  const things = useRef<HTMLDivElement>(null)
  const overlay = useRef<HTMLDivElement>(null)
  useFollowsView(control, things)
  useFollowsView(control, overlay)
  useHands(control, wall)
  const drawn = useDrawn(items)
  const detail = useStore(state.detail)
  const panning = useStore(state.panning)
  const hasFocused = useStore(state.focused, (id) => id !== null && items.has(id))
  const [over, setOver] = useState(false)

  const handleDrop = (event: DragEvent<HTMLDivElement>) => {
    setOver(false)
    if (!hasFiles(event) || !mayWrite) return
    event.preventDefault()
    const edges = event.currentTarget.getBoundingClientRect()
    const at = toWall(state.view.get(), { x: event.clientX - edges.left, y: event.clientY - edges.top })
    onDropFiles([...event.dataTransfer.files], at)
  }

  return (
    <>
      <div
        ref={wall}
        data-wall
        role="application"
        aria-label="Wall"
        aria-describedby="wall-help"
        tabIndex={hasFocused ? -1 : 0}
        className={cn(
          'absolute inset-0 touch-none overflow-hidden bg-surround outline-none',
          panning && 'cursor-grab *:pointer-events-none',
        )}
        onFocus={(event) => {
          if (event.target !== event.currentTarget || !event.currentTarget.matches(':focus-visible') || hasFocused)
            return
          const first = inKeyboardOrder(items)[0]
          if (first) focusItem(control, first.id)
        }}
        onDragOver={(event) => {
          if (!hasFiles(event) || !mayWrite) return
          event.preventDefault()
          event.dataTransfer.dropEffect = 'copy'
          setOver(true)
        }}
        onDragLeave={(event) => {
          if (event.target === event.currentTarget) setOver(false)
        }}
        onDrop={handleDrop}
      >
        <div ref={things} className="absolute top-0 left-0 isolate size-0 origin-top-left" style={detailStyle(detail)}>
          {drawn.map((entry) => (
            <WallItemView key={entry.id} entry={entry} name={nameOf(entry, plan.looks)} mayWrite={mayWrite} />
          ))}
        </div>
        <div ref={overlay} className="pointer-events-none absolute top-0 left-0 size-0 origin-top-left">
          <Guides />
          <Marquee />
          <PeersLayer />
        </div>
        {over && (
          <div className="pointer-events-none absolute inset-2 grid place-items-center rounded-r border-2 border-dashed border-draft bg-draft-wash/70 text-lg font-semibold text-draft">
            Drop to pin here
          </div>
        )}
      </div>
      <p id="wall-help" className="sr-only">
        {HELP}
      </p>
      <Announcer />
    </>
  )
}

function Announcer() {
  const words = useStore(useWall().state.announcement)
  return (
    <div role="status" aria-live="assertive" className="sr-only" data-announcer>
      {words}
    </div>
  )
}

function Guides() {
  const { state } = useWall()
  const guides = useStore(state.guides)
  const detail = useStore(state.detail)
  return guides.map((guide) => (
    <i
      key={guide.axis}
      className="absolute bg-draft"
      style={
        guide.axis === 'x'
          ? { left: guide.at, top: guide.from, width: 1 / detail, height: guide.to - guide.from }
          : { left: guide.from, top: guide.at, width: guide.to - guide.from, height: 1 / detail }
      }
    />
  ))
}

function Marquee() {
  const { state } = useWall()
  const box = useStore(state.marquee)
  const detail = useStore(state.detail)
  if (!box) return null
  return (
    <i
      className="absolute border-draft bg-draft/10"
      style={{ left: box[0], top: box[1], width: box[2], height: box[3], borderWidth: 1.5 / detail }}
    />
  )
}
