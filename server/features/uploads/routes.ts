import { type RequestHandler, Router } from 'express'
import { z } from 'zod'
import { RENDITIONS, uploadSchema } from '#shared/api/uploads.ts'
import { shootIdSchema, uploadIdSchema } from '#shared/ids.ts'
import { AppError } from '#server/errors.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { HTTP_LIMITS, limitPerMin } from '#server/http/limits.ts'
import { ctxOf } from '#server/http/request-ctx.ts'
import { findRendition } from './find-rendition.ts'
import { receiveFile } from '#server/http/receive-file.ts'
import { requireUpload } from './require-upload.ts'
import { storeUpload } from './store-upload.ts'

const putParams = z.object({ shootId: shootIdSchema, uploadId: uploadIdSchema })
const getParams = z.object({ uploadId: uploadIdSchema, rendition: z.coerce.number().pipe(z.literal([...RENDITIONS])) })

const mayUpload: RequestHandler = async (req, _res, next) => {
  const params = putParams.safeParse(req.params)
  if (!params.success) throw new AppError('NOT_FOUND', 'There is nothing at this address.')
  await requireUpload(ctxOf(req), params.data.shootId)
  next()
}

export function uploadsRoutes(uploadsPerMin: number = HTTP_LIMITS.uploadsPerMin): Router {
  const router = Router()
  router.put(
    '/shoots/:shootId/uploads/:uploadId',
    limitPerMin(uploadsPerMin, 'Too many pictures at once'),
    mayUpload,
    receiveFile((req) => ctxOf(req).actor?.userId ?? ''),
    endpoint({
      params: putParams,
      response: uploadSchema,
      handle: (ctx, { params, req }) => {
        if (!req.file)
          throw new AppError(
            'BAD_REQUEST',
            'There was no picture in what was sent. Nothing was kept; choose a file and try again.',
          )
        return storeUpload(ctx, { ...params, bytes: req.file.buffer })
      },
    }),
  )
  router.get(
    '/uploads/:uploadId/:rendition',
    endpoint({
      params: getParams,
      handle: async (ctx, { params, req, res }) => {
        const found = await findRendition(ctx, { uploadId: params.uploadId, longEdgePx: params.rendition })
        res.set({
          etag: found.etag,
          'cache-control': 'private, max-age=31536000, immutable',
          'content-type': 'image/webp',
          'x-content-type-options': 'nosniff',
        })
        if (req.fresh) res.status(304).end()
        else res.send(Buffer.from(await found.read()))
      },
    }),
  )
  return router
}
