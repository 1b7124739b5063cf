import type { LookDifference } from '#shared/domain/sign-off/schema.ts'
import { differenceKind } from '#shared/domain/sign-off/differences.ts'

export type DifferenceListProps = { differences: readonly LookDifference[] }

/** What changed, line by line: struck out before, bold after. */
export function DifferenceList({ differences }: DifferenceListProps) {
  return (
    <ul>
      {differences.map((difference, index) => (
        <li key={index}>
          <Line {...difference} />
        </li>
      ))}
    </ul>
  )
}

function Line(difference: LookDifference) {
  const { what, before, after } = difference
  switch (differenceKind(difference)) {
    case 'added':
      return (
        <>
          <ins className="font-semibold no-underline">{what}</ins>: added
        </>
      )
    case 'taken out':
      return (
        <>
          <del className="text-ink-soft">{what}</del>: taken out
        </>
      )
    case 'changed':
      return (
        <>
          {what}:{' '}
          {before === '' ? (
            <span className="text-ink-soft">not said</span>
          ) : (
            <del className="text-ink-soft">{before}</del>
          )}{' '}
          → {after === '' ? 'not said any more' : <ins className="font-semibold no-underline">{after}</ins>}
        </>
      )
  }
}
