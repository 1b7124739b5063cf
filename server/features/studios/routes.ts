import { Router } from 'express'
import { z } from 'zod'
import { invitationIdSchema, studioIdSchema, userIdSchema } from '#shared/ids.ts'
import { minutesResponseSchema } from '#shared/api/shoots.ts'
import {
  sessionSchema,
  studioInputSchema,
  studioInvitationInputSchema,
  studioPeopleSchema,
  studioRoleInputSchema,
  studioSchema,
} from '#shared/api/studios.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { limitPerMin } from '#server/http/limits.ts'
import { changeStudioRole } from './change-studio-role.ts'
import { createStudio } from './create-studio.ts'
import { getMinutes } from './get-minutes.ts'
import { getSession } from './get-session.ts'
import { inviteToStudio } from './invite-to-studio.ts'
import { listStudioPeople } from './list-studio-people.ts'
import { removeStudioMember } from './remove-studio-member.ts'
import { renameStudio } from './rename-studio.ts'
import { revokeStudioInvitation } from './revoke-studio-invitation.ts'
import { setMinutes } from './set-minutes.ts'

const inStudio = z.object({ studioId: studioIdSchema })
const ofPerson = inStudio.extend({ userId: userIdSchema })
const ofInvitation = inStudio.extend({ invitationId: invitationIdSchema })

export function studiosRoutes({ letters, invitationsPerMin }: { letters: boolean; invitationsPerMin: number }): Router {
  const router = Router()
  router.get(
    '/session',
    endpoint({ response: sessionSchema, handle: async (ctx) => ({ ...(await getSession(ctx)), letters }) }),
  )

  router.post(
    '/studios',
    endpoint({ body: studioInputSchema, response: studioSchema, handle: (ctx, { body }) => createStudio(ctx, body) }),
  )
  router.patch(
    '/studios/:studioId',
    endpoint({
      params: inStudio,
      body: studioInputSchema,
      response: studioSchema,
      handle: (ctx, { params, body }) => renameStudio(ctx, { ...params, ...body }),
    }),
  )

  router.get(
    '/studios/:studioId/people',
    endpoint({
      params: inStudio,
      response: studioPeopleSchema,
      handle: (ctx, { params }) => listStudioPeople(ctx, params.studioId),
    }),
  )
  router.patch(
    '/studios/:studioId/people/:userId',
    endpoint({
      params: ofPerson,
      body: studioRoleInputSchema,
      response: studioPeopleSchema,
      handle: (ctx, { params, body }) => changeStudioRole(ctx, { ...params, ...body }),
    }),
  )
  router.delete(
    '/studios/:studioId/people/:userId',
    endpoint({ params: ofPerson, handle: (ctx, { params }) => removeStudioMember(ctx, params) }),
  )
  router.post(
    '/studios/:studioId/invitations',
    limitPerMin(invitationsPerMin, 'That is a great many invitations at once'),
    endpoint({
      params: inStudio,
      body: studioInvitationInputSchema,
      response: studioPeopleSchema,
      handle: (ctx, { params, body }) => inviteToStudio(ctx, { ...params, ...body }),
    }),
  )
  router.delete(
    '/studios/:studioId/invitations/:invitationId',
    endpoint({
      params: ofInvitation,
      response: studioPeopleSchema,
      handle: (ctx, { params }) => revokeStudioInvitation(ctx, params),
    }),
  )

  router.get(
    '/studios/:studioId/minutes',
    endpoint({
      params: inStudio,
      response: minutesResponseSchema,
      handle: async (ctx, { params }) => ({ minutes: await getMinutes(ctx, params.studioId) }),
    }),
  )
  router.put(
    '/studios/:studioId/minutes',
    endpoint({
      params: inStudio,
      body: minutesResponseSchema,
      response: minutesResponseSchema,
      handle: async (ctx, { params, body }) => ({ minutes: await setMinutes(ctx, { ...params, ...body }) }),
    }),
  )
  return router
}
