import type { WallMap } from './wall.ts'

/** A line on the wall where it is `stops` under the mains: pieces from one point to another, metres. */
export type Contour = { stops: number; pieces: (readonly [x1: number, y1: number, x2: number, y2: number])[] }

type Corner = { x: number; y: number; value: number }

/** Where the line crosses the edge between two corners; undefined where it does not. */
function crossing(a: Corner, b: Corner, level: number): readonly [number, number] | undefined {
  if (a.value < level === b.value < level) return undefined
  const share = (level - a.value) / (b.value - a.value)
  return [a.x + (b.x - a.x) * share, a.y + (b.y - a.y) * share]
}

/** A dark wall, in stops under the mains. */
const DARK_STOPS = 20

function linesOf(map: WallMap, level: number): Contour['pieces'] {
  const { xM, yM, underMainStops } = map
  const cornerAt = (row: number, column: number): Corner | null => {
    const value = underMainStops[row]?.[column]
    const x = xM[column]
    const y = yM[row]
    return value === null || value === undefined || x === undefined || y === undefined
      ? null
      : { x, y, value: Math.min(DARK_STOPS, value) }
  }
  const pieces: Contour['pieces'] = []
  // Triangles instead of squares: a line through one is never in doubt.
  const cut = (a: Corner | null, b: Corner | null, c: Corner | null) => {
    if (!a || !b || !c) return
    const ends = [crossing(a, b, level), crossing(b, c, level), crossing(c, a, level)].filter(
      (end) => end !== undefined,
    )
    const [from, to] = ends
    if (from && to) pieces.push([from[0], from[1], to[0], to[1]])
  }
  for (let row = 0; row + 1 < yM.length; row++) {
    for (let column = 0; column + 1 < xM.length; column++) {
      const low = cornerAt(row + 1, column + 1)
      const high = cornerAt(row, column)
      cut(high, cornerAt(row, column + 1), low)
      cut(high, low, cornerAt(row + 1, column))
    }
  }
  return pieces
}

/**
 * Lines of equal light on a wall, at whole stops under the mains: between points of the map the stops are taken to
 * change evenly. Only lines that are somewhere on the map.
 */
export function wallContours(map: WallMap): Contour[] {
  const values = map.underMainStops.flat().filter((value): value is number => value !== null && Number.isFinite(value))
  if (values.length === 0) return []
  const from = Math.ceil(values.reduce((least, value) => Math.min(least, value), Infinity))
  const to = Math.min(from + 12, Math.floor(values.reduce((most, value) => Math.max(most, value), -Infinity)))
  return Array.from({ length: Math.max(0, to - from + 1) }, (_, index) => from + index)
    .map((stops) => ({ stops, pieces: linesOf(map, stops) }))
    .filter((contour) => contour.pieces.length > 0)
}
