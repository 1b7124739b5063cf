import { LOOSE } from '#shared/domain/board/schema.ts'
import { shortDate } from '#src/lib/format.ts'
import { useBoardPlan } from '../../board-plan.ts'

/** Names of the strip's lists: "Day 1, Thu 14 Oct", "Not on a day". */
export function useNameOfList(): (listId: string) => string {
  const { days } = useBoardPlan()
  return (listId) => {
    if (listId === LOOSE) return 'Not on a day'
    const index = days.findIndex(({ day }) => day.id === listId)
    const date = days[index]?.day.date
    return date ? `Day ${index + 1}, ${shortDate(date)}` : `Day ${index + 1}`
  }
}
