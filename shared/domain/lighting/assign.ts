/** Costs that are compared from the left: the first place that differs decides. All of one length. */
export type Cost = readonly number[]

const EPSILON = 1e-9
/** Above this many equal things the search would be long; they are paired in the order given. */
const MOST = 12

function less(a: Cost, b: Cost): boolean {
  for (let i = 0; i < a.length; i++) {
    const difference = (a[i] ?? 0) - (b[i] ?? 0)
    if (Math.abs(difference) > EPSILON) return difference < 0
  }
  return false
}

type Best = { cost: Cost; pairs: readonly (readonly [number, number])[] }

/**
 * Pairs every index below `rows` with another index below `columns` (rows ≤ columns) so that the sum of the costs is
 * least; exact, by dynamic programming over the sets of taken columns. Ties go to the lower column.
 */
function assignSmaller(rows: number, columns: number, cost: (row: number, column: number) => Cost): Best['pairs'] {
  if (columns > MOST) return Array.from({ length: rows }, (_, index) => [index, index] as const)
  let layer = new Map<number, Best>([[0, { cost: [], pairs: [] }]])
  for (let row = 0; row < rows; row++) {
    const next = new Map<number, Best>()
    for (const [taken, best] of layer) {
      for (let column = 0; column < columns; column++) {
        if (taken & (1 << column)) continue
        const own = cost(row, column)
        const sum = own.map((value, i) => value + (best.cost[i] ?? 0))
        const known = next.get(taken | (1 << column))
        if (!known || less(sum, known.cost)) {
          next.set(taken | (1 << column), { cost: sum, pairs: [...best.pairs, [row, column]] })
        }
      }
    }
    layer = next
  }
  let winner: Best | null = null
  for (const [, best] of [...layer].sort(([a], [b]) => a - b))
    if (!winner || less(best.cost, winner.cost)) winner = best
  return winner?.pairs ?? []
}

/**
 * As many pairs of `left` and `right` as there can be, at the least summed cost; exact for up to twelve a side.
 *
 * @returns pairs of indices [left, right], sorted by left.
 */
export function cheapestPairs<L, R>(
  left: readonly L[],
  right: readonly R[],
  cost: (a: L, b: R) => Cost,
): (readonly [number, number])[] {
  const table = left.map((a) => right.map((b) => cost(a, b)))
  if (left.length <= right.length) {
    return [...assignSmaller(left.length, right.length, (row, column) => table[row]?.[column] ?? [])]
  }
  return assignSmaller(right.length, left.length, (row, column) => table[column]?.[row] ?? [])
    .map(([row, column]) => [column, row] as const)
    .sort((a, b) => a[0] - b[0])
}
