import { inArray } from 'drizzle-orm'
import { z } from 'zod'
import { CLOSE } from '#shared/realtime/protocol.ts'
import type { Db } from '#server/db/client.ts'
import { AUTH_CHANNEL } from '#server/db/notify-auth.ts'
import { session } from '#server/db/schema/auth.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import type { Connection } from './connection.ts'
import { listen } from './listen.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import { reasonOf } from './update-log.ts'

const scopeSchema = z
  .object({ shootId: z.string().optional(), userId: z.string().optional(), sessionId: z.string().optional() })
  .refine((scope) => Object.values(scope).some((id) => id !== undefined), 'an empty scope would mean everybody')

export type RightsWatch = {
  /** Grows with every notice: when it has grown while somebody was let in, what let them in may be out of date. */
  notices(): number
  judge(connection: Connection): void
  /** Judges a connection anew when its session is due to end. */
  add(connection: Connection): void
  remove(connection: Connection): void
  stop(): Promise<void>
}

/** setTimeout takes no more than 2^31 - 1 ms. */
const LONGEST_TIMER_MS = 24 * 3_600_000

/**
 * Closes connections whose rights have changed: at once when the transaction that changed them says so, when a session
 * runs out, and in any case at a check of everybody every minute and after every gap in listening.
 */
export function createRightsWatch(options: {
  db: Db
  databaseUrl: string
  settings: RealtimeSettings
  log: RealtimeLog
  connections: ReadonlySet<Connection>
}): RightsWatch {
  const { db, settings, log, connections } = options
  let notices = 0
  const expiry = new Map<Connection, NodeJS.Timeout>()

  async function judge(which: readonly Connection[]): Promise<void> {
    const atMs = Date.now()
    const open = which.filter((connection) => connection.isOpen)
    if (open.length === 0) return
    const sessionIds = [...new Set(open.map((connection) => connection.person.sessionId))]
    const shootIds = [...new Set(open.map((connection) => connection.place.shootId))]
    const userIds = [...new Set(open.map((connection) => connection.person.userId))]
    const [sessions, members] = await Promise.all([
      db.select({ id: session.id, expiresAt: session.expiresAt }).from(session).where(inArray(session.id, sessionIds)),
      db
        .select({ shootId: shootMember.shootId, userId: shootMember.userId, role: shootMember.role })
        .from(shootMember)
        .where(inArray(shootMember.shootId, shootIds)),
    ])
    const expiresAtMs = new Map(sessions.map((row) => [row.id, row.expiresAt.getTime()]))
    const wanted = new Set<string>(userIds)
    const roles = new Map(
      members.filter((row) => wanted.has(row.userId)).map((row) => [`${row.shootId} ${row.userId}`, row.role]),
    )
    for (const connection of open) {
      const { person, place } = connection
      const endsAtMs = expiresAtMs.get(person.sessionId) ?? 0
      const role = roles.get(`${place.shootId} ${person.userId}`)
      if (endsAtMs <= Date.now()) connection.close(CLOSE.signedOut, 'signed out')
      else if (role === undefined) connection.close(CLOSE.noAccess, 'no access any more')
      else if (role !== connection.role) connection.close(CLOSE.roleChanged, 'role changed')
      else {
        connection.verifiedAtMs = atMs
        connection.expiresAtMs = endsAtMs
      }
    }
  }

  /** Something is known to have changed: whoever cannot be judged now has to come back. */
  function judgeNow(which: readonly Connection[]): void {
    judge(which).catch((error: unknown) => {
      log.error({ error: reasonOf(error), connections: which.length }, 'rights not checked')
      for (const connection of which) connection.close(CLOSE.tryAgain, 'rights could not be checked')
    })
  }

  /**
   * A check without cause. While the database is away nobody's rights can change in it and people go on working;
   * after a while we no longer believe that it is the same database.
   */
  function judgeAll(): void {
    notices++
    const all = [...connections]
    judge(all).catch((error: unknown) => {
      log.error({ error: reasonOf(error), connections: all.length }, 'rights not checked')
      for (const connection of all) {
        if (Date.now() - connection.verifiedAtMs > settings.unverifiedMs) {
          connection.close(CLOSE.tryAgain, 'rights could not be checked')
        }
      }
    })
  }

  function onPayload(payload: string): void {
    let scope: z.infer<typeof scopeSchema>
    try {
      scope = scopeSchema.parse(JSON.parse(payload))
    } catch {
      log.error({ channel: AUTH_CHANNEL }, 'a notice of changed rights that names nobody; everybody is checked')
      judgeAll()
      return
    }
    notices++
    const { shootId, userId, sessionId } = scope
    judgeNow(
      [...connections].filter(
        ({ person, place }) =>
          (shootId === undefined || shootId === place.shootId) &&
          (userId === undefined || userId === person.userId) &&
          (sessionId === undefined || sessionId === person.sessionId),
      ),
    )
  }

  function add(connection: Connection): void {
    const leftMs = Math.max(0, connection.expiresAtMs - Date.now()) + 50
    const timer = setTimeout(
      () => {
        // A session that is used gets longer; its row says so.
        judgeNow([connection])
        if (connections.has(connection)) setTimeout(() => connections.has(connection) && add(connection), 1_000).unref()
      },
      Math.min(leftMs, LONGEST_TIMER_MS),
    )
    timer.unref()
    expiry.set(connection, timer)
  }

  const listening = listen({
    databaseUrl: options.databaseUrl,
    channel: AUTH_CHANNEL,
    log,
    onPayload,
    onConnected: judgeAll,
  })
  const recheck = setInterval(judgeAll, settings.recheckMs)

  return {
    notices: () => notices,
    judge: (connection) => judgeNow([connection]),
    add,
    remove: (connection) => {
      clearTimeout(expiry.get(connection))
      expiry.delete(connection)
    },
    stop: async () => {
      clearInterval(recheck)
      for (const timer of expiry.values()) clearTimeout(timer)
      await listening.stop()
    },
  }
}
