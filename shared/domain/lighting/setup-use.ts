import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import type { Orientation } from './frame.ts'

export type SetupUse = {
  shots: PlannedShot[]
  /** Orientations of its shots; upright when it has none, as a new shot is. */
  orientations: Orientation[]
  /** Frames of all its shots; null when it has none. */
  frames: number | null
  /** "Dome · shots 4 and 5". */
  words: string
}

function joined(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`
}

function shotWords(shots: readonly PlannedShot[]): string {
  const numbers = shots.flatMap((shot) => (shot.number === null ? [] : [shot.number])).sort((a, b) => a - b)
  const loose = shots.length - numbers.length
  const parts = [
    ...(numbers.length > 0 ? [`${numbers.length === 1 ? 'shot' : 'shots'} ${joined(numbers.map(String))}`] : []),
    ...(loose > 0 ? [`${loose} loose ${loose === 1 ? 'shot' : 'shots'}`] : []),
  ]
  return parts.length === 0 ? 'no shot yet' : parts.join(' and ')
}

/** Which shots use a setup, and what they ask of it. */
export function setupUse(plan: Plan, setupId: string): SetupUse {
  const shots = [...plan.shots.values()].filter((shot) => shot.plan.setupId === setupId)
  const places = [...new Set(shots.flatMap((shot) => (shot.set ? [shot.set.name] : [])))]
  const orientations = [...new Set(shots.map((shot) => shot.plan.orientation))]
  return {
    shots,
    orientations: orientations.length === 0 ? ['upright'] : orientations,
    frames: shots.length === 0 ? null : shots.reduce((sum, shot) => sum + shot.plan.frames, 0),
    words: [...(places.length > 0 ? [joined(places)] : []), shotWords(shots)].join(' · '),
  }
}

/** The orientation that sees most to the sides: what the plan is drawn with. */
export function widestOf(orientations: readonly Orientation[]): Orientation {
  return orientations.includes('across') ? 'across' : (orientations[0] ?? 'upright')
}
