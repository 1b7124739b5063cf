import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { DateTime } from 'luxon'
import { initialsOf } from '#shared/domain/people/face.ts'
import { toRecipe } from '#shared/domain/recipes/recipe.ts'
import { wholeSetups } from '#shared/domain/plan/read-plan.ts'
import { fingerprintOf, freezeLook } from '#shared/domain/sign-off/fingerprint.ts'
import type { Role } from '#shared/access/roles.ts'
import {
  type ShootId,
  type StudioId,
  type UserId,
  commentIdSchema,
  deliverableIdSchema,
  lookIdSchema,
  pieceIdSchema,
  roomIdSchema,
  sitterIdSchema,
  uploadIdSchema,
} from '#shared/ids.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { looks, pieces } from '#shared/realtime/documents.ts'
import { lightingPart } from '#shared/realtime/plan-parts.ts'
import type { Actor, Ctx } from '#server/context.ts'
import type { Tx } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { comment } from '#server/db/schema/comments.ts'
import { pieceCost, privateNote, sitterPrivate } from '#server/db/schema/private.ts'
import { deliverable, location, room, shoot, shootMember } from '#server/db/schema/shoots.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { listKit } from '#server/features/kit/list-kit.ts'
import { keepRecipe } from '#server/features/recipes/keep-recipe.ts'
import { createShoot } from '#server/features/shoots/create-shoot.ts'
import { answerLook } from '#server/features/sign-off/answer-look.ts'
import { readLookVersions } from '#server/features/sign-off/look-version-rows.ts'
import { createStudio } from '#server/features/studios/create-studio.ts'
import { type ProcessedPicture, processPicture } from '#server/features/uploads/process-picture.ts'
import { storeUpload } from '#server/features/uploads/store-upload.ts'
import { type DemoUpload, demoBoard } from './content/board.ts'
import { demoLighting } from './content/lighting.ts'
import { demoLooks } from './content/looks.ts'
import { namedIds } from './content/named-ids.ts'
import { demoPlan } from './content/plan.ts'
import { DEMO_PICTURES, demoPicture } from './pictures.ts'
import { DEMO_PEOPLE } from './people.ts'

export type DemoWorld = Omit<Ctx, 'actor'> & {
  /** Makes an account with a password and answers its id. */
  createUser: (person: { name: string; email: string; password: string }) => Promise<UserId>
}

const DAY_MS = 86_400_000

/**
 * Puts the demo shoot into a database that has no people yet: a tea merchant's autumn campaign at a disused hilltop
 * observatory. Everything but accounts and answers is one transaction. Returns whether it did.
 */
export async function ensureDemo(world: DemoWorld): Promise<boolean> {
  const [anybody] = await world.db.select({ id: user.id }).from(user).limit(1)
  if (anybody) return false

  const actors = new Map<Role, Actor>()
  for (const person of DEMO_PEOPLE) {
    const userId = await world.createUser(person)
    actors.set(person.role, { userId, name: person.name, email: person.email })
  }
  const ctxOf = (role: Role, db: Ctx['db'] = world.db): Ctx => ({
    db,
    actor: actors.get(role) ?? null,
    now: world.now,
    documents: world.documents,
    publicUrl: world.publicUrl,
  })

  const id = namedIds(randomUUID)
  const date = nextThursday(world.now())
  const { shootId, studioId } = await world.db.transaction(async (tx) => {
    const studio = await createStudio(ctxOf('photographer', tx), { name: 'Lantern Row Studio' })
    await addMember(tx, studio.id, actors.get('stylist'))
    const { kit } = await listKit(ctxOf('photographer', tx), studio.id)
    const pictures = await demoUploads(id)
    const made = (initials: string) => {
      const person = DEMO_PEOPLE.find((one) => initialsOf(one.name) === initials)
      const actor = person && actors.get(person.role)
      return { by: actor?.userId ?? '', name: actor?.name ?? '', initials, atMs: world.now().getTime() - 3 * DAY_MS }
    }
    const daysAfter = (days: number) => DateTime.fromISO(date).plus({ days }).toISODate()
    const created = await createShoot(
      ctxOf('photographer', tx),
      { studioId: studio.id, title: 'Leaf, Brass & Star', date, zone: 'Europe/London' },
      {
        board: demoBoard(id, (name) => pictureOf(pictures, name), made, Math.random),
        plan: demoPlan(id, id, date, Math.random),
        looks: demoLooks(id, (name) => pictureOf(pictures, name).id, daysAfter, Math.random),
        lighting: demoLighting(id, kit, Math.random),
      },
    )
    await fillTables(tx, created.id, id, date, actors, world.now())
    for (const picture of pictures.values()) {
      await storeUpload(ctxOf('photographer', tx), {
        shootId: created.id,
        uploadId: uploadIdSchema.parse(picture.id),
        bytes: picture.bytes,
        processed: picture.processed,
      })
    }
    return { shootId: created.id, studioId: studio.id }
  })

  await signOffLooks(ctxOf('client'), shootId, id)
  await keepSetups(ctxOf('photographer'), { shootId, studioId, setupIds: [id('setup-octa'), id('setup-window')] })
  // What the client saw was black kid; the stylist has found grey wool since.
  const stylist = actors.get('stylist')
  if (stylist) {
    await world.documents.write(shootId, 'looks', stylist.userId, (doc) => {
      patchItem(doc, pieces, id('gloves'), { name: 'Gloves, grey wool', colour: '#6e7c84' })
      patchItem(doc, looks, id('look-night'), { hair: 'Pinned under the collar' })
    })
  }
  return true
}

/** The Thursday at least three weeks ahead. */
function nextThursday(now: Date): string {
  const from = DateTime.fromJSDate(now, { zone: 'utc' }).plus({ weeks: 3 })
  return from.plus({ days: (4 - from.weekday + 7) % 7 }).toISODate() ?? ''
}

/** Keeps two of the setups as recipes of the studio. */
async function keepSetups(
  ctx: Ctx,
  { shootId, studioId, setupIds }: { shootId: ShootId; studioId: StudioId; setupIds: readonly string[] },
): Promise<void> {
  const setups = await ctx.documents.read(shootId, 'lighting', (doc) => wholeSetups(lightingPart(doc)))
  for (const setupId of setupIds) {
    const whole = setups.get(setupId)
    if (whole) await keepRecipe(ctx, { studioId, content: toRecipe(whole) })
  }
}

type DemoFile = DemoUpload & { bytes: Uint8Array; processed: ProcessedPicture }

async function demoUploads(id: (name: string) => string): Promise<Map<string, DemoFile>> {
  const files = new Map<string, DemoFile>()
  for (const name of DEMO_PICTURES) {
    const bytes = await demoPicture(name)
    const processed = await processPicture(bytes)
    files.set(name, {
      id: id(`upload-${name}`),
      bytes,
      processed,
      widthPx: processed.widthPx,
      heightPx: processed.heightPx,
      palette: processed.palette,
    })
  }
  return files
}

function pictureOf(pictures: ReadonlyMap<string, DemoFile>, name: string): DemoFile {
  const picture = pictures.get(name)
  if (!picture) throw new Error(`the demo has no picture named ${name}`)
  return picture
}

async function addMember(tx: Tx, studioId: StudioId, actor: Actor | undefined): Promise<void> {
  if (actor) await tx.insert(studioMember).values({ studioId, userId: actor.userId, role: 'member' })
}

async function fillTables(
  tx: Tx,
  shootId: ShootId,
  id: (name: string) => string,
  date: string,
  actors: ReadonlyMap<Role, Actor>,
  now: Date,
): Promise<void> {
  const signOffBy = DateTime.fromISO(date, { zone: 'Europe/London' }).minus({ days: 6 }).set({ hour: 18 })
  await tx
    .update(shoot)
    .set({
      client: 'Merrow Lane, tea merchants',
      idea: 'Three people who measure slow things (stars, hours, leaves) meet once, in autumn, in an observatory that no longer looks at anything. Nobody sells tea; it is simply always there, poured and waiting. Cool walls, one warm thing in each picture, brass wherever a hand rests.',
      usage: 'Packets, window cards and the autumn pages for two years; three countries. No third parties.',
      signOffByMs: signOffBy.toMillis(),
    })
    .where(eq(shoot.id, shootId))
  await tx
    .update(location)
    .set({
      name: 'Tarn Fell Observatory',
      address: 'Observatory Track, Tarn Fell',
      latitude: 54.472,
      longitude: -3.031,
      parking: 'Four cars by the gatehouse, the van may go up to unload. Gate code from the photographer.',
      access:
        'Eleven steps to the gallery, a spiral stair of twenty-two to the dome. No lift. Hard hats while the slit is moved; the warden moves it, nobody else.',
    })
    .where(eq(location.shootId, shootId))
  const rooms = [
    {
      name: 'Long gallery',
      widthM: 4.5,
      depthM: 9,
      ceilingM: 3.2,
      power: 'Two double sockets on one 13 A ring by the door. Flash runs on batteries.',
      windows: 'Three tall ones to the north, shutters work',
      note: 'Floor is waxed oak: felt under every stand.',
    },
    {
      name: 'Dome',
      widthM: 7.5,
      depthM: 7.5,
      ceilingM: 6,
      power: 'None. Work light from the landing only.',
      windows: 'The slit, opened by the warden; faces west after three',
      note: 'Platform edge is open on the north side. Tape it.',
    },
    {
      name: 'Old library',
      widthM: 5,
      depthM: 6,
      ceilingM: 3,
      power: 'Four sockets, kettle on its own',
      windows: 'Two to the east',
      note: 'Wardrobe, hair and make-up. Heater in the chimney.',
    },
  ]
  await tx
    .insert(room)
    .values(rooms.map((one, position) => ({ ...one, id: roomIdSchema.parse(id(one.name)), shootId, position })))
  const deliverables = [
    {
      title: 'Packet portraits, one each',
      count: 3,
      orientation: 'upright' as const,
      use: 'Front of the packet, 100 × 150 mm',
      dueOn: plusDays(date, 21),
    },
    {
      title: 'Window card, all three',
      count: 1,
      orientation: 'across' as const,
      use: 'A1, cropped to 3:2',
      dueOn: plusDays(date, 21),
    },
    {
      title: 'Leaf, hands and brass',
      count: 4,
      orientation: 'square' as const,
      use: 'Autumn pages',
      dueOn: plusDays(date, 28),
    },
    {
      title: 'Story pictures',
      count: 4,
      orientation: 'any' as const,
      use: 'Autumn pages, opening spreads',
      dueOn: plusDays(date, 28),
    },
  ]
  await tx
    .insert(deliverable)
    .values(
      deliverables.map((one, position) => ({ ...one, id: deliverableIdSchema.parse(randomUUID()), shootId, position })),
    )
  for (const role of ['stylist', 'client', 'crew'] as const) {
    const actor = actors.get(role)
    if (actor) await tx.insert(shootMember).values({ shootId, userId: actor.userId, role })
  }
  await tx.insert(sitterPrivate).values([
    {
      shootId,
      sitterId: sitterIdSchema.parse(id('astronomer')),
      sizes: 'Coat 38, glove 7½, shoe 39',
      contact: 'maud@example.com',
    },
    {
      shootId,
      sitterId: sitterIdSchema.parse(id('clockmaker')),
      sizes: 'Coat 42, collar 16, shoe 44',
      contact: 'idris@example.com',
    },
    { shootId, sitterId: sitterIdSchema.parse(id('botanist')), sizes: 'Gown 12, shoe 40', contact: 'lena@example.com' },
  ])
  await tx.insert(pieceCost).values([
    {
      shootId,
      pieceId: pieceIdSchema.parse(id('gown')),
      costMinor: 12000,
      costCurrency: 'GBP',
      depositMinor: 20000,
      depositCurrency: 'GBP',
      size: '12',
    },
    {
      shootId,
      pieceId: pieceIdSchema.parse(id('cape')),
      costMinor: 6500,
      costCurrency: 'GBP',
      depositMinor: 10000,
      depositCurrency: 'GBP',
      size: 'M',
    },
    { shootId, pieceId: pieceIdSchema.parse(id('high-collar')), costMinor: 4000, costCurrency: 'GBP', size: '38' },
    {
      shootId,
      pieceId: pieceIdSchema.parse(id('escapement')),
      costMinor: 3000,
      costCurrency: 'GBP',
      depositMinor: 15000,
      depositCurrency: 'GBP',
    },
  ])
  await tx
    .insert(privateNote)
    .values({ shootId, text: 'The client’s brother owns the gatehouse; ring him before the van goes up.' })
  const said = (role: Role, subject: 'frame' | 'look', name: string, text: string, hoursAgo: number) => {
    const actor = actors.get(role)
    return actor
      ? [
          {
            id: commentIdSchema.parse(randomUUID()),
            shootId,
            subject,
            subjectId: id(name),
            userId: actor.userId,
            text,
            at: new Date(now.getTime() - hoursAgo * 3_600_000),
          },
        ]
      : []
  }
  await tx
    .insert(comment)
    .values([
      ...said('stylist', 'frame', 'frame-collar-high', 'Could the collar be softer?', 26),
      ...said('client', 'frame', 'frame-collar-high', 'Felt, not starch. Yes please.', 25),
      ...said('photographer', 'frame', 'frame-eyepiece', 'The blue is one flash on the floor. Keep it this deep.', 20),
    ])
}

function plusDays(date: string, days: number): string | null {
  return DateTime.fromISO(date).plus({ days }).toISODate()
}

/** The client has answered four looks as they stood then. */
async function signOffLooks(ctx: Ctx, shootId: ShootId, id: (name: string) => string): Promise<void> {
  const { looks: planned, pictureHashes } = await readLookVersions(ctx, shootId)
  const answers = [
    ['look-work', 'signed off', ''],
    ['look-open', 'signed off', 'Lovely. Keep the creases.'],
    ['look-night', 'signed off', ''],
    ['look-field', 'change asked', 'The jacket reads army. Could it be softer, more garden than regiment?'],
  ] as const
  for (const [name, answer, words] of answers) {
    const look = planned.get(id(name))
    if (!look) continue
    const fingerprint = fingerprintOf(freezeLook(look, pictureHashes))
    await answerLook(ctx, { shootId, lookId: lookIdSchema.parse(id(name)), answer, words, fingerprint })
  }
}
