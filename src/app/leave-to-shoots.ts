import { useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { shootQueries } from '#src/features/shoots/queries.ts'

/** Back to the list after a shoot is no longer one's own; the list is fetched again. */
export function useLeaveToShoots(): () => void {
  const navigate = useNavigate()
  const queryClient = useQueryClient()
  return () => {
    void navigate('/', { replace: true })
    void queryClient.invalidateQueries({ queryKey: shootQueries.list().queryKey, exact: true })
  }
}
