import { type KeyboardEvent, type PointerEvent, useEffect, useRef, useState } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { type LengthUnit, METRES_PER_INCH, lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { useSetPresence } from '#src/realtime/use-presence.ts'
import {
  type DrawingKind,
  type Part,
  heightLimits,
  moved,
  partKey,
  partName,
  placeWords,
  pointOf,
  snap,
} from './parts.ts'
import { FINE_M, type Guide, gridM, snapPoint } from './snapping.ts'

/** How a drawing turns a hand's way into metres. `plan`: x and z; `side`: z and the height. */
export type Drawing = { kind: DrawingKind; pxPerM: number }

export type Held = {
  part: Part
  key: string
  from: Point
  at: Point
  by: 'pointer' | 'keyboard'
  drawing: DrawingKind
  guides: readonly Guide[]
}

/** A press of an arrow key, alone, with Shift and with Alt: about as far in either unit. */
const STEPS_M = {
  m: { normal: 0.1, large: 0.5, fine: FINE_M },
  ft: { normal: 4 * METRES_PER_INCH, large: 18 * METRES_PER_INCH, fine: METRES_PER_INCH / 2 },
} as const
/** A finger or pointer that is nearer than this to a line is meant to be on it, CSS px. */
const REACH_PX = 8
/** A press that moves less is a choice, not a drag, CSS px. */
const SLOP_PX = 3

type MovingInput = {
  whole: WholeSetup
  mayWrite: boolean
  nameOf: (part: Part) => string
  onChoose: (part: Part) => void
  /** Where a hand in this drawing has put a part; what the drawing does not show of the point is not the hand's. */
  onDrop: (part: Part, at: Point, drawing: DrawingKind) => void
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

/** Where a hand is that went this far, CSS px. */
function dragged(from: Point, dx: number, dy: number, drawing: Drawing): Point {
  const across = dx / drawing.pxPerM
  const down = dy / drawing.pxPerM
  return drawing.kind === 'plan'
    ? [from[0] + across, from[1], from[2] + down]
    : [from[0], from[1] - down, from[2] + across]
}

/** One step of an arrow key, [to the right, down] in the drawing. */
const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
}

function stepped({ part, at, drawing }: Held, key: string, stepM: number): Point | null {
  const arrow = ARROWS[key]
  if (!arrow) return null
  const to = dragged(at, arrow[0] * stepM, arrow[1] * stepM, { kind: drawing, pxPerM: 1 })
  // To a tenth of a millimetre: steps stay steps, wherever they begin.
  const exact = { gridM: 0.0001 }
  return moved(at, [snap(to[0], exact), snap(to[1], { ...exact, ...heightLimits(part) }), snap(to[2], exact)], drawing)
}

const isFreeKey = (event: { altKey: boolean; ctrlKey: boolean; metaKey: boolean }) =>
  event.altKey || event.ctrlKey || event.metaKey

/**
 * Dragging parts of a setup by pointer, touch or keyboard. While something is held the document is left alone: the
 * place is presence for others and a draft here; at the drop it is written once.
 */
export function useMoving({ whole, mayWrite, nameOf, onChoose, onDrop }: MovingInput): Moving {
  const setPresence = useSetPresence()
  const unit = useLengthUnit()
  const [held, setHeld] = useState<Held | null>(null)
  const [said, setSaid] = useState('')
  const grip = useRef<Grip | null>(null)
  // Nobody holds anything on a screen that is gone.
  useEffect(() => () => setPresence({ moving: {} }), [setPresence])

  function hold(next: Held) {
    setHeld(next)
    setPresence({ moving: { [next.key]: next.at } })
  }
  function letGo() {
    grip.current = null
    setHeld(null)
    setPresence({ moving: {} })
  }
  function drop(current: Held) {
    letGo()
    const unmoved = current.at.every((value, index) => value === current.from[index])
    setSaid(`${nameOf(current.part)} put down, ${placeWords(current.at, whole, unit)}`)
    if (!unmoved) onDrop(current.part, current.at, current.drawing)
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
        const { at, guides } = snapPoint({
          part,
          raw: dragged(from, dx, dy, drawing),
          drawing: drawing.kind,
          whole,
          gridM: gridM(unit),
          reachM: REACH_PX / drawing.pxPerM,
          isFree: isFreeKey(event),
        })
        if (mine && at.every((value, index) => value === mine.at[index])) return
        hold({ part, key, from, at, by: 'pointer', drawing: drawing.kind, guides })
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
          hold({ part, key, from: at, at, by: 'keyboard', drawing: drawing.kind, guides: [] })
          setSaid(
            `${nameOf(part)} picked up. Arrow keys move it, with Shift further, with Alt a little; Enter puts it down, Escape takes it back.`,
          )
          return
        }
        if (!mine) return
        const steps = STEPS_M[unit]
        const at = stepped(mine, event.key, event.shiftKey ? steps.large : isFreeKey(event) ? steps.fine : steps.normal)
        if (!at) return
        event.preventDefault()
        hold({ ...mine, at })
        setSaid(
          `${nameOf(part)}, ${drawing.kind === 'side' ? `${lengthLabel(at[1], unit)} up, ` : ''}${placeWords(at, whole, unit)}`,
        )
      },
      onBlur() {
        if (mine?.by === 'keyboard') drop(mine)
      },
    }
  }

  return { held, said, handlers }
}

/** Name of a part for its handle, with where it stands. */
export function handleLabel(part: Part, whole: WholeSetup, unit: LengthUnit, name = partName(part)): string {
  const off = part.kind === 'light' && !part.light.isOn ? ', switched off' : ''
  return `${name}${off}, ${placeWords(pointOf(part, whole), whole, unit)}`
}
