import { EventEmitter } from 'node:events'
import { randomUUID } from 'node:crypto'
import type { Duplex } from 'node:stream'
import * as decoding from 'lib0/decoding'
import type WebSocket from 'ws'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import * as Y from 'yjs'
import { docIdSchema, shootIdSchema, userIdSchema } from '#shared/ids.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { patchItem, readAll } from '#shared/realtime/collection.ts'
import { COLLECTIONS, frames, shots } from '#shared/realtime/documents.ts'
import { MESSAGE } from '#shared/realtime/protocol.ts'
import type { LogEntry } from '#server/realtime/batch.ts'
import { Connection } from '#server/realtime/connection.ts'
import { hasPending } from '#server/realtime/guard.ts'
import { createReceiver } from '#server/realtime/inbound.ts'
import { loadDocument } from '#server/realtime/load.ts'
import { Room, type RoomOutside } from '#server/realtime/room.ts'
import { DEFAULT_SETTINGS } from '#server/realtime/settings.ts'
import { Strikes } from '#server/realtime/strikes.ts'
import { DAMAGE } from '#tests/support/damage.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { Person, randomDeeds, viewOf } from '#tests/support/order-history.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, syncFrame, until } from './support/client.ts'
import { type Shoot, type World, addSession, addShoot, startWorld } from './support/world.ts'

// Thousands of documents on a busy machine.
vi.setConfig({ testTimeout: 120_000 })

/** A board as it is after a while of work. */
const base = (() => {
  const person = new Person(1)
  randomDeeds(20_261_201, 260).forEach((deed, n) => person.do(deed, n))
  return Y.encodeStateAsUpdate(person.doc)
})()
const baseState = Y.encodeStateVector(docOf(base))

function docOf(...updates: Uint8Array[]): Y.Doc {
  const doc = new Y.Doc()
  for (const update of updates) Y.applyUpdate(doc, update)
  return doc
}

/** What somebody new to the board sends after a few deeds: shots and frames made, moved, deleted, titled, taken back. */
function goodUpdate(n: number): Uint8Array {
  const person = new Person(1000 + n, base)
  const deeds = randomDeeds(n, 40)
  const wanted = 1 + (n % 4)
  let written = 0
  for (const [i, deed] of deeds.entries()) {
    if (written < wanted && person.do(deed, 10_000 + n * 100 + i)) written++
  }
  const { looks, frames: hung } = viewOf(person.doc)
  const [shotId, frameId] = [Object.keys(looks)[n % 7], Object.keys(hung)[n % 5]]
  if (n % 3 === 0 && shotId) patchItem(person.doc, shots, shotId, { title: `Lantern, pass ${n} – Überblick` })
  if (n % 5 === 0 && frameId) patchItem(person.doc, frames, frameId, { caption: `“Held low” 🕯 ${n}` })
  return Y.encodeStateAsUpdate(person.doc, baseState)
}

/** Content of a document without roots in which nothing is. */
function seen(doc: Y.Doc): string {
  const roots: Record<string, object> = JSON.parse(contentOf(doc))
  return JSON.stringify(
    Object.entries(roots)
      .filter(([, root]) => Object.keys(root).length > 0)
      .sort(),
  )
}

/** The update in a frame of the kind step 2 or update; undefined for all others. */
function updateIn(frame: Uint8Array): Uint8Array | undefined {
  const decoder = decoding.createDecoder(frame)
  if (decoding.readVarUint(decoder) !== MESSAGE.sync || decoding.readVarUint(decoder) === 0) return undefined
  return decoding.readVarUint8Array(decoder)
}

/** A value of which the path under test uses only these parts. */
function having<T>(parts: object): T {
  return parts as T
}

class Wire extends EventEmitter {
  readonly OPEN = 1
  readonly readyState = 1
  readonly bufferedAmount = 0
  readonly sent: Uint8Array[] = []
  code: number | null = null
  /** Takes a websocket frame; what it carries is kept (RFC 6455, 5.2). */
  write(frame: Uint8Array) {
    const length = frame[1] ?? 0
    this.sent.push(frame.subarray(length < 126 ? 2 : length === 126 ? 4 : 10))
  }
  close(code: number) {
    this.code = code
  }
  pause() {}
  resume() {}
  terminate() {}
}

/** A room of the server with nobody in it but who watches, on no database and no network. */
class Bench {
  readonly entries: LogEntry[] = []
  readonly watching = new Wire()
  isEvicted = false
  readonly room: Room
  readonly #place = {
    docId: docIdSchema.parse(randomUUID()),
    shootId: shootIdSchema.parse(randomUUID()),
    kind: 'board' as const,
  }
  readonly #pool = having<RoomOutside['pool']>({ query: async () => ({ rows: [], rowCount: 0 }) })
  readonly #strikes = new Strikes(1000)
  readonly #log = { info: () => undefined, warn: () => undefined, error: () => undefined }

  constructor() {
    const loaded = { doc: docOf(base), head: 1, sizeBytes: base.length, bad: [], epoch: 1, frozen: null }
    this.room = new Room(this.#place, loaded, {
      log: having<RoomOutside['log']>({
        enqueue: (entry: LogEntry) => void this.entries.push(entry),
        queuedFor: () => 0,
      }),
      pool: this.#pool,
      settings: DEFAULT_SETTINGS,
      instances: having<RoomOutside['instances']>({ showPresence: () => undefined }),
      onBad: () => undefined,
    })
    const watcher = this.#enter(this.watching)
    watcher.isSynced = true
    this.room.peers.add(watcher)
  }

  #enter(wire: Wire): Connection {
    const person = { userId: userIdSchema.parse('u'), name: 'N', sessionId: randomUUID(), expiresAtMs: Infinity }
    return new Connection({
      ws: having<WebSocket>(wire),
      socket: having<Duplex>(wire),
      number: 1,
      person,
      place: this.#place,
      role: 'stylist',
      wantsAcks: true,
      schema: 1,
      settings: DEFAULT_SETTINGS,
      log: this.#log,
    })
  }

  /** Takes an update from somebody whose session is new, the way a frame from a socket is taken. */
  take(update: Uint8Array): 'refused' | 'gap' | 'nothing new' | 'taken' {
    const wire = new Wire()
    const connection = this.#enter(wire)
    const context = {
      pool: this.#pool,
      rooms: having<Parameters<typeof createReceiver>[0]['rooms']>({ letGo: () => void (this.isEvicted = true) }),
      strikes: this.#strikes,
      settings: DEFAULT_SETTINGS,
      log: this.#log,
    }
    createReceiver(context, connection, this.room)(syncFrame(2, update))
    const [entry] = this.entries
    if (entry) return entry.update ? 'taken' : 'nothing new'
    return wire.code === null ? 'gap' : 'refused'
  }

  close(): void {
    this.room.close()
  }
}

const CASES = 1500
const goods = Array.from({ length: 200 }, (_, n) => goodUpdate(n))

/**
 * How many of the 1,500 must at least not be taken, well below what was counted with these seeds and yjs 13.6.33 (1,500,
 * 1,500, 566, 886, 1,408): what is left decodes as a valid edit. Poison is taken and encodes to something else than it
 * reads as, which only the check of a compaction can find; 0 were counted.
 */
const LEFT_OUT_AT_LEAST: Record<string, number> = {
  'random bytes': 1500,
  truncated: 1500,
  'one bit flipped': 450,
  'one byte replaced': 750,
  'bytes inserted': 1300,
}
const POISON_AT_MOST = 1

describe('a damaged update in a room', () => {
  it.each(Object.entries(DAMAGE))(`is left out or taken whole, ${CASES} times: %s`, (name, damage) => {
    const tally = { refused: 0, gap: 0, 'nothing new': 0, taken: 0, poison: 0 }
    let bench = new Bench()
    let before = Y.encodeStateAsUpdate(bench.room.doc)
    for (let i = 0; i < CASES; i++) {
      const bad = damage(goods[i % goods.length] ?? base, seededRandom(1000 + i))
      const outcome = bench.take(bad)
      tally[outcome]++
      const { room, watching, entries } = bench
      const demand = (isSo: boolean, otherwise: string) => {
        if (!isSo) throw new Error(`case ${i}, ${outcome}: ${otherwise}`)
      }
      demand(!hasPending(room.doc), 'something waits in the document')
      demand(!bench.isEvicted && !room.isBroken, 'it broke the document')
      const told = watching.sent.flatMap((frame) => updateIn(frame) ?? [])
      if (outcome !== 'taken') {
        demand(Buffer.compare(before, Y.encodeStateAsUpdate(room.doc)) === 0, 'it changed the document')
        demand(told.length === 0, 'peers were told')
        if (outcome === 'nothing new') entries.length = 0
        continue
      }
      // Whole: what Yjs alone makes of the same bytes, with nothing left over.
      const alone = docOf(base, bad)
      demand(!hasPending(alone), 'some of it was left out')
      demand(seen(room.doc) === seen(alone), 'it was not taken whole')
      for (const c of Object.values(COLLECTIONS.board)) readAll(room.doc, c)
      if (seen(docOf(Y.encodeStateAsUpdate(room.doc))) !== seen(room.doc)) tally.poison++
      else {
        demand(seen(docOf(base, ...told)) === seen(room.doc), 'peers have something else')
        const logged = entries.flatMap(({ update }) => update ?? [])
        demand(seen(docOf(base, ...logged)) === seen(room.doc), 'the log has something else')
      }
      bench.close()
      bench = new Bench()
      before = Y.encodeStateAsUpdate(bench.room.doc)
    }
    bench.close()
    expect(tally.refused + tally.gap).toBeGreaterThanOrEqual(LEFT_OUT_AT_LEAST[name] ?? CASES)
    expect(tally.poison).toBeLessThanOrEqual(POISON_AT_MOST)
  })
})

describe('a damaged update over a socket', () => {
  let database: TestDatabase
  let world: World
  let shoot: Shoot
  beforeAll(async () => {
    database = await createTestDatabase()
    world = await startWorld({ databaseUrl: database.url })
    shoot = await addShoot(world.db, world.realtime.documents)
  })
  afterAll(async () => {
    await world.close()
    await database.drop()
  })

  function open(sessionId: string): Promise<TestClient> {
    return new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
  }

  const EACH = 60

  it(`reaches peers and log only when it is taken: ${EACH} of each kind, each of a session of its own`, async () => {
    const watcher = await open(shoot.people.photographer.sessionId)
    const heard = new Set<string>()
    watcher.ws.on('message', (data: Buffer) => {
      const update = updateIn(Uint8Array.from(data))
      if (update) heard.add(Buffer.from(update).toString('hex'))
    })
    Y.applyUpdate(watcher.doc, base)
    await until(() => watcher.saved === watcher.sent)
    const wanted = docOf(base)
    const leftOut: Uint8Array[] = []
    let refused = 0
    let n = 0
    for (const damage of Object.values(DAMAGE)) {
      for (let i = 0; i < EACH; i++) {
        const bad = damage(goodUpdate(2000 + n), seededRandom(7000 + n++))
        const sessionId = randomUUID()
        await addSession(world.db, shoot.people.client.userId, sessionId)
        const client = await open(sessionId)
        const lines = world.lines.length
        client.sendUpdate(bad)
        await until(() => client.endCode !== null || client.saved === client.sent)
        const isGap = world.lines.slice(lines).some(({ message }) => message === 'update with a gap')
        if (client.endCode === null && !isGap) Y.applyUpdate(wanted, bad)
        else leftOut.push(bad)
        if (client.endCode !== null) {
          expect([client.endCode, client.refusals]).toEqual([1003, [{ n: client.sent, reason: 'invalid' }]])
          refused++
        }
        client.close()
      }
    }
    expect(hasPending(wanted)).toBe(false)
    await until(() => seen(watcher.doc) === seen(wanted))
    for (const bad of leftOut) expect(heard.has(Buffer.from(bad).toString('hex'))).toBe(false)
    const late = await open(shoot.people.stylist.sessionId)
    expect([seen(late.doc), hasPending(late.doc)]).toEqual([seen(wanted), false])
    late.close()
    watcher.close()

    const docs = await world.pool.query<{ id: string }>('select id from rt_doc where shoot_id = $1 and kind = $2', [
      shoot.shootId,
      'board',
    ])
    const docId = docIdSchema.parse(docs.rows[0]?.id)
    const loaded = await loadDocument(world.pool, docId)
    expect(loaded?.bad).toEqual([])
    expect(seen(loaded?.doc ?? new Y.Doc())).toBe(seen(wanted))
    // The rows by themselves, without anything of the server's that would forgive them.
    const rows = await world.pool.query<{ update: Buffer }>(
      'select update from rt_update where doc_id = $1 order by seq',
      [docId],
    )
    const plain = docOf(...rows.rows.map(({ update }) => Uint8Array.from(update)))
    expect([seen(plain), hasPending(plain)]).toEqual([seen(wanted), false])
    const kept = () => world.pool.query('select from rt_quarantine where doc_id = $1', [docId])
    await until(async () => (await kept()).rowCount === refused)
    expect(world.lines.filter(({ level }) => level === 'error')).toEqual([])
  })
})
