import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Room } from '#server/realtime/room.ts'
import { DEFAULT_SETTINGS } from '#server/realtime/settings.ts'
import type { UpdateLog } from '#server/realtime/update-log.ts'
import { docIdSchema } from '#shared/ids.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { openRoom } from '#tests/realtime/support/opened-room.ts'
import { type Shoot, addShoot, startWorld } from '#tests/realtime/support/world.ts'

let database: TestDatabase
let shoot: Shoot
let room: Room
let updateLog: UpdateLog
let close: () => Promise<unknown>

beforeAll(async () => {
  database = await createTestDatabase()
  const world = await startWorld({ databaseUrl: database.url })
  shoot = await addShoot(world.db, world.realtime.documents)
  const { rows } = await world.pool.query<{ id: string }>(
    "select id from rt_doc where shoot_id = $1 and kind = 'board'",
    [shoot.shootId],
  )
  ;({ room, updateLog } = await openRoom({
    pool: world.pool,
    docId: docIdSchema.parse(rows[0]?.id),
    settings: DEFAULT_SETTINGS,
  }))
  close = () => world.close()
})
afterAll(async () => {
  room.close()
  await close()
  await database.drop()
})

const change = (fn: () => void) =>
  new Promise<[string, boolean]>((resolve) => {
    let taken = ''
    const settle = (stored: boolean) => queueMicrotask(() => resolve([taken, stored]))
    taken = room.change({ userId: null, peer: null }, fn, settle)
  })

describe('a document that something went wrong in', () => {
  it('takes nothing more and calls nothing stored: Yjs may not tell of changes any more', async () => {
    const items = room.doc.getMap('items')
    expect(await change(() => items.set('before', 1))).toEqual(['taken', true])
    const trip = () => {
      throw new Error('tripped')
    }
    room.doc.once('afterTransaction', trip)
    expect(await change(() => items.set('tripped', 1))).toEqual(['broken', false])
    expect(room.isBroken).toBe(true)
    expect(await change(() => items.set('after', 1))).toEqual(['broken', false])
    expect(updateLog.stats().queuedEntries).toBe(0)
  })
})
