import type { IncomingHttpHeaders } from 'node:http'
import { fromNodeHeaders } from 'better-auth/node'
import { type UserId, userIdSchema } from '#shared/ids.ts'
import type { Auth } from './auth.ts'

export type SignedIn = { userId: UserId; name: string; email: string; sessionId: string; expiresAtMs: number }

/** Who the session cookie of a request belongs to, for requests and for sockets before they open; null when signed out. */
export async function signedIn(auth: Auth, headers: IncomingHttpHeaders): Promise<SignedIn | null> {
  // No cookie, no question to the database.
  if (headers.cookie === undefined) return null
  const found = await auth.api.getSession({ headers: fromNodeHeaders(headers) })
  if (!found) return null
  return {
    userId: userIdSchema.parse(found.user.id),
    name: found.user.name,
    email: found.user.email,
    sessionId: found.session.id,
    expiresAtMs: found.session.expiresAt.getTime(),
  }
}
