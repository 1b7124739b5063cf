import type { OrderDay } from '../use-order-day.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import { count } from '#src/lib/format.ts'
import { Caution } from '#src/ui/caution.tsx'

/** Everything that does not hold in the order as it stands, summed up; a sentence opens its shot. */
export function BrokenRules({ shown, onOpen }: { shown: OrderDay; onOpen: (shotId: string) => void }) {
  const { day } = shown
  const late = day.shots.filter(({ made }) => !made)
  if (day.broken.length === 0 && late.length === 0) return null
  const firstLate = late[0]
  const titles = [
    day.broken.length > 0 ? `${count(day.broken.length, 'rule')} broken` : '',
    late.length > 0 ? `${count(late.length, 'shot')} after the hard out` : '',
  ]
  return (
    <Caution title={titles.filter((part) => part !== '').join(' · ')}>
      <ul>
        {day.broken.map(({ key, shotId, words }) => (
          <li key={`${key}:${shotId ?? ''}`}>
            {shotId === null ? (
              words
            ) : (
              <button
                type="button"
                onClick={() => onOpen(shotId)}
                className="text-left underline decoration-edge underline-offset-2 hover:decoration-ink max-md:min-h-11"
              >
                {words}
              </button>
            )}
          </li>
        ))}
        {firstLate && (
          <li>
            The day wraps at {clockLabel(day.wrapMin)}, the hard out is {clockLabel(day.hardOutMin)}.
          </li>
        )}
      </ul>
    </Caution>
  )
}
