import { readFileSync } from 'node:fs'
import { createServer } from 'node:http'
import { fileURLToPath } from 'node:url'
import { pino } from 'pino'
import { z } from 'zod'
import { createLetterCatcher } from '#server/adapters/letter-catcher.ts'
import { createMailer } from '#server/adapters/mail.ts'
import { createApp } from '#server/app.ts'
import { makeAuth } from '#server/auth/auth.ts'
import { createPerson } from '#server/auth/create-person.ts'
import { signedIn } from '#server/auth/session.ts'
import { connectDatabase } from '#server/db/client.ts'
import { migrateDatabase } from '#server/db/migrate.ts'
import { ensureDemo } from '#server/demo/ensure-demo.ts'
import { parseEnv } from '#server/env.ts'
import { startMailWorker } from '#server/features/mail/mail-worker.ts'
import { HTTP_LIMITS } from '#server/http/limits.ts'
import { loggable } from '#server/http/loggable.ts'
import { watchLoopDelay } from '#server/http/loop-delay.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { isLoopback } from '#server/start/ports.mjs'

const DRAIN_MS = 15_000

const env = parseEnv(process.env)
// Standard output belongs to whoever started us; the log goes to standard error.
const log = pino({ level: env.logLevel, base: null }, pino.destination(2))

process.on('unhandledRejection', (error) => log.error({ failure: loggable(error) }, 'a promise was left alone'))

await migrateDatabase(env.databaseUrl)
const { db, pool } = connectDatabase(env.databaseUrl, (error) =>
  log.warn({ failure: loggable(error) }, 'an idle database connection broke'),
)
const now = () => new Date()
const { publicUrl, trustedOrigins } = env
const auth = makeAuth(db, {
  secret: env.authSecret,
  publicUrl,
  trustedOrigins,
  signInsPerMin: HTTP_LIMITS.signInsPerMin,
})
const realtime = createRealtime({
  db,
  databaseUrl: env.databaseUrl,
  auth: (headers) => signedIn(auth, headers),
  trustedOrigins,
  log,
})

if (env.demo) {
  const put = await ensureDemo({
    db,
    now,
    documents: realtime.documents,
    publicUrl,
    createUser: (person) => createPerson(auth, db, person),
  })
  if (put) log.info('the demo shoot is in')
}

// Letters are caught here only where nobody else can come and read them.
const letters = env.smtpUrl === undefined && isLoopback(env.host) && isLoopback(new URL(publicUrl).hostname)
const catcher = letters ? await createLetterCatcher() : undefined
const smtpUrl = env.smtpUrl ?? catcher?.smtpUrl
if (smtpUrl === undefined)
  log.warn('SMTP_URL is not set and the server is open to others: letters wait in the queue and are not sent')
const mailer = smtpUrl === undefined ? undefined : createMailer(smtpUrl, publicUrl)
const mailWorker = mailer && startMailWorker({ db, mailer, now, log, keepsText: letters })

const { version } = z
  .object({ version: z.string() })
  .parse(JSON.parse(readFileSync(new URL('../package.json', import.meta.url), 'utf8')))

let isServing = true
const clientDir = fileURLToPath(new URL('../dist/client', import.meta.url))
const app = createApp({
  db,
  auth,
  documents: realtime.documents,
  now,
  publicUrl,
  trustedOrigins,
  log,
  clientDir,
  letters,
  isServing: () => isServing,
  metrics: {
    stats: () => realtime.stats(),
    loopDelay: watchLoopDelay(),
    version,
    ...(env.metricsToken === undefined ? {} : { token: env.metricsToken }),
  },
})
const server = createServer(app)
// Longer than a balancer keeps its own, so that it never sends into a connection that is just closing.
server.keepAliveTimeout = 75_000
realtime.attach(server)
// Whatever else wants to become a socket would hang here for ever.
server.on('upgrade', (request, socket) => {
  if (!request.url?.startsWith('/rt/')) socket.destroy()
})
server.on('error', (error) => {
  log.fatal({ failure: loggable(error) }, 'cannot listen')
  process.exit(1)
})
server.listen(env.port, env.host, () => {
  const address = server.address()
  const port = typeof address === 'object' && address !== null ? address.port : env.port
  process.stdout.write(`ready ${env.port === 0 ? `http://localhost:${port}` : publicUrl}\n`)
})

async function drain(): Promise<void> {
  if (!isServing) return
  isServing = false
  // What hangs does not keep us: everything acknowledged is in the database already.
  setTimeout(() => process.exit(1), DRAIN_MS).unref()
  const closed = new Promise<void>((resolve) => server.close(() => resolve()))
  server.closeIdleConnections()
  await realtime.drain()
  await mailWorker?.stop()
  const soon = setInterval(() => server.closeIdleConnections(), 100)
  await closed
  clearInterval(soon)
  mailer?.close()
  await catcher?.close()
  await pool.end()
  process.exit(0)
}

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.on(signal, () => {
    drain().catch((error: unknown) => {
      log.error({ failure: loggable(error) }, 'draining failed')
      process.exit(1)
    })
  })
}
