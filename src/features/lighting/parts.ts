import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Light, Point, Prop, SitterPlace } from '#shared/domain/lighting/schema.ts'
import { distanceBetween, facePoint } from '#shared/domain/lighting/geometry.ts'
import { purposeWord } from '#shared/domain/lighting/words.ts'
import { type LengthUnit, lengthLabel } from '#src/lib/length-unit.ts'

/** What a hand can move in the drawings of a setup. */
export type Part =
  | { kind: 'light'; light: Light }
  | { kind: 'aim'; light: Light }
  | { kind: 'place'; place: SitterPlace }
  | { kind: 'prop'; prop: Prop }
  | { kind: 'camera'; setupId: string }

/** Name of a part in presence and in the moves of a drag: a light, place or prop by its id. */
export function partKey(part: Part): string {
  switch (part.kind) {
    case 'light':
      return part.light.id
    case 'aim':
      return `${part.light.id}:aim`
    case 'place':
      return part.place.id
    case 'prop':
      return part.prop.id
    case 'camera':
      return `${part.setupId}:camera`
  }
}

/** Everything of a setup that can be moved. */
export function partsOf(whole: WholeSetup): Part[] {
  return [
    { kind: 'camera', setupId: whole.setup.id },
    ...whole.places.map((place): Part => ({ kind: 'place', place })),
    ...whole.props.map((prop): Part => ({ kind: 'prop', prop })),
    ...whole.lights.flatMap((light): Part[] => [
      { kind: 'light', light },
      { kind: 'aim', light },
    ]),
  ]
}

/** Where a part stands, metres; a sitter's height is that of the eyes. */
export function pointOf(part: Part, whole: WholeSetup): Point {
  switch (part.kind) {
    case 'light':
      return part.light.at
    case 'aim':
      return part.light.aim
    case 'place':
      return [part.place.at[0], part.place.eyeHeightM, part.place.at[1]]
    case 'prop':
      return part.prop.at
    case 'camera':
      return whole.setup.camera.at
  }
}

export function partName(part: Part, sitterName = 'Sitter'): string {
  switch (part.kind) {
    case 'light':
      return purposeWord(part.light.purpose)
    case 'aim':
      return `Aim of the ${purposeWord(part.light.purpose).toLowerCase()}`
    case 'place':
      return sitterName
    case 'prop':
      return part.prop.name
    case 'camera':
      return 'Camera'
  }
}

/** Parts being moved, by key: where they are now. */
export type Moves = ReadonlyMap<string, Point>

/** The setup with the parts that are being moved where hands hold them. Untouched items keep their identity. */
export function withMoves(whole: WholeSetup, moves: Moves): WholeSetup {
  if (moves.size === 0) return whole
  const camera = moves.get(`${whole.setup.id}:camera`)
  return {
    setup: camera ? { ...whole.setup, camera: { ...whole.setup.camera, at: camera } } : whole.setup,
    lights: whole.lights.map((light) => {
      const at = moves.get(light.id)
      const aim = moves.get(`${light.id}:aim`)
      return at || aim ? { ...light, at: at ?? light.at, aim: aim ?? light.aim } : light
    }),
    places: whole.places.map((place) => {
      const at = moves.get(place.id)
      return at ? { ...place, at: [at[0], at[2]], eyeHeightM: at[1] } : place
    }),
    props: whole.props.map((prop) => {
      const at = moves.get(prop.id)
      return at ? { ...prop, at } : prop
    }),
  }
}

export type DrawingKind = 'plan' | 'side'

/** The numbers of a point that a drawing shows and that a hand in it changes; the others stay as they are written. */
const AXES: Readonly<Record<DrawingKind, readonly (0 | 1 | 2)[]>> = { plan: [0, 2], side: [1, 2] }

/** A written point with the numbers that a hand in this drawing has changed. */
export function moved(written: Point, at: Point, drawing: DrawingKind): Point {
  const next: Point = [...written]
  for (const axis of AXES[drawing]) next[axis] = at[axis]
  return next
}

/** How low and how high a part may be, metres: eyes of sitters, everything else. */
export function heightLimits(part: Part): { min: number; max: number } {
  return part.kind === 'place' ? { min: 0.3, max: 2.4 } : { min: 0, max: 8 }
}

/** To the nearest point of a grid, five centimetres by itself, within limits. */
export function snap(metres: number, { min = -50, max = 50, gridM = 0.05 } = {}): number {
  // Rounded again, so that a twentieth is written as one.
  const nearest = Number((Math.round(metres / gridM) * gridM).toFixed(4))
  return Math.min(max, Math.max(min, nearest)) + 0
}

/** A point's place as told aloud: "1.2 m left, 1.1 m towards the camera, 1.6 m from the sitter". */
export function placeWords(point: Point, whole: WholeSetup, unit: LengthUnit = 'm'): string {
  const [x, , z] = point
  const parts: string[] = []
  if (Math.abs(x) >= 0.05) parts.push(`${lengthLabel(Math.abs(x), unit)} ${x < 0 ? 'left' : 'right'}`)
  if (Math.abs(z) >= 0.05)
    parts.push(`${lengthLabel(Math.abs(z), unit)} ${z > 0 ? 'towards the camera' : 'behind the sitter’s mark'}`)
  if (parts.length === 0) parts.push('on the sitter’s mark')
  const fromFaceM = distanceBetween(point, facePoint(whole))
  if (fromFaceM >= 0.05) parts.push(`${lengthLabel(fromFaceM, unit)} from the sitter`)
  return parts.join(', ')
}
