import { z } from 'zod'
import type { ErrorCode } from '#shared/api/errors.ts'
import { AppError } from '#server/errors.ts'

type Words = { code: ErrorCode; message: string; issue?: { path: string; message: string } }

const WORDS: Readonly<Record<string, Words>> = {
  INVALID_EMAIL_OR_PASSWORD: {
    code: 'SIGNED_OUT',
    message: 'The e-mail or the password is not right. Try again, or have a letter sent that signs you in.',
  },
  USER_ALREADY_EXISTS: {
    code: 'CONFLICT',
    message: 'There is an account with this e-mail already. Sign in, or have a letter sent that signs you in.',
  },
  USER_ALREADY_EXISTS_USE_ANOTHER_EMAIL: {
    code: 'CONFLICT',
    message: 'There is an account with this e-mail already. Sign in, or have a letter sent that signs you in.',
  },
  INVALID_EMAIL: {
    code: 'BAD_REQUEST',
    message: 'This is not an e-mail address.',
    issue: { path: 'email', message: 'this is not an e-mail address' },
  },
  PASSWORD_TOO_SHORT: {
    code: 'BAD_REQUEST',
    message: 'The password is too short: at least 10 characters.',
    issue: { path: 'password', message: 'at least 10 characters' },
  },
  PASSWORD_TOO_LONG: {
    code: 'BAD_REQUEST',
    message: 'The password is too long: at most 128 characters.',
    issue: { path: 'password', message: 'at most 128 characters' },
  },
  INVALID_PASSWORD: {
    code: 'FORBIDDEN',
    message: 'The present password is not right. Nothing was changed.',
    issue: { path: 'currentPassword', message: 'this is not your password' },
  },
  CREDENTIAL_ACCOUNT_NOT_FOUND: {
    code: 'CONFLICT',
    message: 'You have no password yet. Have a letter sent to set one.',
  },
  INVALID_TOKEN: { code: 'GONE', message: 'This link has been used or is too old. Ask for a new letter.' },
  UNAUTHORIZED: { code: 'SIGNED_OUT', message: 'You are not signed in. Sign in and try again.' },
}

const refusalSchema = z.object({ code: z.string().optional(), message: z.string().optional() })

/** A refusal of the sign-in library in our words; what it says itself is for programmers. */
export function authError(status: number, body: unknown): AppError {
  const refusal = refusalSchema.safeParse(body).data
  const words = refusal?.code === undefined ? undefined : WORDS[refusal.code]
  if (words) return new AppError(words.code, words.message, words.issue ? { issues: [words.issue] } : {})
  if (status === 429)
    return new AppError('TOO_MANY', 'That was tried very often. Wait a minute and try again; nothing was changed.')
  if (status < 400) return new AppError('GONE', 'This link has been used or is too old. Ask for a new letter.')
  if (status === 401) return new AppError('SIGNED_OUT', 'You are not signed in. Sign in and try again.')
  if (status === 403)
    return new AppError(
      'WRONG_ORIGIN',
      'This was sent from a page that is not ours, so nothing was changed. Open Sconce at its own address and try again.',
    )
  if (status === 404) return new AppError('NOT_FOUND', 'There is nothing at this address.')
  if (status < 500)
    return new AppError(
      'BAD_REQUEST',
      'Some of what was sent does not fit. Nothing was changed; check e-mail, name and password.',
      { issues: issuesFrom(refusal?.message) },
    )
  return new AppError('INTERNAL', 'Something went wrong on our side. Nothing was changed; try again.', { cause: body })
}

/** Its validation says `[body.email] Invalid email address; [body.password] …`. */
function issuesFrom(message: string | undefined): { path: string; message: string }[] {
  return [...(message ?? '').matchAll(/\[body\.([\w.]+)\] ([^;[]+)/g)].map(([, path = '', words = '']) => ({
    path,
    message: words.trim(),
  }))
}
