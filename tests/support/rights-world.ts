import { randomUUID } from 'node:crypto'
import sharp from 'sharp'
import type * as Y from 'yjs'
import { lookIdSchema, pieceIdSchema, sitterIdSchema, uploadIdSchema } from '#shared/ids.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { putItems } from '#shared/realtime/collection.ts'
import { lights, looks, pieces, props, setups, sitterPlaces, sitters } from '#shared/realtime/documents.ts'
import type { Actor } from '#server/context.ts'
import { addComment } from '#server/features/comments/add-comment.ts'
import { loadKit } from '#server/features/kit/kit-rows.ts'
import { setPieceCost } from '#server/features/private/set-piece-cost.ts'
import { setPrivateNote } from '#server/features/private/set-private-note.ts'
import { setSizes } from '#server/features/private/set-sizes.ts'
import { keepRecipe } from '#server/features/recipes/keep-recipe.ts'
import { addDeliverable } from '#server/features/shoots/add-deliverable.ts'
import { addRoom } from '#server/features/shoots/add-room.ts'
import { listSignOffs } from '#server/features/sign-off/list-sign-offs.ts'
import { inviteToStudio } from '#server/features/studios/invite-to-studio.ts'
import { keepVersion } from '#server/features/versions/keep-version.ts'
import { fromRecipe, toRecipe } from '#shared/domain/recipes/recipe.ts'
import { deliverableInputSchema, roomInputSchema } from '#shared/domain/shoots/schema.ts'
import type { TestApp } from '#tests/support/app.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'
import { OCTA, light, whole } from '#tests/support/lighting-sample.ts'

export const EVERYBODY = [
  'signed out',
  'stranger',
  'photographer',
  'stylist',
  'client',
  'crew',
  'removed',
  'invited',
  'studio member',
] as const
export type Who = (typeof EVERYBODY)[number]

export const SECRETS = {
  sizes: 'sizes-Qm7xW',
  contact: 'contact-Zp4vR',
  cost: 918_273_645,
  size: 'pcsize-Kd9',
  note: 'note-Hb2tL',
} as const

/** A recipe with one light. */
export const RECIPE = toRecipe(
  whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA })] }),
)

/** Puts a setup with all that stands in it into a lighting document. */
export function putWhole(doc: Y.Doc, whole: WholeSetup): void {
  putItems(doc, setups, [whole.setup], Math.random)
  putItems(doc, lights, whole.lights, Math.random)
  putItems(doc, sitterPlaces, whole.places, Math.random)
  putItems(doc, props, whole.props, Math.random)
}

/** What asks for a recipe sheet, without pictures. */
export function sheetForm(more: Record<string, unknown> = {}): FormData {
  const form = new FormData()
  form.set('sheet', JSON.stringify({ paper: 'A4', unit: 'm', ...more }))
  return form
}

/** A world with something of everything in it, secrets included. */
export type FullWorld = World & {
  who: Readonly<Record<Who, Actor | undefined>>
  sitterId: string
  pieceId: string
  lookId: string
  fingerprint: string
  roomId: string
  deliverableId: string
  kitId: string
  commentIds: Readonly<Record<'photographer' | 'stylist' | 'client' | 'crew', string>>
  uploadId: string
  versionId: string
  recipeId: string
  setupId: string
  studioInvitationId: string
}

export async function makeFullWorld(app: TestApp): Promise<FullWorld> {
  const world = await makeWorld(app)
  const { shootId, studioId, photographer } = world
  const ctx = app.ctxOf(photographer)
  const sitterId = sitterIdSchema.parse(randomUUID())
  const pieceId = pieceIdSchema.parse(randomUUID())
  const lookId = lookIdSchema.parse(randomUUID())
  await app.documents.write(shootId, 'looks', photographer.userId, (doc) => {
    putItems(doc, sitters, [{ id: sitterId, name: 'Ada Wren' }], Math.random)
    putItems(doc, pieces, [{ id: pieceId, kind: 'garment', name: 'Grey coat' }], Math.random)
    putItems(doc, looks, [{ id: lookId, sitterId, name: 'Harbour', pieceIds: [pieceId], rank: 'a0' }], Math.random)
  })
  await setSizes(ctx, { shootId, sitterId, sizes: SECRETS.sizes, contact: SECRETS.contact })
  await setPieceCost(ctx, {
    shootId,
    pieceId,
    cost: { minor: SECRETS.cost, currency: 'GBP' },
    deposit: null,
    size: SECRETS.size,
  })
  await setPrivateNote(ctx, { shootId, text: SECRETS.note })
  const { rooms } = await addRoom(ctx, { shootId, room: roomInputSchema.parse({ name: 'Net loft' }) })
  const { deliverables } = await addDeliverable(ctx, {
    shootId,
    deliverable: deliverableInputSchema.parse({ title: 'Cover' }),
  })
  const kit = await loadKit(app.db, studioId)
  const { invitations } = await inviteToStudio(ctx, {
    studioId,
    email: `guest.${randomUUID()}@example.com`,
    role: 'member',
  })
  const said = async (role: 'photographer' | 'stylist' | 'client' | 'crew') => {
    const { comments } = await addComment(app.ctxOf(world[role]), {
      shootId,
      subject: 'look',
      subjectId: lookId,
      text: `from ${role}`,
    })
    return comments.find(({ userId }) => userId === world[role].userId)?.id ?? ''
  }
  const commentIds = {
    photographer: await said('photographer'),
    stylist: await said('stylist'),
    client: await said('client'),
    crew: await said('crew'),
  }
  const uploadId = uploadIdSchema.parse(randomUUID())
  const stored = await (
    await app.clientOf(photographer)
  ).send('PUT', `/api/shoots/${shootId}/uploads/${uploadId}`, await pictureForm())
  if (stored.status !== 200) throw new Error(`The picture was not taken: ${stored.text}`)
  const { versions } = await keepVersion(ctx, { shootId, name: 'First idea' })
  const lit = fromRecipe(RECIPE, { newId: randomUUID })
  await app.documents.write(shootId, 'lighting', photographer.userId, (doc) => putWhole(doc, lit))
  const { recipes } = await keepRecipe(ctx, { studioId, content: RECIPE })
  const { current } = await listSignOffs(ctx, shootId)
  return {
    ...world,
    who: {
      'signed out': undefined,
      stranger: world.stranger,
      photographer,
      stylist: world.stylist,
      client: world.client,
      crew: world.crew,
      removed: world.removed,
      invited: world.invited,
      'studio member': world.studioMember,
    },
    sitterId,
    pieceId,
    lookId,
    fingerprint: current[0]?.fingerprint ?? '',
    roomId: rooms[0]?.id ?? '',
    deliverableId: deliverables[0]?.id ?? '',
    kitId: kit[0]?.id ?? '',
    commentIds,
    uploadId,
    versionId: versions[0]?.id ?? '',
    recipeId: recipes[0]?.id ?? '',
    setupId: lit.setup.id,
    studioInvitationId: invitations[0]?.id ?? '',
  }
}

export async function pictureForm(): Promise<FormData> {
  const png = await sharp({ create: { width: 40, height: 30, channels: 3, background: '#7a5c3e' } })
    .png()
    .toBuffer()
  const form = new FormData()
  form.set('file', new Blob([new Uint8Array(png)], { type: 'image/png' }), 'net-loft.png')
  return form
}
