import { Router } from 'express'
import { sessionSchema, studioInputSchema, studioSchema } from '#shared/api/studios.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { createStudio } from './create-studio.ts'
import { getSession } from './get-session.ts'

export function studiosRoutes(options: { letters: boolean }): Router {
  const router = Router()
  router.get('/session', endpoint({ response: sessionSchema, handle: async (ctx) => ({ ...(await getSession(ctx)), letters: options.letters }) }))
  router.post('/studios', endpoint({ body: studioInputSchema, response: studioSchema, handle: (ctx, { body }) => createStudio(ctx, body) }))
  return router
}
