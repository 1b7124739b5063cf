import { createAuthEndpoint } from 'better-auth/api'
import { setSessionCookie } from 'better-auth/cookies'
import { z } from 'zod'

/**
 * Signs a person in who has just shown, by an invitation's token, that the mailbox is theirs: no password asked.
 * Reachable from our own code only; it has no address.
 */
export function invitedSignIn() {
  return {
    id: 'invited-sign-in',
    endpoints: {
      signInInvited: createAuthEndpoint.serverOnly(
        { method: 'POST', body: z.object({ userId: z.string() }), requireHeaders: true },
        async (ctx) => {
          const user = await ctx.context.internalAdapter.findUserById(ctx.body.userId)
          if (!user) throw ctx.error('NOT_FOUND')
          const session = await ctx.context.internalAdapter.createSession(user.id)
          await setSessionCookie(ctx, { session, user })
          return ctx.json({ ok: true })
        },
      ),
    },
  }
}
