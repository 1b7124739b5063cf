import { randomUUID } from 'node:crypto'
import { setTimeout as pause } from 'node:timers/promises'
import pg from 'pg'
import { z } from 'zod'
import { type DocId, type ShootId, docIdSchema, shootIdSchema } from '#shared/ids.ts'
import { within } from '#server/within.ts'
import { listen } from './listen.ts'
import type { RealtimeLog, RealtimeSettings } from './settings.ts'
import { reasonOf } from './update-log.ts'

/** Channel on which the processes that serve one database tell each other what is new. */
export const INSTANCE_CHANNEL = 'rt'

/** Presence of one client id, as another process is told it. `state` is JSON, `null` for gone. */
export type PresenceElsewhere = { clientId: number; clock: number; state: string; sessionId: string }

const envelope = z.object({ from: z.string().min(1).max(64) })
const messageSchema = z.discriminatedUnion('kind', [
  /** I am here; with `asks`, say so too. */
  envelope.extend({ kind: z.literal('here'), asks: z.boolean() }),
  envelope.extend({ kind: z.literal('gone') }),
  /** The log of these documents reaches so far now. */
  envelope.extend({ kind: z.literal('log'), heads: z.array(z.tuple([docIdSchema, z.number().int()])) }),
  /** Who has this document open at yours? */
  envelope.extend({ kind: z.literal('who'), docId: docIdSchema }),
  envelope.extend({
    kind: z.literal('presence'),
    docId: docIdSchema,
    entries: z.array(z.tuple([z.number().int().min(0), z.number().int().min(0), z.string(), z.string()])),
  }),
  /** These queries of a shoot have other answers now. */
  envelope.extend({ kind: z.literal('changed'), shootId: shootIdSchema, queryKeys: z.array(z.array(z.string())) }),
])
type Message = z.infer<typeof messageSchema>
type Outgoing = Message extends infer M ? (M extends Message ? Omit<M, 'from'> : never) : never

/** PostgreSQL takes less than 8000 bytes in one notice. */
const MAX_PAYLOAD_BYTES = 7_800
const HEADS_PER_MESSAGE = 100
/** Between two rounds of speaking, so that what comes close together is said together. */
const BREATH_MS = 5
const AFTER_FAILURE_MS = 1_000
const MAX_WAITING = 1_000

export type Instances = {
  /** Says that a document's log has grown. */
  logGrew(docId: DocId, head: number): void
  showPresence(docId: DocId, entries: readonly PresenceElsewhere[]): void
  askPresence(docId: DocId): void
  changed(shootId: ShootId, queryKeys: readonly (readonly string[])[]): void
  /** How many others are known to be there. */
  others(): number
  /** Whether it is known that there are none. */
  isAlone(): boolean
  stop(): Promise<void>
}

/**
 * What the processes on one database tell each other, over LISTEN and NOTIFY. All of it is a hint and may be lost: the
 * log is the truth, and whoever uses this looks at its heads every few seconds anyway. A process that knows of no
 * other says nothing but that it is there.
 *
 * Notices go out after the commit they tell of, in transactions of their own that do not wait for the disk: a
 * transaction with a pending notice takes a lock on the whole database through its commit.
 */
export function createInstances(options: {
  databaseUrl: string
  settings: RealtimeSettings
  log: RealtimeLog
  onLogGrew: (docId: DocId, head: number) => void
  onPresence: (instance: string, docId: DocId, entries: readonly PresenceElsewhere[]) => void
  onAskedPresence: (docId: DocId) => void
  onChanged: (shootId: ShootId, queryKeys: readonly (readonly string[])[]) => void
  /** Another process has come, or we were deaf for a while: whatever was said meanwhile is lost. */
  onMissed: () => void
  onGone: (instance: string) => void
}): Instances {
  const { databaseUrl, settings, log } = options
  const me = randomUUID().slice(0, 8)
  const heardAtMs = new Map<string, number>()
  const pool = new pg.Pool({
    connectionString: databaseUrl,
    max: 1,
    connectionTimeoutMillis: 5_000,
    query_timeout: 10_000,
    keepAlive: true,
    options: '-c timezone=UTC -c synchronous_commit=off',
  })
  pool.on('error', () => undefined)

  const heads = new Map<DocId, number>()
  /** What is to be said of each document as soon as it may be. */
  const presence = new Map<DocId, Map<number, PresenceElsewhere>>()
  const presenceSaidAtMs = new Map<DocId, number>()
  let waiting: Outgoing[] = []
  let isSpeaking = false
  let isListening = false
  let isStopped = false

  function say(message: Outgoing): void {
    if (waiting.length < MAX_WAITING) waiting.push(message)
    speak()
  }

  function speak(): void {
    if (!isSpeaking && !isStopped) void speakOn()
  }

  async function speakOn(): Promise<void> {
    isSpeaking = true
    for (let messages = gather(); messages.length > 0 && !isStopped; messages = gather()) {
      const payloads = messages.map((message) => JSON.stringify({ from: me, ...message }))
      const fitting = payloads.filter((payload) => Buffer.byteLength(payload) <= MAX_PAYLOAD_BYTES)
      if (fitting.length < payloads.length) log.warn({ count: payloads.length - fitting.length }, 'notices too long')
      try {
        await pool.query({
          name: 'rt-notify',
          text: 'select pg_notify($1, payload) from unnest($2::text[]) payload',
          values: [INSTANCE_CHANNEL, fitting],
        })
        await pause(BREATH_MS)
      } catch (error) {
        // Not said again: the heads are looked at anyway, presence is out of date. Whoever forgets us asks for it anew.
        waiting.unshift({ kind: 'gone' }, { kind: 'here', asks: false })
        log.warn({ error: reasonOf(error) }, 'other instances not told')
        await pause(AFTER_FAILURE_MS)
      }
    }
    // In the same turn as the last look at what there is to say.
    isSpeaking = false
  }

  /** Takes what is to be said now. */
  function gather(): Outgoing[] {
    const messages = waiting
    waiting = []
    const grown = [...heads]
    heads.clear()
    for (let i = 0; i < grown.length; i += HEADS_PER_MESSAGE) {
      messages.push({ kind: 'log', heads: grown.slice(i, i + HEADS_PER_MESSAGE) })
    }
    return messages
  }

  function sayPresence(docId: DocId, entries: ReadonlyMap<number, PresenceElsewhere>): void {
    presence.delete(docId)
    const nowMs = Date.now()
    for (const [id, atMs] of presenceSaidAtMs) {
      if (nowMs - atMs > settings.presenceAcrossMs) presenceSaidAtMs.delete(id)
    }
    presenceSaidAtMs.set(docId, nowMs)
    for (const message of presenceMessages(docId, [...entries.values()])) say(message)
  }

  function onPayload(payload: string): void {
    const message = parse(payload)
    if (!message) return log.error({ channel: INSTANCE_CHANNEL }, 'a notice that is none of ours')
    if (message.from === me) return
    if (message.kind === 'gone') return forget(message.from)
    const isNew = !heardAtMs.has(message.from)
    heardAtMs.set(message.from, Date.now())
    if (isNew) {
      log.info({ instance: message.from }, 'another instance is there')
      options.onMissed()
    }
    switch (message.kind) {
      case 'here':
        if (message.asks) say({ kind: 'here', asks: false })
        return
      case 'log':
        for (const [docId, head] of message.heads) options.onLogGrew(docId, head)
        return
      case 'who':
        return options.onAskedPresence(message.docId)
      case 'presence':
        return options.onPresence(
          message.from,
          message.docId,
          message.entries.map(([clientId, clock, state, sessionId]) => ({ clientId, clock, state, sessionId })),
        )
      case 'changed':
        return options.onChanged(message.shootId, message.queryKeys)
    }
  }

  function forget(instance: string): void {
    if (heardAtMs.delete(instance)) options.onGone(instance)
  }

  const listening = listen({
    databaseUrl,
    channel: INSTANCE_CHANNEL,
    log,
    onPayload,
    onConnected: () => {
      isListening = true
      for (const instance of heardAtMs.keys()) {
        // Who is silent while nobody listens may well be there.
        heardAtMs.set(instance, Date.now())
        // Farewells may have been among what was not heard; those who are there show themselves again.
        options.onGone(instance)
      }
      say({ kind: 'here', asks: true })
      options.onMissed()
    },
    onLost: () => (isListening = false),
  })
  const beat = setInterval(() => {
    say({ kind: 'here', asks: false })
    if (!isListening) return
    for (const [instance, atMs] of heardAtMs) if (Date.now() - atMs > settings.instanceGoneMs) forget(instance)
  }, settings.headsMs)

  return {
    logGrew: (docId, head) => {
      if (heardAtMs.size === 0) return
      heads.set(docId, head)
      speak()
    },
    showPresence: (docId, entries) => {
      if (heardAtMs.size === 0 || entries.length === 0) return
      const due = presence.get(docId)
      const told = due ?? new Map<number, PresenceElsewhere>()
      for (const entry of entries) told.set(entry.clientId, entry)
      if (due) return
      presence.set(docId, told)
      const sinceMs = Date.now() - (presenceSaidAtMs.get(docId) ?? 0)
      setTimeout(() => sayPresence(docId, told), Math.max(0, settings.presenceAcrossMs - sinceMs)).unref()
    },
    askPresence: (docId) => {
      if (heardAtMs.size > 0) say({ kind: 'who', docId })
    },
    changed: (shootId, queryKeys) => {
      if (heardAtMs.size > 0) say({ kind: 'changed', shootId, queryKeys: queryKeys.map((key) => [...key]) })
    },
    others: () => heardAtMs.size,
    isAlone: () => isListening && heardAtMs.size === 0,
    stop: async () => {
      if (isStopped) return
      isStopped = true
      clearInterval(beat)
      await listening.stop()
      const farewell = JSON.stringify({ from: me, kind: 'gone' })
      await within(
        1_000,
        pool.query('select pg_notify($1, $2)', [INSTANCE_CHANNEL, farewell]).catch(() => undefined),
      )
      await within(1_000, pool.end())
    },
  }
}

function parse(payload: string): Message | undefined {
  try {
    return messageSchema.parse(JSON.parse(payload))
  } catch {
    return undefined
  }
}

/** Presence in as many messages as it takes. */
function presenceMessages(docId: DocId, entries: readonly PresenceElsewhere[]): Outgoing[] {
  const messages: Extract<Outgoing, { kind: 'presence' }>[] = []
  let bytes = Infinity
  for (const { clientId, clock, state, sessionId } of entries) {
    // As it will be inside a message: a string inside JSON gains backslashes.
    const entry: [number, number, string, string] = [clientId, clock, state, sessionId]
    const size = Buffer.byteLength(JSON.stringify(entry)) + 1
    if (bytes + size > MAX_PAYLOAD_BYTES - 200) {
      messages.push({ kind: 'presence', docId, entries: [] })
      bytes = 0
    }
    messages[messages.length - 1]?.entries.push(entry)
    bytes += size
  }
  return messages
}
