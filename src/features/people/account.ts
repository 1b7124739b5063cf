import { z } from 'zod'
import { api } from '#src/lib/api.ts'

/** The sign-in library's answers carry more than we need; what matters is the cookie. */
const anything = z.unknown()

const post = (path: string, body: Record<string, unknown>) =>
  api(`/auth${path}`, { method: 'POST', body, response: anything })

export const account = {
  signIn: (input: { email: string; password: string }) => post('/sign-in/email', input),
  create: (input: { name: string; email: string; password: string }) => post('/sign-up/email', input),
  sendSignInLetter: (input: { email: string }) => post('/sign-in/magic-link', input),
  signInByLetter: (token: string) =>
    api(`/auth/magic-link/verify?token=${encodeURIComponent(token)}`, { response: anything }),
  sendResetLetter: (input: { email: string }) => post('/request-password-reset', input),
  setPassword: (input: { token: string; newPassword: string }) => post('/reset-password', input),
  rename: (input: { name: string }) => post('/update-user', input),
  signOut: () => post('/sign-out', {}),
  signOutElsewhere: () => post('/revoke-other-sessions', {}),
}

export const MIN_PASSWORD_LENGTH = 10

export const emailSchema = z.email('This is not an e-mail address').max(254)
export const nameSchema = z.string().trim().min(1, 'Say what we call you').max(80, 'At most 80 characters')
export const passwordSchema = z
  .string()
  .min(MIN_PASSWORD_LENGTH, `At least ${MIN_PASSWORD_LENGTH} characters`)
  .max(128, 'At most 128 characters')
