import { randomUUID } from 'node:crypto'
import { betterAuth } from 'better-auth'
import { drizzleAdapter } from 'better-auth/adapters/drizzle'
import { magicLink } from 'better-auth/plugins/magic-link'
import { eq } from 'drizzle-orm'
import type { Db } from '#server/db/client.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import * as schema from '#server/db/schema/auth.ts'
import { resetLetter, signInLetter } from '#server/features/mail/letters.ts'
import { queueLetter } from '#server/features/mail/queue-letter.ts'
import { invitedSignIn } from './invited-sign-in.ts'

export type AuthOptions = {
  secret: string
  publicUrl: string
  trustedOrigins: readonly string[]
  /** Tries of a password, and letters asked for, that one address has in a minute. */
  signInsPerMin: number
}

export const MIN_PASSWORD_LENGTH = 10

/** Accounts and sessions: e-mail with a password, or a letter with a link; the letters go through our own queue. */
export function makeAuth(db: Db, options: AuthOptions) {
  const { publicUrl, signInsPerMin } = options
  const perMinute = { window: 60, max: signInsPerMin }
  return betterAuth({
    appName: 'Sconce',
    secret: options.secret,
    baseURL: publicUrl,
    basePath: '/api/auth',
    trustedOrigins: [...options.trustedOrigins],
    telemetry: { enabled: false },
    logger: { disabled: true },
    database: drizzleAdapter(db, { provider: 'pg', schema, transaction: true }),
    verification: { storeIdentifier: 'hashed' },
    emailAndPassword: {
      enabled: true,
      minPasswordLength: MIN_PASSWORD_LENGTH,
      revokeSessionsOnPasswordReset: true,
      sendResetPassword: async ({ user, token }) => {
        await queueLetter(
          db,
          resetLetter({ to: user.email, name: user.name, url: `${publicUrl}/reset?token=${token}` }),
        )
      },
      // The letter has shown that the mailbox is theirs, and nobody else is signed in any more.
      onPasswordReset: async ({ user }) => {
        await db.update(schema.user).set({ emailVerified: true }).where(eq(schema.user.id, user.id))
      },
    },
    rateLimit: {
      enabled: true,
      storage: 'database',
      window: 60,
      max: Math.max(200, signInsPerMin),
      customRules: {
        '/sign-in/email': perMinute,
        '/sign-up/email': perMinute,
        '/sign-in/magic-link': perMinute,
        '/magic-link/verify': perMinute,
        '/request-password-reset': perMinute,
        '/reset-password': perMinute,
      },
    },
    advanced: {
      cookiePrefix: 'sconce',
      database: { generateId: () => randomUUID() },
      defaultCookieAttributes: { sameSite: 'lax' },
      ipAddress: { ipAddressHeaders: [CLIENT_IP_HEADER] },
    },
    databaseHooks: {
      session: {
        // Every process closes the sockets of a session that has ended.
        delete: { after: (session) => notifyAuth(db, { userId: session.userId, sessionId: session.id }) },
      },
    },
    plugins: [
      magicLink({
        expiresIn: 15 * 60,
        storeToken: 'hashed',
        disableSignUp: true,
        sendMagicLink: async ({ email, token }) => {
          const [person] = await db
            .select({ name: schema.user.name, email: schema.user.email })
            .from(schema.user)
            .where(eq(schema.user.email, email.toLowerCase()))
          // Whether there is an account is not told to whoever asks; a letter goes only where there is one.
          if (person)
            await queueLetter(
              db,
              signInLetter({ to: person.email, name: person.name, url: `${publicUrl}/sign-in?letter=${token}` }),
            )
        },
      }),
      invitedSignIn(),
    ],
  })
}

/** Set by us from the connection; what a client sends under this name is overwritten. */
export const CLIENT_IP_HEADER = 'x-client-ip'

export type Auth = ReturnType<typeof makeAuth>
