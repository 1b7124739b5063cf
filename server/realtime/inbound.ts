import type pg from 'pg'
import * as Y from 'yjs'
import { CLOSE, type Refusal } from '#shared/realtime/protocol.ts'
import type { Connection } from './connection.ts'
import { bringsNothing, examine, withoutGaps } from './guard.ts'
import { quarantine } from './quarantine.ts'
import type { Room } from './room.ts'
import type { Rooms } from './rooms.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import type { Strikes } from './strikes.ts'
import { reasonOf } from './update-log.ts'
import { type ClientMessage, readMessage, step1Frame, step2Frame } from './wire.ts'

/** What frames need beside their connection and room. */
export type Inbound = {
  pool: pg.Pool
  rooms: Rooms
  strikes: Strikes
  settings: RealtimeSettings
  log: RealtimeLog
}

/** Between two questions to a client whose updates do not fit. */
const ASK_AGAIN_MS = 1_000
/** The longest list of deletions that is read from somebody who may not write. */
const MAX_DELETIONS_BYTES = 256 * 1024
/** A full document still takes what makes it smaller, and so much of small changes: taking out is a change too. */
const SMALL_CHANGE_BYTES = 1024
const SMALL_CHANGES_BYTES = 256 * 1024
/** Between two workings-out of what a client's step 2 holds beside its gaps: each costs a copy of the document. */
const SALVAGE_MS = 10_000

/** Makes the receiver of one connection's frames in its room. */
export function createReceiver(context: Inbound, connection: Connection, room: Room): (frame: Uint8Array) => void {
  const { settings, log } = context
  let askedAtMs = 0
  let isAsking = false
  let salvagedAtMs = 0
  let gapsInStep2 = 0

  function receive(frame: Uint8Array): void {
    let message: ClientMessage
    try {
      message = readMessage(frame)
    } catch {
      strike('a frame that is no message')
      return
    }
    switch (message.kind) {
      case 'step 1':
        return answer(message.stateVector)
      case 'step 2':
      case 'update':
        return takeUpdate(message.kind, message.update)
      case 'presence':
        return takePresence(message.body)
      case 'query presence':
        return answerPresence()
      case 'unknown':
        log.warn({ ...connection.facts, type: message.type }, 'unknown message ignored')
    }
  }

  function answer(stateVector: Uint8Array): void {
    try {
      // Working it out goes through the whole document, however little comes of it.
      connection.charge(Math.max(room.fanOut.answer(connection, stateVector, step2Frame), room.sizeBytes / 4))
    } catch {
      strike('a state vector that does not decode')
      return
    }
    connection.isSynced = true
    connection.send(step1Frame(Y.encodeStateVector(room.doc)))
  }

  function answerPresence(): void {
    const everyone = room.presence.everyoneBut(connection)
    connection.charge(everyone.length)
    connection.send(everyone)
  }

  function takePresence(body: Uint8Array): void {
    const outcome = room.presence.receive(connection, body)
    if (outcome === 'too large' || outcome === 'not a presence')
      log.warn({ ...connection.facts, outcome }, 'presence refused')
  }

  function takeUpdate(kind: 'step 2' | 'update', update: Uint8Array): void {
    const n = ++connection.received
    const isEmpty = update.length === 2 && update[0] === 0 && update[1] === 0
    if (isEmpty) {
      if (kind === 'step 2') connection.unhold()
      return store(() => undefined)
    }
    if (!connection.mayWrite) {
      // The first byte counts the parts with content: anything but a list of deletions reaches no parser.
      const mayBeKnown = kind === 'step 2' && update[0] === 0 && update.length <= MAX_DELETIONS_BYTES
      if (mayBeKnown && bringsNothing(room.doc, update)) return store(() => undefined)
      return connection.refuse(n, 'read-only')
    }
    if (room.frozen !== null) return putOff(n, 'frozen')
    if (kind === 'update' && update.length > settings.maxUpdateBytes) return putOff(n, 'too-large')
    const verdict = examine(room.doc, update)
    if (verdict.kind === 'undecodable') return refuseInvalid(n, update)
    if (verdict.kind === 'gap') return mend(kind, n, update)
    if (!room.mayGrow(verdict.structs, settings.structsPerMinute, Date.now())) return putOff(n, 'full')
    const isSmall = update.length <= SMALL_CHANGE_BYTES
    const limitBytes = settings.stateBytes + (isSmall ? SMALL_CHANGES_BYTES : 0)
    if (verdict.structs > 0 && !room.hasRoomFor(update.length, limitBytes, Date.now())) return putOff(n, 'full')
    if (kind === 'step 2') connection.unhold()
    gapsInStep2 = 0
    store(() => Y.applyUpdate(room.doc, update, connection))
  }

  function store(apply: () => void): void {
    const { ackable, received: n } = connection
    const { userId } = connection.person
    let isWhole = true
    const taken = room.change({ userId, peer: connection }, apply, (stored) => {
      if (stored) connection.saved(isWhole ? ackable : Math.min(ackable, n - 1))
      else if (!room.isBroken) connection.close(CLOSE.unknown, 'the document is gone')
    })
    if (taken === 'broken') {
      log.error(connection.facts, 'an update that decodes broke the document in memory; it is loaded anew')
      context.rooms.letGo(room, CLOSE.tryAgain, 'the document is loaded anew')
    }
    if (taken === 'incomplete') {
      isWhole = false
      connection.holdAt(connection.received)
      ask()
    }
  }

  /** Not taken for now; the client's next step 2 brings it again. */
  function putOff(n: number, reason: Refusal): void {
    connection.holdAt(n)
    connection.refuse(n, reason)
  }

  function refuseInvalid(n: number, update: Uint8Array): void {
    connection.holdAt(n)
    connection.refuse(n, 'invalid')
    strike('an update that does not decode', update)
  }

  function strike(why: string, update?: Uint8Array): void {
    const count = context.strikes.add(connection.person.sessionId, Date.now())
    log.warn({ ...connection.facts, why, count }, 'bad frame')
    if (update && count <= settings.strikes) {
      const { userId } = connection.person
      void quarantine(context.pool, log, { docId: connection.place.docId, userId, reason: 'undecodable', update })
    }
    connection.close(count >= settings.strikes ? CLOSE.abuse : 1003, why)
  }

  /** An update that builds on what is not here: look into the log, then ask the client for all it has. */
  function mend(kind: 'step 2' | 'update', n: number, update: Uint8Array): void {
    connection.holdAt(n)
    log.info({ ...connection.facts, n }, 'update with a gap')
    if (kind === 'update') return ask()
    gapsInStep2++
    const now = Date.now()
    if (gapsInStep2 < 2 || now - salvagedAtMs < SALVAGE_MS) return ask()
    // The client itself waits for something nobody has. Take what it has made of its own.
    salvagedAtMs = now
    const rest = withoutGaps(room.doc, update)
    if (!rest) return connection.refuse(n, 'invalid')
    connection.unhold()
    store(() => Y.applyUpdate(room.doc, rest, connection))
  }

  /** Asks for all the client has, once at a time and not more often than is of use. */
  function ask(): void {
    if (isAsking) return
    isAsking = true
    setTimeout(() => void askNow(), Math.max(0, askedAtMs + ASK_AGAIN_MS - Date.now()))
  }

  async function askNow(): Promise<void> {
    try {
      await room.catchUp()
    } catch (error) {
      log.warn({ ...connection.facts, error: reasonOf(error) }, 'not caught up with the log')
    }
    isAsking = false
    askedAtMs = Date.now()
    if (connection.isHolding) connection.send(step1Frame(Y.encodeStateVector(room.doc)))
  }

  return receive
}
