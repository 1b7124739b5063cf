import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { invitationIdSchema } from '#shared/ids.ts'
import { account, user } from '#server/db/schema/auth.ts'
import { mail } from '#server/db/schema/mail.ts'
import { auditEvent, invitation } from '#server/db/schema/people.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { acceptInvitation } from '#server/features/people/accept-invitation.ts'
import { getInvitationPage } from '#server/features/people/get-invitation-page.ts'
import { invitePerson } from '#server/features/people/invite-person.ts'
import { listPeople } from '#server/features/people/list-people.ts'
import { resendInvitation } from '#server/features/people/resend-invitation.ts'
import { revokeInvitation } from '#server/features/people/revoke-invitation.ts'
import { inviteToStudio } from '#server/features/studios/invite-to-studio.ts'
import { listStudioPeople } from '#server/features/studios/list-studio-people.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'
import { type World, makePerson, makeWorld, newestToken } from '#tests/support/factories.ts'

const DAY_MS = 24 * 3600 * 1000
const clock = clockAt('2026-12-01T09:00:00Z')
let app: TestApp
let world: World
let made = 0
beforeAll(async () => {
  app = await startTestApp({ clock })
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
})

const newEmail = () => `guest.${(made += 1)}@example.com`
const invite = (email: string) =>
  invitePerson(app.ctxOf(world.photographer), { shootId: world.shootId, email, name: 'Gwen', role: 'client' })

describe('invitePerson', () => {
  it('writes one letter that says who invites whom to what, with one link', async () => {
    const email = newEmail()
    const { invitations } = await invite(email.toUpperCase())
    expect(invitations.find((open) => open.email === email)).toMatchObject({
      name: 'Gwen',
      role: 'client',
      sentAtMs: clock.now().getTime(),
      expiresAtMs: clock.now().getTime() + 7 * DAY_MS,
      expired: false,
    })
    const letters = await app.db.select().from(mail).where(eq(mail.to, email))
    expect(letters).toHaveLength(1)
    expect(letters[0]?.subject).toBe('Pia Lund invites you to Salt and Linen')
    expect(letters[0]?.text).toContain('Hello Gwen,')
    expect(letters[0]?.text.match(/https?:\/\/\S+/g)).toEqual([
      expect.stringMatching(/^http:\/\/localhost:4103\/join\/[\w-]{43}$/),
    ])
  })

  it('keeps only the hash of the token', async () => {
    const email = newEmail()
    await invite(email)
    const token = await newestToken(app.db, email)
    const [row] = await app.db.select().from(invitation).where(eq(invitation.email, email))
    expect(row?.tokenHash).toHaveLength(32)
    expect(Buffer.from(row?.tokenHash ?? []).toString('latin1')).not.toContain(token)
    expect(JSON.stringify({ ...row, tokenHash: '' })).not.toContain(token)
  })

  it('refuses an address that is in the shoot, or has an open invitation, and sends nothing', async () => {
    await expect(invite(world.stylist.email.toUpperCase())).rejects.toMatchObject({
      code: 'CONFLICT',
      message:
        'Sol Vance is in this shoot already, as stylist. No letter was sent; change the role in the list instead.',
    })
    await expect(invite(world.invited.email)).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('has an open invitation already'),
    })
    expect(await app.db.select().from(mail).where(eq(mail.to, world.stylist.email))).toEqual([])
  })

  it('notes who did it and tells open screens', async () => {
    const email = newEmail()
    app.documents.announced.length = 0
    const { invitations } = await invite(email)
    const [open] = invitations.filter((candidate) => candidate.email === email)
    expect(
      await app.db
        .select()
        .from(auditEvent)
        .where(eq(auditEvent.subject, open?.id ?? '')),
    ).toMatchObject([{ what: 'invitation.sent', userId: world.photographer.userId, shootId: world.shootId }])
    expect(app.documents.announced).toEqual([
      { shootId: world.shootId, queryKeys: [['shoots', world.shootId, 'people']] },
    ])
  })
})

describe('getInvitationPage', () => {
  it('shows what the letter is for and uses nothing up', async () => {
    const page = {
      kind: 'shoot',
      title: 'Salt and Linen',
      inviter: 'Pia Lund',
      role: 'stylist',
      email: world.invited.email,
      name: 'Ivy Nash',
    }
    for (let i = 0; i < 3; i++) expect(await getInvitationPage(app.ctxOf(), world.invitation.token)).toEqual(page)
  })

  it('does not know a token that nobody made', async () => {
    await expect(getInvitationPage(app.ctxOf(), 'A'.repeat(43))).rejects.toMatchObject({
      code: 'NOT_FOUND',
      message: expect.stringContaining('This invitation is not known'),
    })
  })
})

describe('resendInvitation', () => {
  it('sends another link for another seven days, and the old one is dead', async () => {
    clock.advanceMs(8 * DAY_MS)
    await expect(getInvitationPage(app.ctxOf(), world.invitation.token)).rejects.toMatchObject({ code: 'GONE' })
    const { invitations } = await resendInvitation(app.ctxOf(world.photographer), {
      shootId: world.shootId,
      invitationId: world.invitation.id,
    })
    expect(invitations).toMatchObject([
      { id: world.invitation.id, expired: false, expiresAtMs: clock.now().getTime() + 7 * DAY_MS },
    ])
    const token = await newestToken(app.db, world.invited.email)
    expect(token).not.toBe(world.invitation.token)
    await expect(getInvitationPage(app.ctxOf(), world.invitation.token)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    expect(await getInvitationPage(app.ctxOf(), token)).toMatchObject({ email: world.invited.email })
  })

  it('refuses one that was accepted or withdrawn, and one of another shoot', async () => {
    const other = await makeWorld(app)
    const again = (invitationId = world.invitation.id) =>
      resendInvitation(app.ctxOf(world.photographer), { shootId: world.shootId, invitationId })
    await expect(again(other.invitation.id)).rejects.toMatchObject({ code: 'CONFLICT' })
    await acceptInvitation(app.ctxOf(world.invited), { token: world.invitation.token, name: 'Ivy' })
    await expect(again()).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('No letter was sent'),
    })
  })
})

describe('revokeInvitation', () => {
  it('makes the link say that it was withdrawn', async () => {
    const revoke = () =>
      revokeInvitation(app.ctxOf(world.photographer), { shootId: world.shootId, invitationId: world.invitation.id })
    expect((await revoke()).invitations).toEqual([])
    expect((await revoke()).invitations).toEqual([])
    const gone = { code: 'GONE', message: 'This invitation was withdrawn. Ask whoever invited you for a new one.' }
    await expect(getInvitationPage(app.ctxOf(), world.invitation.token)).rejects.toMatchObject(gone)
    await expect(acceptInvitation(app.ctxOf(), { token: world.invitation.token, name: 'Ivy' })).rejects.toMatchObject(
      gone,
    )
    expect((await invite(world.invited.email)).invitations).toHaveLength(1)
  })

  it('refuses once it was accepted', async () => {
    await acceptInvitation(app.ctxOf(world.invited), { token: world.invitation.token, name: 'Ivy' })
    await expect(
      revokeInvitation(app.ctxOf(world.photographer), { shootId: world.shootId, invitationId: world.invitation.id }),
    ).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('remove the person from the list instead'),
    })
  })

  it('leaves an invitation of another shoot alone', async () => {
    const other = await makeWorld(app)
    await revokeInvitation(app.ctxOf(world.photographer), { shootId: world.shootId, invitationId: other.invitation.id })
    expect(await getInvitationPage(app.ctxOf(), other.invitation.token)).toMatchObject({ email: other.invited.email })
  })
})

describe('acceptInvitation', () => {
  it('makes an account for a new address, its mailbox shown to be theirs, and asks for a session', async () => {
    const email = newEmail()
    await invite(email)
    const { to, userId, signsIn } = await acceptInvitation(app.ctxOf(), {
      token: await newestToken(app.db, email),
      name: '  Gwen\n Hale ',
    })
    expect({ to, signsIn }).toEqual({ to: `/shoots/${world.shootId}/board`, signsIn: true })
    expect(await app.db.select().from(user).where(eq(user.id, userId))).toMatchObject([
      { email, name: 'Gwen Hale', emailVerified: true },
    ])
    expect(
      (await listPeople(app.ctxOf(world.photographer), world.shootId)).people.find(
        (person) => person.userId === userId,
      ),
    ).toMatchObject({ role: 'client', name: 'Gwen Hale' })
  })

  it('opens a session over HTTP without a password', async () => {
    const client = await app.clientOf()
    const path = `/api/invitations/${world.invitation.token}/accept`
    expect((await client.send('POST', path, { name: '' })).body).toMatchObject({
      error: { code: 'BAD_REQUEST', issues: [{ path: 'name', message: 'say what we call you' }] },
    })
    expect((await client.send('POST', path, { name: 'Ivy Nash' })).body).toEqual({
      to: `/shoots/${world.shootId}/board`,
    })
    expect((await client.get('/api/session')).body).toMatchObject({ user: { id: world.invited.userId } })
    expect((await client.get(`/api/shoots/${world.shootId}`)).body).toMatchObject({ role: 'stylist', inStudio: false })
  })

  it('is one acceptance when pressed twice at once', async () => {
    const email = newEmail()
    await invite(email)
    const token = await newestToken(app.db, email)
    const both = await Promise.all([1, 2].map(() => acceptInvitation(app.ctxOf(), { token, name: 'Gwen' })))
    expect(both[0]).toEqual(both[1])
    expect(await app.db.select().from(user).where(eq(user.email, email))).toHaveLength(1)
    expect(
      await app.db
        .select()
        .from(auditEvent)
        .where(eq(auditEvent.userId, both[0]?.userId ?? world.invited.userId)),
    ).toHaveLength(1)
  })

  it('is used up for everybody but the person themselves', async () => {
    const accept = () => acceptInvitation(app.ctxOf(world.invited), { token: world.invitation.token, name: 'Ivy' })
    await accept()
    clock.advanceMs(60_000)
    expect(await accept()).toMatchObject({ userId: world.invited.userId, signsIn: false })
    await expect(acceptInvitation(app.ctxOf(), { token: world.invitation.token, name: 'Ivy' })).rejects.toMatchObject({
      code: 'GONE',
      message: 'This invitation has been used. Sign in to open what it was for.',
    })
    await expect(
      acceptInvitation(app.ctxOf(world.stranger), { token: world.invitation.token, name: 'Stu' }),
    ).rejects.toMatchObject({ code: 'GONE' })
  })

  it('expires after seven days to the minute', async () => {
    clock.advanceMs(7 * DAY_MS - 1)
    expect(await getInvitationPage(app.ctxOf(), world.invitation.token)).toBeDefined()
    clock.advanceMs(1)
    await expect(acceptInvitation(app.ctxOf(), { token: world.invitation.token, name: 'Ivy' })).rejects.toMatchObject({
      code: 'GONE',
      message: 'This invitation is more than 7 days old and has expired. Ask whoever invited you to send it again.',
    })
  })

  it('is refused to somebody who is signed in with another address', async () => {
    await expect(
      acceptInvitation(app.ctxOf(world.stranger), { token: world.invitation.token, name: 'Stu' }),
    ).rejects.toMatchObject({
      code: 'CONFLICT',
      message: `You are signed in as ${world.stranger.email}, and this invitation is for ${world.invited.email}. Nothing was changed; sign out first, then open the letter again.`,
    })
  })

  it('does not hand an account to whoever put a password on somebody’s address first', async () => {
    const email = newEmail()
    const squatter = await makePerson(app.db, 'Squatter', { email })
    await app.db.update(user).set({ emailVerified: false }).where(eq(user.id, squatter.userId))
    await app.db.insert(account).values({
      id: squatter.userId,
      accountId: squatter.userId,
      userId: squatter.userId,
      providerId: 'credential',
      password: 'hash',
    })
    await invite(email)
    const token = await newestToken(app.db, email)
    await expect(acceptInvitation(app.ctxOf(), { token, name: 'Gwen' })).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('sign in to it'),
    })
    expect(
      (await listPeople(app.ctxOf(world.photographer), world.shootId)).people.some(
        (person) => person.userId === squatter.userId,
      ),
    ).toBe(false)
  })

  it('keeps the role that the person has meanwhile', async () => {
    await app.db
      .insert(shootMember)
      .values({ shootId: world.shootId, userId: world.invited.userId, role: 'photographer' })
    await acceptInvitation(app.ctxOf(world.invited), { token: world.invitation.token, name: 'Ivy' })
    expect((await listPeople(app.ctxOf(world.invited), world.shootId)).people.find(({ you }) => you)).toMatchObject({
      role: 'photographer',
    })
  })

  it('lets into a studio as well', async () => {
    const email = newEmail()
    await inviteToStudio(app.ctxOf(world.photographer), { studioId: world.studioId, email, role: 'member' })
    const token = await newestToken(app.db, email)
    expect(await getInvitationPage(app.ctxOf(), token)).toMatchObject({
      kind: 'studio',
      title: 'Harbour Studio',
      role: 'member',
    })
    expect(await acceptInvitation(app.ctxOf(), { token, name: 'Gwen' })).toMatchObject({ to: '/' })
    expect(
      (await listStudioPeople(app.ctxOf(world.photographer), world.studioId)).people.map(
        ({ email: address }) => address,
      ),
    ).toContain(email)
    const unknown = invitationIdSchema.parse(crypto.randomUUID())
    await expect(
      resendInvitation(app.ctxOf(world.photographer), { shootId: world.shootId, invitationId: unknown }),
    ).rejects.toMatchObject({ code: 'CONFLICT' })
  })
})
