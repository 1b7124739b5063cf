import { createServer } from 'node:http'
import { pino } from 'pino'
import { z } from 'zod'
import { connectDatabase } from '#server/db/client.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { ORIGIN, authBySessionHeader } from '#tests/realtime/support/world.ts'

/**
 * The realtime server alone in a process, to be measured and killed: rights, guard, presence, log, as in the program; the
 * session comes by a header instead of a cookie. LIMITS is JSON with settings to change: a client of the bench sends
 * more than one person could.
 */
const env = z
  .object({
    DATABASE_URL: z.string(),
    HOST: z.string(),
    PORT: z.coerce.number(),
    LIMITS: z.string().default('{}'),
    LOG_LEVEL: z.string().default('error'),
  })
  .parse(process.env)
const limits = z.record(z.string(), z.union([z.number(), z.boolean()])).parse(JSON.parse(env.LIMITS))

const log = pino({ level: env.LOG_LEVEL }, pino.destination(2))
const { db, pool } = connectDatabase(env.DATABASE_URL, () => undefined)
const realtime = createRealtime({
  db,
  databaseUrl: env.DATABASE_URL,
  auth: authBySessionHeader(db),
  trustedOrigins: [ORIGIN],
  log,
  limits,
})
const server = createServer((_, response) => response.end('not here'))
realtime.attach(server)
server.listen(env.PORT, env.HOST)
process.on('SIGTERM', () => {
  void realtime.drain().then(async () => {
    await pool.end()
    process.exit(0)
  })
})
