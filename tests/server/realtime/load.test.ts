import { createHash } from 'node:crypto'
import type pg from 'pg'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { type DocId, docIdSchema } from '#shared/ids.ts'
import { COMPACT_KIND, loadDocument } from '#server/realtime/load.ts'
import { TestClient, until } from '#tests/realtime/support/client.ts'
import { type Shoot, type World, addShoot, startWorld } from '#tests/realtime/support/world.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let world: World
let pool: pg.Pool
let shoot: Shoot
let docId: DocId

beforeAll(async () => {
  database = await createTestDatabase()
  world = await startWorld({ databaseUrl: database.url })
  pool = world.pool
})
afterAll(async () => {
  await world.close()
  await database.drop()
})

const updates: Uint8Array[] = []

beforeEach(async () => {
  shoot = await addShoot(world.db, world.realtime.documents)
  const { rows } = await pool.query<{ id: string }>("select id from rt_doc where shoot_id = $1 and kind = 'board'", [
    shoot.shootId,
  ])
  docId = docIdSchema.parse(rows[0]?.id)
  updates.length = 0
  const source = new Y.Doc()
  source.on('update', (update: Uint8Array) => updates.push(update))
  for (let i = 0; i < 5; i++) source.getMap('items').set(`k${i}`, i)
})

async function append(rows: readonly Uint8Array[]): Promise<void> {
  for (const update of rows) {
    await pool.query(
      'with d as (update rt_doc set head = head + 1 where id = $1 returning head) insert into rt_update (doc_id, seq, update) select $1, head, $2 from d',
      [docId, Buffer.from(update)],
    )
  }
}

async function snapshot(
  seq: number,
  state: Uint8Array,
  sha256 = createHash('sha256').update(state).digest(),
): Promise<void> {
  await pool.query('insert into rt_snapshot (doc_id, seq, kind, state, sha256) values ($1, $2, $3, $4, $5)', [
    docId,
    seq,
    COMPACT_KIND,
    Buffer.from(state),
    sha256,
  ])
}

describe('loadDocument', () => {
  it('is undefined for a document that does not exist', async () => {
    expect(await loadDocument(pool, docIdSchema.parse('00000000-0000-4000-8000-000000000000'))).toBeUndefined()
  })

  it('builds it from the rows, up to the head', async () => {
    await append(updates)
    const loaded = await loadDocument(pool, docId)
    expect(loaded?.doc.getMap('items').toJSON()).toEqual({ k0: 0, k1: 1, k2: 2, k3: 3, k4: 4 })
    expect(loaded).toMatchObject({ head: 6, bad: [] })
  })

  it('starts from the newest sound snapshot', async () => {
    await append(updates)
    await snapshot(4, Y.mergeUpdates(updates.slice(0, 3)))
    await pool.query('delete from rt_update where doc_id = $1 and seq <= 4', [docId])
    await snapshot(5, Uint8Array.of(1, 2, 3))
    const loaded = await loadDocument(pool, docId)
    expect(loaded?.doc.getMap('items').size).toBe(5)
    expect(loaded).toMatchObject({ head: 6, bad: [{ reason: 'log snapshot 5' }] })
  })

  it('goes back over as many unsound snapshots as there are', async () => {
    await append(updates)
    await snapshot(3, Y.mergeUpdates(updates.slice(0, 2)))
    for (const seq of [4, 5, 6]) await snapshot(seq, Uint8Array.of(1, 2, 3))
    await pool.query('delete from rt_update where doc_id = $1 and seq <= 3', [docId])
    const loaded = await loadDocument(pool, docId)
    expect(loaded?.doc.getMap('items').size).toBe(5)
    expect(loaded?.bad.map((bad) => bad.reason)).toEqual(['log snapshot 6', 'log snapshot 5', 'log snapshot 4'])
  })

  it('does not believe a snapshot whose sum is wrong', async () => {
    await append(updates)
    await snapshot(3, Y.mergeUpdates(updates.slice(0, 1)), Buffer.alloc(32))
    const loaded = await loadDocument(pool, docId)
    expect(loaded?.doc.getMap('items').size).toBe(5)
    expect(loaded?.bad).toHaveLength(1)
  })

  it('leaves out a row that is broken, and takes one whose ground comes later', async () => {
    await append([
      updates[0] ?? new Uint8Array(),
      Uint8Array.of(7, 7, 7),
      updates[2] ?? new Uint8Array(),
      updates[1] ?? new Uint8Array(),
    ])
    const loaded = await loadDocument(pool, docId)
    expect(loaded?.doc.getMap('items').toJSON()).toEqual({ k0: 0, k1: 1, k2: 2 })
    expect(loaded?.bad.map((bad) => bad.reason)).toEqual(['log 3'])
    expect(loaded?.doc.store.pendingStructs).toBe(null)
  })
})

describe('a document with a bad row', () => {
  it('is readable and writable, takes back what was lost from who has it, and the row is in quarantine once', async () => {
    const [first, , third] = updates
    await append([first ?? new Uint8Array(), Uint8Array.of(7, 7, 7), third ?? new Uint8Array()])
    for (let time = 0; time < 2; time++) {
      const another = await startWorld({ databaseUrl: database.url })
      const { sessionId } = shoot.people.photographer
      const client = await new TestClient({
        url: another.url,
        shootId: shoot.shootId,
        kind: 'board',
        sessionId,
      }).ready()
      expect(client.items.get('k0')).toBe(0)
      client.items.set(`new-${time}`, time)
      await until(() => client.saved === client.sent)
      expect(another.realtime.stats().flagged).toBe(1)
      client.close()
      await another.close()
    }
    const { rows } = await pool.query<{ reason: string }>(
      'select reason from rt_quarantine where doc_id = $1 order by id',
      [docId],
    )
    expect(rows.map((row) => row.reason)).toEqual(['log 3', 'log 4'])
    const keeper = new Y.Doc()
    for (const update of updates) Y.applyUpdate(keeper, update)
    const { sessionId } = shoot.people.stylist
    const holder = await new TestClient({
      url: world.url,
      shootId: shoot.shootId,
      kind: 'board',
      sessionId,
      doc: keeper,
    }).ready()
    const other = await new TestClient({ url: world.url, shootId: shoot.shootId, kind: 'board', sessionId }).ready()
    expect(other.items.toJSON()).toMatchObject({ k0: 0, k1: 1, k2: 2, k3: 3, k4: 4 })
    holder.close()
    other.close()
  })
})
