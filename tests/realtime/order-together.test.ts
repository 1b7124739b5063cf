import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { rtDoc } from '#server/db/schema/realtime.ts'
import { loadDocument } from '#server/realtime/load.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { Person, demandOneOrder, randomDeeds, viewOf } from '#tests/support/order-history.ts'
import type { TestDatabase } from '#tests/support/template.ts'
import { TestClient, contentOf, until } from './support/client.ts'
import { type Shoot, type World, addShoot, startWorld } from './support/world.ts'

let database: TestDatabase
let world: World

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url, limits: { messagesPerSecond: 100_000 } })
})
afterAll(async () => {
  await world.close()
  await database.drop()
})

const ROLES = ['photographer', 'stylist', 'client'] as const

/** Somebody with their board and a way to the server, when there is one. */
class Seat {
  person: Person
  #client: TestClient | null = null
  readonly #shoot: Shoot
  readonly #role: (typeof ROLES)[number]

  constructor(shoot: Shoot, role: (typeof ROLES)[number], clientId: number) {
    this.#shoot = shoot
    this.#role = role
    this.person = new Person(clientId)
  }

  connect(): void {
    if (this.#client) return
    const { sessionId } = this.#shoot.people[this.#role]
    const at = { url: world.url, shootId: this.#shoot.shootId, kind: 'board', sessionId }
    this.#client = new TestClient({ ...at, doc: this.person.doc })
  }

  /** The way is gone without a goodbye; the page goes on. */
  lose(): void {
    this.#client?.vanish()
    this.#client = null
  }

  /** The page is gone in the middle of what it did, and opened anew with what the device has kept. */
  dieAndReturn(clientId: number): void {
    this.lose()
    this.person = new Person(clientId, Y.encodeStateAsUpdate(this.person.doc))
    this.connect()
  }

  async saved(): Promise<void> {
    await this.#client?.ready()
  }
}

describe('a board that three people order through the server', () => {
  it.each([1, 2, 3])(
    'is in one order for all of them, for who comes later and in the log, one of them killed: history %i',
    async (seed) => {
      const shoot = await addShoot(world.db, world.realtime.documents)
      const seats = ROLES.map((role, i) => new Seat(shoot, role, 100 + i))
      for (const seat of seats) seat.connect()
      for (const [n, deed] of randomDeeds(5000 + seed, 240).entries()) {
        const seat = seats[deed.who]
        if (!seat) continue
        if (n === 120) seat.dieAndReturn(200)
        if (deed.kind === 'leave') seat.lose()
        else if (deed.kind === 'return') seat.connect()
        else if (deed.kind === 'exchange') await seat.saved()
        else seat.person.do(deed, n)
        // Lets what is on its way in.
        if (deed.one < 0.5) await new Promise((resolve) => setImmediate(resolve))
      }
      for (const seat of seats) seat.connect()
      for (const seat of seats) await seat.saved()
      const docs = seats.map(({ person }) => person.doc)
      const [first] = docs
      if (!first) throw new Error('nobody is there')
      await until(() => docs.every((doc) => contentOf(doc) === contentOf(first)))
      demandOneOrder(docs)
      expect(Object.values(viewOf(first).lists).flat().length).toBeGreaterThan(0)

      const { sessionId } = shoot.people.crew
      const late = await new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
      expect(contentOf(late.doc)).toBe(contentOf(first))
      late.close()
      const boards = await world.db.select().from(rtDoc).where(eq(rtDoc.shootId, shoot.shootId))
      const board = boards.find(({ kind }) => kind === 'board')
      const loaded = board && (await loadDocument(world.pool, board.id))
      expect(loaded?.bad).toEqual([])
      expect(contentOf(loaded?.doc ?? new Y.Doc())).toBe(contentOf(first))
      for (const seat of seats) seat.lose()
    },
  )
})
