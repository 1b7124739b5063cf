import { Router } from 'express'
import { z } from 'zod'
import { shootIdSchema, versionIdSchema } from '#shared/ids.ts'
import { keepVersionSchema, versionStatesSchema, versionsSchema } from '#shared/api/versions.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { beginTakeBack } from './begin-take-back.ts'
import { getVersion } from './get-version.ts'
import { keepVersion } from './keep-version.ts'
import { listVersions } from './list-versions.ts'
import { removeVersion } from './remove-version.ts'
import { renameVersion } from './rename-version.ts'

const inShoot = z.object({ shootId: shootIdSchema })
const ofVersion = inShoot.extend({ versionId: versionIdSchema })

export function versionsRoutes(): Router {
  const router = Router()
  router.get(
    '/shoots/:shootId/versions',
    endpoint({
      params: inShoot,
      response: versionsSchema,
      handle: (ctx, { params }) => listVersions(ctx, params.shootId),
    }),
  )
  router.post(
    '/shoots/:shootId/versions',
    endpoint({
      params: inShoot,
      body: keepVersionSchema,
      response: versionsSchema,
      handle: (ctx, { params, body }) => keepVersion(ctx, { ...params, ...body }),
    }),
  )
  router.get(
    '/shoots/:shootId/versions/:versionId',
    endpoint({
      params: ofVersion,
      response: versionStatesSchema,
      handle: (ctx, { params }) => getVersion(ctx, params),
    }),
  )
  router.patch(
    '/shoots/:shootId/versions/:versionId',
    endpoint({
      params: ofVersion,
      body: keepVersionSchema,
      response: versionsSchema,
      handle: (ctx, { params, body }) => renameVersion(ctx, { ...params, ...body }),
    }),
  )
  router.delete(
    '/shoots/:shootId/versions/:versionId',
    endpoint({ params: ofVersion, response: versionsSchema, handle: (ctx, { params }) => removeVersion(ctx, params) }),
  )
  router.post(
    '/shoots/:shootId/versions/:versionId/take-back',
    endpoint({ params: ofVersion, response: versionsSchema, handle: (ctx, { params }) => beginTakeBack(ctx, params) }),
  )
  return router
}
