import { Router } from 'express'
import { z } from 'zod'
import { commentIdSchema, shootIdSchema } from '#shared/ids.ts'
import { commentInputSchema, commentsSchema } from '#shared/api/comments.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { addComment } from './add-comment.ts'
import { listComments } from './list-comments.ts'
import { removeComment } from './remove-comment.ts'

const inShoot = z.object({ shootId: shootIdSchema })
const ofComment = inShoot.extend({ commentId: commentIdSchema })

export function commentsRoutes(): Router {
  const router = Router()
  router.get(
    '/shoots/:shootId/comments',
    endpoint({
      params: inShoot,
      response: commentsSchema,
      handle: (ctx, { params }) => listComments(ctx, params.shootId),
    }),
  )
  router.post(
    '/shoots/:shootId/comments',
    endpoint({
      params: inShoot,
      body: commentInputSchema,
      response: commentsSchema,
      handle: (ctx, { params, body }) => addComment(ctx, { ...params, ...body }),
    }),
  )
  router.delete(
    '/shoots/:shootId/comments/:commentId',
    endpoint({ params: ofComment, response: commentsSchema, handle: (ctx, { params }) => removeComment(ctx, params) }),
  )
  return router
}
