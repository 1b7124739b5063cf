import { Worker } from 'node:worker_threads'
import type { CompactJob } from './compact-log.ts'
import type { Answer, CompactWorkerSettings } from './compact-worker.ts'
import { reasonOf } from './update-log.ts'

/** A job that takes longer is given up. */
const JOB_MS = 60_000
/** A thread without a job for so long gives its memory back. */
const IDLE_MS = 60_000
/** More than the largest document takes; a thread that wants more ends, and not the program. */
const MEMORY_MB = 1024

export type CompactThread = {
  /** Never rejects. One job at a time. */
  run(job: CompactJob): Promise<Answer>
  /** Ends the thread wherever it is; the database undoes what it has not committed. */
  stop(): Promise<void>
}

/** The other thread, started when there is something to do. It does not keep the program running. */
export function createCompactThread(settings: CompactWorkerSettings): CompactThread {
  let worker: Worker | null = null
  let idle: NodeJS.Timeout | undefined

  function start(): Worker {
    const started = new Worker(new URL('./start-compact-worker.mjs', import.meta.url), {
      workerData: settings,
      // Not those of the program: they are about the program.
      execArgv: [],
      resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
    })
    started.unref()
    started.on('exit', () => {
      if (worker === started) worker = null
    })
    // Without a job there is nobody to tell; with one, `run` listens as well.
    started.on('error', () => undefined)
    return started
  }

  /** Ends a thread; the next job gets another one, even before this one is down. */
  function letGo(which: Worker): void {
    if (worker === which) worker = null
    void which.terminate()
  }

  function run(job: CompactJob): Promise<Answer> {
    clearTimeout(idle)
    const current = (worker ??= start())
    return new Promise((resolve) => {
      const tooLong = setTimeout(() => letGo(current), JOB_MS)
      const onMessage = (answer: Answer) => end(answer)
      const onError = (error: unknown) => {
        letGo(current)
        end({ kind: 'failed', reason: reasonOf(error) })
      }
      const onExit = () => end({ kind: 'failed', reason: 'the thread ended' })
      current.on('message', onMessage).on('error', onError).on('exit', onExit)
      current.postMessage(job)

      function end(answer: Answer): void {
        clearTimeout(tooLong)
        current.off('message', onMessage).off('error', onError).off('exit', onExit)
        clearTimeout(idle)
        idle = setTimeout(() => letGo(current), IDLE_MS).unref()
        resolve(answer)
      }
    })
  }

  return {
    run,
    stop: async () => {
      clearTimeout(idle)
      await worker?.terminate()
    },
  }
}
