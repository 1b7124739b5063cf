import { constants, setPriority } from 'node:os'
import { parentPort, workerData } from 'node:worker_threads'
import pg from 'pg'
import { z } from 'zod'
import { type CompactJob, type Compacted, compactLog } from './compact-log.ts'
import { reasonOf } from './update-log.ts'

/** The thread that compacts: takes a job, answers it, takes the next. Started through `start-compact-worker.mjs`. */

export type Answer = Compacted | { kind: 'failed'; reason: string }

const settingsSchema = z.object({ databaseUrl: z.string(), statementMs: z.number(), keepReplacedMs: z.number() })
export type CompactWorkerSettings = z.infer<typeof settingsSchema>

/** What the database calls this connection. */
const APPLICATION = 'sconce-compaction'
/** The log waits while the last transaction is open, so whatever holds that up ends it instead. */
const PATIENCE_MS = 5_000

// On Linux a thread has a priority of its own, and 0 means the one that asks: people come first.
if (process.platform === 'linux') setPriority(0, constants.priority.PRIORITY_LOW)

const { databaseUrl, statementMs, keepReplacedMs } = settingsSchema.parse(workerData)
const pool = new pg.Pool({
  connectionString: databaseUrl,
  max: 1,
  connectionTimeoutMillis: 5_000,
  query_timeout: statementMs,
  application_name: APPLICATION,
  options: [
    '-c timezone=UTC -c synchronous_commit=on',
    `-c lock_timeout=${PATIENCE_MS} -c idle_in_transaction_session_timeout=${PATIENCE_MS}`,
  ].join(' '),
})
// Met again, and reported, by the next query.
pool.on('error', () => undefined)

parentPort?.on('message', (job: CompactJob) => {
  compactLog(pool, job, keepReplacedMs).then(answer, (error: unknown) =>
    answer({ kind: 'failed', reason: reasonOf(error) }),
  )
})

function answer(answer: Answer): void {
  parentPort?.postMessage(answer)
}
