import { canInStudio } from '#shared/access/roles.ts'
import { ShootsScreen } from '#src/features/shoots/components/shoots-screen.tsx'
import { NameStudio } from '#src/features/studios/components/name-studio.tsx'
import { today } from '#src/lib/format.ts'
import { useSession } from '../session.ts'

export function Component() {
  const { user, studios } = useSession()
  const own = studios.filter(({ role }) => canInStudio(role, 'shoots.create'))
  return <ShootsScreen userId={user.id} studios={own} today={today()} nameStudio={<NameStudio />} />
}
