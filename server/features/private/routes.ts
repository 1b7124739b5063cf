import { Router } from 'express'
import { z } from 'zod'
import { pieceIdSchema, shootIdSchema, sitterIdSchema } from '#shared/ids.ts'
import {
  pieceCostInputSchema,
  pieceCostsSchema,
  privateNoteSchema,
  sitterPrivateInputSchema,
  sitterPrivatesSchema,
} from '#shared/api/private.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { getPrivateNote } from './get-private-note.ts'
import { listPieceCosts } from './list-piece-costs.ts'
import { listSizes } from './list-sizes.ts'
import { setPieceCost } from './set-piece-cost.ts'
import { setPrivateNote } from './set-private-note.ts'
import { setSizes } from './set-sizes.ts'

const inShoot = z.object({ shootId: shootIdSchema })

export function privateRoutes(): Router {
  const router = Router()
  router.get(
    '/shoots/:shootId/sizes',
    endpoint({
      params: inShoot,
      response: sitterPrivatesSchema,
      handle: (ctx, { params }) => listSizes(ctx, params.shootId),
    }),
  )
  router.put(
    '/shoots/:shootId/sizes/:sitterId',
    endpoint({
      params: inShoot.extend({ sitterId: sitterIdSchema }),
      body: sitterPrivateInputSchema,
      response: sitterPrivatesSchema,
      handle: (ctx, { params, body }) => setSizes(ctx, { ...params, ...body }),
    }),
  )
  router.get(
    '/shoots/:shootId/piece-costs',
    endpoint({
      params: inShoot,
      response: pieceCostsSchema,
      handle: (ctx, { params }) => listPieceCosts(ctx, params.shootId),
    }),
  )
  router.put(
    '/shoots/:shootId/piece-costs/:pieceId',
    endpoint({
      params: inShoot.extend({ pieceId: pieceIdSchema }),
      body: pieceCostInputSchema,
      response: pieceCostsSchema,
      handle: (ctx, { params, body }) => setPieceCost(ctx, { ...params, ...body }),
    }),
  )
  router.get(
    '/shoots/:shootId/private-note',
    endpoint({
      params: inShoot,
      response: privateNoteSchema,
      handle: (ctx, { params }) => getPrivateNote(ctx, params.shootId),
    }),
  )
  router.put(
    '/shoots/:shootId/private-note',
    endpoint({
      params: inShoot,
      body: privateNoteSchema,
      response: privateNoteSchema,
      handle: (ctx, { params, body }) => setPrivateNote(ctx, { ...params, ...body }),
    }),
  )
  return router
}
