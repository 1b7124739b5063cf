import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { auditEvent } from '#server/db/schema/people.ts'
import { getInvitationPage } from '#server/features/people/get-invitation-page.ts'
import { listKit } from '#server/features/kit/list-kit.ts'
import { getShoot } from '#server/features/shoots/get-shoot.ts'
import { changeStudioRole } from '#server/features/studios/change-studio-role.ts'
import { createStudio } from '#server/features/studios/create-studio.ts'
import { getMinutes } from '#server/features/studios/get-minutes.ts'
import { getSession } from '#server/features/studios/get-session.ts'
import { inviteToStudio } from '#server/features/studios/invite-to-studio.ts'
import { listStudioPeople } from '#server/features/studios/list-studio-people.ts'
import { removeStudioMember } from '#server/features/studios/remove-studio-member.ts'
import { renameStudio } from '#server/features/studios/rename-studio.ts'
import { revokeStudioInvitation } from '#server/features/studios/revoke-studio-invitation.ts'
import { setMinutes } from '#server/features/studios/set-minutes.ts'
import { invitationIdSchema } from '#shared/ids.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type World, makePerson, makeWorld, newestToken } from '#tests/support/factories.ts'

let app: TestApp
let world: World
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
})
const owner = () => app.ctxOf(world.photographer)

describe('createStudio', () => {
  it('makes its maker the owner, with a starter kit and the common minutes', async () => {
    const person = await makePerson(app.db, 'Nell Gray')
    const studio = await createStudio(app.ctxOf(person), { name: 'Gray & Daughters' })
    expect(studio).toMatchObject({ name: 'Gray & Daughters', role: 'owner', people: 1 })
    const { kit } = await listKit(app.ctxOf(person), studio.id)
    expect(kit.map(({ name }) => name).sort()).toEqual(STARTER_KIT.map(({ name }) => name).sort())
    expect(await getMinutes(app.ctxOf(person), studio.id)).toEqual(DEFAULT_MINUTES)
    expect(await app.db.select().from(auditEvent).where(eq(auditEvent.studioId, studio.id))).toMatchObject([
      { what: 'studio.created', userId: person.userId },
    ])
  })

  it('is for people who are signed in', async () => {
    await expect(createStudio(app.ctxOf(), { name: 'x' })).rejects.toMatchObject({ code: 'SIGNED_OUT' })
  })
})

describe('getSession', () => {
  it('says who one is and to which studios one belongs, by name', async () => {
    await createStudio(owner(), { name: 'Attic' })
    const session = await getSession(owner())
    expect(session.user).toEqual({
      id: world.photographer.userId,
      name: 'Pia Lund',
      email: world.photographer.email,
      initials: 'PL',
      colour: expect.stringMatching(/^#[0-9a-f]{6}$/),
    })
    expect(session.studios.map(({ name, role }) => [name, role])).toEqual([
      ['Attic', 'owner'],
      ['Harbour Studio', 'owner'],
    ])
    expect((await getSession(app.ctxOf(world.client))).studios).toEqual([])
  })
})

describe('renameStudio', () => {
  it('renames it for owners only', async () => {
    expect(await renameStudio(owner(), { studioId: world.studioId, name: 'Quay Studio' })).toMatchObject({
      name: 'Quay Studio',
      people: 2,
    })
    await expect(
      renameStudio(app.ctxOf(world.studioMember), { studioId: world.studioId, name: 'x' }),
    ).rejects.toMatchObject({
      code: 'FORBIDDEN',
      message: 'Only an owner of the studio may do this. Nothing was changed; ask one of them.',
    })
  })
})

describe('listStudioPeople', () => {
  it('has owners first, and open invitations for them alone', async () => {
    await inviteToStudio(owner(), { studioId: world.studioId, email: 'nora@example.com', role: 'owner' })
    const mine = await listStudioPeople(owner(), world.studioId)
    expect(mine.people.map(({ name, role }) => [name, role])).toEqual([
      ['Pia Lund', 'owner'],
      ['Mel Ward', 'member'],
    ])
    expect(mine.invitations).toMatchObject([{ email: 'nora@example.com', role: 'owner' }])
    expect((await listStudioPeople(app.ctxOf(world.studioMember), world.studioId)).invitations).toEqual([])
  })
})

describe('inviteToStudio', () => {
  it('replaces an earlier letter to the same address', async () => {
    const email = 'twice@example.com'
    await inviteToStudio(owner(), { studioId: world.studioId, email, role: 'member' })
    const first = await newestToken(app.db, email)
    const { invitations } = await inviteToStudio(owner(), { studioId: world.studioId, email, role: 'owner' })
    expect(invitations).toMatchObject([{ email, role: 'owner' }])
    await expect(getInvitationPage(app.ctxOf(), first)).rejects.toMatchObject({ code: 'GONE' })
  })

  it('refuses somebody who belongs to it already', async () => {
    await expect(
      inviteToStudio(owner(), { studioId: world.studioId, email: world.studioMember.email, role: 'owner' }),
    ).rejects.toMatchObject({
      code: 'CONFLICT',
      message: 'Mel Ward belongs to this studio already. No letter was sent.',
    })
  })
})

describe('revokeStudioInvitation', () => {
  it('withdraws it', async () => {
    const email = 'not.now@example.com'
    const { invitations } = await inviteToStudio(owner(), { studioId: world.studioId, email, role: 'member' })
    const id = invitationIdSchema.parse(invitations[0]?.id)
    expect((await revokeStudioInvitation(owner(), { studioId: world.studioId, invitationId: id })).invitations).toEqual(
      [],
    )
    await expect(getInvitationPage(app.ctxOf(), await newestToken(app.db, email))).rejects.toMatchObject({
      code: 'GONE',
    })
  })

  it('leaves a shoot’s invitation alone', async () => {
    await revokeStudioInvitation(owner(), { studioId: world.studioId, invitationId: world.invitation.id })
    expect(await getInvitationPage(app.ctxOf(), world.invitation.token)).toBeDefined()
  })
})

describe('changeStudioRole', () => {
  it('makes owners, and never leaves a studio without one', async () => {
    const change = (userId = world.studioMember.userId, role: 'owner' | 'member' = 'owner') =>
      changeStudioRole(owner(), { studioId: world.studioId, userId, role })
    await expect(change(world.photographer.userId, 'member')).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('make somebody else owner first'),
    })
    expect((await change()).people.map(({ role }) => role)).toEqual(['owner', 'owner'])
    expect((await change(world.photographer.userId, 'member')).people.map(({ role }) => role)).toEqual([
      'owner',
      'member',
    ])
  })

  it('does not know a stranger', async () => {
    await expect(
      changeStudioRole(owner(), { studioId: world.studioId, userId: world.stranger.userId, role: 'owner' }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('removeStudioMember', () => {
  it('takes a person out of the studio and leaves their shoots to them', async () => {
    await changeStudioRole(owner(), { studioId: world.studioId, userId: world.studioMember.userId, role: 'owner' })
    await removeStudioMember(app.ctxOf(world.studioMember), {
      studioId: world.studioId,
      userId: world.photographer.userId,
    })
    expect(await getShoot(owner(), world.shootId)).toMatchObject({ role: 'photographer', inStudio: false })
    await expect(listStudioPeople(owner(), world.studioId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })

  it('lets a member leave, and the last owner not', async () => {
    await removeStudioMember(app.ctxOf(world.studioMember), {
      studioId: world.studioId,
      userId: world.studioMember.userId,
    })
    await expect(
      removeStudioMember(owner(), { studioId: world.studioId, userId: world.photographer.userId }),
    ).rejects.toMatchObject({ code: 'CONFLICT', message: expect.stringContaining('A studio needs an owner') })
  })
})

describe('setMinutes', () => {
  it('is what the studio’s shoots count with from then, and their screens hear of it', async () => {
    app.documents.announced.length = 0
    const minutes = { ...DEFAULT_MINUTES, standMove: 3.5 }
    expect(await setMinutes(app.ctxOf(world.studioMember), { studioId: world.studioId, minutes })).toEqual(minutes)
    expect((await getShoot(app.ctxOf(world.crew), world.shootId)).minutes.standMove).toBe(3.5)
    expect(app.documents.announced).toEqual([
      {
        shootId: world.shootId,
        queryKeys: [
          ['shoots', world.shootId],
          ['studios', world.studioId, 'minutes'],
        ],
      },
    ])
  })
})
