import { useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { PeopleScreen } from '#src/features/people/components/people-screen.tsx'
import { shootQueries } from '#src/features/shoots/queries.ts'

export function Component() {
  const navigate = useNavigate()
  const queryClient = useQueryClient()
  const handleLeft = () => {
    void navigate('/', { replace: true })
    void queryClient.invalidateQueries({ queryKey: shootQueries.list().queryKey, exact: true })
  }
  return <PeopleScreen onLeft={handleLeft} />
}
