import { createContext, use } from 'react'
import type { Session } from '#shared/api/studios.ts'

export const SessionContext = createContext<Session | null>(null)

let firstUserId: string | undefined

/**
 * Whether a page belongs to this person: to the first who is signed in on it. Documents, pictures on their way and
 * fetched answers live as long as the page, and go out under whatever cookie the browser has.
 */
export function isPageOf(userId: string): boolean {
  firstUserId ??= userId
  return firstUserId === userId
}

/** Who is signed in. @throws outside of SignedIn: a programming error. */
export function useSession(): Session {
  const session = use(SessionContext)
  if (!session) throw new Error('useSession needs a SignedIn above it')
  return session
}
