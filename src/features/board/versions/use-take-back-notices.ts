import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef } from 'react'
import { useNavigate } from 'react-router-dom'
import { useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { toast } from '#src/ui/toast.ts'
import { boardQueries } from '../queries.ts'

/** Says it when somebody else has taken the board back, and shows the way to how it was before. */
export function useTakeBackNotices(): void {
  const { shoot, userId } = useShootContext()
  const navigate = useNavigate()
  const { data } = useQuery(boardQueries.versions(shoot.id))
  const known = useRef<ReadonlySet<string> | null>(null)
  useEffect(() => {
    if (!data) return
    const before = known.current
    known.current = new Set(data.versions.map(({ id }) => id))
    if (before === null) return
    for (const { id, userId: who, by, takingBack } of data.versions) {
      if (takingBack === null || who === userId || before.has(id)) continue
      toast.say(`${by} took the board back to “${takingBack}”.`, {
        label: 'As it was before',
        onPress: () => void navigate(`/shoots/${shoot.id}/board/versions/${id}`),
      })
    }
  }, [data, userId, shoot.id, navigate])
}
