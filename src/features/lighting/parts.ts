import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Light, Point, Prop, SitterPlace } from '#shared/domain/lighting/schema.ts'
import { distanceBetween, facePoint } from '#shared/domain/lighting/geometry.ts'
import { metresLabel, purposeWord } from '#shared/domain/lighting/words.ts'

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

/** To the nearest five centimetres, within the drawing's limits. */
export function snap(metres: number, min = -50, max = 50): number {
  return Math.min(max, Math.max(min, Math.round(metres * 20) / 20 + 0))
}

/** A point's place as told aloud: "1.2 m left, 1.1 m towards the camera, 1.6 m from the sitter". */
export function placeWords(point: Point, whole: WholeSetup): string {
  const [x, , z] = point
  const parts: string[] = []
  if (Math.abs(x) >= 0.05) parts.push(`${metresLabel(Math.abs(x))} ${x < 0 ? 'left' : 'right'}`)
  if (Math.abs(z) >= 0.05)
    parts.push(`${metresLabel(Math.abs(z))} ${z > 0 ? 'towards the camera' : 'behind the sitter’s mark'}`)
  if (parts.length === 0) parts.push('on the sitter’s mark')
  return [...parts, `${metresLabel(distanceBetween(point, facePoint(whole)))} from the sitter`].join(', ')
}
