import { asc, eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { kitItemIdSchema } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import { kitInputSchema } from '#shared/domain/kit/schema.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import type { Ctx } from '#server/context.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { addKitItem } from '#server/features/kit/add-kit-item.ts'
import { listKit } from '#server/features/kit/list-kit.ts'
import { listShootKit } from '#server/features/kit/list-shoot-kit.ts'
import { removeKitItem } from '#server/features/kit/remove-kit-item.ts'
import { updateKitItem } from '#server/features/kit/update-kit-item.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

let app: TestApp
let world: World
let ctx: Ctx
let item: KitItem
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
  ctx = app.ctxOf(world.photographer)
  const [first] = (await listKit(ctx, world.studioId)).kit
  if (!first) throw new Error('the starter kit is not empty')
  item = first
})
const update = (version: number, name: string, by = ctx) =>
  updateKitItem(by, {
    studioId: world.studioId,
    kitId: item.id,
    version,
    input: kitInputSchema.parse({ ...item, name }),
  })

describe('listKit', () => {
  it('is the newest version of each item, by name', async () => {
    await update(1, 'A renamed thing')
    const { kit } = await listKit(ctx, world.studioId)
    expect(kit).toHaveLength(STARTER_KIT.length)
    expect(kit.find(({ id }) => id === item.id)).toMatchObject({ name: 'A renamed thing', version: 2 })
    expect(kit.map(({ name }) => name)).toEqual(
      kit.map(({ name }) => name).sort((a, b) => a.localeCompare(b, 'en', { numeric: true })),
    )
  })
})

describe('listShootKit', () => {
  it('is the studio’s, read by every role of the shoot', async () => {
    for (const actor of [world.photographer, world.stylist, world.client, world.crew]) {
      expect(await listShootKit(app.ctxOf(actor), world.shootId)).toEqual(await listKit(ctx, world.studioId))
    }
    await expect(listShootKit(app.ctxOf(world.studioMember), world.shootId)).rejects.toMatchObject({
      code: 'NOT_FOUND',
    })
  })
})

describe('addKitItem', () => {
  it('puts it in as version 1 and tells the studio’s shoots', async () => {
    app.documents.announced.length = 0
    const { kit } = await addKitItem(app.ctxOf(world.studioMember), {
      studioId: world.studioId,
      input: kitInputSchema.parse({ ...item, name: 'Zip ties' }),
    })
    expect(kit.at(-1)).toMatchObject({ name: 'Zip ties', version: 1 })
    expect(app.documents.announced).toEqual([
      {
        shootId: world.shootId,
        queryKeys: [
          ['shoots', world.shootId, 'kit'],
          ['studios', world.studioId, 'kit'],
        ],
      },
    ])
  })
})

describe('updateKitItem', () => {
  it('writes a new version and keeps the old one', async () => {
    await update(1, 'Once')
    await update(2, 'Twice')
    const rows = await app.db.select().from(kitItem).where(eq(kitItem.id, item.id)).orderBy(asc(kitItem.version))
    expect(rows.map(({ version, input }) => [version, input.name])).toEqual([
      [1, item.name],
      [2, 'Once'],
      [3, 'Twice'],
    ])
  })

  it('refuses an editor who saw an older version and shows the newer one', async () => {
    await update(1, 'Hers')
    await expect(update(1, 'His', app.ctxOf(world.studioMember))).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('what you typed is still here'),
      details: { item: { id: item.id, name: 'Hers', version: 2 } },
    })
    const client = await app.clientOf(world.studioMember)
    const answer = await client.send('PUT', `/api/studios/${world.studioId}/kit/${item.id}`, { ...item, version: 1 })
    expect([answer.status, answer.body]).toMatchObject([
      409,
      { error: { code: 'CONFLICT', details: { item: { name: 'Hers', version: 2 } } } },
    ])
  })

  it('lets one of two who save at the same time through', async () => {
    const both = await Promise.allSettled([update(1, 'Hers'), update(1, 'His')])
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected'])
  })

  it('does not know an item of another studio', async () => {
    const other = await makeWorld(app)
    const [theirs] = (await listKit(app.ctxOf(other.photographer), other.studioId)).kit
    const kitId = theirs?.id ?? kitItemIdSchema.parse('')
    await expect(
      updateKitItem(ctx, { studioId: world.studioId, kitId, version: 1, input: kitInputSchema.parse(item) }),
    ).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('removeKitItem', () => {
  it('takes it out of the list, keeps its versions, and is no error twice', async () => {
    const remove = () => removeKitItem(ctx, { studioId: world.studioId, kitId: item.id })
    expect((await remove()).kit.map(({ id }) => id)).not.toContain(item.id)
    await remove()
    expect(await app.db.select().from(kitItem).where(eq(kitItem.id, item.id))).toHaveLength(2)
    await expect(update(2, 'Back')).rejects.toMatchObject({
      code: 'NOT_FOUND',
      message: expect.stringContaining('taken out of the kit'),
    })
  })
})
