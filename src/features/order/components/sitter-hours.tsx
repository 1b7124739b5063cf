import { clockLabel } from '#shared/domain/order/clock.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import type { DaySchedule } from '#shared/domain/order/schedule-types.ts'

export type SitterHoursProps = {
  problem: OrderProblem
  day: DaySchedule
  endMin: number
  topOf: (atMin: number) => number
}

export const SITTER_RAIL_PX = 27

/** When each sitter is here, as a thin rail each, and when they are in front of the camera, as the thick parts of it. */
export function SitterHours({ problem, day, endMin, topOf }: SitterHoursProps) {
  return (
    <ul aria-label="Hours of the sitters" className="absolute inset-y-0 right-2 flex">
      {problem.sitters.map((sitter, index) => {
        const from = Math.max(problem.lightsOnMin, sitter.hours?.[0] ?? problem.lightsOnMin)
        const to = Math.min(endMin, sitter.hours?.[1] ?? endMin)
        const words = sitter.hours
          ? `${sitter.name}, here ${clockLabel(sitter.hours[0])} to ${clockLabel(sitter.hours[1])}`
          : `${sitter.name}, here the whole day`
        const theirs = day.shots.filter(({ shotId }) =>
          problem.shots.find(({ id }) => id === shotId)?.wears.some((wear) => wear.sitter === index),
        )
        return (
          <li key={sitter.id} title={words} style={{ width: SITTER_RAIL_PX }} className="relative">
            <span className="sr-only">{words}</span>
            {to > from && (
              <span
                aria-hidden
                className="absolute right-[3px] w-px bg-edge"
                style={{ top: topOf(from), height: topOf(to) - topOf(from) }}
              />
            )}
            {theirs.map((shot) => (
              <span
                key={shot.shotId}
                aria-hidden
                className="absolute right-px w-[5px] rounded-sm bg-rail"
                style={{ top: topOf(shot.startMin), height: topOf(shot.endMin) - topOf(shot.startMin) }}
              />
            ))}
            <span
              aria-hidden
              className="absolute right-[8px] text-xs leading-none whitespace-nowrap text-ink-soft [writing-mode:vertical-rl]"
              style={{ top: topOf(from) + 2 }}
            >
              {sitter.name}
              {sitter.hours && sitter.hours[0] > problem.lightsOnMin && ` from ${clockLabel(sitter.hours[0])}`}
            </span>
          </li>
        )
      })}
    </ul>
  )
}
