import { and, eq, ne } from 'drizzle-orm'
import type { ShootId, UserId } from '#shared/ids.ts'
import type { Tx } from '#server/db/client.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { AppError } from '#server/errors.ts'

/** A shoot is never without a photographer; call it under the shoot's lock. @throws CONFLICT */
export async function requireAnotherPhotographer(tx: Tx, shootId: ShootId, besides: UserId): Promise<void> {
  const others = await tx
    .select({ userId: shootMember.userId })
    .from(shootMember)
    .where(and(eq(shootMember.shootId, shootId), eq(shootMember.role, 'photographer'), ne(shootMember.userId, besides)))
    .limit(1)
  if (others.length === 0) {
    throw new AppError(
      'CONFLICT',
      'A shoot needs a photographer, and this is the only one. Nothing was changed; make somebody else photographer first, or remove the whole shoot.',
    )
  }
}
