import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { dayIdSchema, lookIdSchema, setIdSchema, shotIdSchema, sitterIdSchema } from '#shared/ids.ts'
import { roomInputSchema } from '#shared/domain/shoots/schema.ts'
import { putItems, readAll, rootOf, upsertItem } from '#shared/realtime/collection.ts'
import { days, looks, sets, shotPlans, shots, sitters } from '#shared/realtime/documents.ts'
import { readShootPlan } from '#server/features/plan/read-shoot-plan.ts'
import { addRoom } from '#server/features/shoots/add-room.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { makeWorld } from '#tests/support/factories.ts'

let app: TestApp
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())

describe('readShootPlan', () => {
  it('joins the documents with brief, rooms and the studio’s minutes', async () => {
    const { shootId, photographer, client } = await makeWorld(app)
    const ctx = app.ctxOf(photographer)
    const { rooms } = await addRoom(ctx, { shootId, room: roomInputSchema.parse({ name: 'Net loft' }) })
    const dayId = await app.documents.read(shootId, 'plan', (doc) => [...readAll(doc, days).items.keys()][0])
    const id = crypto.randomUUID()
    await app.documents.write(shootId, 'looks', photographer.userId, (doc) => {
      putItems(doc, sitters, [{ id: sitterIdSchema.parse(id), name: 'Ada Wren' }], Math.random)
      putItems(
        doc,
        looks,
        [{ id: lookIdSchema.parse(id), sitterId: sitterIdSchema.parse(id), name: 'Harbour' }],
        Math.random,
      )
    })
    await app.documents.write(shootId, 'board', photographer.userId, (doc) => {
      putItems(
        doc,
        shots,
        [
          {
            id: shotIdSchema.parse(id),
            title: 'At the bollard',
            lookIds: [lookIdSchema.parse(id)],
            place: [dayIdSchema.parse(dayId), 'a0'],
          },
        ],
        Math.random,
      )
      rootOf(doc, shots).set(crypto.randomUUID(), 'not a shot')
    })
    await app.documents.write(shootId, 'plan', photographer.userId, (doc) => {
      putItems(doc, sets, [{ id: setIdSchema.parse(id), name: 'Window', roomId: rooms[0]?.id ?? null }], Math.random)
      upsertItem(doc, shotPlans, { id: shotIdSchema.parse(id), setId: setIdSchema.parse(id) })
    })
    const plan = await readShootPlan(app.ctxOf(client), shootId)
    expect(plan.brief.title).toBe('Salt and Linen')
    expect(plan.minutes.standMove).toBeGreaterThan(0)
    expect(plan.days).toHaveLength(1)
    expect(plan.days[0]?.shots).toMatchObject([
      {
        number: 1,
        shot: { title: 'At the bollard' },
        room: { name: 'Net loft' },
        looks: [{ sitter: { name: 'Ada Wren' } }],
        missing: ['setup'],
      },
    ])
  })

  it('is hidden from a stranger', async () => {
    const { shootId, stranger } = await makeWorld(app)
    await expect(readShootPlan(app.ctxOf(stranger), shootId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    await expect(readShootPlan(app.ctxOf(), shootId)).rejects.toMatchObject({ code: 'SIGNED_OUT' })
  })
})
