import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { LengthUnit } from '#src/lib/length-unit.ts'
import { type Part, partKey } from '../../parts.ts'
import { type Drawing, type Moving, handleLabel } from '../../use-moving.ts'
import type { PeerHold } from '../../use-peer-moves.ts'

/** What the two drawings of a setup know about everything that can be moved in them. */
export type MovableSetup = {
  /** The setup as it is shown: with what hands hold. */
  whole: WholeSetup
  chosenKey: string | null
  moving: Moving
  mayWrite: boolean
  peers: ReadonlyMap<string, PeerHold>
  nameOf: (part: Part) => string
}

/** What every handle of a drawing gets; where it stands is the drawing's own. */
export function handlePropsIn(setup: MovableSetup, drawing: Drawing, unit: LengthUnit) {
  const { whole, chosenKey, moving, mayWrite, peers, nameOf } = setup
  return (part: Part) => {
    const key = partKey(part)
    const label = handleLabel(part, whole, unit, nameOf(part))
    return {
      label: drawing.kind === 'side' ? `${label}, seen from the side` : label,
      handlers: moving.handlers(part, drawing),
      held: moving.held?.key === key,
      chosen: chosenKey === key,
      peer: peers.get(key),
      mayWrite,
    }
  }
}
