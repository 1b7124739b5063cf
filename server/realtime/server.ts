import type { IncomingMessage, Server } from 'node:http'
import type { Duplex } from 'node:stream'
import pg from 'pg'
import { WebSocketServer } from 'ws'
import { CLOSE } from '#shared/realtime/protocol.ts'
import type { ShootId } from '#shared/ids.ts'
import type { Documents } from '#server/adapters/documents.ts'
import type { Db } from '#server/db/client.ts'
import { within } from '#server/within.ts'
import { type Admission, type Authenticate, admit } from './authorise.ts'
import { type CompactionStats, createCompaction } from './compaction.ts'
import { Connection } from './connection.ts'
import { createDocuments } from './documents.ts'
import { createHeadsWatch } from './heads-watch.ts'
import { createReceiver } from './inbound.ts'
import { createInstances } from './instances.ts'
import { createRightsWatch } from './rights-watch.ts'
import type { Standing } from './room.ts'
import { type RoomsStats, UnknownDocument, createRooms } from './rooms.ts'
import { DEFAULT_SETTINGS, type RealtimeLog, type RealtimeSettings } from './settings.ts'
import { Strikes } from './strikes.ts'
import { type UpdateLogStats, createUpdateLog, reasonOf } from './update-log.ts'
import { warmUp } from './warm-up.ts'
import { changedFrame } from './wire.ts'

export type Realtime = {
  documents: Documents
  /** Takes the upgrades under `/rt/`; all other paths are left to others. */
  attach(server: Server): void
  /** Takes nobody new, waits for the queue, sends the last acknowledgements, closes everybody with 1012, lets go of everything. */
  drain(): Promise<void>
  stats(): RealtimeStats
}

/** Counts are since the start of the process. */
export type RealtimeStats = RoomsStats &
  UpdateLogStats &
  Pick<CompactionStats, 'compactions' | 'failedChecks'> & {
    connections: number
    /** Other processes heard of on the same database. */
    instances: number
  }

/** Upgrades under way at the same time; each is a question to the database. */
const MAX_ADMITTING = 500

/** The realtime server of one process: rooms, sockets, log. */
export function createRealtime(options: {
  db: Db
  databaseUrl: string
  auth: Authenticate
  trustedOrigins: readonly string[]
  log: RealtimeLog
  limits?: Partial<RealtimeSettings>
}): Realtime {
  const { db, databaseUrl, auth, trustedOrigins, log } = options
  const settings: RealtimeSettings = { ...DEFAULT_SETTINGS, ...options.limits }
  const connections = new Set<Connection>()
  const perUser = new Map<string, number>()
  const strikes = new Strikes(settings.strikeMemoryMs)
  let isDraining = false
  let admitting = 0
  let nextNumber = 1

  // Its own connections: a verb that holds one of the others while it waits for a document must not wait for itself.
  const pool = new pg.Pool({
    connectionString: databaseUrl,
    max: 4,
    connectionTimeoutMillis: 5_000,
    query_timeout: settings.statementMs,
    keepAlive: true,
    options: '-c timezone=UTC -c synchronous_commit=on',
  })
  pool.on('error', (error) => log.warn({ error: reasonOf(error) }, 'idle database connection lost'))

  const updateLog = createUpdateLog({
    pool,
    settings,
    log,
    onCommitted: (committed) => {
      rooms.committed(committed)
      instances.logGrew(committed.docId, committed.last)
    },
    onPressure: (isUnderPressure) => {
      for (const connection of connections) {
        if (!connection.mayWrite) continue
        if (isUnderPressure) connection.pause('pressure')
        else connection.resume('pressure')
      }
    },
    onStalled: () => connections.forEach((connection) => connection.stalled()),
  })
  const instances = createInstances({
    databaseUrl,
    settings,
    log,
    onLogGrew: (docId, head) => heads.grew(docId, head),
    onPresence: (instance, docId, entries) => rooms.get(docId)?.presence.takeElsewhere(instance, entries),
    onAskedPresence: (docId) => instances.showPresence(docId, rooms.get(docId)?.presence.here() ?? []),
    onChanged: tellHere,
    onMissed: () => {
      heads.look()
      for (const { place, presence } of rooms.all()) {
        instances.showPresence(place.docId, presence.here())
        instances.askPresence(place.docId)
      }
    },
    onGone: (instance) => rooms.all().forEach(({ presence }) => presence.instanceGone(instance)),
  })
  const compaction = createCompaction({
    pool,
    databaseUrl,
    updateLog,
    isAlone: () => instances.isAlone(),
    settings,
    log,
  })
  const rooms = createRooms({ pool, updateLog, instances, compaction, settings, log })
  const heads = createHeadsWatch({ pool, rooms, settings, log })
  const watch = createRightsWatch({ db, databaseUrl, settings, log, connections })
  const documents = createDocuments({
    pool,
    rooms,
    updateLog,
    settings,
    announce: (shootId, queryKeys) => {
      tellHere(shootId, queryKeys)
      instances.changed(shootId, queryKeys)
    },
  })
  const sockets = new WebSocketServer({ noServer: true, perMessageDeflate: false, maxPayload: settings.maxFrameBytes })

  const keepAlive = setInterval(() => connections.forEach((connection) => connection.keepAlive()), settings.keepAliveMs)
  const ping = setInterval(() => connections.forEach((connection) => connection.ping()), settings.pingMs)

  function tellHere(shootId: ShootId, queryKeys: readonly (readonly string[])[]): void {
    const frame = changedFrame(queryKeys)
    for (const connection of connections) {
      if (connection.place.shootId === shootId && connection.place.kind === 'board') connection.sendExtra(frame)
    }
  }

  async function onUpgrade(request: IncomingMessage, socket: Duplex, head: Buffer): Promise<void> {
    socket.on('error', () => socket.destroy())
    if (isDraining || admitting >= MAX_ADMITTING) return refuse(socket, 503)
    admitting++
    const noticesBefore = watch.notices()
    let admission: Admission
    try {
      admission = await admit(request, { db, auth, trustedOrigins })
    } catch (error) {
      log.error({ error: reasonOf(error) }, 'upgrade not judged')
      return refuse(socket, 503)
    } finally {
      admitting--
    }
    if (socket.destroyed) return
    if (isDraining) return refuse(socket, 503)
    if (admission.kind === 'http') {
      log.warn({ status: admission.status }, 'upgrade refused')
      return refuse(socket, admission.status)
    }
    const { url } = request
    // Nothing a peer sends is read before this line.
    sockets.handleUpgrade(request, socket, head, (ws) => {
      if (admission.kind === 'close') {
        ws.on('error', () => ws.terminate())
        log.warn({ code: admission.code, why: admission.why }, 'connection closed')
        ws.close(admission.code, admission.why)
        setTimeout(() => ws.terminate(), 3_000).unref()
        return
      }
      const { person, place, role, schema } = admission
      const wantsAcks = new URLSearchParams(url?.split('?')[1]).get('ack') === '1'
      const connection = new Connection({
        ws,
        socket,
        number: nextNumber++,
        person,
        place,
        role,
        wantsAcks,
        schema,
        settings,
        log,
      })
      const mine = (perUser.get(person.userId) ?? 0) + 1
      perUser.set(person.userId, mine)
      ws.on('close', () => {
        const left = (perUser.get(person.userId) ?? 1) - 1
        if (left > 0) perUser.set(person.userId, left)
        else perUser.delete(person.userId)
      })
      if (mine > settings.socketsPerUser) return connection.close(CLOSE.tryAgain, 'too many sockets of one person')
      connections.add(connection)
      watch.add(connection)
      if (watch.notices() !== noticesBefore) watch.judge(connection)
      if (connection.mayWrite && updateLog.isUnderPressure()) connection.pause('pressure')
      connection.greet(admission)
      const leave = join(connection, admission)
      ws.on('close', () => {
        connections.delete(connection)
        watch.remove(connection)
        leave()
      })
    })
  }

  /** Brings a connection into its room as soon as that is there. Returns what to do when it goes. */
  function join(connection: Connection, told: Standing): () => void {
    const hold = rooms.hold(connection.place)
    let leave = hold.release
    hold.room.then(
      (room) => {
        if (!connection.isOpen) return
        if (room.peers.size >= settings.connectionsPerDocument) {
          return connection.close(CLOSE.crowded, 'too many people in one document')
        }
        if (room.epoch < told.epoch) {
          // Rebuilt since it was loaded: those who are in it have another document than the one to come.
          rooms.letGo(room, CLOSE.epoch, 'the document is of another epoch')
          return connection.close(CLOSE.tryAgain, 'the document is loaded anew')
        }
        if (room.epoch > told.epoch) return connection.close(CLOSE.epoch, 'the document is of another epoch')
        if (room.frozen !== told.frozen) connection.greet(room)
        room.peers.add(connection)
        leave = () => {
          room.leave(connection)
          hold.release()
        }
        connection.start(createReceiver({ pool, rooms, strikes, settings, log }, connection, room))
        connection.send(room.presence.everyoneBut(connection))
      },
      (error: unknown) => {
        log.error({ ...connection.facts, error: reasonOf(error) }, 'document not loaded')
        if (error instanceof UnknownDocument) connection.close(CLOSE.unknown, 'no such document')
        else connection.close(CLOSE.tryAgain, 'the document could not be loaded')
      },
    )
    return () => leave()
  }

  let draining: Promise<void> | null = null
  async function drainOnce(): Promise<void> {
    isDraining = true
    for (const connection of connections) connection.pause('drain')
    const isEmpty = await updateLog.drained(settings.drainMs)
    if (!isEmpty) log.error({ ...updateLog.stats() }, 'drained with unstored updates; their authors were told nothing')
    // Acknowledgements go out in a microtask of the commit; after this turn they are on their way.
    await new Promise((resolve) => setImmediate(resolve))
    const leaving = [...connections]
    await Promise.all(
      leaving.map(async (connection, i) => {
        // Everybody at once would be everybody back at once.
        await new Promise((resolve) => setTimeout(resolve, (i / leaving.length) * settings.drainSpreadMs))
        connection.close(CLOSE.restart, 'restarting')
      }),
    )
    clearInterval(keepAlive)
    clearInterval(ping)
    updateLog.stop()
    heads.stop()
    rooms.stop()
    await Promise.all([watch.stop(), instances.stop(), compaction.stop()])
    // A connection that hangs has nothing left that anybody waits for.
    await within(2_000, pool.end())
  }

  return {
    documents,
    attach: (server) => {
      server.on('upgrade', (request, socket, head) => {
        if (request.url?.startsWith('/rt/')) void onUpgrade(request, socket, head)
      })
      if (settings.warmUp) setImmediate(warmUp)
    },
    drain: () => (draining ??= drainOnce()),
    stats: () => {
      const { compactions, failedChecks } = compaction.stats()
      return {
        connections: connections.size,
        instances: instances.others(),
        compactions,
        failedChecks,
        ...rooms.stats(),
        ...updateLog.stats(),
      }
    },
  }
}

const REASONS = { 401: 'Unauthorized', 403: 'Forbidden', 503: 'Service Unavailable' } as const

function refuse(socket: Duplex, status: keyof typeof REASONS): void {
  // Nothing else would ever end a socket whose other side does not.
  socket.once('finish', () => socket.destroy())
  socket.end(`HTTP/1.1 ${status} ${REASONS[status]}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`)
}
