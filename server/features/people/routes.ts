import { fromNodeHeaders } from 'better-auth/node'
import { Router } from 'express'
import { z } from 'zod'
import { invitationIdSchema, shootIdSchema, userIdSchema } from '#shared/ids.ts'
import {
  acceptInvitationSchema,
  acceptedInvitationSchema,
  invitationInputSchema,
  invitationPageSchema,
  peopleSchema,
  roleInputSchema,
} from '#shared/api/people.ts'
import type { Auth } from '#server/auth/auth.ts'
import { sendCookies } from '#server/http/auth-routes.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { limitPerMin } from '#server/http/limits.ts'
import { acceptInvitation } from './accept-invitation.ts'
import { changeRole } from './change-role.ts'
import { getInvitationPage } from './get-invitation-page.ts'
import { invitePerson } from './invite-person.ts'
import { listPeople } from './list-people.ts'
import { removePerson } from './remove-person.ts'
import { resendInvitation } from './resend-invitation.ts'
import { revokeInvitation } from './revoke-invitation.ts'

const inShoot = z.object({ shootId: shootIdSchema })
const ofInvitation = inShoot.extend({ invitationId: invitationIdSchema })
const ofPerson = inShoot.extend({ userId: userIdSchema })
const byToken = z.object({ token: z.string().max(200) })

export function peopleRoutes({ auth, invitationsPerMin }: { auth: Auth; invitationsPerMin: number }): Router {
  const router = Router()
  const limited = limitPerMin(invitationsPerMin, 'That is a great many invitations at once')

  router.get(
    '/shoots/:shootId/people',
    endpoint({ params: inShoot, response: peopleSchema, handle: (ctx, { params }) => listPeople(ctx, params.shootId) }),
  )
  router.patch(
    '/shoots/:shootId/people/:userId',
    endpoint({
      params: ofPerson,
      body: roleInputSchema,
      response: peopleSchema,
      handle: (ctx, { params, body }) => changeRole(ctx, { ...params, ...body }),
    }),
  )
  router.delete(
    '/shoots/:shootId/people/:userId',
    endpoint({ params: ofPerson, handle: (ctx, { params }) => removePerson(ctx, params) }),
  )

  router.post(
    '/shoots/:shootId/invitations',
    limited,
    endpoint({
      params: inShoot,
      body: invitationInputSchema,
      response: peopleSchema,
      handle: (ctx, { params, body }) => invitePerson(ctx, { ...params, ...body }),
    }),
  )
  router.post(
    '/shoots/:shootId/invitations/:invitationId/resend',
    limited,
    endpoint({
      params: ofInvitation,
      response: peopleSchema,
      handle: (ctx, { params }) => resendInvitation(ctx, params),
    }),
  )
  router.delete(
    '/shoots/:shootId/invitations/:invitationId',
    endpoint({
      params: ofInvitation,
      response: peopleSchema,
      handle: (ctx, { params }) => revokeInvitation(ctx, params),
    }),
  )

  router.get(
    '/invitations/:token',
    endpoint({
      params: byToken,
      response: invitationPageSchema,
      handle: (ctx, { params }) => getInvitationPage(ctx, params.token),
    }),
  )
  router.post(
    '/invitations/:token/accept',
    limited,
    endpoint({
      params: byToken,
      body: acceptInvitationSchema,
      response: acceptedInvitationSchema,
      handle: async (ctx, { params, body, req, res }) => {
        const { to, userId, signsIn } = await acceptInvitation(ctx, { ...params, ...body })
        if (signsIn) {
          const { headers } = await auth.api.signInInvited({
            body: { userId },
            headers: fromNodeHeaders(req.headers),
            returnHeaders: true,
          })
          sendCookies(headers, res)
        }
        return { to }
      },
    }),
  )
  return router
}
