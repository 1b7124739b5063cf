import type { Request, RequestHandler } from 'express'
import { ipKeyGenerator, rateLimit } from 'express-rate-limit'
import { AppError } from '#server/errors.ts'
import { ctxOf } from './request-ctx.ts'

/** How many of each one person (or, signed out, one address) may send in a minute. */
export type HttpLimits = {
  invitationsPerMin: number
  uploadsPerMin: number
  signInsPerMin: number
  sheetsPerMin: number
}

export const HTTP_LIMITS: HttpLimits = {
  invitationsPerMin: 30,
  uploadsPerMin: 240,
  signInsPerMin: 20,
  sheetsPerMin: 20,
}

/** Refuses what comes faster than the limit, in words that say how long to wait. */
export function limitPerMin(limit: number, what: string): RequestHandler {
  return rateLimit({
    windowMs: 60_000,
    limit,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    keyGenerator: whoAsks,
    handler: () => {
      throw new AppError('TOO_MANY', `${what}. Wait a minute and try again; nothing was changed.`)
    },
  })
}

function whoAsks(req: Request): string {
  return ctxOf(req).actor?.userId ?? ipKeyGenerator(req.ip ?? '')
}
