import { BriefScreen } from '#src/features/shoots/components/brief-screen.tsx'
import { useLeaveToShoots } from '../leave-to-shoots.ts'
import { useSession } from '../session.ts'

export function Component() {
  const { user } = useSession()
  return <BriefScreen userId={user.id} onRemoved={useLeaveToShoots()} />
}
