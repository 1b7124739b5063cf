import { createHash, randomBytes } from 'node:crypto'
import { and, eq, isNull, sql } from 'drizzle-orm'
import type { ShootId, StudioId } from '#shared/ids.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { invitation } from '#server/db/schema/people.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { studio } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'

export const INVITATION_DAYS = 7
const DAY_MS = 24 * 3600 * 1000

export type InvitationRow = typeof invitation.$inferSelect

/** A fresh token of 256 bits for a letter, and what is stored of it. */
export function newToken(): { token: string; tokenHash: Uint8Array } {
  const token = randomBytes(32).toString('base64url')
  return { token, tokenHash: hashOf(token) }
}

export function hashOf(token: string): Uint8Array {
  return createHash('sha256').update(token).digest()
}

export function expiryFrom(at: Date): Date {
  return new Date(at.getTime() + INVITATION_DAYS * DAY_MS)
}

export function joinUrl(publicUrl: string, token: string): string {
  return `${publicUrl}/join/${token}`
}

/** The invitation a letter's token belongs to; `lock` holds its row until the transaction ends. @throws NOT_FOUND */
export async function getInvitationByToken(db: Db | Tx, token: string, lock = false): Promise<InvitationRow> {
  const query = db
    .select()
    .from(invitation)
    .where(eq(invitation.tokenHash, hashOf(token)))
  const [row] = await (lock ? query.for('update') : query)
  if (!row) {
    throw new AppError(
      'NOT_FOUND',
      'This invitation is not known. Perhaps the link broke on its way, or a newer letter replaced it: look for the newest one, or ask for another.',
    )
  }
  return row
}

/** @throws GONE with a sentence that says why it cannot be used any more */
export function requireOpen(row: InvitationRow, at: Date): void {
  if (row.revokedAt) throw new AppError('GONE', 'This invitation was withdrawn. Ask whoever invited you for a new one.')
  if (row.acceptedAt) throw new AppError('GONE', 'This invitation has been used. Sign in to open what it was for.')
  if (row.expiresAt <= at)
    throw new AppError(
      'GONE',
      `This invitation is more than ${INVITATION_DAYS} days old and has expired. Ask whoever invited you to send it again.`,
    )
}

/** What the invitation is into. */
export async function titleOf(
  db: Db | Tx,
  row: Pick<InvitationRow, 'shootId' | 'studioId'>,
): Promise<{ kind: 'shoot' | 'studio'; title: string }> {
  if (row.shootId) {
    const [found] = await db.select({ title: shoot.title }).from(shoot).where(eq(shoot.id, row.shootId))
    return { kind: 'shoot', title: found?.title ?? '' }
  }
  const [found] = row.studioId
    ? await db.select({ title: studio.name }).from(studio).where(eq(studio.id, row.studioId))
    : []
  return { kind: 'studio', title: found?.title ?? '' }
}

/** Whether an invitation for this address into this shoot or studio waits to be accepted, expired or not. */
export async function findWaiting(
  tx: Tx,
  home: { shootId: ShootId } | { studioId: StudioId },
  email: string,
): Promise<InvitationRow | undefined> {
  const into = 'shootId' in home ? eq(invitation.shootId, home.shootId) : eq(invitation.studioId, home.studioId)
  const [row] = await tx
    .select()
    .from(invitation)
    .where(and(into, eq(invitation.email, email), isNull(invitation.acceptedAt), isNull(invitation.revokedAt)))
  return row
}

/** The person with this address, whatever its case. */
export async function findPersonByEmail(db: Db | Tx, email: string): Promise<typeof user.$inferSelect | undefined> {
  const [row] = await db
    .select()
    .from(user)
    .where(eq(sql`lower(${user.email})`, email.toLowerCase()))
  return row
}
