import { Router } from 'express'
import { lettersSchema } from '#shared/api/mail.ts'
import { AppError } from '#server/errors.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { listLetters } from './list-letters.ts'

const HERE = new Set(['localhost', '127.0.0.1', '[::1]', '::1'])

/** Letters open what they were written for, so they show to this machine alone: not by another name, not through a proxy. */
export function mailRoutes(): Router {
  const router = Router()
  router.get(
    '/letters',
    endpoint({
      response: lettersSchema,
      handle: (ctx, { req }) => {
        if (!HERE.has(req.hostname) || req.headers['x-forwarded-for'] !== undefined)
          throw new AppError('NOT_FOUND', 'There is nothing at this address.')
        return listLetters(ctx)
      },
    }),
  )
  return router
}
