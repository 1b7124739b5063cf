import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { type InvitationId, type ShootId, type StudioId, userIdSchema } from '#shared/ids.ts'
import type { Role, StudioRole } from '#shared/access/roles.ts'
import type { Actor } from '#server/context.ts'
import type { Db } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { mail } from '#server/db/schema/mail.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { invitePerson } from '#server/features/people/invite-person.ts'
import { removePerson } from '#server/features/people/remove-person.ts'
import { createShoot } from '#server/features/shoots/create-shoot.ts'
import { createStudio } from '#server/features/studios/create-studio.ts'
import type { TestApp } from '#tests/support/app.ts'

let made = 0

/** A person with an account of their own, and no password. */
export async function makePerson(db: Db, name = 'Somebody', more: { email?: string } = {}): Promise<Actor> {
  made += 1
  const email = more.email ?? `${name.toLowerCase().replace(/\W+/g, '.')}.${made}@example.com`
  const userId = userIdSchema.parse(randomUUID())
  await db.insert(user).values({ id: userId, name, email, emailVerified: true })
  return { userId, name, email }
}

export async function addToShoot(db: Db, shootId: ShootId, actor: Actor, role: Role): Promise<void> {
  await db.insert(shootMember).values({ shootId, userId: actor.userId, role })
}

export async function addToStudio(db: Db, studioId: StudioId, actor: Actor, role: StudioRole): Promise<void> {
  await db.insert(studioMember).values({ studioId, userId: actor.userId, role })
}

/** A studio with a shoot, and one of everybody who can stand in some relation to it. */
export type World = {
  studioId: StudioId
  shootId: ShootId
  /** Owner of the studio too. */
  photographer: Actor
  stylist: Actor
  client: Actor
  crew: Actor
  /** Belongs to the studio and has no role in the shoot. */
  studioMember: Actor
  stranger: Actor
  /** Was a stylist once. */
  removed: Actor
  /** Invited as a stylist, and has not said yes. */
  invited: Actor
  invitation: { id: InvitationId; token: string }
}

export async function makeWorld(app: TestApp): Promise<World> {
  const { db } = app
  const [photographer, stylist, client, crew, member, stranger, removed, invited] = await Promise.all(
    ['Pia Lund', 'Sol Vance', 'Cleo Marsh', 'Cy Dorn', 'Mel Ward', 'Stu Fell', 'Ray Moss', 'Ivy Nash'].map((name) =>
      makePerson(db, name),
    ),
  )
  if (!photographer || !stylist || !client || !crew || !member || !stranger || !removed || !invited)
    throw new Error('eight names make eight people')
  const { id: studioId } = await createStudio(app.ctxOf(photographer), { name: 'Harbour Studio' })
  const { id: shootId } = await createShoot(app.ctxOf(photographer), {
    studioId,
    title: 'Salt and Linen',
    date: '2027-03-04',
    zone: 'Europe/London',
  })
  await addToShoot(db, shootId, stylist, 'stylist')
  await addToShoot(db, shootId, client, 'client')
  await addToShoot(db, shootId, crew, 'crew')
  await addToStudio(db, studioId, member, 'member')
  await addToShoot(db, shootId, removed, 'stylist')
  await removePerson(app.ctxOf(photographer), { shootId, userId: removed.userId })
  const people = await invitePerson(app.ctxOf(photographer), {
    shootId,
    email: invited.email,
    name: invited.name,
    role: 'stylist',
  })
  const id = people.invitations[0]?.id
  if (!id) throw new Error('an invitation is in the list')
  const token = await newestToken(db, invited.email)
  return {
    studioId,
    shootId,
    photographer,
    stylist,
    client,
    crew,
    studioMember: member,
    stranger,
    removed,
    invited,
    invitation: { id, token },
  }
}

/** The token in the newest letter to this address: of `/join/…`, or of `?letter=…` and `?token=…`. */
export async function newestToken(db: Db, to: string): Promise<string> {
  const letters = await db.select({ text: mail.text, at: mail.createdAt }).from(mail).where(eq(mail.to, to))
  const newest = letters.sort((a, b) => b.at.getTime() - a.at.getTime())[0]
  const token = /(?:\/join\/|[?&](?:letter|token)=)([\w-]+)/.exec(newest?.text ?? '')?.[1]
  if (token === undefined) throw new Error(`There is no letter with a link to ${to}.`)
  return token
}
