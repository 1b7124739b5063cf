import { useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { account } from '#src/features/people/account.ts'
import { MeScreen } from '#src/features/people/components/me-screen.tsx'
import { studioQueries } from '#src/features/studios/queries.ts'
import { forgetDrafts } from '#src/lib/drafts.ts'
import { useUnsentOnDevice } from '#src/realtime/use-unsent-on-device.ts'
import { signOutOfDevice } from '#src/realtime/sign-out.ts'
import { useSession } from '../session.ts'

export function Component() {
  const { user, letters } = useSession()
  const queryClient = useQueryClient()
  const navigate = useNavigate()
  const unsent = useUnsentOnDevice(user.id)
  const signOut = async () => {
    await signOutOfDevice(user.id, async () => void (await account.signOut()))
    forgetDrafts(user.id)
    await navigate('/sign-in', { replace: true })
    queryClient.clear()
  }
  return (
    <MeScreen
      user={user}
      letters={letters}
      unsent={unsent}
      onSignOut={signOut}
      onRenamed={() => void queryClient.invalidateQueries({ queryKey: studioQueries.session().queryKey })}
    />
  )
}
