import { randomUUID } from 'node:crypto'
import { and, asc, eq } from 'drizzle-orm'
import * as Y from 'yjs'
import { type ShootId, docIdSchema } from '#shared/ids.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import type { Documents } from '#server/adapters/documents.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { rtDoc, rtUpdate } from '#server/db/schema/realtime.ts'

export type FakeDocuments = Documents & {
  /** What was announced: shoot and query keys. */
  announced: { shootId: ShootId; queryKeys: readonly (readonly string[])[] }[]
}

/** Documents straight from the log's tables, without rooms: for tests of verbs that are not about realtime. */
export function fakeDocuments(db: Db): FakeDocuments {
  const load = async (shootId: ShootId, kind: DocumentKind) => {
    const [head] = await db
      .select({ id: rtDoc.id, head: rtDoc.head })
      .from(rtDoc)
      .where(and(eq(rtDoc.shootId, shootId), eq(rtDoc.kind, kind)))
    if (!head) throw new Error(`There is no ${kind} of this shoot.`)
    const rows = await db
      .select({ update: rtUpdate.update })
      .from(rtUpdate)
      .where(eq(rtUpdate.docId, head.id))
      .orderBy(asc(rtUpdate.seq))
    const doc = new Y.Doc()
    for (const row of rows) Y.applyUpdate(doc, row.update)
    return { ...head, doc }
  }
  const announced: FakeDocuments['announced'] = []
  return {
    announced,
    create: async (tx: Tx, shootId, kind, encodedState) => {
      const id = docIdSchema.parse(randomUUID())
      await tx.insert(rtDoc).values({ id, shootId, kind, head: 1 })
      await tx.insert(rtUpdate).values({ docId: id, seq: 1, update: encodedState })
      return id
    },
    read: async (shootId, kind, fn) => {
      const { doc, head } = await load(shootId, kind)
      return fn(doc, head)
    },
    write: async (shootId, kind, userId, fn) => {
      const { id, doc, head } = await load(shootId, kind)
      const before = Y.encodeStateVector(doc)
      fn(doc)
      await db.insert(rtUpdate).values({ docId: id, seq: head + 1, userId, update: Y.encodeStateAsUpdate(doc, before) })
      await db
        .update(rtDoc)
        .set({ head: head + 1 })
        .where(eq(rtDoc.id, id))
    },
    announce: (shootId, queryKeys) => void announced.push({ shootId, queryKeys }),
  }
}
