import { Worker } from 'node:worker_threads'
import { AppError } from '#server/errors.ts'
import { queueOf } from '#server/features/uploads/queue.ts'
import type { RecipeSheetContent } from './recipe-sheet.tsx'
import type { SheetAnswer } from './sheet-worker.ts'

/** A sheet that takes longer is given up. */
const SHEET_MS = 60_000
/** A thread without a sheet for so long gives its memory back. */
const IDLE_MS = 60_000
/** More than the longest sheet takes; a thread that wants more ends, and not the program. */
const MEMORY_MB = 512

let worker: Worker | null = null
let idle: NodeJS.Timeout | undefined

function start(): Worker {
  const started = new Worker(new URL('./start-sheet-worker.mjs', import.meta.url), {
    // Not those of the program: they are about the program.
    execArgv: [],
    resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
  })
  started.unref()
  started.on('exit', () => {
    if (worker === started) worker = null
  })
  // Without a sheet there is nobody to tell; with one, `lay` listens as well.
  started.on('error', () => undefined)
  return started
}

function letGo(which: Worker): void {
  if (worker === which) worker = null
  void which.terminate()
}

const givenUp = (what: string, cause?: unknown) =>
  new AppError('INTERNAL', `${what} No sheet was made, and nothing was changed; try again.`, { cause })

function lay(content: RecipeSheetContent): Promise<Uint8Array> {
  clearTimeout(idle)
  const current = (worker ??= start())
  return new Promise((resolve, reject) => {
    const tooLong = setTimeout(() => {
      end()
      letGo(current)
      reject(givenUp(`The sheet was given up after ${SHEET_MS / 1000} seconds.`))
    }, SHEET_MS)
    const onMessage = (answer: SheetAnswer) => {
      end()
      if ('pdf' in answer) resolve(answer.pdf)
      else reject(givenUp('The sheet could not be laid out.', new Error(answer.failed)))
    }
    const onError = (error: unknown) => {
      letGo(current)
      end()
      reject(givenUp('The sheet could not be laid out.', error))
    }
    const onExit = () => {
      end()
      reject(givenUp('The sheet could not be laid out.', new Error('the thread that lays sheets out ended')))
    }
    current.on('message', onMessage).on('error', onError).on('exit', onExit)
    current.postMessage(content)

    function end(): void {
      clearTimeout(tooLong)
      current.off('message', onMessage).off('error', onError).off('exit', onExit)
      idle = setTimeout(() => letGo(current), IDLE_MS).unref()
    }
  })
}

const inTurn = queueOf(1)

/** Lays a sheet out on a thread of its own, so that nobody who edits waits for it; one at a time. */
export function layOut(content: RecipeSheetContent): Promise<Uint8Array> {
  return inTurn(() => lay(content))
}
