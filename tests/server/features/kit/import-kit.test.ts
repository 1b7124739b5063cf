import { asc, eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { kitItemIdSchema } from '#shared/ids.ts'
import {
  IMPORT_ROWS_MAX,
  KIT_ITEMS_MAX,
  type KitImportRow,
  type KitItem,
  kitImportRowSchema,
  kitListSchema,
} from '#shared/api/kit.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import type { Ctx } from '#server/context.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { addKitItem } from '#server/features/kit/add-kit-item.ts'
import { importKit } from '#server/features/kit/import-kit.ts'
import { listKit } from '#server/features/kit/list-kit.ts'
import { removeKitItem } from '#server/features/kit/remove-kit-item.ts'
import { updateKitItem } from '#server/features/kit/update-kit-item.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'
import { id } from '#tests/support/lighting-sample.ts'

let app: TestApp
let world: World
let ctx: Ctx
let kit: KitItem[]
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
  ctx = app.ctxOf(world.photographer)
  kit = (await listKit(ctx, world.studioId)).kit
})

const gel = STARTER_KIT.find(({ body }) => body.kind === 'gel')
const unit = STARTER_KIT[0]
const fresh = (n: number, name: string, input: unknown = { ...gel, name }): KitImportRow =>
  kitImportRowSchema.parse({ id: id(n), version: null, input })
const changed = (item: KitItem | undefined, name: string): KitImportRow =>
  kitImportRowSchema.parse({ id: item?.id, version: item?.version, input: { ...item, name } })
const send = (rows: readonly KitImportRow[], by = ctx) => importKit(by, { studioId: world.studioId, rows })

describe('importKit', () => {
  it('writes new items and new versions, and tells the studio’s shoots once', async () => {
    app.documents.announced.length = 0
    const after = (await send([fresh(1, 'A new gel'), changed(kit[3], 'Another name')])).kit
    expect(after).toHaveLength(kit.length + 1)
    expect(after.find(({ name }) => name === 'A new gel')).toMatchObject({ version: 1 })
    expect(after.find(({ id: itemId }) => itemId === kit[3]?.id)).toMatchObject({ name: 'Another name', version: 2 })
    expect(app.documents.announced).toHaveLength(1)
    const rows = await app.db
      .select()
      .from(kitItem)
      .where(eq(kitItem.id, kitItemIdSchema.parse(kit[3]?.id)))
      .orderBy(asc(kitItem.version))
    expect(rows.map(({ input }) => input.name)).toEqual([kit[3]?.name, 'Another name'])
  })

  it('gives a new item an id of its own and takes meter readings of the file along', async () => {
    const octa = kit.find(({ body }) => body.kind === 'modifier')
    const entry = { modifierKitId: id(1), zoomMm: null, guideNumberM: 20, source: 'f/5 at 4 m' }
    const measured = {
      ...unit,
      name: 'Measured',
      body: { kind: 'unit', numbers: { ...unit?.body.numbers, metered: [entry] } },
    }
    const after = (await send([fresh(2, 'Measured', measured), fresh(1, 'An octa', { ...octa, name: 'An octa' })])).kit
    const newOcta = after.find(({ name }) => name === 'An octa')
    expect(newOcta?.id).not.toBe(id(1))
    const newUnit = after.find(({ name }) => name === 'Measured')
    expect(newUnit?.body.kind === 'unit' && newUnit.body.numbers.metered).toEqual([
      { ...entry, modifierKitId: newOcta?.id },
    ])
  })

  it('writes nothing when one of the items was changed or taken out meanwhile', async () => {
    const [first, second] = kit
    if (!first || !second) throw new Error('the starter kit is not empty')
    await updateKitItem(ctx, {
      studioId: world.studioId,
      kitId: first.id,
      version: 1,
      input: changed(first, 'Hers').input,
    })
    const refused = { code: 'CONFLICT', message: expect.stringContaining('Nothing was written') }
    await expect(send([fresh(1, 'New'), changed(first, 'His')])).rejects.toMatchObject(refused)
    await removeKitItem(ctx, { studioId: world.studioId, kitId: second.id })
    await expect(send([fresh(1, 'New'), changed(second, 'His')])).rejects.toMatchObject(refused)
    expect((await listKit(ctx, world.studioId)).kit.some(({ name }) => name === 'New' || name === 'His')).toBe(false)
  })

  it('does not know an item of another studio, and takes no item twice', async () => {
    const other = await makeWorld(app)
    const [theirs] = (await listKit(app.ctxOf(other.photographer), other.studioId)).kit
    await expect(send([changed(theirs, 'Mine now')])).rejects.toMatchObject({ code: 'CONFLICT' })
    await expect(send([changed(kit[0], 'Once'), changed(kit[0], 'Twice')])).rejects.toMatchObject({
      code: 'BAD_REQUEST',
    })
  })

  it('fills a kit room and then says that it is full', async () => {
    await send(Array.from({ length: KIT_ITEMS_MAX - kit.length }, (_, index) => fresh(index + 1, `Gel ${index}`)))
    const full = { code: 'CONFLICT', message: expect.stringContaining('holds 5000 items') }
    await expect(send([fresh(1, 'One more')])).rejects.toMatchObject(full)
    const { input } = fresh(1, 'One more')
    await expect(addKitItem(ctx, { studioId: world.studioId, input })).rejects.toMatchObject(full)
    const { kit: stored } = await send([changed(kit[3], 'Another name')])
    expect(stored).toHaveLength(KIT_ITEMS_MAX)
  })

  it('is for people of the studio', async () => {
    const rows = [fresh(1, 'Theirs')]
    expect((await send(rows, app.ctxOf(world.studioMember))).kit).toHaveLength(kit.length + 1)
    for (const actor of [world.stylist, world.client, world.crew, world.stranger])
      await expect(send(rows, app.ctxOf(actor))).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })

  it('takes two thousand rows over HTTP in one request, and refuses one more or a bad one by its path', async () => {
    const client = await app.clientOf(world.photographer)
    const path = `/api/studios/${world.studioId}/kit/import`
    const rows = Array.from({ length: IMPORT_ROWS_MAX }, (_, index) =>
      fresh(index + 1, `Unit ${index}`, { ...unit, name: `Unit ${index}` }),
    )
    // More than the megabyte that other requests may send.
    expect(JSON.stringify({ rows }).length).toBeGreaterThan(1_100_000)
    const answer = await client.send('POST', path, { rows })
    expect([answer.status, kitListSchema.parse(answer.body).kit.length]).toEqual([200, kit.length + IMPORT_ROWS_MAX])
    const more = await client.send('POST', path, { rows: [...rows, fresh(9000, 'One more')] })
    expect(more.status).toBe(400)
    const none = {
      ...unit,
      body: { kind: 'unit', numbers: { ...unit?.body.numbers, guideNumberM: { value: 0, from: 'assumed' } } },
    }
    const bad = await client.send('POST', path, { rows: [{ id: id(1), version: null, input: none }] })
    expect([bad.status, bad.body]).toMatchObject([
      400,
      { error: { issues: [{ path: 'rows.0.input.body.numbers.guideNumberM.value' }] } },
    ])
  })
})
