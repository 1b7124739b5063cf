import type { Summary } from './stats.ts'
import type { Cell } from './scenarios/scenario.ts'

/** The usual four figures of a summary. */
export function fourOf(summary: Summary | null): string {
  return summary ? `${summary.p50} / ${summary.p95} / ${summary.p99} / ${summary.max}` : '–'
}

/** Lines of text with aligned columns. */
export function table(head: readonly Cell[], rows: readonly (readonly Cell[])[]): string {
  const cells = [head, ...rows].map((row) => row.map((cell) => String(cell ?? '–')))
  const widths = head.map((_, column) => Math.max(...cells.map((row) => (row[column] ?? '').length)))
  return cells
    .map((row) =>
      row
        .map((cell, i) => cell.padEnd(widths[i] ?? 0))
        .join('  ')
        .trimEnd(),
    )
    .join('\n')
}
