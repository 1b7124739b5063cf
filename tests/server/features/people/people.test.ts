import { eq } from 'drizzle-orm'
import pg from 'pg'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { AUTH_CHANNEL } from '#server/db/notify-auth.ts'
import { callSheet, callSheetCopy } from '#server/db/schema/call-sheet.ts'
import { auditEvent } from '#server/db/schema/people.ts'
import { changeRole } from '#server/features/people/change-role.ts'
import { listPeople } from '#server/features/people/list-people.ts'
import { removePerson } from '#server/features/people/remove-person.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type World, addToShoot, makeWorld } from '#tests/support/factories.ts'

let app: TestApp
let world: World
let listener: pg.Client
let heard: unknown[] = []
beforeAll(async () => {
  app = await startTestApp()
  listener = new pg.Client({ connectionString: app.databaseUrl })
  await listener.connect()
  listener.on('notification', ({ payload }) => heard.push(JSON.parse(payload ?? '')))
  await listener.query(`listen ${AUTH_CHANNEL}`)
})
afterAll(async () => {
  await listener.end()
  await app.close()
})
beforeEach(async () => {
  world = await makeWorld(app)
  await listener.query('select 1')
  heard = []
  app.documents.announced.length = 0
})

const told = async () => {
  await listener.query('select 1')
  return heard
}

describe('listPeople', () => {
  it('is in the order of roles, then names, with you marked', async () => {
    const { people } = await listPeople(app.ctxOf(world.stylist), world.shootId)
    expect(people.map(({ name, role, you, initials }) => [name, role, you, initials])).toEqual([
      ['Pia Lund', 'photographer', false, 'PL'],
      ['Sol Vance', 'stylist', true, 'SV'],
      ['Cleo Marsh', 'client', false, 'CM'],
      ['Cy Dorn', 'crew', false, 'CD'],
    ])
  })

  it('shows the crew the addresses on the newest call sheet', async () => {
    const issue = async (number: number, emails: string[]) => {
      const id = crypto.randomUUID()
      await app.db
        .insert(callSheet)
        .values({ id, shootId: world.shootId, number, content: {}, issuedBy: world.photographer.userId })
      await app.db
        .insert(callSheetCopy)
        .values(emails.map((email) => ({ id: crypto.randomUUID(), callSheetId: id, email })))
    }
    await issue(1, [world.client.email])
    await issue(2, [world.stylist.email])
    const { people } = await listPeople(app.ctxOf(world.crew), world.shootId)
    expect(people.flatMap(({ role, email }) => (email === null ? [] : [role]))).toEqual(['stylist', 'crew'])
  })
})

describe('changeRole', () => {
  it('changes it, notes it, and tells sockets and screens', async () => {
    const { people } = await changeRole(app.ctxOf(world.photographer), {
      shootId: world.shootId,
      userId: world.crew.userId,
      role: 'stylist',
    })
    expect(people.find(({ userId }) => userId === world.crew.userId)).toMatchObject({ role: 'stylist' })
    expect(await told()).toEqual([{ shootId: world.shootId, userId: world.crew.userId }])
    expect(app.documents.announced).toEqual([
      {
        shootId: world.shootId,
        queryKeys: [
          ['shoots', world.shootId, 'people'],
          ['shoots', world.shootId],
        ],
      },
    ])
    expect(await app.db.select().from(auditEvent).where(eq(auditEvent.subject, world.crew.userId))).toMatchObject([
      { what: 'role.stylist', userId: world.photographer.userId },
    ])
  })

  it('changes nothing and tells nobody when it is the same', async () => {
    await changeRole(app.ctxOf(world.photographer), { shootId: world.shootId, userId: world.crew.userId, role: 'crew' })
    expect(await told()).toEqual([])
  })

  it('never leaves a shoot without a photographer, and says what to do', async () => {
    const demote = () =>
      changeRole(app.ctxOf(world.photographer), {
        shootId: world.shootId,
        userId: world.photographer.userId,
        role: 'crew',
      })
    await expect(demote()).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('make somebody else photographer first'),
    })
    await changeRole(app.ctxOf(world.photographer), {
      shootId: world.shootId,
      userId: world.stylist.userId,
      role: 'photographer',
    })
    expect((await demote()).people.find(({ you }) => you)).toMatchObject({ role: 'crew' })
  })

  it('keeps one of two photographers who step down at the same time', async () => {
    await changeRole(app.ctxOf(world.photographer), {
      shootId: world.shootId,
      userId: world.stylist.userId,
      role: 'photographer',
    })
    const both = await Promise.allSettled(
      [world.photographer, world.stylist].map((person) =>
        changeRole(app.ctxOf(person), { shootId: world.shootId, userId: person.userId, role: 'crew' }),
      ),
    )
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected'])
    const { people } = await listPeople(app.ctxOf(world.client), world.shootId)
    expect(people.filter(({ role }) => role === 'photographer')).toHaveLength(1)
  })

  it('does not know somebody who is not in the shoot', async () => {
    await expect(
      changeRole(app.ctxOf(world.photographer), {
        shootId: world.shootId,
        userId: world.stranger.userId,
        role: 'crew',
      }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND', message: expect.stringContaining('not in the shoot any more') })
  })
})

describe('removePerson', () => {
  it('takes a person out, notes it, and closes their sockets', async () => {
    await removePerson(app.ctxOf(world.photographer), { shootId: world.shootId, userId: world.stylist.userId })
    expect(await told()).toEqual([{ shootId: world.shootId, userId: world.stylist.userId }])
    await expect(listPeople(app.ctxOf(world.stylist), world.shootId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    expect(await app.db.select().from(auditEvent).where(eq(auditEvent.subject, world.stylist.userId))).toMatchObject([
      { what: 'person.removed' },
    ])
    expect(
      await removePerson(app.ctxOf(world.photographer), { shootId: world.shootId, userId: world.stylist.userId }),
    ).toBeUndefined()
  })

  it('lets anybody leave but the last photographer', async () => {
    await removePerson(app.ctxOf(world.client), { shootId: world.shootId, userId: world.client.userId })
    expect(await app.db.select().from(auditEvent).where(eq(auditEvent.subject, world.client.userId))).toMatchObject([
      { what: 'person.left' },
    ])
    const leave = () =>
      removePerson(app.ctxOf(world.photographer), { shootId: world.shootId, userId: world.photographer.userId })
    await expect(leave()).rejects.toMatchObject({
      code: 'CONFLICT',
      message:
        'A shoot needs a photographer, and this is the only one. Nothing was changed; make somebody else photographer first, or remove the whole shoot.',
    })
    await addToShoot(app.db, world.shootId, world.stranger, 'photographer')
    await leave()
    await expect(listPeople(app.ctxOf(world.photographer), world.shootId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})
