import { type KeyboardEvent, type PointerEvent, useEffect, useRef, useState } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { useSetPresence } from '#src/realtime/use-presence.ts'
import { type Part, partKey, partName, placeWords, pointOf, snap } from './parts.ts'

/** How a drawing turns a hand's way into metres. `plan`: x and z; `side`: z and the height. */
export type Drawing = { kind: 'plan' | 'side'; pxPerM: number }

export type Held = {
  part: Part
  key: string
  from: Point
  at: Point
  by: 'pointer' | 'keyboard'
  drawing: Drawing['kind']
}

const STEP_M = 0.1
const LARGE_STEP_M = 0.5
/** A press that moves less is a choice, not a drag, CSS px. */
const SLOP_PX = 3

type MovingInput = {
  whole: WholeSetup
  mayWrite: boolean
  nameOf: (part: Part) => string
  onChoose: (part: Part) => void
  onDrop: (part: Part, at: Point) => void
}

export type Moving = {
  held: Held | null
  /** What a screen reader is told. */
  said: string
  handlers: (part: Part, drawing: Drawing) => PartHandlers
}

export type PartHandlers = {
  onPointerDown: (event: PointerEvent<SVGElement>) => void
  onPointerMove: (event: PointerEvent<SVGElement>) => void
  onPointerUp: (event: PointerEvent<SVGElement>) => void
  onPointerCancel: (event: PointerEvent<SVGElement>) => void
  onKeyDown: (event: KeyboardEvent<SVGElement>) => void
  onBlur: () => void
}

type Grip = { pointerId: number; x: number; y: number; moved: boolean }

function clampHeight(metres: number): number {
  return snap(metres, 0, 8)
}

/** Where a part comes to when a hand went this far, CSS px. */
function dragged(from: Point, dx: number, dy: number, drawing: Drawing): Point {
  const across = dx / drawing.pxPerM
  const down = dy / drawing.pxPerM
  return drawing.kind === 'plan'
    ? [snap(from[0] + across), from[1], snap(from[2] + down)]
    : [from[0], clampHeight(from[1] - down), snap(from[2] + across)]
}

function stepped(at: Point, key: string, step: number, drawing: Drawing['kind']): Point | null {
  const by = (dx: number, dUp: number, dz: number): Point => [
    snap(at[0] + dx),
    clampHeight(at[1] + dUp),
    snap(at[2] + dz),
  ]
  switch (key) {
    case 'ArrowLeft':
      return drawing === 'plan' ? by(-step, 0, 0) : by(0, 0, -step)
    case 'ArrowRight':
      return drawing === 'plan' ? by(step, 0, 0) : by(0, 0, step)
    case 'ArrowUp':
      return drawing === 'plan' ? by(0, 0, -step) : by(0, step, 0)
    case 'ArrowDown':
      return drawing === 'plan' ? by(0, 0, step) : by(0, -step, 0)
    default:
      return null
  }
}

/**
 * Dragging parts of a setup by pointer, touch or keyboard. While something is held the document is left alone: the
 * place is presence for others and a draft here; at the drop it is written once.
 */
export function useMoving({ whole, mayWrite, nameOf, onChoose, onDrop }: MovingInput): Moving {
  const setPresence = useSetPresence()
  const [held, setHeld] = useState<Held | null>(null)
  const [said, setSaid] = useState('')
  const grip = useRef<Grip | null>(null)
  // Nobody holds anything on a screen that is gone.
  useEffect(() => () => setPresence({ moving: {} }), [setPresence])

  function hold(next: Held) {
    setHeld(next)
    setPresence({ moving: { [next.key]: [next.at[0], next.at[2]] } })
  }
  function letGo() {
    grip.current = null
    setHeld(null)
    setPresence({ moving: {} })
  }
  function drop(current: Held) {
    letGo()
    const unmoved = current.at.every((value, index) => value === current.from[index])
    setSaid(`${nameOf(current.part)} put down, ${placeWords(current.at, whole)}`)
    if (!unmoved) onDrop(current.part, current.at)
  }
  function cancel(current: Held) {
    letGo()
    setSaid(`${nameOf(current.part)} back where it was`)
  }

  function handlers(part: Part, drawing: Drawing): PartHandlers {
    const key = partKey(part)
    const mine = held?.key === key ? held : null
    return {
      onPointerDown(event) {
        if (event.button !== 0) return
        event.stopPropagation()
        onChoose(part)
        if (!mayWrite) return
        if (held) drop(held)
        event.currentTarget.setPointerCapture(event.pointerId)
        event.currentTarget.focus({ preventScroll: true })
        grip.current = { pointerId: event.pointerId, x: event.clientX, y: event.clientY, moved: false }
      },
      onPointerMove(event) {
        const own = grip.current
        if (!own || own.pointerId !== event.pointerId) return
        const dx = event.clientX - own.x
        const dy = event.clientY - own.y
        if (!own.moved && Math.hypot(dx, dy) < SLOP_PX) return
        own.moved = true
        const from = mine?.from ?? pointOf(part, whole)
        const at = dragged(from, dx, dy, drawing)
        if (mine && at.every((value, index) => value === mine.at[index])) return
        hold({ part, key, from, at, by: 'pointer', drawing: drawing.kind })
      },
      onPointerUp(event) {
        if (grip.current?.pointerId !== event.pointerId) return
        if (mine) drop(mine)
        else grip.current = null
      },
      onPointerCancel() {
        if (mine) cancel(mine)
        else grip.current = null
      },
      onKeyDown(event) {
        if (mine && event.key === 'Escape') {
          event.preventDefault()
          event.stopPropagation()
          cancel(mine)
          return
        }
        if (mine?.by === 'pointer') return
        if (event.key === 'Enter' || event.key === ' ') {
          event.preventDefault()
          onChoose(part)
          if (!mayWrite) return
          if (mine) {
            drop(mine)
            return
          }
          const at = pointOf(part, whole)
          hold({ part, key, from: at, at, by: 'keyboard', drawing: drawing.kind })
          setSaid(
            `${nameOf(part)} picked up. Arrow keys move it, with Shift further; Enter puts it down, Escape takes it back.`,
          )
          return
        }
        if (!mine) return
        const at = stepped(mine.at, event.key, event.shiftKey ? LARGE_STEP_M : STEP_M, drawing.kind)
        if (!at) return
        event.preventDefault()
        hold({ ...mine, at })
        setSaid(
          `${nameOf(part)}, ${drawing.kind === 'side' ? `${at[1].toFixed(1)} m up, ` : ''}${placeWords(at, whole)}`,
        )
      },
      onBlur() {
        if (mine?.by === 'keyboard') drop(mine)
      },
    }
  }

  return { held, said, handlers }
}

/** Name of a part for its handle, with where it stands and what a press does. */
export function handleLabel(part: Part, whole: WholeSetup, name = partName(part)): string {
  return `${name}, ${placeWords(pointOf(part, whole), whole)}`
}
