import type { Logger } from 'pino'
import type { Mailer } from '#server/adapters/mail.ts'
import type { Db } from '#server/db/client.ts'
import { sendDue } from './send-due.ts'

const LOOK_EVERY_MS = 1000

type MailWorker = { db: Db; mailer: Mailer; now: () => Date; log: Logger; keepsText: boolean }

/** Looks for letters that are due every second and sends them one by one. `stop` waits for the one in hand. */
export function startMailWorker({ db, mailer, now, log, keepsText }: MailWorker): { stop(): Promise<void> } {
  let isStopping = false
  let timer: NodeJS.Timeout | undefined
  let round = Promise.resolve()
  // A mail server's words name the address; its code does not.
  const onFailure = (error: unknown, tries: number) =>
    log.warn({ code: codeOf(error), tries }, 'a letter was not taken')

  const work = async (): Promise<void> => {
    try {
      while (!isStopping && (await sendDue(db, mailer, { now, keepsText, onFailure }))) continue
    } catch (error) {
      log.warn({ code: codeOf(error) }, 'the queue of letters cannot be read')
    }
    if (isStopping) return
    timer = setTimeout(() => {
      round = work()
    }, LOOK_EVERY_MS)
  }
  round = work()
  return {
    stop: async () => {
      isStopping = true
      clearTimeout(timer)
      await round
    },
  }
}

function codeOf(error: unknown): string {
  if (!(error instanceof Error)) return 'unknown'
  if ('responseCode' in error && typeof error.responseCode === 'number') return String(error.responseCode)
  if ('code' in error && typeof error.code === 'string') return error.code
  return error.cause === undefined ? error.name : codeOf(error.cause)
}
