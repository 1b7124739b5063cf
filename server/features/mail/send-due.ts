import { and, asc, eq, isNull, lte } from 'drizzle-orm'
import type { Mailer } from '#server/adapters/mail.ts'
import type { Db } from '#server/db/client.ts'
import { mail } from '#server/db/schema/mail.ts'

export const MOST_TRIES = 8
const FIRST_WAIT_MS = 5_000
const LONGEST_WAIT_MS = 3_600_000

/** Wait before the next try, ms: 5 s, doubling four times as fast up to an hour. */
export function waitMs(tries: number): number {
  return Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 4 ** (tries - 1))
}

type SendDue = {
  now: () => Date
  /** Keep the words of sent letters (the local catcher shows them); else they go, because a link in them opens something. */
  keepsText: boolean
  onFailure?: (error: unknown, tries: number) => void
}

/**
 * Sends one letter that is due, if there is one and no other process has it in hand. A letter that is not taken waits
 * longer each time and is given up after the eighth try.
 *
 * @returns whether there was one
 */
export async function sendDue(db: Db, mailer: Mailer, { now, keepsText, onFailure }: SendDue): Promise<boolean> {
  return db.transaction(async (tx) => {
    const [letter] = await tx
      .select()
      .from(mail)
      .where(and(isNull(mail.sentAt), isNull(mail.failed), lte(mail.nextTryAt, now())))
      .orderBy(asc(mail.nextTryAt))
      .limit(1)
      .for('update', { skipLocked: true })
    if (!letter) return false
    const tries = letter.tries + 1
    try {
      await mailer.send(letter)
      await tx
        .update(mail)
        .set({ sentAt: now(), tries, ...(keepsText ? {} : { text: '', html: '' }) })
        .where(eq(mail.id, letter.id))
    } catch (error) {
      const failed = tries >= MOST_TRIES ? (error instanceof Error ? error.message : String(error)).slice(0, 500) : null
      const nextTryAt = new Date(now().getTime() + waitMs(tries))
      await tx.update(mail).set({ tries, nextTryAt, failed }).where(eq(mail.id, letter.id))
      onFailure?.(error, tries)
    }
    return true
  })
}
