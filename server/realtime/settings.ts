import { LIMITS } from '#shared/realtime/protocol.ts'

/** Everything that bounds the realtime server; tests narrow some of it. Times in milliseconds, sizes in bytes. */
export const DEFAULT_SETTINGS = {
  ...LIMITS,
  /** What one connection may use up at once above the sustained rate. */
  burstBytes: 1024 * 1024,
  /** Frames held for a connection while its document loads. */
  earlyFrames: 64,
  earlyBytes: 5 * 1024 * 1024,
  /** Above this nobody waits for a slow reader any more. */
  outboundBytes: 8 * 1024 * 1024,

  /** One transaction of the writer. */
  batchRows: 2000,
  batchBytes: 4 * 1024 * 1024,
  /** Above either, writers are no longer read from and no document is opened. */
  queueBytes: 16 * 1024 * 1024,
  queueAgeMs: 30_000,
  /** Writers are told that the database is away when nothing was stored for so long. */
  stalledMs: 4_000,
  retryMinMs: 100,
  retryMaxMs: 5_000,
  /** A statement without an answer for so long counts as failed. */
  statementMs: 15_000,

  idleUnloadMs: 60_000,
  presenceFlushMs: 50,
  keepAliveMs: 15_000,
  pingMs: 25_000,
  recheckMs: 60_000,
  /** Rights that could not be checked for so long are no longer believed. */
  unverifiedMs: 180_000,

  /** Updates of one session that do not decode, until it is shut out. */
  strikes: 3,
  strikeMemoryMs: 3_600_000,
  /** How long a verb waits for its change to be stored. */
  writeWaitMs: 20_000,

  drainMs: 10_000,
  drainSpreadMs: 2_000,
  warmUp: true,
}

export type RealtimeSettings = typeof DEFAULT_SETTINGS extends infer T
  ? { readonly [K in keyof T]: T[K] extends boolean ? boolean : number }
  : never

/** The part of a pino logger that is used. No name, address or content goes in. */
export type RealtimeLog = {
  info(details: object, message: string): void
  warn(details: object, message: string): void
  error(details: object, message: string): void
}
