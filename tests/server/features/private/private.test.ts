import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { pieceIdSchema, sitterIdSchema } from '#shared/ids.ts'
import { getPrivateNote } from '#server/features/private/get-private-note.ts'
import { listPieceCosts } from '#server/features/private/list-piece-costs.ts'
import { listSizes } from '#server/features/private/list-sizes.ts'
import { setPieceCost } from '#server/features/private/set-piece-cost.ts'
import { setPrivateNote } from '#server/features/private/set-private-note.ts'
import { setSizes } from '#server/features/private/set-sizes.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

let app: TestApp
let world: World
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
})
const sitterId = sitterIdSchema.parse('0f4f0a0e-51a4-4a3c-8f0e-6f1f0b6f9d11')
const pieceId = pieceIdSchema.parse('3b0c8a52-2f0d-4b8a-9b57-1f2e3d4c5b6a')
const forbidden = { code: 'FORBIDDEN' }

describe('setSizes and listSizes', () => {
  it('are for those who plan', async () => {
    const { shootId } = world
    await setSizes(app.ctxOf(world.stylist), { shootId, sitterId, sizes: 'Coat 38', contact: '' })
    expect(
      await setSizes(app.ctxOf(world.photographer), { shootId, sitterId, sizes: 'Coat 40', contact: 'by post' }),
    ).toEqual({ sitters: [{ sitterId, sizes: 'Coat 40', contact: 'by post' }] })
    for (const actor of [world.client, world.crew]) {
      await expect(listSizes(app.ctxOf(actor), shootId)).rejects.toMatchObject(forbidden)
      await expect(setSizes(app.ctxOf(actor), { shootId, sitterId, sizes: '', contact: '' })).rejects.toMatchObject(
        forbidden,
      )
    }
    expect((await listSizes(app.ctxOf(world.stylist), shootId)).sitters).toMatchObject([{ sizes: 'Coat 40' }])
  })
})

describe('setPieceCost and listPieceCosts', () => {
  it('keep money in minor units with its currency, or none', async () => {
    const { shootId } = world
    const set = (cost: { minor: number; currency: string } | null) =>
      setPieceCost(app.ctxOf(world.stylist), { shootId, pieceId, cost, deposit: null, size: '40' })
    expect(await set({ minor: 0, currency: 'GBP' })).toEqual({
      pieces: [{ pieceId, cost: { minor: 0, currency: 'GBP' }, deposit: null, size: '40' }],
    })
    expect(await set({ minor: 999_999_999_999, currency: 'EUR' })).toMatchObject({
      pieces: [{ cost: { minor: 999_999_999_999, currency: 'EUR' } }],
    })
    expect(await set(null)).toMatchObject({ pieces: [{ cost: null }] })
    for (const actor of [world.client, world.crew])
      await expect(listPieceCosts(app.ctxOf(actor), shootId)).rejects.toMatchObject(forbidden)
  })
})

describe('setPrivateNote and getPrivateNote', () => {
  it('are the photographer’s alone', async () => {
    const { shootId } = world
    expect(await getPrivateNote(app.ctxOf(world.photographer), shootId)).toEqual({ text: '' })
    await setPrivateNote(app.ctxOf(world.photographer), { shootId, text: 'Ring first' })
    expect(await getPrivateNote(app.ctxOf(world.photographer), shootId)).toEqual({ text: 'Ring first' })
    for (const actor of [world.stylist, world.client, world.crew]) {
      await expect(getPrivateNote(app.ctxOf(actor), shootId)).rejects.toMatchObject(forbidden)
      await expect(setPrivateNote(app.ctxOf(actor), { shootId, text: '' })).rejects.toMatchObject(forbidden)
    }
  })
})
