import { readFileSync } from 'node:fs'
import { sql } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { kitItemIdSchema } from '#shared/ids.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { listKit } from '#server/features/kit/list-kit.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { makeWorld } from '#tests/support/factories.ts'
import { id } from '#tests/support/lighting-sample.ts'

// Panels were modifiers of the shape "panel"; 0002_kit_panels makes them a kind of their own.

let app: TestApp
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())

const MIGRATION = readFileSync(new URL('../../../../drizzle/0002_kit_panels.sql', import.meta.url), 'utf8')
const stated = (value: number) => ({ value, from: 'assumed', source: 'old' })
const oldPanel = (name: string, widthM: number, heightM: number) => ({
  name,
  quantity: 2,
  note: 'in the van',
  body: {
    kind: 'modifier',
    numbers: { shape: 'panel', widthM, heightM, lossStops: stated(0), beamDeg: null, massKg: stated(1.5) },
  },
})

describe('0002_kit_panels', () => {
  it('makes old panels panels, black ones flags, keeps the rest and can run twice', async () => {
    const world = await makeWorld(app)
    const ctx = app.ctxOf(world.photographer)
    const before = (await listKit(ctx, world.studioId)).kit
    const old = [oldPanel('White panel', 1, 1.5), oldPanel('Big black cloth', 1, 2), oldPanel('Silver sheet', 0, 20)]
    for (const [index, input] of old.entries()) {
      await app.db.insert(kitItem).values({
        id: kitItemIdSchema.parse(id(index + 1)),
        version: 1,
        studioId: world.studioId,
        // Its type is that of today; the row is of yesterday.
        input: sql`${JSON.stringify(input)}::jsonb`,
        createdBy: world.photographer.userId,
        createdAt: ctx.now(),
      })
    }
    await expect(listKit(ctx, world.studioId)).rejects.toThrow()
    await app.db.execute(sql.raw(MIGRATION))
    const { kit } = await listKit(ctx, world.studioId)
    const one = (n: number) => kit.find((item) => item.id === id(n))
    expect(one(1)).toEqual({
      id: id(1),
      version: 1,
      name: 'White panel',
      quantity: 2,
      note: 'in the van',
      body: {
        kind: 'panel',
        numbers: { use: 'panel', widthM: 1, heightM: 1.5, colour: '#ffffff', massKg: stated(1.5) },
      },
    })
    expect(one(2)?.body).toMatchObject({ kind: 'panel', numbers: { use: 'flag', colour: '#1f1c1a' } })
    expect(one(3)?.body).toMatchObject({ numbers: { use: 'panel', colour: '#d9dbde', widthM: 0.01, heightM: 10 } })
    expect(kit.filter((item) => ![1, 2, 3].some((n) => item.id === id(n)))).toEqual(before)
    await app.db.execute(sql.raw(MIGRATION))
    expect((await listKit(ctx, world.studioId)).kit).toEqual(kit)
  })
})
