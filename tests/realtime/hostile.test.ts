import { randomBytes } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import WebSocket from 'ws'
import * as Y from 'yjs'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, pause, presenceMessage, syncFrame, until } from './support/client.ts'
import { ORIGIN, type Shoot, type World, addShoot, startWorld } from './support/world.ts'

let database: TestDatabase
let world: World
let shoot: Shoot
let good: TestClient

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url })
})
beforeEach(async () => {
  shoot = await addShoot(world.db, world.realtime.documents)
  good = await open('photographer').ready()
  good.items.set('a', 1)
  await until(() => good.saved === good.sent)
})
afterAll(async () => {
  await world.close()
  await database.drop()
})

function open(role: keyof Shoot['people'], more: Partial<ConstructorParameters<typeof TestClient>[0]> = {}) {
  const { sessionId } = shoot.people[role]
  return new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'board', sessionId, ...more })
}

/** The others are connected, can write, and a newcomer sees what they see. */
async function othersAreFine(): Promise<void> {
  good.items.set('b', Math.random())
  await until(() => good.saved === good.sent)
  const late = await open('stylist').ready()
  expect(contentOf(late.doc)).toBe(contentOf(good.doc))
  late.close()
  good.close()
}

describe('frames that are none', () => {
  it.each<[string, Uint8Array | string]>([
    ['nothing', new Uint8Array(0)],
    ['noise', Uint8Array.from(randomBytes(64), (byte, i) => (i === 0 ? 0 : byte | 128))],
    ['a number without end', Uint8Array.of(255, 255, 255, 255, 255, 255, 255, 255, 255, 127)],
    ['a type alone', Uint8Array.of(0)],
    ['an update without length', Uint8Array.of(0, 2)],
    ['a length beyond the frame', Uint8Array.of(0, 2, 255, 255, 255, 255, 15)],
    ['a sync message of no kind', Uint8Array.of(0, 9, 1, 1)],
    ['a step 1 that decodes to nothing', syncFrame(0, Uint8Array.of(200, 1, 1))],
    ['text', 'hello'],
  ])('closes 1003 for %s', async (_, frame) => {
    const bad = await open('client').ready()
    bad.send(frame)
    expect(await bad.ended).toBe(1003)
    await othersAreFine()
  })

  it('ignores types it does not know, the ones only a server says among them', async () => {
    const bad = await open('client').ready()
    for (const type of [2, 77, 100, 101, 102, 103]) bad.send(Uint8Array.of(type, 1, 0))
    bad.items.set('c', 1)
    await until(() => bad.saved === bad.sent)
    expect(bad.endCode).toBe(null)
    bad.close()
    await othersAreFine()
  })

  it('closes 1009 for more than 4 MiB', async () => {
    const bad = await open('client').ready()
    bad.send(new Uint8Array(4 * 1024 * 1024 + 1))
    expect(await bad.ended).toBe(1009)
    await othersAreFine()
  })
})

describe('updates that do not decode', () => {
  it('are refused, kept in quarantine, never shown or stored, and shut a session out at the third', async () => {
    const update = Y.encodeStateAsUpdate(good.doc)
    const cut = update.slice(0, update.length - 3)
    const codes: number[] = []
    for (let time = 0; time < 4; time++) {
      const bad = await open('client').ready()
      bad.sendUpdate(cut)
      codes.push(await bad.ended)
      expect(bad.refusals).toEqual([{ n: bad.sent, reason: 'invalid' }])
    }
    expect(codes).toEqual([1003, 1003, CLOSE.abuse, CLOSE.abuse])
    const { rows } = await world.pool.query<{ update: Buffer; user_id: string }>(
      `select q.update, q.user_id from rt_quarantine q join rt_doc d on d.id = q.doc_id where d.shoot_id = $1`,
      [shoot.shootId],
    )
    expect(rows).toHaveLength(3)
    expect(rows.every((row) => row.update.equals(cut) && row.user_id === shoot.people.client.userId)).toBe(true)
    await othersAreFine()
  })

  it('cannot read on beyond their own end', async () => {
    const bad = await open('client').ready()
    // An update whose text claims 60 characters and brings 2; the frame goes on with what must not be read.
    const doc = new Y.Doc()
    doc.getText('t').insert(0, 'x'.repeat(60))
    const whole = Y.encodeStateAsUpdate(doc)
    const cut = whole.slice(0, whole.length - 59)
    const frame = syncFrame(2, cut)
    bad.sent++
    bad.send(Uint8Array.from([...frame, ...Buffer.from('SECRET'.repeat(20))]))
    expect(await bad.ended).toBe(1003)
    expect(contentOf(good.doc)).not.toContain('SECRET')
    await othersAreFine()
  })

  it('are refused when they are larger than an update may be', async () => {
    const bad = await open('client').ready()
    bad.items.set('big', 'x'.repeat(1024 * 1024 + 1))
    await until(() => bad.refusals.length === 1)
    expect(bad.refusals[0]?.reason).toBe('too-large')
    expect(good.items.has('big')).toBe(false)
    bad.close()
    await othersAreFine()
  })
})

describe('updates with a gap', () => {
  it('stay out of the document and unacknowledged until a step 2 brings what was missing', async () => {
    const client = await open('client').ready()
    const updates: Uint8Array[] = []
    client.isSilent = true
    client.doc.on('update', (update: Uint8Array) => updates.push(update))
    client.items.set('x', 1)
    client.items.set('y', 2)
    client.isSilent = false
    const before = client.saved
    client.answers = false
    client.sendUpdate(updates[1] ?? new Uint8Array())
    // What fits is taken meanwhile, and yet not acknowledged: that would cover the one before it.
    const apart = new Y.Doc()
    apart.getMap('items').set('z', 3)
    client.sendUpdate(Y.encodeStateAsUpdate(apart))
    await until(() => good.items.get('z') === 3)
    await pause(200)
    expect(client.saved).toBe(before)
    expect(good.items.has('y')).toBe(false)
    // The client's answer to the server's question holds all of it.
    client.answers = true
    client.ask()
    await until(() => client.saved === client.sent)
    await until(() => good.items.get('x') === 1 && good.items.get('y') === 2)
    client.close()
    await othersAreFine()
  })

  it('are taken without the part that nobody can fill', async () => {
    // A client that itself waits for something: its step 2 carries the gap again and again.
    const ghost = new Y.Doc()
    const ghosts: Uint8Array[] = []
    ghost.on('update', (update: Uint8Array) => ghosts.push(update))
    ghost.getMap('items').set('g1', 1)
    ghost.getMap('items').set('g2', 2)
    const client = await open('client').ready()
    Y.applyUpdate(client.doc, ghosts[1] ?? new Uint8Array(), client)
    client.items.set('own', 3)
    client.send(syncFrame(1, Y.encodeStateAsUpdate(client.doc)))
    client.sent++
    await until(() => client.saved === client.sent && good.items.get('own') === 3)
    const late = await open('stylist').ready()
    expect(late.doc.store.pendingStructs).toBe(null)
    expect(late.items.has('g2')).toBe(false)
    late.close()
    client.close()
    await othersAreFine()
  })
})

describe('presence', () => {
  const stamp = (role: keyof Shoot['people']) => ({
    id: shoot.people[role].userId,
    name: shoot.people[role].name,
    role,
  })

  it('carries who it is from the session, whatever the client says', async () => {
    const client = await open('client').ready()
    client.show(7, 1, { user: { id: 'x', name: 'Somebody else', role: 'photographer' }, pointer: [1, 2] })
    await until(() => good.presence.has(7))
    expect(good.presence.get(7)).toMatchObject({ user: { ...stamp('client'), initials: 'JW' }, pointer: [1, 2] })
    client.close()
    await until(() => !good.presence.has(7))
    await othersAreFine()
  })

  it('is of one id for each connection: nobody speaks for, or removes, another', async () => {
    good.show(1, 1, { pointer: [0, 0] })
    const client = await open('client').ready()
    await until(() => client.presence.has(1))
    client.show(1, 99, { pointer: [66, 66] })
    client.show(1, 100, null)
    client.show(2, 1, { pointer: [5, 5] })
    client.show(3, 1, { pointer: [6, 6] })
    client.send(presenceMessage(Array.from({ length: 2000 }, (_, i) => ({ clientId: 100 + i, clock: 1, state: {} }))))
    await until(() => good.presence.has(2))
    const late = await open('stylist').ready()
    await until(() => late.presence.size === 2)
    expect(late.presence.get(1)).toMatchObject({ user: stamp('photographer'), pointer: [0, 0] })
    expect(late.presence.get(2)).toMatchObject({ user: stamp('client'), pointer: [5, 5] })
    expect([...good.presence.keys()]).toEqual([2])
    late.close()
    client.close()
    await othersAreFine()
  })

  it('is no larger than 2 KiB and leaves readers theirs', async () => {
    const reader = await open('crew').ready()
    reader.show(5, 1, { note: 'x'.repeat(3000) })
    reader.show(5, 2, { at: 'board' })
    await until(() => good.presence.has(5))
    expect(good.presence.get(5)).toMatchObject({ at: 'board', user: stamp('crew') })
    reader.close()
    await othersAreFine()
  })

  it('that is not taken takes no id over: nobody is left behind when all have gone', async () => {
    const client = await open('client').ready()
    const again = await open('client').ready()
    client.show(9, 1, { at: 'board' })
    await until(() => good.presence.has(9))
    again.show(9, 2, ['not a presence'])
    again.show(9, 3, { note: 'x'.repeat(3000) })
    again.close()
    await again.ended
    client.close()
    await until(() => !good.presence.has(9))
    await othersAreFine()
  })

  it('reaches peers at most 20 times a second, the latest last', async () => {
    const client = await open('client').ready()
    const before = good.types.filter((type) => type === 1).length
    for (let i = 1; i <= 60; i++) {
      client.show(8, i, { pointer: [i, i] })
      await pause(5)
    }
    await until(() => JSON.stringify(good.presence.get(8) ?? {}).includes('[60,60]'))
    expect(good.types.filter((type) => type === 1).length - before).toBeLessThanOrEqual(14)
    client.close()
    await othersAreFine()
  })

  it('of nobody keeps a silent connection alive', async () => {
    const lively = await startWorld({ databaseUrl: database.url, limits: { keepAliveMs: 30 } })
    const { sessionId } = shoot.people.crew
    const reader = await new TestClient({ url: lively.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    const before = reader.types.length
    await until(() => reader.types.length >= before + 2)
    reader.close()
    await lively.close()
  })
})

describe('a client that takes too much', () => {
  it('is read more slowly, not dropped, when it sends faster than allowed', async () => {
    const slow = await startWorld({ databaseUrl: database.url, limits: { messagesPerSecond: 20 } })
    const { sessionId } = shoot.people.client
    const client = await new TestClient({ url: slow.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    const startMs = performance.now()
    for (let i = 0; i < 80; i++) {
      client.items.set('n', i)
      await pause(1)
    }
    await until(() => client.saved === client.sent)
    expect(performance.now() - startMs).toBeGreaterThan(1_000)
    expect(client.endCode).toBe(null)
    client.close()
    await slow.close()
  })

  it('is held up alone by what it packs into one packet', async () => {
    const slow = await startWorld({ databaseUrl: database.url, limits: { messagesPerSecond: 50 } })
    const { sessionId } = shoot.people.client
    const client = await new TestClient({ url: slow.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    let answers = 0
    client.ws.on('message', (data: Buffer) => (answers += data[0] === 0 && data[1] === 0 ? 1 : 0))
    const startMs = performance.now()
    client.answers = false
    // Written at once, so that the server reads many of them together.
    client.ws.pause()
    for (let i = 0; i < 300; i++) client.ask()
    client.ws.resume()
    client.items.set('last', 1)
    await until(() => client.saved === client.sent)
    // 100 may be sent at once, the other 200 take four seconds at 50 a second.
    expect(performance.now() - startMs).toBeGreaterThan(3_000)
    expect(answers).toBe(300)
    expect(client.endCode).toBe(null)
    client.close()
    await slow.close()
  })

  it('may make a full document smaller', async () => {
    const tight = await startWorld({ databaseUrl: database.url, limits: { stateBytes: 20_000 } })
    const { sessionId } = shoot.people.photographer
    const client = await new TestClient({ url: tight.url, shootId: shoot.shootId, kind: 'looks', sessionId }).ready()
    client.items.set('large', 'x'.repeat(19_000))
    await until(() => client.saved === client.sent)
    client.items.delete('large')
    client.items.set('small', 'y'.repeat(500))
    await until(() => client.saved === client.sent)
    expect(client.refusals).toEqual([])
    client.close()
    await tight.close()
  })

  it('is refused when the document is full or grows too fast', async () => {
    const tight = await startWorld({ databaseUrl: database.url, limits: { stateBytes: 20_000, structsPerMinute: 50 } })
    const at = { url: tight.url, shootId: shoot.shootId, kind: 'board' }
    const first = await new TestClient({ ...at, sessionId: shoot.people.client.sessionId }).ready()
    first.items.set('text', 'x'.repeat(30_000))
    await until(() => first.refusals.length > 0)
    expect(first.refusals[0]?.reason).toBe('full')
    first.close()
    const second = await new TestClient({ ...at, sessionId: shoot.people.stylist.sessionId }).ready()
    second.doc.transact(() => {
      for (let i = 0; i < 60; i++) second.items.set(`k${i}`, i)
    })
    await until(() => second.refusals.length > 0)
    expect(second.refusals[0]?.reason).toBe('full')
    second.close()
    await tight.close()
    await othersAreFine()
  })

  it('gets no socket at paths that are not ours, and others may have them', async () => {
    const taken: string[] = []
    world.server.on('upgrade', (request, socket) => {
      if (request.url?.startsWith('/rt/')) return
      taken.push(request.url ?? '')
      socket.destroy()
    })
    const ws = new WebSocket(`${world.url}/somewhere`, { headers: { origin: ORIGIN } })
    ws.on('error', () => undefined)
    await until(() => taken.length === 1)
    expect(taken).toEqual(['/somewhere'])
    await othersAreFine()
  })
})

describe('the log of the program', () => {
  it('names every refusal and no person or content', () => {
    const text = JSON.stringify(world.lines)
    expect(world.lines.some((line) => line.message === 'update refused')).toBe(true)
    for (const name of ['Maren', 'Ines', 'Jonas', 'Tam', 'example.com', 'SECRET']) expect(text).not.toContain(name)
  })
})
