import { distanceBetween, floorDistance } from './geometry.ts'
import type { Background, Light, Point } from './schema.ts'
import { inSentence, metresLabel, sideOf } from './words.ts'

/** The sitter's eyes: distances and sides are told from here. */
export type Place = Point

/** Heights that differ by less are not worth a word, metres. */
const SAME_HEIGHT_M = 0.1

function heightWords(before: Point, after: Point): string {
  const rise = after[1] - before[1]
  if (Math.abs(rise) < SAME_HEIGHT_M) return ''
  return `${metresLabel(Math.abs(rise))} ${rise > 0 ? 'higher' : 'lower'}`
}

/**
 * How a move is told: where to and how far from the sitter, or, when it stays on its side, only what changed
 * ("Main 0.4 m closer", "Main 0.6 m lower"). Sides are as the camera sees them.
 */
export function moveWords(
  name: string,
  before: Point,
  after: Point,
  fromSitter: Place,
  toSitter: Place,
  sameRoom: boolean,
): { what: string; detail: string } {
  const side = sideOf(after, toSitter)
  const height = heightWords(before, after)
  const where = `${name} to ${side}, ${metresLabel(distanceBetween(after, toSitter))}`
  if (!sameRoom) return { what: where, detail: `${metresLabel(after[1])} up` }
  const onFloor = floorDistance(before, after)
  if (onFloor < SAME_HEIGHT_M && height !== '')
    return { what: `${name} ${height}`, detail: `${metresLabel(after[1])} up` }
  const nearer = floorDistance(before, fromSitter) - floorDistance(after, toSitter)
  const sideways = Math.sqrt(Math.max(0, onFloor ** 2 - nearer ** 2))
  if (Math.abs(nearer) >= SAME_HEIGHT_M && sideways < 0.25 && sideOf(before, fromSitter) === side) {
    const what = `${name} ${metresLabel(Math.abs(nearer))} ${nearer > 0 ? 'closer' : 'further off'}`
    return {
      what,
      detail: [`${metresLabel(distanceBetween(after, toSitter))} from the sitter`, height]
        .filter((part) => part !== '')
        .join(' · '),
    }
  }
  return { what: where, detail: [height, `moves ${metresLabel(onFloor)}`].filter((part) => part !== '').join(' · ') }
}

/** "Main: add, camera left, 1.6 m". */
export function addWords(name: string, at: Point, sitter: Place): string {
  return `${name}: add, ${sideOf(at, sitter)}, ${metresLabel(distanceBetween(at, sitter))}`
}

/** "60 cm softbox off, 110 cm umbrella on", or only one half. */
export function swapWords(off: string | undefined, on: string | undefined): string {
  const parts = [off === undefined ? '' : `${inSentence(off)} off`, on === undefined ? '' : `${inSentence(on)} on`]
  return parts.filter((part) => part !== '').join(', ')
}

/** Where a head is turned to: at the sitter, up, down, or to a side. */
export function aimWords(light: Light, sitter: Place): string {
  if (distanceBetween(light.aim, sitter) < 0.4) return 'turn to the sitter’s face'
  if (light.aim[2] < sitter[2] - 0.6) return 'turn to the background'
  return `turn to a point ${sideOf(light.aim, sitter)}, ${metresLabel(light.aim[1])} up`
}

/** How the camera moves; z is towards it. */
export function cameraWords(before: Point | null, after: Point, sitter: Place, sameRoom: boolean): string {
  const off = `${metresLabel(distanceBetween(after, sitter))} from the sitter`
  if (!before || !sameRoom) return `Camera to ${metresLabel(after[1])} up, ${off}`
  const height = heightWords(before, after)
  const onFloor = floorDistance(before, after)
  if (onFloor < SAME_HEIGHT_M && height !== '') return `Camera ${height}`
  return `Camera to ${[off, height].filter((part) => part !== '').join(', ')}`
}

/** "Background: grey paper, 2.7 m wide, 3.0 m behind the sitter". */
export function backgroundWords(before: Background | null, after: Background): { what: string; detail: string } {
  const name = after.what === '' ? 'as drawn' : inSentence(after.what)
  const where = `${metresLabel(-after.zM)} behind the sitter`
  const same = before && before.what === after.what && before.colour.toLowerCase() === after.colour.toLowerCase()
  if (same) return { what: `Background to ${where}`, detail: `${metresLabel(after.widthM)} wide` }
  return { what: `Background: ${name}`, detail: `${metresLabel(after.widthM)} wide, ${where}` }
}
