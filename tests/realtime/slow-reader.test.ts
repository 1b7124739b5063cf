import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { CLOSE } from '#shared/realtime/protocol.ts'
import type { RealtimeSettings } from '#server/realtime/settings.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, pause, until } from './support/client.ts'
import { type Shoot, type World, addShoot, startWorld } from './support/world.ts'

const VALUE = 'x'.repeat(64 * 1024)
const EDITS = 400
const ASKS = 2_000

let database: TestDatabase
let shoot: Shoot

beforeAll(async () => {
  database = await createTestDatabase()
  const world = await startWorld({ databaseUrl: database.url })
  shoot = await addShoot(world.db, world.realtime.documents)
  await world.close()
})
afterAll(() => database.drop())

const startFast = (limits: Partial<RealtimeSettings> = {}) =>
  startWorld({ databaseUrl: database.url, limits: { bytesPerSecond: 1e9, burstBytes: 1e9, mergeMs: 1, ...limits } })

function open(world: World, role: keyof Shoot['people']) {
  const { sessionId } = shoot.people[role]
  return new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'board', sessionId })
}

/** Writes much more than a socket holds over one key. */
async function overwrite(writer: TestClient, edits = EDITS): Promise<void> {
  for (let n = 0; n < edits; n++) {
    writer.items.set('k', `${n} ${VALUE}`)
    if (n % 10 === 9) await until(() => writer.saved === writer.sent)
  }
}

describe('a reader that stops reading', () => {
  it('is kept, holds nobody up, and has everything with a fraction of the bytes when it reads again', async () => {
    const world = await startFast()
    const [writer, slow] = [await open(world, 'photographer').ready(), await open(world, 'stylist').ready()]
    let bytes = 0
    slow.ws.on('message', (data: Buffer) => (bytes += data.length))
    slow.ws.pause()
    await overwrite(writer)
    expect(world.realtime.stats().lagging).toBe(1)
    writer.show(5, 1, { at: 'board' })
    await pause(100)
    slow.ws.resume()
    await until(() => contentOf(slow.doc) === contentOf(writer.doc))
    await until(() => world.realtime.stats().lagging === 0 && slow.presence.has(5))
    // What both sockets' buffers in the system held beforehand, and one update; not what was written.
    expect(bytes).toBeLessThan((EDITS * VALUE.length) / 2)
    writer.items.set('after', 1)
    await until(() => slow.items.get('after') === 1)
    expect(slow.endCode).toBe(null)
    await world.close()
  })

  it('is let go of after a while, and finds everything when it returns', async () => {
    const world = await startFast({ lagMs: 300, slowestBytesPerSecond: 1e9 })
    const [writer, slow] = [await open(world, 'photographer').ready(), await open(world, 'stylist').ready()]
    slow.ws.pause()
    await overwrite(writer)
    await until(() => world.realtime.stats().connections === 1)
    expect(world.lines.some(({ details }) => 'code' in details && details.code === CLOSE.tryAgain)).toBe(true)
    const again = await open(world, 'stylist').ready()
    expect(contentOf(again.doc)).toBe(contentOf(writer.doc))
    await world.close()
  })

  it('gets no more answers for asking more often', async () => {
    const world = await startFast({ messagesPerSecond: 1e6 })
    const writer = await open(world, 'photographer').ready()
    await overwrite(writer, 20)
    const asking = new TestClient({
      url: world.url,
      shootId: shoot.shootId,
      kind: 'board',
      sessionId: shoot.people.client.sessionId,
      asks: false,
    })
    await until(() => asking.hello !== null)
    let bytes = 0
    asking.ws.on('message', (data: Buffer) => (bytes += data.length))
    asking.ws.pause()
    for (let i = 0; i < ASKS; i++) asking.ask()
    await until(() => world.realtime.stats().lagging === 1)
    asking.ws.resume()
    await until(() => contentOf(asking.doc) === contentOf(writer.doc) && world.realtime.stats().lagging === 0)
    expect(bytes).toBeLessThan((ASKS * VALUE.length) / 4)
    expect(asking.endCode).toBe(null)
    await world.close()
  })
})
