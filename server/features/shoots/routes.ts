import { Router } from 'express'
import { z } from 'zod'
import { shootIdSchema } from '#shared/ids.ts'
import { createShootSchema, createdShootSchema, shootSchema } from '#shared/api/shoots.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { createShoot } from './create-shoot.ts'
import { getShoot } from './get-shoot.ts'

const inShoot = z.object({ shootId: shootIdSchema })

export function shootsRoutes(): Router {
  const router = Router()
  router.post('/shoots', endpoint({ body: createShootSchema, response: createdShootSchema, handle: (ctx, { body }) => createShoot(ctx, body) }))
  router.get('/shoots/:shootId', endpoint({ params: inShoot, response: shootSchema, handle: (ctx, { params }) => getShoot(ctx, params.shootId) }))
  return router
}
