import { fromNodeHeaders } from 'better-auth/node'
import type { RequestHandler, Response as ExpressResponse } from 'express'
import { type Auth, CLIENT_IP_HEADER } from '#server/auth/auth.ts'
import { personName } from '#server/auth/person-name.ts'
import { AppError } from '#server/errors.ts'
import { authError } from './auth-errors.ts'

/** What of the sign-in library can be reached; everything else of it has no address here. */
const OPEN = new Set([
  'POST /sign-up/email',
  'POST /sign-in/email',
  'POST /sign-in/magic-link',
  'GET /magic-link/verify',
  'POST /sign-out',
  'POST /request-password-reset',
  'POST /reset-password',
  'POST /change-password',
  'POST /update-user',
  'POST /revoke-other-sessions',
])

/** Sign-in, sign-up, sign-out and passwords, with refusals in our own envelope. Comes after the JSON parser. */
export function authRoute(auth: Auth, publicUrl: string): RequestHandler {
  return async (req, res) => {
    const path = req.path.replace(/^\/auth/, '')
    if (!OPEN.has(`${req.method} ${path}`)) throw new AppError('NOT_FOUND', 'There is nothing at this address.')
    const headers = fromNodeHeaders(req.headers)
    headers.set(CLIENT_IP_HEADER, req.ip ?? '')
    headers.delete('content-length')
    const body = withCheckedName(req.body)
    if (body === undefined) headers.delete('content-type')
    const answer = await auth.handler(
      new Request(new URL(req.originalUrl, publicUrl), {
        method: req.method,
        headers,
        ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      }),
    )
    await pass(answer, res)
  }
}

/** A name goes into letters and everybody's screens, so it is one line of readable length. @throws BAD_REQUEST */
function withCheckedName(body: unknown): unknown {
  if (typeof body !== 'object' || body === null || !('name' in body) || typeof body.name !== 'string') return body
  return { ...body, name: personName(body.name) }
}

/**
 * Hands cookies on, and refusals as ours. What the library answers with would show the session's token to scripts, so
 * nobody gets to read it. A redirect means that the letter's link was no good.
 */
async function pass(answer: Response, res: ExpressResponse): Promise<void> {
  if (answer.status >= 300) throw authError(answer.status, await answer.json().catch(() => undefined))
  sendCookies(answer.headers, res)
  res.json({ ok: true })
}

/** The session cookie of an answer of the sign-in library. */
export function sendCookies(headers: Headers, res: ExpressResponse): void {
  for (const cookie of headers.getSetCookie()) res.append('set-cookie', cookie)
}
