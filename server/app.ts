import { sql } from 'drizzle-orm'
import express, { type Express, Router } from 'express'
import type { Logger } from 'pino'
import { IMPORT_BYTES_MAX } from '#shared/api/kit.ts'
import type { Documents } from '#server/adapters/documents.ts'
import type { Auth } from '#server/auth/auth.ts'
import { signedIn } from '#server/auth/session.ts'
import type { Db } from '#server/db/client.ts'
import { commentsRoutes } from '#server/features/comments/routes.ts'
import { kitRoutes } from '#server/features/kit/routes.ts'
import { mailRoutes } from '#server/features/mail/routes.ts'
import { peopleRoutes } from '#server/features/people/routes.ts'
import { privateRoutes } from '#server/features/private/routes.ts'
import { recipesRoutes } from '#server/features/recipes/routes.ts'
import { shootsRoutes } from '#server/features/shoots/routes.ts'
import { signOffRoutes } from '#server/features/sign-off/routes.ts'
import { studiosRoutes } from '#server/features/studios/routes.ts'
import { uploadsRoutes } from '#server/features/uploads/routes.ts'
import { versionsRoutes } from '#server/features/versions/routes.ts'
import { authRoute } from '#server/http/auth-routes.ts'
import { errorHandler, nothingHere } from '#server/http/errors.ts'
import { HTTP_LIMITS, type HttpLimits } from '#server/http/limits.ts'
import { logRequests } from '#server/http/log-requests.ts'
import { type MetricsSource, metrics } from '#server/http/metrics.ts'
import { pages } from '#server/http/pages.ts'
import { createProbe } from '#server/http/probe.ts'
import { withCtx } from '#server/http/request-ctx.ts'
import { requireOwnOrigin, securityHeaders } from '#server/http/security.ts'

export type AppDeps = {
  db: Db
  auth: Auth
  documents: Documents
  now: () => Date
  /** Address as people reach it, without a slash at the end. */
  publicUrl: string
  trustedOrigins: readonly string[]
  log: Logger
  /** Folder of the built client. */
  clientDir: string
  /** Letters are caught here and shown at /letters. */
  letters: boolean
  /** False once the process is going down: balancers look elsewhere. */
  isServing?: () => boolean
  limits?: Partial<HttpLimits>
  /** What the operator's page shows beside the database's own counts; without it there is no such page. */
  metrics?: MetricsSource
}

/** A balancer is answered within this, whatever the database does. */
const READY_LIMIT_MS = 2_000

/** The whole HTTP side over its dependencies; never listens. */
export function createApp(deps: AppDeps): Express {
  const { db, auth, documents, now, publicUrl, trustedOrigins, log, letters } = deps
  const limits = { ...HTTP_LIMITS, ...deps.limits }
  const app = express()
  app.set('trust proxy', 'loopback')
  app.set('query parser', 'simple')
  app.disable('x-powered-by')
  app.use(logRequests(log), securityHeaders(publicUrl.startsWith('https:')))

  app.get('/healthz', (_req, res) => void res.json({ ok: true }))
  const askDatabase = createProbe(() => db.execute(sql`select 1`), READY_LIMIT_MS)
  app.get('/readyz', async (_req, res) => {
    const ok = (deps.isServing?.() ?? true) && (await askDatabase()) !== undefined
    res.status(ok ? 200 : 503).json({ ok })
  })
  if (deps.metrics) app.get('/metrics', metrics({ ...deps.metrics, db, now }))

  const api = Router()
  api.use((_req, res, next) => {
    res.set('cache-control', 'no-store')
    next()
  })
  api.use(requireOwnOrigin(trustedOrigins))
  // A whole kit is larger than what other requests may send.
  api.use('/studios/:studioId/kit/import', express.json({ limit: IMPORT_BYTES_MAX }))
  api.use(express.json({ limit: '1mb' }))
  api.all('/auth/*path', authRoute(auth, publicUrl))
  api.use(withCtx({ db, documents, now, publicUrl, actorOf: (req) => signedIn(auth, req.headers) }))
  const { invitationsPerMin, uploadsPerMin, sheetsPerMin } = limits
  api.use(
    studiosRoutes({ letters, invitationsPerMin }),
    peopleRoutes({ auth, invitationsPerMin }),
    shootsRoutes(),
    kitRoutes(),
    recipesRoutes(sheetsPerMin),
  )
  api.use(commentsRoutes(), privateRoutes(), uploadsRoutes(uploadsPerMin), signOffRoutes(), versionsRoutes())
  if (letters) api.use(mailRoutes())
  api.use(nothingHere)
  app.use('/api', api)
  app.use(pages(deps.clientDir))
  app.use(errorHandler(log))
  return app
}
