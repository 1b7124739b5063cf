import { randomUUID } from 'node:crypto'
import express, { type Express, type Router } from 'express'
import { pino } from 'pino'
import * as Y from 'yjs'
import type { Role } from '#shared/access/roles.ts'
import { type ShootId, shootIdSchema, studioIdSchema, userIdSchema } from '#shared/ids.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import type { Documents } from '#server/adapters/documents.ts'
import type { Actor, Ctx } from '#server/context.ts'
import type { Db } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { shoot, shootMember } from '#server/db/schema/shoots.ts'
import { studio } from '#server/db/schema/studios.ts'
import { errorHandler } from '#server/http/errors.ts'
import { withCtx } from '#server/http/request-ctx.ts'

export type MemoryDocuments = Documents & {
  doc: (shootId: ShootId, kind: DocumentKind) => Y.Doc
  announced: (readonly string[])[]
}

/** Documents in memory: `seq` counts updates. Stands in for the realtime adapter where sockets are not the subject. */
export function memoryDocuments(): MemoryDocuments {
  const docs = new Map<string, { doc: Y.Doc; seq: number }>()
  const announced: (readonly string[])[] = []
  const open = (shootId: ShootId, kind: DocumentKind) => {
    const key = `${shootId}:${kind}`
    const known = docs.get(key)
    if (known) return known
    const made = { doc: new Y.Doc(), seq: 1 }
    made.doc.on('update', () => (made.seq += 1))
    docs.set(key, made)
    return made
  }
  return {
    doc: (shootId, kind) => open(shootId, kind).doc,
    announced,
    create: () => Promise.reject(new Error('not part of this world')),
    read: (shootId, kind, fn) => {
      const { doc, seq } = open(shootId, kind)
      return Promise.resolve(fn(doc, seq))
    },
    write: (shootId, kind, _userId, fn) => {
      fn(open(shootId, kind).doc)
      return Promise.resolve()
    },
    announce: (_shootId, keys) => void announced.push(...keys),
  }
}

/** A person with an account. */
export async function makePerson(db: Db, name: string): Promise<Actor> {
  const id = userIdSchema.parse(randomUUID())
  const email = `${id}@example.com`
  await db.insert(user).values({ id, name, email })
  return { userId: id, name, email }
}

/** A shoot of its own studio with these people in it. */
export async function makeShoot(db: Db, people: readonly (readonly [Actor, Role])[]): Promise<ShootId> {
  const [creator] = people[0] ?? []
  if (!creator) throw new Error('a shoot has somebody in it')
  const studioId = studioIdSchema.parse(randomUUID())
  const shootId = shootIdSchema.parse(randomUUID())
  await db.insert(studio).values({ id: studioId, name: 'Hilltop studio' })
  await db
    .insert(shoot)
    .values({ id: shootId, studioId, title: 'Leaf, brass and star', zone: 'Europe/London', createdBy: creator.userId })
  await db.insert(shootMember).values(people.map(([person, role]) => ({ shootId, userId: person.userId, role })))
  return shootId
}

export function makeCtx(db: Db, documents: Documents, actor: Actor | null, nowMs = Date.UTC(2026, 8, 29, 10)): Ctx {
  return { db, documents, actor, now: () => new Date(nowMs), publicUrl: 'http://localhost:4000' }
}

/** The routes alone behind their context; the header `x-user` says who asks. */
export function makeApp(db: Db, documents: Documents, people: readonly Actor[], routes: Router): Express {
  const app = express()
  app.use(express.json())
  app.use(
    withCtx({
      db,
      documents,
      now: () => new Date(),
      publicUrl: 'http://localhost:4000',
      actorOf: (req) => Promise.resolve(people.find((person) => person.userId === req.headers['x-user']) ?? null),
    }),
  )
  app.use('/api', routes)
  app.use(errorHandler(pino({ level: 'silent' })))
  return app
}
