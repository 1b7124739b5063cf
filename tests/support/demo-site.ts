import { randomUUID } from 'node:crypto'
import { pino } from 'pino'
import type { Role } from '#shared/access/roles.ts'
import { type ShootId, userIdSchema } from '#shared/ids.ts'
import type { Ctx } from '#server/context.ts'
import { connectDatabase } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { type DemoWorld, ensureDemo } from '#server/demo/ensure-demo.ts'
import { DEMO_PEOPLE } from '#server/demo/people.ts'
import { createRealtime } from '#server/realtime/server.ts'
import { eq } from 'drizzle-orm'
import { createTestDatabase } from '#tests/support/database.ts'

export type DemoSite = {
  /** What `ensureDemo` answered. */
  put: boolean
  putAgain: () => Promise<boolean>
  shootId: ShootId
  ctx: (role: Role) => Ctx
  close: () => Promise<void>
}

/** The demo shoot on a database of its own, its documents through the real rooms; nothing listens. */
export async function putDemo(): Promise<DemoSite> {
  const database = await createTestDatabase()
  const { db, pool } = connectDatabase(database.url, () => undefined)
  const realtime = createRealtime({
    db,
    databaseUrl: database.url,
    auth: () => Promise.resolve(null),
    trustedOrigins: [],
    log: pino({ level: 'silent' }),
  })
  const world: DemoWorld = {
    db,
    now: () => new Date(),
    documents: realtime.documents,
    publicUrl: 'http://localhost',
    createUser: async ({ name, email }) => {
      const id = userIdSchema.parse(randomUUID())
      await db.insert(user).values({ id, name, email })
      return id
    },
  }
  const put = await ensureDemo(world)
  const [row] = await db.select({ id: shoot.id }).from(shoot).limit(1)
  if (!row) throw new Error('the demo has no shoot')
  const people = new Map<Role, Ctx['actor']>()
  for (const person of DEMO_PEOPLE) {
    const [found] = await db.select({ id: user.id }).from(user).where(eq(user.email, person.email))
    people.set(person.role, { userId: userIdSchema.parse(found?.id), name: person.name, email: person.email })
  }
  return {
    put,
    putAgain: () => ensureDemo(world),
    shootId: row.id,
    ctx: (role) => ({ ...world, actor: people.get(role) ?? null }),
    close: async () => {
      await realtime.drain()
      await pool.end()
      await database.drop()
    },
  }
}
