import { BriefScreen } from '#src/features/shoots/components/brief-screen.tsx'
import { useSession } from '../session.ts'

export function Component() {
  const { user } = useSession()
  return <BriefScreen userId={user.id} />
}
