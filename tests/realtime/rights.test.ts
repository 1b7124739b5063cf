import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { DOCUMENT_WRITERS, ROLES } from '#shared/access/roles.ts'
import { invitationIdSchema } from '#shared/ids.ts'
import { DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { notifyAuth } from '#server/db/notify-auth.ts'
import { session } from '#server/db/schema/auth.ts'
import { invitation } from '#server/db/schema/people.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { tryDocument } from './support.ts'
import { TestClient, contentOf, pause, syncFrame, until } from './support/client.ts'
import {
  ORIGIN,
  type Shoot,
  type Someone,
  type World,
  addPerson,
  addSession,
  addShoot,
  startWorld,
} from './support/world.ts'

let database: TestDatabase
let world: World
let shoot: Shoot

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url, limits: { recheckMs: 400 } })
  shoot = await addShoot(world.db, world.realtime.documents)
})
afterAll(async () => {
  await world.close()
  await database.drop()
})

const headersOf = (someone: Someone) => ({ 'x-test-session': someone.sessionId, origin: ORIGIN })

function open(someone: Someone, kind = 'board', at = shoot) {
  return new TestClient({ url: world.url, shootId: at.shootId, kind, sessionId: someone.sessionId })
}

describe('who gets into a document', () => {
  for (const kind of DOCUMENT_KINDS) {
    for (const role of ROLES) {
      const may = DOCUMENT_WRITERS[kind].includes(role)
      it(`lets ${role} ${may ? 'write' : 'only read'} ${kind}`, async () => {
        const access = await tryDocument(world.url, headersOf(shoot.people[role]), shoot.shootId, kind)
        expect(access).toEqual({ kind: may ? 'reads and writes' : 'reads' })
      })
    }

    it(`shows ${kind} to nobody without a role, who cannot tell it from what does not exist`, async () => {
      const stranger = await addPerson(world.db, 'Ada Nilsen')
      const studioOwner = await addPerson(world.db, 'Rosa Lind')
      await world.db
        .insert(studioMember)
        .values({ studioId: shoot.studioId, userId: studioOwner.userId, role: 'owner' })
      const removed = await addPerson(world.db, 'Piet Baas')
      await world.db.insert(shootMember).values({ shootId: shoot.shootId, userId: removed.userId, role: 'stylist' })
      await world.db
        .delete(shootMember)
        .where(and(eq(shootMember.shootId, shoot.shootId), eq(shootMember.userId, removed.userId)))
      const invited = await addPerson(world.db, 'Uma Reyes')
      await world.db.insert(invitation).values({
        id: invitationIdSchema.parse(randomUUID()),
        shootId: shoot.shootId,
        email: `${invited.userId}@example.com`,
        role: 'stylist',
        tokenHash: Buffer.from(randomUUID()),
        invitedBy: shoot.people.photographer.userId,
        sentAt: new Date(),
        expiresAt: new Date(Date.now() + 1e8),
      })
      const elsewhere = await addShoot(world.db, world.realtime.documents)
      const unknown = { kind: 'closed', code: CLOSE.unknown }
      for (const someone of [stranger, studioOwner, removed, invited, elsewhere.people.photographer]) {
        expect(await tryDocument(world.url, headersOf(someone), shoot.shootId, kind)).toEqual(unknown)
        expect(await tryDocument(world.url, headersOf(someone), randomUUID(), kind)).toEqual(unknown)
      }
    })

    it(`turns away from ${kind} who is signed out or comes from another page, before a socket exists`, async () => {
      const { shootId } = shoot
      const mine = headersOf(shoot.people.photographer)
      const refused = (status: number) => ({ kind: 'upgrade refused', status })
      expect(await tryDocument(world.url, { origin: ORIGIN }, shootId, kind)).toEqual(refused(401))
      expect(await tryDocument(world.url, { ...mine, 'x-test-session': 'none' }, shootId, kind)).toEqual(refused(401))
      expect(await tryDocument(world.url, { ...mine, origin: 'http://localhost:9' }, shootId, kind)).toEqual(
        refused(403),
      )
      const { origin: _, ...without } = mine
      expect(await tryDocument(world.url, without, shootId, kind)).toEqual(refused(403))
    })
  }

  it('knows no other kinds and no other ids', async () => {
    const mine = headersOf(shoot.people.photographer)
    for (const [id, kind] of [
      [shoot.shootId, 'money'],
      ['not-an-id', 'board'],
      [shoot.shootId, 'board/x'],
    ] as const) {
      expect(await tryDocument(world.url, mine, id, kind)).toEqual({ kind: 'closed', code: CLOSE.unknown })
    }
  })

  it('takes no edits of a page that somebody else opened', async () => {
    const { photographer, stylist } = shoot.people
    const opened = (user: string) =>
      new TestClient({
        url: world.url,
        shootId: shoot.shootId,
        kind: `board?ack=1&user=${user}&as=`,
        sessionId: stylist.sessionId,
      })
    expect(await opened(photographer.userId).ended).toBe(CLOSE.signedOut)
    const own = await opened(stylist.userId).ready()
    expect(own.hello?.role).toBe('stylist')
    own.close()
  })

  it('gives a person 60 sockets', async () => {
    const many = await startWorld({ databaseUrl: database.url, limits: { socketsPerUser: 3 } })
    const one = shoot.people.crew
    const at = { url: many.url, shootId: shoot.shootId, kind: 'day', sessionId: one.sessionId }
    const clients = [1, 2, 3].map(() => new TestClient(at))
    await Promise.all(clients.map((client) => client.ready()))
    expect(await new TestClient(at).ended).toBe(CLOSE.tryAgain)
    clients[0]?.close()
    await clients[0]?.ended
    await until(async () => {
      const next = new TestClient(at)
      const isIn = await next.ready().then(
        () => true,
        () => false,
      )
      next.close()
      return isIn
    })
    clients.forEach((client) => client.close())
    await many.close()
  })
})

describe('a cache of another epoch', () => {
  it('is turned away with 4409 before anything of it is read', async () => {
    const { sessionId } = shoot.people.photographer
    const at = { url: world.url, shootId: shoot.shootId, sessionId }
    expect(await new TestClient({ ...at, kind: 'board?epoch=7' }).ended).toBe(CLOSE.epoch)
    const same = new TestClient({ ...at, kind: 'board?epoch=1' })
    await until(() => same.isSynced)
    same.close()
  })
})

describe('a reader', () => {
  it('is told so at once, acknowledged for an empty step 2, refused otherwise, and changes nothing', async () => {
    const writer = await open(shoot.people.photographer, 'plan').ready()
    const reader = await open(shoot.people.client, 'plan').ready()
    expect(reader.hello).toMatchObject({ role: 'client', mayWrite: false })
    expect(reader.saved).toBe(1)
    const before = contentOf(writer.doc)
    reader.items.set('mine', 1)
    reader.send(syncFrame(1, Y.encodeStateAsUpdate(reader.doc)))
    // Not even decoded: what could not be read is refused for the role.
    reader.send(syncFrame(2, Uint8Array.of(255, 255, 255)))
    await until(() => reader.refusals.length === 3)
    expect(reader.refusals.map((refusal) => refusal.reason)).toEqual(['read-only', 'read-only', 'read-only'])
    expect(reader.saved).toBe(1)
    writer.items.set('theirs', 2)
    await until(() => reader.items.get('theirs') === 2)
    expect(contentOf(writer.doc)).not.toContain('mine')
    expect(before).not.toContain('mine')
    writer.close()
    reader.close()
  })
})

describe('a reader of a document in which things were deleted', () => {
  it('is acknowledged for the list of deletions in its step 2, and refused for one of its own', async () => {
    const writer = await open(shoot.people.photographer, 'plan').ready()
    writer.items.set('moved', 1)
    writer.items.set('moved', 2)
    await until(() => writer.saved === writer.sent)
    const reader = await open(shoot.people.client, 'plan').ready()
    await until(() => reader.saved === 1)
    expect(reader.refusals).toEqual([])
    // Coming back with a copy, as from the browser's cache.
    const again = await new TestClient({
      url: world.url,
      shootId: shoot.shootId,
      kind: 'plan',
      sessionId: shoot.people.client.sessionId,
      doc: reader.doc,
    }).ready()
    await until(() => again.saved === 1)
    expect(again.refusals).toEqual([])
    const own = new Y.Doc()
    Y.applyUpdate(own, Y.encodeStateAsUpdate(again.doc))
    own.getMap('items').delete('moved')
    again.send(syncFrame(1, Y.encodeStateAsUpdate(own, Y.encodeStateVector(own))))
    await until(() => again.refusals.length === 1)
    expect(writer.items.get('moved')).toBe(2)
    for (const client of [writer, reader, again]) client.close()
  })
})

describe('changed rights', () => {
  const WITHIN_MS = 2_000

  async function endsWithin(client: TestClient): Promise<number> {
    return Promise.race([client.ended, pause(WITHIN_MS).then(() => 0)])
  }

  it('closes with 4205 when the role changes, and the new role holds after coming back', async () => {
    const { shootId } = shoot
    const someone = await addPerson(world.db, 'Lena Frost')
    await world.db.insert(shootMember).values({ shootId, userId: someone.userId, role: 'stylist' })
    const client = await open(someone, 'looks').ready()
    const other = await open(shoot.people.photographer, 'looks').ready()
    const typing = setInterval(() => client.items.set('n', Math.random()), 5)
    await world.db.transaction(async (tx) => {
      await tx.update(shootMember).set({ role: 'crew' }).where(eq(shootMember.userId, someone.userId))
      await notifyAuth(tx, { shootId, userId: someone.userId })
    })
    expect(await endsWithin(client)).toBe(CLOSE.roleChanged)
    clearInterval(typing)
    expect(other.endCode).toBe(null)
    expect(await tryDocument(world.url, headersOf(someone), shootId, 'looks')).toEqual({ kind: 'reads' })
    other.close()
  })

  it('closes with 4403 when somebody is removed', async () => {
    const { shootId } = shoot
    const someone = await addPerson(world.db, 'Ivo Marsh')
    await world.db.insert(shootMember).values({ shootId, userId: someone.userId, role: 'stylist' })
    const client = await open(someone).ready()
    await world.db.transaction(async (tx) => {
      await tx.delete(shootMember).where(eq(shootMember.userId, someone.userId))
      await notifyAuth(tx, { shootId, userId: someone.userId })
    })
    expect(await endsWithin(client)).toBe(CLOSE.noAccess)
  })

  it('closes with 4401 the sockets of a session that is ended, not those of another', async () => {
    const someone = shoot.people.crew
    const elsewhere = randomUUID()
    await addSession(world.db, someone.userId, elsewhere)
    const here = await open(someone, 'day').ready()
    const there = await open({ ...someone, sessionId: elsewhere }, 'day').ready()
    await world.db.transaction(async (tx) => {
      await tx.delete(session).where(eq(session.id, elsewhere))
      await notifyAuth(tx, { sessionId: elsewhere })
    })
    expect(await endsWithin(there)).toBe(CLOSE.signedOut)
    expect(here.endCode).toBe(null)
    here.close()
  })

  it('is not told of what is rolled back', async () => {
    const quiet = await startWorld({ databaseUrl: database.url })
    const { shootId, people } = shoot
    const client = await new TestClient({
      url: quiet.url,
      shootId,
      kind: 'board',
      sessionId: people.stylist.sessionId,
    }).ready()
    await quiet.db
      .transaction(async (tx) => {
        await tx.update(shootMember).set({ role: 'crew' }).where(eq(shootMember.userId, people.stylist.userId))
        await notifyAuth(tx, { shootId })
        throw new Error('no')
      })
      .catch(() => undefined)
    await pause(200)
    expect(client.endCode).toBe(null)
    client.close()
    await quiet.close()
  })

  it('is found by the regular check when nobody says so', async () => {
    const { shootId } = shoot
    const someone = await addPerson(world.db, 'Bea Quist')
    await world.db.insert(shootMember).values({ shootId, userId: someone.userId, role: 'stylist' })
    const client = await open(someone).ready()
    await world.db.delete(shootMember).where(eq(shootMember.userId, someone.userId))
    expect(await endsWithin(client)).toBe(CLOSE.noAccess)
  })

  it('closes with 4401 when the session runs out, and not while it is prolonged', async () => {
    const quiet = await startWorld({ databaseUrl: database.url })
    const { shootId } = shoot
    const someone = await addPerson(quiet.db, 'Ove Sand', 500)
    await quiet.db.insert(shootMember).values({ shootId, userId: someone.userId, role: 'stylist' })
    const client = await new TestClient({
      url: quiet.url,
      shootId,
      kind: 'board',
      sessionId: someone.sessionId,
    }).ready()
    await quiet.db
      .update(session)
      .set({ expiresAt: new Date(Date.now() + 1_500) })
      .where(eq(session.id, someone.sessionId))
    await pause(900)
    expect(client.endCode).toBe(null)
    expect(await client.ended).toBe(CLOSE.signedOut)
    await quiet.close()
  })
})

describe('notifyAuth', () => {
  it('refuses an empty scope', async () => {
    await expect(notifyAuth(world.db, {})).rejects.toThrow('needs a shoot')
  })
})
