import { type Compiled, at } from './compiled.ts'

/**
 * The least minutes of changeovers of any order, from below: every shot gets a predecessor of its own (the start of
 * the day or another shot), chains not asked for. Hungarian method with potentials, O(n³); from memory.
 */
export function assignmentBound(c: Compiled): number {
  const { n } = c
  const FORBIDDEN = 1e9
  // Rows are the shots that want a predecessor, columns the predecessors: 0 the start, k + 1 shot k. One more column
  // than rows; the start has to be among the used ones, which a large reward on it sees to.
  const REWARD = 1e7
  const cost = (to: number, column: number) => {
    if (column === to + 1) return FORBIDDEN
    return at(c.least, column * n + to) - (column === 0 ? REWARD : 0)
  }
  const rowPotential = new Float64Array(n + 1)
  const columnPotential = new Float64Array(n + 2)
  const rowOf = new Int32Array(n + 2)
  const cameFrom = new Int32Array(n + 2)
  for (let row = 1; row <= n; row++) {
    rowOf[0] = row
    let column = 0
    const slack = new Float64Array(n + 2).fill(Infinity)
    const used = new Uint8Array(n + 2)
    do {
      used[column] = 1
      const current = at(rowOf, column)
      let least = Infinity
      let next = 0
      for (let other = 1; other <= n + 1; other++) {
        if (at(used, other) === 1) continue
        const reduced = cost(current - 1, other - 1) - at(rowPotential, current) - at(columnPotential, other)
        if (reduced < at(slack, other)) {
          slack[other] = reduced
          cameFrom[other] = column
        }
        if (at(slack, other) < least) {
          least = at(slack, other)
          next = other
        }
      }
      for (let other = 0; other <= n + 1; other++) {
        if (at(used, other) === 1) {
          rowPotential[at(rowOf, other)] = at(rowPotential, at(rowOf, other)) + least
          columnPotential[other] = at(columnPotential, other) - least
        } else slack[other] = at(slack, other) - least
      }
      column = next
    } while (at(rowOf, column) !== 0)
    while (column !== 0) {
      const previous = at(cameFrom, column)
      rowOf[column] = at(rowOf, previous)
      column = previous
    }
  }
  let total = 0
  for (let column = 1; column <= n + 1; column++) {
    const row = at(rowOf, column)
    if (row > 0) total += at(c.least, (column - 1) * n + row - 1)
  }
  return total
}
