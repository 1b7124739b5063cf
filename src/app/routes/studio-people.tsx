import { useParams } from 'react-router-dom'
import { StudioPeopleScreen } from '#src/features/studios/components/studio-people-screen.tsx'
import { ApiError } from '#src/lib/api.ts'
import { useSession } from '../session.ts'

export function Component() {
  const { studioId } = useParams()
  const { studios, user } = useSession()
  const studio = studios.find(({ id }) => id === studioId)
  if (!studio) throw new ApiError('NOT_FOUND', 'There is no such studio.')
  return <StudioPeopleScreen studioId={studio.id} name={studio.name} role={studio.role} userId={user.id} />
}
