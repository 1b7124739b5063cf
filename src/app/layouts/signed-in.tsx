import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query'
import { Suspense, useEffect } from 'react'
import { Navigate, Outlet, useLocation } from 'react-router-dom'
import type { Session } from '#shared/api/studios.ts'
import { studioQueries } from '#src/features/studios/queries.ts'
import { listenForSignOut } from '#src/realtime/sign-out.ts'
import { Waiting } from '#src/ui/waiting.tsx'
import { SessionContext, isPageOf } from '../session.ts'
import { forgetAnswers } from '../signed-in-again.ts'

/** Everything below needs a person: without one it leads to the sign-in page and back again afterwards. */
export function SignedIn() {
  return (
    <Suspense fallback={<Waiting />}>
      <WithSession />
    </Suspense>
  )
}

function WithSession() {
  const { data: session } = useSuspenseQuery(studioQueries.session())
  const { pathname, search } = useLocation()
  if (!session) return <Navigate to={`/sign-in?to=${encodeURIComponent(pathname + search)}`} replace />
  return isPageOf(session.user.id) ? <Provided session={session} /> : <AnotherPerson />
}

/** A page of one person does not go on as another's. */
function AnotherPerson() {
  useEffect(() => {
    void forgetAnswers().then(() => window.location.reload())
  }, [])
  return <Waiting className="min-h-dvh" />
}

function Provided({ session }: { session: Session }) {
  const queryClient = useQueryClient()
  const userId = session.user.id
  useEffect(
    () => listenForSignOut(userId, () => queryClient.setQueryData(studioQueries.session().queryKey, null)),
    [userId, queryClient],
  )
  return (
    <SessionContext value={session}>
      <Outlet />
    </SessionContext>
  )
}
