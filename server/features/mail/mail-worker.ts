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
  const onFailure = (error: unknown, tries: number) => log.warn({ err: error, tries }, 'a letter was not taken')

  const work = async (): Promise<void> => {
    try {
      while (!isStopping && (await sendDue(db, mailer, { now, keepsText, onFailure }))) continue
    } catch (error) {
      log.warn({ err: error }, 'the queue of letters cannot be read')
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
