import type { UserId } from '#shared/ids.ts'
import type { Db, Tx } from '#server/db/client.ts'
import type { Documents } from '#server/adapters/documents.ts'

/** Who asks. A signed-out person is null. */
export type Actor = { userId: UserId; name: string; email: string }

/** A verb's world: the database or an open transaction, who asks, the clock, and the outside behind small interfaces. */
export type Ctx = {
  db: Db | Tx
  actor: Actor | null
  now: () => Date
  documents: Documents
  /** Address of the program as people reach it, without a slash at the end; for links in letters. */
  publicUrl: string
}
