import type { RealtimeSettings } from '#server/realtime/settings.ts'
import type { Seat } from '../client.ts'
import type { ServerChild } from '../server-child.ts'
import type { Dialect } from '../wire.ts'

/** A document that writers can sit down at; how depends on the server that runs. */
export type BenchDocument = {
  /** In Sconce's tables; null elsewhere. */
  docId: string | null
  /** Of the i-th person who may write. */
  seat(server: ServerChild, i: number): Seat
  /** Of somebody who may only read; null where there is no such right. */
  readerSeat(server: ServerChild): Seat | null
}

/** A server that is measured. */
export type Target = {
  name: string
  dialect: Dialect
  /** What its acknowledgements promise: nothing (there are none), "received", or "will survive kill -9". */
  ack: 'none' | 'memory' | 'durable'
  /** Whether documents are there after a restart. */
  isPersistent: boolean
  /** Idle time after which it has stored all it is going to store, ms. */
  settleMs: number
  /** Starts it on the bench's database. `limits` raises Sconce's own; others have none to raise. */
  start(limits?: Partial<RealtimeSettings>): Promise<ServerChild>
  /** New, empty documents with so many writers each. */
  addDocuments(count: number, writersEach: number): Promise<BenchDocument[]>
  close(): Promise<void>
}
