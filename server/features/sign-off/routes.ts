import { Router } from 'express'
import { z } from 'zod'
import { signOffInputSchema, signOffsSchema, signedOffSchema } from '#shared/api/sign-off.ts'
import { lookIdSchema, shootIdSchema } from '#shared/ids.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { answerLook } from './answer-look.ts'
import { listSignOffs } from './list-sign-offs.ts'

export function signOffRoutes(): Router {
  const router = Router()
  router.get(
    '/shoots/:shootId/sign-offs',
    endpoint({
      params: z.object({ shootId: shootIdSchema }),
      response: signOffsSchema,
      handle: (ctx, { params }) => listSignOffs(ctx, params.shootId),
    }),
  )
  router.post(
    '/shoots/:shootId/looks/:lookId/sign-offs',
    endpoint({
      params: z.object({ shootId: shootIdSchema, lookId: lookIdSchema }),
      body: signOffInputSchema,
      response: signedOffSchema,
      handle: async (ctx, { params, body }) => ({ signOff: await answerLook(ctx, { ...params, ...body }) }),
    }),
  )
  return router
}
