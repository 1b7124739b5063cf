import { Router } from 'express'
import { z } from 'zod'
import { kitItemIdSchema, shootIdSchema, studioIdSchema } from '#shared/ids.ts'
import { kitImportSchema, kitListSchema, kitUpdateSchema } from '#shared/api/kit.ts'
import { kitInputSchema } from '#shared/domain/kit/schema.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { addKitItem } from './add-kit-item.ts'
import { importKit } from './import-kit.ts'
import { listKit } from './list-kit.ts'
import { listShootKit } from './list-shoot-kit.ts'
import { removeKitItem } from './remove-kit-item.ts'
import { updateKitItem } from './update-kit-item.ts'

const inStudio = z.object({ studioId: studioIdSchema })
const ofItem = inStudio.extend({ kitId: kitItemIdSchema })

export function kitRoutes(): Router {
  const router = Router()
  router.get(
    '/studios/:studioId/kit',
    endpoint({ params: inStudio, response: kitListSchema, handle: (ctx, { params }) => listKit(ctx, params.studioId) }),
  )
  router.post(
    '/studios/:studioId/kit',
    endpoint({
      params: inStudio,
      body: kitInputSchema,
      response: kitListSchema,
      handle: (ctx, { params, body }) => addKitItem(ctx, { ...params, input: body }),
    }),
  )
  router.post(
    '/studios/:studioId/kit/import',
    endpoint({
      params: inStudio,
      body: kitImportSchema,
      response: kitListSchema,
      handle: (ctx, { params, body }) => importKit(ctx, { ...params, ...body }),
    }),
  )
  router.put(
    '/studios/:studioId/kit/:kitId',
    endpoint({
      params: ofItem,
      body: kitUpdateSchema,
      response: kitListSchema,
      handle: (ctx, { params, body: { version, ...input } }) => updateKitItem(ctx, { ...params, version, input }),
    }),
  )
  router.delete(
    '/studios/:studioId/kit/:kitId',
    endpoint({ params: ofItem, response: kitListSchema, handle: (ctx, { params }) => removeKitItem(ctx, params) }),
  )
  router.get(
    '/shoots/:shootId/kit',
    endpoint({
      params: z.object({ shootId: shootIdSchema }),
      response: kitListSchema,
      handle: (ctx, { params }) => listShootKit(ctx, params.shootId),
    }),
  )
  return router
}
