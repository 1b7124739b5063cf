import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { deliverableIdSchema, roomIdSchema, shotIdSchema } from '#shared/ids.ts'
import { briefPatchSchema, createShootSchema } from '#shared/api/shoots.ts'
import { deliverableInputSchema, locationSchema, roomInputSchema } from '#shared/domain/shoots/schema.ts'
import { putItems, readAll } from '#shared/realtime/collection.ts'
import { days, shots } from '#shared/realtime/documents.ts'
import { rtDoc } from '#server/db/schema/realtime.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { addDeliverable } from '#server/features/shoots/add-deliverable.ts'
import { addRoom } from '#server/features/shoots/add-room.ts'
import { createShoot } from '#server/features/shoots/create-shoot.ts'
import { getShoot } from '#server/features/shoots/get-shoot.ts'
import { listShoots } from '#server/features/shoots/list-shoots.ts'
import { removeDeliverable } from '#server/features/shoots/remove-deliverable.ts'
import { removeRoom } from '#server/features/shoots/remove-room.ts'
import { removeShoot } from '#server/features/shoots/remove-shoot.ts'
import { setLocation } from '#server/features/shoots/set-location.ts'
import { updateBrief } from '#server/features/shoots/update-brief.ts'
import { updateDeliverable } from '#server/features/shoots/update-deliverable.ts'
import { updateRoom } from '#server/features/shoots/update-room.ts'
import type { Ctx } from '#server/context.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

let app: TestApp
let world: World
let ctx: Ctx
beforeAll(async () => {
  app = await startTestApp({ clock: clockAt('2026-12-01T23:30:00Z') })
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
  ctx = app.ctxOf(world.photographer)
})

describe('createShoot', () => {
  it('makes its maker photographer, with a place and five documents, one day in the plan', async () => {
    const { id } = await createShoot(
      app.ctxOf(world.studioMember),
      createShootSchema.parse({ studioId: world.studioId, title: ' Tide ', date: '2027-05-01', zone: 'America/Lima' }),
    )
    const shoot = await getShoot(app.ctxOf(world.studioMember), id)
    expect(shoot).toMatchObject({
      role: 'photographer',
      inStudio: true,
      brief: {
        title: 'Tide',
        date: '2027-05-01',
        zone: 'America/Lima',
        rooms: [],
        deliverables: [],
        location: { name: '', latitude: null },
      },
    })
    expect(Object.keys(shoot.epochs)).toEqual(['board', 'day', 'lighting', 'looks', 'plan'])
    const made = await app.documents.read(id, 'plan', (doc) => [...readAll(doc, days).items.values()])
    expect(made).toMatchObject([{ date: '2027-05-01' }])
  })

  it('makes nothing at all when one part fails', async () => {
    const before = await app.db.select({ id: rtDoc.id }).from(rtDoc)
    const failing: Ctx = {
      ...ctx,
      documents: {
        ...app.documents,
        create: (tx, shootId, kind, state) =>
          kind === 'day' ? Promise.reject(new Error('full')) : app.documents.create(tx, shootId, kind, state),
      },
    }
    await expect(
      createShoot(failing, createShootSchema.parse({ studioId: world.studioId, title: 'Tide', zone: 'Europe/London' })),
    ).rejects.toThrow('full')
    expect(await app.db.select({ id: rtDoc.id }).from(rtDoc)).toHaveLength(before.length)
    expect((await listShoots(ctx)).shoots).toHaveLength(1)
  })
})

describe('createShootSchema', () => {
  it('knows real time zones and real days', () => {
    const issues = createShootSchema.safeParse({
      studioId: world.studioId,
      title: ' ',
      date: '2027-02-30',
      zone: 'Mars/Olympus',
    }).error?.issues
    expect(issues?.map(({ path }) => path.join('.')).sort()).toEqual(['date', 'title', 'zone'])
  })
})

describe('getShoot', () => {
  it('says whether the person belongs to the studio too', async () => {
    expect(await getShoot(ctx, world.shootId)).toMatchObject({ inStudio: true })
    expect(await getShoot(app.ctxOf(world.client), world.shootId)).toMatchObject({ inStudio: false, role: 'client' })
  })
})

describe('updateBrief', () => {
  it('changes what is given and leaves the rest, and open screens hear of it', async () => {
    const patch = (input: object) => updateBrief(ctx, { shootId: world.shootId, patch: briefPatchSchema.parse(input) })
    await patch({ client: 'Tallow & Sons', idea: 'Wind', signOffByMs: 1_800_000_000_000 })
    app.documents.announced.length = 0
    expect(await patch({ title: 'Salt' })).toMatchObject({
      title: 'Salt',
      client: 'Tallow & Sons',
      idea: 'Wind',
      date: '2027-03-04',
      signOffByMs: 1_800_000_000_000,
    })
    expect(app.documents.announced).toEqual([
      { shootId: world.shootId, queryKeys: [['shoots', world.shootId], ['shoots']] },
    ])
    expect(await patch({ date: null, signOffByMs: null, idea: '' })).toMatchObject({
      date: null,
      signOffByMs: null,
      idea: '',
      client: 'Tallow & Sons',
    })
    expect(await patch({})).toMatchObject({ title: 'Salt' })
  })
})

describe('setLocation', () => {
  it('replaces the place as a whole', async () => {
    const place = (input: object) => setLocation(ctx, { shootId: world.shootId, location: locationSchema.parse(input) })
    await place({ name: 'Old harbour', latitude: 54.5, longitude: -3.1, parking: 'On the quay' })
    expect((await place({ name: 'New harbour' })).location).toEqual({
      name: 'New harbour',
      address: '',
      latitude: null,
      longitude: null,
      parking: '',
      access: '',
    })
  })
})

describe('rooms', () => {
  const names = (brief: { rooms: { name: string }[] }) => brief.rooms.map(({ name }) => name)

  it('keep the order they were added in through every change', async () => {
    const add = (name: string) =>
      addRoom(ctx, { shootId: world.shootId, room: roomInputSchema.parse({ name, ceilingM: 2.4 }) })
    await add('Quay')
    await add('Loft')
    const { rooms } = await add('Cellar')
    const loft = rooms[1]?.id ?? roomIdSchema.parse('')
    const changed = await updateRoom(ctx, {
      shootId: world.shootId,
      roomId: loft,
      room: roomInputSchema.parse({ name: 'Net loft' }),
    })
    expect(names(changed)).toEqual(['Quay', 'Net loft', 'Cellar'])
    expect(changed.rooms[1]).toMatchObject({ ceilingM: null })
    expect(names(await removeRoom(ctx, { shootId: world.shootId, roomId: loft }))).toEqual(['Quay', 'Cellar'])
    expect(names(await removeRoom(ctx, { shootId: world.shootId, roomId: loft }))).toEqual(['Quay', 'Cellar'])
    await expect(
      updateRoom(ctx, { shootId: world.shootId, roomId: loft, room: roomInputSchema.parse({ name: 'x' }) }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND' })
    expect(names(await add('Attic'))).toEqual(['Quay', 'Cellar', 'Attic'])
  })

  it('of another shoot stay as they are', async () => {
    const other = await makeWorld(app)
    const theirs = await addRoom(app.ctxOf(other.photographer), {
      shootId: other.shootId,
      room: roomInputSchema.parse({ name: 'Theirs' }),
    })
    const roomId = theirs.rooms[0]?.id ?? roomIdSchema.parse('')
    await removeRoom(ctx, { shootId: world.shootId, roomId })
    await expect(
      updateRoom(ctx, { shootId: world.shootId, roomId, room: roomInputSchema.parse({ name: 'Mine' }) }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND' })
    expect(names((await getShoot(app.ctxOf(other.photographer), other.shootId)).brief)).toEqual(['Theirs'])
  })
})

describe('deliverables', () => {
  it('are added at the end, changed and taken out', async () => {
    const add = (title: string) =>
      addDeliverable(ctx, {
        shootId: world.shootId,
        deliverable: deliverableInputSchema.parse({ title, count: 3, orientation: 'upright' }),
      })
    await add('Cover')
    const { deliverables } = await add('Poster')
    const cover = deliverables[0]?.id ?? deliverableIdSchema.parse('')
    const changed = await updateDeliverable(ctx, {
      shootId: world.shootId,
      deliverableId: cover,
      deliverable: deliverableInputSchema.parse({ title: 'Front', dueOn: '2027-04-01' }),
    })
    expect(changed.deliverables).toMatchObject([
      { title: 'Front', count: 1, orientation: 'any', dueOn: '2027-04-01' },
      { title: 'Poster', count: 3 },
    ])
    expect((await removeDeliverable(ctx, { shootId: world.shootId, deliverableId: cover })).deliverables).toMatchObject(
      [{ title: 'Poster' }],
    )
    await expect(
      updateDeliverable(ctx, {
        shootId: world.shootId,
        deliverableId: cover,
        deliverable: deliverableInputSchema.parse({ title: 'x' }),
      }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('removeShoot', () => {
  it('takes everything of it away, documents included', async () => {
    await removeShoot(ctx, world.shootId)
    await expect(getShoot(ctx, world.shootId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    expect(await app.db.select().from(rtDoc).where(eq(rtDoc.shootId, world.shootId))).toEqual([])
  })
})

describe('listShoots', () => {
  it('has what is to come first, soonest on top, then undated, then what is over, by the shoot’s own day', async () => {
    const make = (title: string, date: string | null, zone = 'Europe/London') =>
      createShoot(ctx, createShootSchema.parse({ studioId: world.studioId, title, date, zone }))
    await make('Over long ago', '2025-01-01')
    await make('Over', '2026-11-30')
    await make('No date', null)
    // 23:30 UTC on 1 December is 2 December in Tokyo and still the 1st in London.
    await make('Today in London', '2026-12-01')
    await make('Over in Tokyo', '2026-12-01', 'Asia/Tokyo')
    const { shoots } = await listShoots(ctx)
    expect(shoots.map(({ title }) => title)).toEqual([
      'Today in London',
      'Salt and Linen',
      'No date',
      'Over in Tokyo',
      'Over',
      'Over long ago',
    ])
  })

  it('counts the shots and says how ready each section is', async () => {
    await app.documents.write(world.shootId, 'board', world.photographer.userId, (doc) => {
      putItems(
        doc,
        shots,
        [{ id: shotIdSchema.parse(crypto.randomUUID()), title: 'At the bollard', place: ['loose', 'a0'] }],
        Math.random,
      )
    })
    await updateBrief(ctx, { shootId: world.shootId, patch: { client: 'Tallow & Sons' } })
    const [card] = (await listShoots(app.ctxOf(world.crew))).shoots
    expect(card).toMatchObject({ role: 'crew', shots: 1, pictures: [], place: '' })
    expect(card?.readiness.map(({ section, lamp }) => [section, lamp])).toEqual([
      ['brief', 'half'],
      ['board', 'unlit'],
      ['looks', 'unlit'],
      ['lighting', 'unlit'],
      ['order', 'unlit'],
      ['day', 'unlit'],
    ])
  })

  it('is empty for who has no role in any shoot', async () => {
    await app.db
      .delete(shootMember)
      .where(and(eq(shootMember.shootId, world.shootId), eq(shootMember.userId, world.crew.userId)))
    expect(await listShoots(app.ctxOf(world.crew))).toEqual({ shoots: [] })
    await expect(listShoots(app.ctxOf())).rejects.toMatchObject({ code: 'SIGNED_OUT' })
  })
})
