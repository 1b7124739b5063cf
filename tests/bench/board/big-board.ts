import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { pino } from 'pino'
import { areaIdSchema, frameIdSchema, noteIdSchema, tagIdSchema, userIdSchema } from '#shared/ids.ts'
import { putItems, readAll } from '#shared/realtime/collection.ts'
import { areas, frames, notes, tags } from '#shared/realtime/documents.ts'
import { makeAuth } from '#server/auth/auth.ts'
import { createPerson } from '#server/auth/create-person.ts'
import { connectDatabase } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { ensureDemo } from '#server/demo/ensure-demo.ts'
import { DEMO_PEOPLE } from '#server/demo/people.ts'
import { createRealtime } from '#server/realtime/server.ts'

const COLUMNS = 24
const CELL = { w: 240, h: 320 }

/** The demo shoot with its board filled up to `items` things, `pictures` of them frames; answers the shoot's id. */
export async function putBigBoard(databaseUrl: string, items: number, pictures: number): Promise<string> {
  const { db, pool } = connectDatabase(databaseUrl, () => undefined)
  const log = pino({ level: 'silent' })
  const publicUrl = 'http://localhost'
  const secret = 'only for a bench, and long enough to be taken for one'
  const auth = makeAuth(db, { secret, publicUrl, trustedOrigins: [], signInsPerMin: 100 })
  const realtime = createRealtime({ db, databaseUrl, auth: () => Promise.resolve(null), trustedOrigins: [], log })
  await ensureDemo({
    db,
    now: () => new Date(),
    documents: realtime.documents,
    publicUrl,
    createUser: (person) => createPerson(auth, db, person),
  })
  const [row] = await db.select({ id: shoot.id }).from(shoot).limit(1)
  const [person] = await db
    .select({ id: user.id })
    .from(user)
    .where(eq(user.email, DEMO_PEOPLE[0]?.email ?? ''))
  if (!row || !person) throw new Error('the demo is not in')
  await realtime.documents.write(row.id, 'board', userIdSchema.parse(person.id), (doc) => {
    const stored = [...readAll(doc, frames).items.values()]
    const there =
      stored.length + readAll(doc, notes).items.size + readAll(doc, tags).items.size + readAll(doc, areas).items.size
    const box = (index: number): [number, number, number, number] => [
      24 + (index % COLUMNS) * CELL.w,
      1100 + Math.floor(index / COLUMNS) * CELL.h,
      200,
      270,
    ]
    const random = Math.random
    const newFrames = Array.from({ length: Math.max(0, pictures - stored.length) }, (_, index) => {
      const model = stored[index % stored.length]
      if (!model) throw new Error('the demo has no frames')
      return {
        ...model,
        id: frameIdSchema.parse(randomUUID()),
        box: box(index),
        z: 100 + index,
        caption: `Frame ${index}`,
      }
    })
    putItems(doc, frames, newFrames, random)
    const rest = Math.max(0, items - there - newFrames.length)
    const at = (index: number) => box(newFrames.length + index)
    const [noteCount, areaCount] = [Math.floor(rest * 0.6), Math.floor(rest * 0.05)]
    putItems(
      doc,
      notes,
      Array.from({ length: noteCount }, (_, index) => ({
        id: noteIdSchema.parse(randomUUID()),
        box: at(index),
        z: 500,
        text: `Note ${index}: quiet hands, long line, nothing that shines.`,
      })),
      random,
    )
    putItems(
      doc,
      areas,
      Array.from({ length: areaCount }, (_, index) => ({
        id: areaIdSchema.parse(randomUUID()),
        box: at(noteCount + index),
        title: `Area ${index}`,
      })),
      random,
    )
    putItems(
      doc,
      tags,
      Array.from({ length: rest - noteCount - areaCount }, (_, index) => ({
        id: tagIdSchema.parse(randomUUID()),
        box: at(noteCount + areaCount + index),
        z: 500,
        title: `Tag ${index}`,
        text: 'Felt, wool, horn',
      })),
      random,
    )
  })
  await realtime.drain()
  await pool.end()
  return row.id
}
