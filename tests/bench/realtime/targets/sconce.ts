import { randomUUID } from 'node:crypto'
import { fileURLToPath } from 'node:url'
import * as Y from 'yjs'
import type { Role } from '#shared/access/roles.ts'
import { type UserId, shootIdSchema, studioIdSchema, userIdSchema } from '#shared/ids.ts'
import { documentPath } from '#shared/realtime/protocol.ts'
import { connectDatabase } from '#server/db/client.ts'
import { session, user } from '#server/db/schema/auth.ts'
import { shoot, shootMember } from '#server/db/schema/shoots.ts'
import { studio } from '#server/db/schema/studios.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { ORIGIN } from '#tests/realtime/support/world.ts'
import type { BenchDatabase } from '../database.ts'
import { startServerChild } from '../server-child.ts'
import type { BenchDocument, Target } from './target.ts'

const entry = fileURLToPath(new URL('../sconce-process.ts', import.meta.url))

const SESSION_MS = 6 * 3_600_000
const WRITERS: readonly Role[] = ['photographer', 'stylist', 'client']
const READER: Role = 'crew'

type Member = { userId: UserId; sessionId: string; name: string; role: Role }

/** Sconce with boards of shoots of its own; every client is a person with a session and a role. */
export async function createSconce(database: BenchDatabase): Promise<Target> {
  const { db, pool } = connectDatabase(database.url, () => undefined, 4)
  // Of it only the making of documents is used, which needs nothing that runs.
  const silent = { info: () => undefined, warn: () => undefined, error: () => undefined }
  const seeding = createRealtime({
    db,
    databaseUrl: database.url,
    auth: async () => null,
    trustedOrigins: [],
    log: silent,
    limits: { warmUp: false, drainSpreadMs: 0 },
  })
  await seeding.drain()
  const studioId = studioIdSchema.parse(randomUUID())
  await db.insert(studio).values({ id: studioId, name: 'Hilltop' })

  function addBoard(writers: number): Promise<BenchDocument> {
    const shootId = shootIdSchema.parse(randomUUID())
    const members = Array.from({ length: writers + 1 }, (_, i): Member => {
      const role = i === writers ? READER : (WRITERS[i % WRITERS.length] ?? READER)
      return { userId: userIdSchema.parse(randomUUID()), sessionId: randomUUID(), name: `Person ${i}`, role }
    })
    return db.transaction(async (tx) => {
      await tx
        .insert(user)
        .values(members.map(({ userId, name }) => ({ id: userId, name, email: `${userId}@example.com` })))
      const expiresAt = new Date(Date.now() + SESSION_MS)
      await tx
        .insert(session)
        .values(members.map(({ userId, sessionId }) => ({ id: sessionId, userId, token: randomUUID(), expiresAt })))
      const createdBy = members[0]?.userId ?? userIdSchema.parse('nobody')
      await tx
        .insert(shoot)
        .values({ id: shootId, studioId, title: 'Autumn campaign', zone: 'Europe/London', createdBy })
      await tx.insert(shootMember).values(members.map(({ userId, role }) => ({ shootId, userId, role })))
      const docId = await seeding.documents.create(tx, shootId, 'board', Y.encodeStateAsUpdate(new Y.Doc()))
      const seatOf = (url: string, member: Member | undefined) => {
        if (!member) throw new Error('nobody is left to sit down')
        return {
          url: `${url}${documentPath(shootId, 'board')}?ack=1`,
          headers: { origin: ORIGIN, 'x-test-session': member.sessionId },
          documentName: shootId,
          personName: member.name,
        }
      }
      return {
        docId,
        seat: ({ url }, i) => seatOf(url, members[i]),
        readerSeat: ({ url }) => seatOf(url, members[writers]),
      }
    })
  }

  return {
    name: 'sconce',
    dialect: 'yjs',
    ack: 'durable',
    isPersistent: true,
    settleMs: 500,
    start: (limits = {}) =>
      startServerChild({
        args: ['--import', 'tsx', entry],
        env: { DATABASE_URL: database.url, LIMITS: JSON.stringify(limits) },
      }),
    addDocuments: async (count, writersEach) => {
      const documents: BenchDocument[] = []
      for (let i = 0; i < count; i++) documents.push(await addBoard(writersEach))
      return documents
    },
    close: () => pool.end(),
  }
}
