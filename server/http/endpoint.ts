import type { Request, RequestHandler, Response } from 'express'
import type { z } from 'zod'
import type { Issue } from '#shared/api/errors.ts'
import type { Ctx } from '#server/context.ts'
import { AppError } from '#server/errors.ts'
import { ctxOf } from './request-ctx.ts'

type Any = z.ZodType
type Input<P extends Any, B extends Any, Q extends Any> = {
  params: z.output<P>
  body: z.output<B>
  query: z.output<Q>
  req: Request
  res: Response
}

type Endpoint<P extends Any, B extends Any, Q extends Any, R extends Any> = {
  params?: P
  body?: B
  query?: Q
  /** Parsed before sending, so that a field no schema names never leaves. */
  response?: R
  handle: (ctx: Ctx, input: Input<P, B, Q>) => Promise<z.input<R>> | z.input<R>
}

/**
 * Parse → verb → JSON. All issues of body and query come back with their paths; a path that does not parse is an
 * address that does not exist. An answer of undefined is 204; a handler that has answered by itself is left alone.
 */
export function endpoint<
  P extends Any = z.ZodUnknown,
  B extends Any = z.ZodUnknown,
  Q extends Any = z.ZodUnknown,
  R extends Any = z.ZodUnknown,
>(options: Endpoint<P, B, Q, R>): RequestHandler {
  return async (req, res) => {
    const params = options.params?.safeParse(req.params)
    if (params && !params.success) throw new AppError('NOT_FOUND', 'There is nothing at this address.')
    if (options.body && req.body === undefined && hasBody(req)) {
      throw new AppError('NOT_JSON', 'What was sent is not JSON. Nothing was changed.')
    }
    const body = options.body?.safeParse(req.body)
    const query = options.query?.safeParse(req.query)
    const issues = [...issuesOf(body), ...issuesOf(query)]
    if (issues.length > 0) {
      throw new AppError(
        'BAD_REQUEST',
        'Some of what was sent does not fit. Nothing was changed; see what is marked.',
        { issues },
      )
    }
    const input = { params: params?.data, body: body?.data, query: query?.data, req, res } as Input<P, B, Q>
    const result = await options.handle(ctxOf(req), input)
    if (res.headersSent || res.destroyed) return
    if (result === undefined) res.status(204).end()
    else res.json(options.response ? options.response.parse(result) : result)
  }
}

function issuesOf(parsed: z.ZodSafeParseResult<unknown> | undefined): Issue[] {
  if (!parsed || parsed.success) return []
  return parsed.error.issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message }))
}

function hasBody(req: Request): boolean {
  return req.headers['transfer-encoding'] !== undefined || Number(req.headers['content-length'] ?? 0) > 0
}
