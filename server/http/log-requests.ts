import type { RequestHandler } from 'express'
import type { Logger } from 'pino'
import { pinoHttp } from 'pino-http'

/** One line a request without anything personal: no address, no cookie, no query, no token of a letter's link. */
export function logRequests(log: Logger): RequestHandler {
  return pinoHttp({
    logger: log,
    quietReqLogger: true,
    autoLogging: { ignore: (req) => req.url === '/healthz' || req.url === '/readyz' },
    customLogLevel: (req, res) => levelOf(req.method ?? 'GET', res.statusCode),
    customSuccessMessage: (_req, res) => (res.statusCode >= 400 ? 'a request was refused' : 'a request was answered'),
    serializers: {
      req: (req: { method: string; url: string }) => ({ method: req.method, path: pathWithoutTokens(req.url) }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
    },
  })
}

/** What was refused leaves a line; that a page asks whether somebody is signed in is no such thing. */
export function levelOf(method: string, status: number): 'error' | 'warn' | 'debug' {
  if (status >= 500) return 'error'
  return status >= 400 && !(method === 'GET' && status === 401) ? 'warn' : 'debug'
}

/** An address as it may stand in a log. */
export function pathWithoutTokens(url: string): string {
  return (url.split('?')[0] ?? '').replace(
    /\/(invitations|join|link|reset-password)\/(?![0-9a-f-]{36}(?:\/|$))[^/]+/g,
    '/$1/…',
  )
}
