import type { ErrorRequestHandler, RequestHandler } from 'express'
import type { Logger } from 'pino'
import type { ErrorEnvelope } from '#shared/api/errors.ts'
import { AppError, STATUS } from '#server/errors.ts'
import { loggable } from './loggable.ts'

/** Everything that a request can end with, as the one envelope. The cause of what is not ours to tell goes to the log. */
export function errorHandler(log: Logger): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    if (res.headersSent) {
      next(error)
      return
    }
    const known = toAppError(error)
    if (known.code === 'INTERNAL' || known.code === 'STARTING') {
      log.error({ failure: loggable(error), method: req.method, route: routeOf(req.route) }, 'a request failed')
    }
    res.status(STATUS[known.code]).json(toEnvelope(known))
  }
}

/** For addresses below /api that no route has. */
export const nothingHere: RequestHandler = () => {
  throw new AppError('NOT_FOUND', 'There is nothing at this address.')
}

export function toEnvelope(error: AppError): ErrorEnvelope {
  return {
    error: {
      code: error.code,
      message: error.message,
      ...(error.issues ? { issues: error.issues } : {}),
      ...(error.details === undefined ? {} : { details: error.details }),
    },
  }
}

/** What a request failed with, in words for people. */
export function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error
  if (error instanceof URIError) return new AppError('NOT_FOUND', 'There is nothing at this address.')
  const type = textOf(error, 'type')
  if (type === 'entity.parse.failed') return new AppError('NOT_JSON', 'What was sent is not JSON. Nothing was changed.')
  if (type === 'entity.too.large')
    return new AppError('TOO_LARGE', 'This is more than one request may carry (1 MB). Nothing was changed.')
  if (type === 'charset.unsupported' || type === 'encoding.unsupported') {
    return new AppError('UNSUPPORTED', 'Text has to come as UTF-8. Nothing was changed.')
  }
  if (type === 'request.aborted' || type === 'request.size.invalid') {
    return new AppError('BAD_REQUEST', 'The request broke off on its way. Nothing was changed; send it again.')
  }
  const state = sqlState(error)
  // A character that PostgreSQL cannot hold (NUL), in text and in JSON.
  if (state === '22021' || state === '22P05') {
    return new AppError(
      'BAD_REQUEST',
      'The text holds a character that cannot be kept. Nothing was changed; take it out and try again.',
    )
  }
  if (state !== undefined && isDatabaseAway(state)) {
    return new AppError(
      'STARTING',
      'The database cannot be reached just now. Nothing was changed; try again in a moment.',
      { cause: error },
    )
  }
  return new AppError('INTERNAL', 'Something went wrong on our side. Nothing was changed; try again.', { cause: error })
}

/** SQLSTATE or socket error code; Drizzle wraps what the driver threw. */
export function sqlState(error: unknown): string | undefined {
  if (!(error instanceof Error)) return undefined
  return textOf(error.cause, 'code') ?? textOf(error, 'code')
}

function isDatabaseAway(state: string): boolean {
  return (
    ['ECONNREFUSED', 'ECONNRESET', 'EPIPE', '57P01', '57P02', '57P03', '53300'].includes(state) ||
    state.startsWith('08')
  )
}

function textOf(value: unknown, key: string): string | undefined {
  if (typeof value !== 'object' || value === null) return undefined
  const found: unknown = Reflect.get(value, key)
  return typeof found === 'string' ? found : undefined
}

function routeOf(route: unknown): string | undefined {
  return textOf(route, 'path')
}
