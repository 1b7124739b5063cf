import type { PlannedDay } from '#shared/domain/plan/read-plan.ts'

/** From this length on a day is called long, minutes (an assumption; local law decides). */
const LONG_DAY_MIN = 600

/** Long days and children: a word of caution that defers to the law of the place. */
export function LongDayCaution({ day: { day, shots } }: { day: PlannedDay }) {
  const isLong = day.hardOutMin - day.lightsOnMin > LONG_DAY_MIN
  const underAge = shots.some(({ looks }) => looks.some(({ sitter }) => sitter?.underAge === true))
  if (!isLong && !underAge) return null
  const words = [
    ...(isLong ? ['A long day: keep breaks and the meal. Hours and rest are for local labour law to say.'] : []),
    ...(underAge
      ? ['Somebody is under age: hours, breaks and company follow the child-performance law of the place.']
      : []),
  ]
  return (
    <p className="border-l-3 border-glow bg-night-2 px-3 py-2 text-[0.8125rem] text-bone-soft">{words.join(' ')}</p>
  )
}
