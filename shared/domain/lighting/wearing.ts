import type { Plan, PlannedLook, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import type { SitterPlace } from './schema.ts'
import type { Wearing } from './test-frame/scene-of.ts'

function colourOf(look: PlannedLook | undefined): string | null {
  return look?.pieces.find((piece) => piece.kind === 'garment' && piece.colour !== null)?.colour ?? null
}

function byNumber(a: PlannedShot, b: PlannedShot): number {
  const from = a.number ?? Number.MAX_SAFE_INTEGER
  return from - (b.number ?? Number.MAX_SAFE_INTEGER)
}

/**
 * What sitters wear in a setup's test frames, `#rrggbb`: the look written at the place, else the first look that its
 * sitter wears in a shot with this setup, in running order; of it the first garment that has a colour. Null: no such
 * look, or no colour in it.
 */
export function wearingOf(plan: Pick<Plan, 'shots' | 'looks'>, setupId: string): Wearing {
  const shots = [...plan.shots.values()].filter((shot) => shot.plan.setupId === setupId).sort(byNumber)
  const lookAt = (place: SitterPlace): PlannedLook | undefined => {
    if (place.lookId !== null) return plan.looks.get(place.lookId)
    if (place.sitterId === null) return undefined
    return shots.flatMap((shot) => shot.looks).find(({ look }) => look.sitterId === place.sitterId)
  }
  return { garmentColour: (place) => colourOf(lookAt(place)) }
}
