import type { Request, RequestHandler } from 'express'
import type { Actor, Ctx } from '#server/context.ts'

/** Kept beside the request rather than on it, so that nothing else can put one there. */
const ctxs = new WeakMap<Request, Ctx>()

type CtxParts = Omit<Ctx, 'actor'> & { actorOf: (req: Request) => Promise<Actor | null> }

/** Gives every request its verbs' world: who asks, by the session cookie, and what the process was made with. */
export function withCtx({ actorOf, ...parts }: CtxParts): RequestHandler {
  return async (req, _res, next) => {
    ctxs.set(req, { ...parts, actor: await actorOf(req) })
    next()
  }
}

/** The request's world. @throws when `withCtx` does not stand before the route (a programming error). */
export function ctxOf(req: Request): Ctx {
  const ctx = ctxs.get(req)
  if (!ctx) throw new Error('This route is mounted before its context.')
  return ctx
}
