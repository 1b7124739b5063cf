import type { Field } from './field.ts'

/** What a part is made of: how it shades. */
export type Stuff = 'skin' | 'eye' | 'hair' | 'cloth' | 'metal' | 'wood' | 'leaf' | 'trousers' | 'linen' | 'paint'

export type Part = { field: Field; stuff: Stuff }

/**
 * A body in the scene: parts in coordinates of its own, turned and put into place, with its distances kept on a grid.
 * World to own: q = R·(p − at), R orthonormal by rows.
 */
export type Solid = {
  parts: readonly Part[]
  rows: readonly [number, number, number, number, number, number, number, number, number]
  at: readonly [number, number, number]
  low: readonly [number, number, number]
  high: readonly [number, number, number]
  /** Side of a grid cell, metres. */
  cellM: number
  grid: Grid
  /** Distance of the nearest part, own coordinates. */
  distance: Field
  /** Index of whatever the solid was made from, and what: for colours. */
  of: { kind: 'head' | 'body' | 'prop'; index: number }
}

export type Grid = {
  values: Float32Array
  nx: number
  ny: number
  nz: number
  x0: number
  y0: number
  z0: number
  cellM: number
}

/** Cells of a block: a block far from the surface is filled from one value. */
const BLOCK = 4

/**
 * Distances of a field at the corners of a grid. Blocks that the surface cannot reach hold a lower bound from their
 * middle: enough for striding, and it saves most of the work.
 */
export function bake(
  field: Field,
  low: readonly [number, number, number],
  high: readonly [number, number, number],
  cellM: number,
): Grid {
  const count = (axis: 0 | 1 | 2) => Math.ceil((high[axis] - low[axis]) / cellM / BLOCK) * BLOCK
  const nx = count(0)
  const ny = count(1)
  const nz = count(2)
  const [x0, y0, z0] = low
  const values = new Float32Array(nx * ny * nz)
  const half = ((BLOCK - 1) * cellM) / 2
  const reach = half * Math.sqrt(3)
  for (let bz = 0; bz < nz; bz += BLOCK) {
    for (let by = 0; by < ny; by += BLOCK) {
      for (let bx = 0; bx < nx; bx += BLOCK) {
        const cx = x0 + bx * cellM + half
        const cy = y0 + by * cellM + half
        const cz = z0 + bz * cellM + half
        const middle = field(cx, cy, cz)
        const isFar = Math.abs(middle) > reach * 1.35 + cellM * 2
        for (let k = 0; k < BLOCK; k++) {
          for (let j = 0; j < BLOCK; j++) {
            const row = ((bz + k) * ny + by + j) * nx + bx
            for (let i = 0; i < BLOCK; i++) {
              const x = x0 + (bx + i) * cellM
              const y = y0 + (by + j) * cellM
              const z = z0 + (bz + k) * cellM
              if (!isFar) values[row + i] = field(x, y, z)
              else {
                const away = Math.sqrt((x - cx) ** 2 + (y - cy) ** 2 + (z - cz) ** 2)
                values[row + i] = middle > 0 ? Math.max(cellM, middle - away) : middle + away
              }
            }
          }
        }
      }
    }
  }
  return { values, nx, ny, nz, x0, y0, z0, cellM }
}

/** Distance between the corners of the grid; outside it the nearest corner's. */
export function sampleGrid(grid: Grid, x: number, y: number, z: number): number {
  const { values, nx, ny, nz } = grid
  let u = (x - grid.x0) / grid.cellM
  let v = (y - grid.y0) / grid.cellM
  let w = (z - grid.z0) / grid.cellM
  u = u < 0 ? 0 : u > nx - 1.001 ? nx - 1.001 : u
  v = v < 0 ? 0 : v > ny - 1.001 ? ny - 1.001 : v
  w = w < 0 ? 0 : w > nz - 1.001 ? nz - 1.001 : w
  const i = u | 0
  const j = v | 0
  const k = w | 0
  const fu = u - i
  const fv = v - j
  const fw = w - k
  const a = (k * ny + j) * nx + i
  const b = a + nx
  const c = a + nx * ny
  const d = c + nx
  const al = values[a] ?? 0
  const a0 = al + ((values[a + 1] ?? 0) - al) * fu
  const bl = values[b] ?? 0
  const b0 = bl + ((values[b + 1] ?? 0) - bl) * fu
  const cl = values[c] ?? 0
  const c0 = cl + ((values[c + 1] ?? 0) - cl) * fu
  const dl = values[d] ?? 0
  const d0 = dl + ((values[d + 1] ?? 0) - dl) * fu
  const ab = a0 + (b0 - a0) * fv
  const cd = c0 + (d0 - c0) * fv
  return ab + (cd - ab) * fw
}

/** Corners a grid has at most: beyond it the cells grow, whatever size somebody has written down. */
const MOST_CORNERS = 1_200_000

/** The side of a cell, metres, at which a box has no more corners than a grid may have. */
function affordable(cellM: number, low: Solid['low'], high: Solid['high']): number {
  let side = cellM
  const corners = () =>
    [0, 1, 2].reduce(
      (product, axis) => product * (Math.ceil(((high[axis] ?? 0) - (low[axis] ?? 0)) / side / BLOCK) * BLOCK),
      1,
    )
  while (corners() > MOST_CORNERS) side *= 1.25
  return side
}

/** A solid with its grid baked. */
export function makeSolid(input: Omit<Solid, 'grid' | 'distance'>): Solid {
  const fields = input.parts.map((part) => part.field)
  const distance: Field = (x, y, z) => {
    let d = Infinity
    for (const field of fields) {
      const own = field(x, y, z)
      if (own < d) d = own
    }
    return d
  }
  const cellM = affordable(input.cellM, input.low, input.high)
  return { ...input, cellM, distance, grid: bake(distance, input.low, input.high, cellM) }
}

const NOTHING: Part = { field: () => Infinity, stuff: 'paint' }

/** The part of a solid that a point of its surface belongs to. */
export function partAt(solid: Solid, x: number, y: number, z: number): Part {
  let best = NOTHING
  let least = Infinity
  for (const part of solid.parts) {
    const d = part.field(x, y, z)
    if (d < least) {
      least = d
      best = part
    }
  }
  return best
}
