import { once } from 'node:events'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { type Server, createServer } from 'node:http'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Express } from 'express'
import { pino } from 'pino'
import { type AppDeps, createApp } from '#server/app.ts'
import { makeAuth } from '#server/auth/auth.ts'
import type { Actor, Ctx } from '#server/context.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import type { RealtimeStats } from '#server/realtime/server.ts'
import { type Client, TEST_ORIGIN, clientFor } from '#tests/support/client.ts'
import { type Clock, clockAt } from '#tests/support/clock.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { type FakeDocuments, fakeDocuments } from '#tests/support/documents.ts'

export type TestApp = {
  app: Express
  /** Where it listens. */
  url: string
  db: Db
  databaseUrl: string
  clock: Clock
  documents: FakeDocuments
  /** A verb's world as this person, or without anybody signed in. */
  ctxOf: (actor?: Actor) => Ctx
  /** A browser signed in as this person, without the form. */
  clientOf: (actor?: Actor) => Promise<Client>
  close: () => Promise<void>
}

const GENEROUS = 100_000

/** Of a realtime server where nothing has happened yet. */
export const quietFigures: RealtimeStats = {
  rooms: 0,
  connections: 0,
  lagging: 0,
  instances: 0,
  flagged: 0,
  queuedEntries: 0,
  queuedBytes: 0,
  oldestMs: 0,
  commits: 0,
  rows: 0,
  failures: 0,
  commitMs: { p50: 0, p95: 0, p99: 0, max: 0 },
  compactions: 0,
  failedChecks: 0,
}

/** The real app on a database and a port of its own. The clock stands at the given time; sessions follow the real one. */
export async function startTestApp(
  more: Partial<AppDeps> & { clock?: Clock; signInsPerMin?: number } = {},
): Promise<TestApp> {
  const database = await createTestDatabase()
  const { db, pool } = connectDatabase(database.url, () => undefined)
  const clock = more.clock ?? clockAt(new Date().toISOString())
  const documents = fakeDocuments(db)
  const clientDir = mkdtempSync(join(tmpdir(), 'sconce-client-'))
  writeFileSync(join(clientDir, 'index.html'), '<!doctype html><title>Sconce</title>')
  const auth = makeAuth(db, {
    secret: 'a secret that only these tests know, long enough',
    publicUrl: TEST_ORIGIN,
    trustedOrigins: [TEST_ORIGIN],
    signInsPerMin: more.signInsPerMin ?? GENEROUS,
  })
  const app = createApp({
    db,
    auth,
    documents,
    now: clock.now,
    publicUrl: TEST_ORIGIN,
    trustedOrigins: [TEST_ORIGIN],
    log: pino({ level: 'silent' }),
    clientDir,
    letters: true,
    metrics: { stats: () => quietFigures, loopDelay: () => quietFigures.commitMs, version: '0.0.0' },
    limits: { invitationsPerMin: GENEROUS, uploadsPerMin: GENEROUS, sheetsPerMin: GENEROUS },
    ...more,
  })
  const server = createServer(app)
  server.listen(0, '127.0.0.1')
  await once(server, 'listening')
  const url = addressOf(server)
  return {
    app,
    url,
    db,
    databaseUrl: database.url,
    clock,
    documents,
    ctxOf: (actor) => ({ db, actor: actor ?? null, now: clock.now, documents, publicUrl: TEST_ORIGIN }),
    clientOf: async (actor) => {
      if (!actor) return clientFor(url)
      const { headers } = await auth.api.signInInvited({
        body: { userId: actor.userId },
        headers: new Headers(),
        returnHeaders: true,
      })
      return clientFor(
        url,
        headers
          .getSetCookie()
          .map((line) => line.split(';')[0] ?? '')
          .join('; '),
      )
    },
    close: async () => {
      server.closeAllConnections()
      await new Promise((resolve) => server.close(resolve))
      await pool.end()
      await database.drop()
      rmSync(clientDir, { recursive: true, force: true })
    },
  }
}

function addressOf(server: Server): string {
  const address = server.address()
  if (typeof address !== 'object' || address === null) throw new Error('The server does not listen on a port.')
  return `http://127.0.0.1:${address.port}`
}
