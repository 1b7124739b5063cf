import { randomUUID } from 'node:crypto'
import type { ShootId, StudioId, UserId } from '#shared/ids.ts'
import type { Tx } from './client.ts'
import { auditEvent } from './schema/people.ts'

type AuditEvent = {
  shootId?: ShootId
  studioId?: StudioId
  userId: UserId | null
  what: string
  subject?: string
  at: Date
}

/** Notes who did what to whose rights, in the transaction that did it. `subject` is an id, never a name or an address. */
export async function audit(tx: Tx, event: AuditEvent): Promise<void> {
  await tx.insert(auditEvent).values({ id: randomUUID(), ...event })
}
