import { randomUUID } from 'node:crypto'
import { once } from 'node:events'
import { type IncomingHttpHeaders, type Server, createServer } from 'node:http'
import { eq } from 'drizzle-orm'
import type pg from 'pg'
import * as Y from 'yjs'
import { ROLES, type Role } from '#shared/access/roles.ts'
import { type ShootId, type StudioId, type UserId, shootIdSchema, studioIdSchema, userIdSchema } from '#shared/ids.ts'
import { DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { session, user } from '#server/db/schema/auth.ts'
import { shoot, shootMember } from '#server/db/schema/shoots.ts'
import { studio } from '#server/db/schema/studios.ts'
import type { Documents } from '#server/adapters/documents.ts'
import type { Authenticate } from '#server/realtime/authorise.ts'
import { type Realtime, createRealtime } from '#server/realtime/server.ts'
import type { RealtimeSettings } from '#server/realtime/settings.ts'

export const ORIGIN = 'http://localhost:4102'

/** Signed in by a header that names a row of `session`: what the cookie does in the program. */
export function authBySessionHeader(db: Db): Authenticate {
  return async (headers: IncomingHttpHeaders) => {
    const id = headers['x-test-session']
    if (typeof id !== 'string') return null
    const [found] = await db
      .select({ userId: session.userId, name: user.name, expiresAt: session.expiresAt })
      .from(session)
      .innerJoin(user, eq(user.id, session.userId))
      .where(eq(session.id, id))
    return found
      ? { userId: found.userId, name: found.name, sessionId: id, expiresAtMs: found.expiresAt.getTime() }
      : null
  }
}

export type Someone = { userId: UserId; sessionId: string; name: string }

/** A person with a session. */
export async function addPerson(db: Db, name: string, sessionMs = 3_600_000): Promise<Someone> {
  const userId = userIdSchema.parse(randomUUID())
  const sessionId = randomUUID()
  await db.insert(user).values({ id: userId, name, email: `${userId}@example.com` })
  await addSession(db, userId, sessionId, sessionMs)
  return { userId, sessionId, name }
}

export async function addSession(db: Db, userId: UserId, sessionId: string, sessionMs = 3_600_000): Promise<void> {
  await db
    .insert(session)
    .values({ id: sessionId, userId, token: randomUUID(), expiresAt: new Date(Date.now() + sessionMs) })
}

export type Shoot = { studioId: StudioId; shootId: ShootId; people: Record<Role, Someone> }

/** A shoot with its five empty documents and one person in each role. */
export async function addShoot(db: Db, documents: Documents): Promise<Shoot> {
  const people = {
    photographer: await addPerson(db, 'Maren Holt'),
    stylist: await addPerson(db, 'Ines Corrado'),
    client: await addPerson(db, 'Jonas Weller'),
    crew: await addPerson(db, 'Tam Okoro'),
  }
  const studioId = studioIdSchema.parse(randomUUID())
  const shootId = shootIdSchema.parse(randomUUID())
  await db.transaction(async (tx) => {
    await tx.insert(studio).values({ id: studioId, name: 'Hilltop' })
    await tx.insert(shoot).values({
      id: shootId,
      studioId,
      title: 'Autumn campaign',
      zone: 'Europe/London',
      createdBy: people.photographer.userId,
    })
    for (const role of ROLES) await tx.insert(shootMember).values({ shootId, userId: people[role].userId, role })
    for (const kind of DOCUMENT_KINDS) {
      await documents.create(tx, shootId, kind, Y.encodeStateAsUpdate(new Y.Doc()))
    }
  })
  return { studioId, shootId, people }
}

export type LogLine = { level: 'info' | 'warn' | 'error'; message: string; details: object }

export type World = {
  /** Of the websockets, `ws://…`. */
  url: string
  databaseUrl: string
  db: Db
  pool: pg.Pool
  server: Server
  realtime: Realtime
  lines: LogLine[]
  close(): Promise<void>
}

/** A realtime server in this process on a port of its own. */
export async function startWorld(options: {
  databaseUrl: string
  /** Where the realtime server finds the database, when that is to be another way than the test's own. */
  serverDatabaseUrl?: string
  limits?: Partial<RealtimeSettings>
}): Promise<World> {
  const { databaseUrl } = options
  const serverUrl = options.serverDatabaseUrl ?? databaseUrl
  const own = connectDatabase(databaseUrl, () => undefined, 4)
  const theirs = connectDatabase(serverUrl, () => undefined, 4)
  const lines: LogLine[] = []
  const say = (level: LogLine['level']) => (details: object, message: string) =>
    void lines.push({ level, message, details })
  const realtime = createRealtime({
    db: theirs.db,
    databaseUrl: serverUrl,
    auth: authBySessionHeader(theirs.db),
    trustedOrigins: [ORIGIN],
    log: { info: say('info'), warn: say('warn'), error: say('error') },
    limits: { warmUp: false, drainSpreadMs: 0, drainMs: 2_000, ...options.limits },
  })
  const server = createServer((_, response) => response.end('not here'))
  realtime.attach(server)
  server.listen(0, '127.0.0.1')
  await once(server, 'listening')
  const address = server.address()
  if (typeof address !== 'object' || address === null) throw new Error('no port')
  return {
    url: `ws://127.0.0.1:${address.port}`,
    databaseUrl,
    db: own.db,
    pool: own.pool,
    server,
    realtime,
    lines,
    close: async () => {
      await realtime.drain()
      server.closeAllConnections()
      await new Promise((resolve) => server.close(resolve))
      await Promise.all([own.pool.end(), theirs.pool.end()])
    },
  }
}
