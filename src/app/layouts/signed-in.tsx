import { useSuspenseQuery } from '@tanstack/react-query'
import { Suspense } from 'react'
import { Navigate, Outlet, useLocation } from 'react-router-dom'
import type { Session } from '#shared/api/studios.ts'
import { studioQueries } from '#src/features/studios/queries.ts'
import { Waiting } from '#src/ui/waiting.tsx'
import { SessionContext } from '../session.ts'

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
  return <Provided session={session} />
}

function Provided({ session }: { session: Session }) {
  return (
    <SessionContext value={session}>
      <Outlet />
    </SessionContext>
  )
}
