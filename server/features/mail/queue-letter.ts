import { randomUUID } from 'node:crypto'
import type { Db, Tx } from '#server/db/client.ts'
import { mail } from '#server/db/schema/mail.ts'
import type { Letter } from './letters.ts'

/** Puts a letter into the queue, in the transaction that causes it: it goes if and only if that commits. */
export async function queueLetter(tx: Db | Tx, letter: Letter): Promise<void> {
  await tx.insert(mail).values({ id: randomUUID(), ...letter })
}
