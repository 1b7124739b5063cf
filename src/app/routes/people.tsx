import { PeopleScreen } from '#src/features/people/components/people-screen.tsx'
import { useLeaveToShoots } from '../leave-to-shoots.ts'

export function Component() {
  return <PeopleScreen onLeft={useLeaveToShoots()} />
}
