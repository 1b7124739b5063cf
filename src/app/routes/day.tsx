import { DayScreen } from '#src/features/day/components/day-screen.tsx'
import { useSession } from '../session.ts'

export function Component() {
  const { user } = useSession()
  return <DayScreen userName={user.name} />
}
