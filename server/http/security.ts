import type { RequestHandler } from 'express'
import helmet from 'helmet'
import { AppError } from '#server/errors.ts'

/**
 * Headers of every answer. No script but our own files. Styles may stand in elements: dialogs lock the page's
 * scrolling and notices bring their looks with a style element each, written by their libraries.
 */
export function securityHeaders(isHttps: boolean): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'blob:', 'data:'],
        mediaSrc: ["'self'", 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'", 'ws:', 'wss:'],
        workerSrc: ["'self'", 'blob:'],
        manifestSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        ...(isHttps ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: isHttps ? { maxAge: 15_552_000 } : false,
    referrerPolicy: { policy: 'no-referrer' },
    crossOriginEmbedderPolicy: false,
  })
}

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])

/** A change comes from one of our own pages, or not at all: the cookie alone does not say who made the browser send it. */
export function requireOwnOrigin(trustedOrigins: readonly string[]): RequestHandler {
  const trusted = new Set(trustedOrigins)
  return (req, _res, next) => {
    const { origin } = req.headers
    if (!SAFE.has(req.method) && (origin === undefined || !trusted.has(origin))) {
      throw new AppError(
        'WRONG_ORIGIN',
        'This was sent from a page that is not ours, so nothing was changed. Open Sconce at its own address and try again.',
      )
    }
    next()
  }
}
