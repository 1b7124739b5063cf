import { createServer } from 'node:http'
import { pino } from 'pino'
import { connectDatabase } from '#server/db/client.ts'
import { createRealtime } from '#server/realtime/server.ts'
import type { RealtimeSettings } from '#server/realtime/settings.ts'
import { ORIGIN, authBySessionHeader } from './world.ts'

/** The realtime server alone in a process, to be killed. Prints `ready <port>`. */
const databaseUrl = process.env['DATABASE_URL']
if (databaseUrl === undefined) throw new Error('DATABASE_URL is not set')
const log = pino({ level: process.env['LOG_LEVEL'] ?? 'silent' }, pino.destination(2))
const { db, pool } = connectDatabase(databaseUrl, () => undefined)
// Bounds other than the usual ones, as JSON.
const limits: Partial<RealtimeSettings> = JSON.parse(process.env['REALTIME_LIMITS'] ?? '{}')
const realtime = createRealtime({
  db,
  databaseUrl,
  auth: authBySessionHeader(db),
  trustedOrigins: [ORIGIN],
  log,
  limits,
})
const server = createServer((_, response) => response.end('not here'))
realtime.attach(server)
server.listen(0, '127.0.0.1', () => {
  const address = server.address()
  process.stdout.write(`ready ${typeof address === 'object' && address !== null ? address.port : 0}\n`)
})
process.on('SIGTERM', () => {
  void realtime.drain().then(async () => {
    await pool.end()
    process.exit(0)
  })
})
