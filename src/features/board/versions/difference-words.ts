import { count } from '#src/lib/format.ts'
import type { VersionDifferences } from './take-back-version.ts'

export type DifferenceLine = { what: string; things: string }

const LINES = [
  ['back', 'Back again'],
  ['gone', 'Taken off'],
  ['changed', 'As it was then'],
] as const

/** "Back again: 2 frames and 1 note", one line for each thing that happens; none when nothing differs. */
export function differenceLines(differences: VersionDifferences): DifferenceLine[] {
  return LINES.flatMap(([key, what]) => {
    const things = [...differences].flatMap(([word, counts]) => (counts[key] > 0 ? [count(counts[key], word)] : []))
    return things.length === 0 ? [] : [{ what, things: listWords(things) }]
  })
}

/** "a", "a and b", "a, b and c" */
function listWords(parts: readonly string[]): string {
  return parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1) ?? ''}`
}
