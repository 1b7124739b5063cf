import { createContext, use } from 'react'
import type { Session } from '#shared/api/studios.ts'

export const SessionContext = createContext<Session | null>(null)

/** Who is signed in. @throws outside of SignedIn: a programming error. */
export function useSession(): Session {
  const session = use(SessionContext)
  if (!session) throw new Error('useSession needs a SignedIn above it')
  return session
}
