import { LIMITS } from '#shared/realtime/protocol.ts'

/** Everything that bounds the realtime server; tests narrow some of it. Times in milliseconds, sizes in bytes. */
export const DEFAULT_SETTINGS = {
  ...LIMITS,
  /** What one connection may use up at once above the sustained rate. */
  burstBytes: 1024 * 1024,
  /** Frames held for a connection while its document loads. */
  earlyFrames: 64,
  earlyBytes: 5 * 1024 * 1024,
  /** Changes that come within so long after the last broadcast go out together: with `crowd` readers, sooner with fewer. */
  mergeMs: 20,
  crowd: 100,
  /** A reader with so much on its way is sent no more changes; below `caughtUpBytes` it gets one for all it missed. */
  lagBytes: 1024 * 1024,
  caughtUpBytes: 64 * 1024,
  /** How long a reader may lag: this, and the time that what is on its way takes at `slowestBytesPerSecond`. */
  lagMs: 30_000,
  slowestBytesPerSecond: 32 * 1024,
  /** Above this nobody waits for a slow reader any more. */
  outboundBytes: 8 * 1024 * 1024,

  /** One transaction of the writer. */
  batchRows: 2000,
  batchBytes: 4 * 1024 * 1024,
  /** Between the beginnings of two transactions of the writer. */
  commitGapMs: 16,
  /** Above either, writers are no longer read from and no document is opened. */
  queueBytes: 16 * 1024 * 1024,
  queueAgeMs: 30_000,
  /** Writers are told that the database is away when nothing was stored for so long. */
  stalledMs: 4_000,
  retryMinMs: 100,
  retryMaxMs: 5_000,
  /** A statement without an answer for so long counts as failed. */
  statementMs: 15_000,

  /** A log longer than either is replaced by a snapshot; one with `compactIdleRows` when its document is put away. */
  compactRows: 500,
  compactBytes: 1024 * 1024,
  compactIdleRows: 20,
  /** A document that people are busy in is not compacted more often than this. */
  compactEveryMs: 30_000,
  /** Snapshots and rows that a newer snapshot stands for stay so long, to undo a bad one. */
  keepReplacedMs: 7 * 24 * 3_600_000,
  /** What was deleted so long ago is taken out of the document. */
  purgeDeletedMs: 30 * 24 * 3_600_000,
  /** Order keys longer than this are made anew when nobody is connected. Characters. */
  longestKey: 64,

  /** Between two looks at the heads of the log: what a notice should have said and did not. */
  headsMs: 5_000,
  /** An instance not heard of for so long is gone, and the people on it. */
  instanceGoneMs: 20_000,
  /** Presence goes to other instances at most once in this time for each document. */
  presenceAcrossMs: 100,

  idleUnloadMs: 60_000,
  /** Between two messages about presence in a room; more when one tells more people of more people than `presencePerFlush`. */
  presenceFlushMs: 50,
  presencePerFlush: 1_000,
  presenceSlowestMs: 500,
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
